package viz

import (
	"fmt"
	"math"
	"strings"
	"time"
)

// clock writes moments of a run for people: wall clock when the plant states a start, elapsed time otherwise.
type clock struct {
	start time.Time
	span  float64 // s, of the run; decides how finely moments are told
}

// side is to which side a moment is rounded.
type side int

const (
	earlier side = iota // "not later than": down
	later               // "not before", durations: up
	near                // moments of peaks
)

// grain is the resolution, s: whole minutes, seconds when the whole answer is under 10 minutes, finer under 10 s.
func (c clock) grain() float64 {
	switch {
	case c.span >= 600:
		return 60
	case c.span >= 10:
		return 1
	}
	return 0
}

func (c clock) round(s float64, to side) float64 {
	g := c.grain()
	if g == 0 {
		return s
	}
	const hair = 1e-6 // a moment computed a hair past the minute is on the minute
	switch to {
	case later:
		return g * math.Ceil(s/g-hair)
	case near:
		return g * math.Round(s/g)
	}
	return g * math.Floor(s/g+hair)
}

// Known reports whether moments are told by the wall clock: there is a start, and the run is neither too short nor too long for it.
func (c clock) Known() bool {
	return !c.start.IsZero() && c.span < 3e9 && (c.span >= 10 || c.span == 0)
}

// At writes the moment s after the start, rounded to a side.
func (c clock) At(s float64, to side) string {
	if !finite(s) {
		return none
	}
	if !c.Known() {
		return c.Span(s, to)
	}
	r := c.round(s, to)
	t := c.start.Add(time.Duration(math.Round(r*1000)) * time.Millisecond)
	layout := "15:04"
	if g := c.grain(); g == 1 {
		layout = "15:04:05"
	} else if g == 0 {
		layout = "15:04:05.000"
	}
	text := t.Format(layout)
	if d := days(c.start, t); d != 0 {
		text = fmt.Sprintf("%+dd %s", d, text)
	}
	return text
}

// Opt writes a moment that may never come.
func (c clock) Opt(s *float64, to side) string {
	if s == nil {
		return none
	}
	return c.At(*s, to)
}

// Day writes weekday and date of a moment; "" without a start.
func (c clock) Day(s float64) string {
	if !c.Known() || !finite(s) {
		return ""
	}
	return c.start.Add(time.Duration(s * float64(time.Second))).Format("Mon 2 Jan 2006")
}

// Both writes the moment and, in brackets, how long after the start it is.
func (c clock) Both(s float64, to side) string {
	if !c.Known() || !finite(s) {
		return c.At(s, to)
	}
	return c.At(s, to) + " (" + c.Span(s, to) + ")"
}

func days(a, b time.Time) int {
	day := func(t time.Time) time.Time { y, m, d := t.Date(); return time.Date(y, m, d, 0, 0, 0, 0, time.UTC) }
	return int(math.Round(day(b).Sub(day(a)).Hours() / 24))
}

// Span writes a duration: "1 h 20 min".
func (c clock) Span(s float64, to side) string {
	if !finite(s) {
		return none
	}
	sign := ""
	if s < 0 {
		sign, s = "−", -s
	}
	g := c.grain()
	if g == 0 || s != 0 && s < 600 && g == 60 && s != math.Trunc(s/60)*60 {
		if s >= 60 {
			return sign + parts(roundTo(s, 1, to))
		}
		if s >= 10 {
			return sign + digits(roundTo(s, 1, to), 3) + "\u00a0s"
		}
		return sign + digits(s, 3) + "\u00a0s"
	}
	return sign + parts(c.round(s, to))
}

func roundTo(s, g float64, to side) float64 {
	switch to {
	case later:
		return g * math.Ceil(s/g-1e-6)
	case near:
		return g * math.Round(s/g)
	}
	return g * math.Floor(s/g+1e-6)
}

// parts splits whole seconds into days, hours, minutes and seconds.
func parts(s float64) string {
	if s >= 1e15 {
		return digits(s, 3) + "\u00a0s"
	}
	n := int64(math.Round(s))
	var out []string
	for _, p := range []struct {
		name string
		size int64
	}{{"d", 86400}, {"h", 3600}, {"min", 60}, {"s", 1}} {
		if k := n / p.size; k > 0 {
			out = append(out, fmt.Sprintf("%d\u00a0%s", k, p.name))
			n -= k * p.size
		}
		if len(out) == 2 && out[0][len(out[0])-1] == 'd' {
			break
		}
	}
	if len(out) == 0 {
		return "0\u00a0min"
	}
	return strings.Join(out, " ")
}

func newClock(p Page) clock {
	return clock{start: p.Plant.Start, span: math.Max(p.Result.End, 0)}
}
