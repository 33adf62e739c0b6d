package text

import (
	"fmt"
	"math"
	"strings"
	"time"
)

// Clock writes moments, given in s from the start, as people speak of them: the clock first, what has gone by in brackets.
type Clock struct {
	Start time.Time // zero when the plan names no start; then only what has gone by is written
	Whole float64   // s, the length of the whole answer; from ten minutes on the clock shows whole minutes, as in the report. 0: it is not known
}

const (
	fine   = 600.0 // s: under ten minutes seconds count, from there on whole minutes
	second = 1.0
	minute = 60.0
	hour   = 3600.0
)

// face rounds a moment to what the clock shows.
func (c Clock) face(s float64, dir Dir) float64 {
	if c.Whole >= fine {
		return round(s, minute, dir)
	}
	return snap(s, dir)
}

// snap rounds a moment or a duration to what is read off a watch.
func snap(s float64, dir Dir) float64 {
	step := minute
	switch a := math.Abs(s); {
	case a < 20:
		step = 0.1
	case a < fine:
		step = second
	}
	return round(s, step, dir)
}

// When writes "06:41 (41 min)", or "41 min" without a start.
func (c Clock) When(s float64, dir Dir) string {
	gone := Duration(snap(s, dir), Near)
	if snap(s, dir) == 0 {
		gone = "start"
	}
	if c.Start.IsZero() {
		return gone
	}
	return c.At(s, dir) + " (" + gone + ")"
}

// At writes the clock alone: "06:41", "+1d 00:20"; without a start what has gone by.
func (c Clock) At(s float64, dir Dir) string {
	if c.Start.IsZero() {
		if s = snap(s, dir); s == 0 {
			return "start"
		}
		return Duration(s, Near)
	}
	s = c.face(s, dir)
	t := c.Start.Add(time.Duration(math.Round(s*1e3)) * time.Millisecond)
	form := "15:04"
	if t.Second() != 0 || t.Nanosecond() != 0 {
		form = "15:04:05"
	}
	if days := daysBetween(c.Start, t); days > 0 {
		return fmt.Sprintf("+%dd %s", days, t.Format(form))
	}
	return t.Format(form)
}

// Span writes "06:05 to 06:12".
func (c Clock) Span(from, to float64) string {
	a, b := c.At(from, Down), c.At(to, Up)
	if a == b {
		return a
	}
	return a + " to " + b
}

// Day writes the start in full: "Sat 2027-10-09 06:00"; "" without one.
func (c Clock) Day() string {
	if c.Start.IsZero() {
		return ""
	}
	return c.Start.Format("Mon 2006-01-02 15:04")
}

func daysBetween(a, b time.Time) int {
	day := func(t time.Time) time.Time { return time.Date(t.Year(), t.Month(), t.Day(), 0, 0, 0, 0, time.UTC) }
	return int(math.Round(day(b).Sub(day(a)).Hours() / 24))
}

// Duration writes "1 h 24 min", "7 min 46 s", "5.2 s".
func Duration(s float64, dir Dir) string {
	if unknowable(s) {
		return "-"
	}
	s = snap(s, dir)
	sign := ""
	if s < 0 {
		sign, s = "-", -s
	}
	if s < minute {
		return sign + strings.TrimSuffix(fmt.Sprintf("%.1f", s), ".0") + " s"
	}
	total := int(math.Round(s))
	return sign + join([]string{unless(total/3600, "h"), unless(total/60%60, "min"), unless(total%60, "s")}, " ")
}

// unless writes n with its unit, or nothing when n is 0.
func unless(n int, unit string) string {
	if n == 0 {
		return ""
	}
	return fmt.Sprintf("%d %s", n, unit)
}

// join puts what is not empty together.
func join(list []string, by string) string {
	var kept []string
	for _, s := range list {
		if s != "" {
			kept = append(kept, s)
		}
	}
	return strings.Join(kept, by)
}
