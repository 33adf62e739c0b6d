package scenarios

import (
	"math"
	"regexp"
	"strings"
	"time"

	"headfall/elements"
	"headfall/elements/quantity"
	"headfall/network"
)

const day = 86400 // s

// clockLike are times of day as they are not written here: 6 pm, 6h30.
var clockLike = regexp.MustCompile(`(?i)^\s*\d{1,2}(\s*[ap]\.?m\.?|\s*h\s*\d{2})\s*$`)

// moment reads a clock time, a date with time, or a duration from the start.
func (d *decoder) moment(n *node, key string) (m network.Moment, ok bool) {
	if !d.text(n, key) {
		return m, false
	}
	m = network.Moment{Text: strings.TrimSpace(n.text), Given: true}
	if !strings.ContainsRune(n.text, ':') && !clockLike.MatchString(n.text) {
		m.S, ok = d.elapsed(n, key)
		return m, ok
	}
	m.Clock = true
	if t, err := quantity.ParseDateTime(n.text); err == nil {
		m.S, ok = d.dated(n, key, t)
		return m, ok
	}
	c, err := quantity.ParseClock(n.text)
	if err != nil {
		d.badText(n, key, err)
		return m, false
	}
	if !d.hasStart(n, key) {
		return m, false
	}
	if m.S = c.Elapsed(d.plant.Start); m.S < 0 { // earlier than the start: the next day's
		m.S += day
	}
	return m, true
}

// elapsed reads a duration from the start.
func (d *decoder) elapsed(n *node, key string) (float64, bool) {
	v, err := quantity.ParseTime(n.text)
	if err != nil {
		d.badValue(n, key, quantity.Time, err)
		return 0, false
	}
	switch {
	case v.Doubt.Stated():
		d.problem(n, key+": a moment carries no doubt", "write one time")
	case !(v.SI >= 0) || math.IsInf(v.SI, 0):
		d.problem(n, key+" lies before the start", "times are counted from the start on, e.g. 20 min")
	default:
		n.echo = v.Echo()
		return v.SI, true
	}
	return 0, false
}

func (d *decoder) dated(n *node, key string, t time.Time) (float64, bool) {
	if !d.hasStart(n, key) {
		return 0, false
	}
	s := t.Sub(d.plant.Start).Seconds()
	if s < 0 {
		d.problem(n, key+" lies before the start", "the start is "+quantity.FormatDateTime(d.plant.Start))
		return 0, false
	}
	return s, true
}

// hasStart notes a clock time in a file that has none to begin with.
func (d *decoder) hasStart(n *node, key string) bool {
	if d.plant.Start.IsZero() {
		d.problem(n, key+": a clock time needs the clock time of the start", `add start: "2027-10-09 06:00" to the file, or write the time from the start, e.g. 20 min`)
		return false
	}
	return true
}

// momentField makes a field for a moment; one of a thing with a tag is a number of the plant.
func (d *decoder) momentField(m *network.Moment, key string, need elements.Need, help string) field {
	return field{key: key, need: need, help: help, written: asMoment, read: func(n *node, owner string) {
		v, ok := d.moment(n, key)
		if !ok {
			return
		}
		*m = v
		if owner != "" {
			d.register(n, owner, key, quantity.Value{SI: m.S, Dim: quantity.Time}, &m.S, []elements.Check{elements.NotNegative})
		}
	}}
}

// hours reads a pair of clock times between which something is permitted, every day.
func (d *decoder) hours(n *node, key string, m *[2]network.Moment) bool {
	if n.form != list || len(n.items) != 2 {
		d.problem(n, key+" is two clock times", `e.g. ["06:00", "22:00"]`)
		return false
	}
	for i, item := range n.items {
		v, ok := d.moment(item, key)
		if ok && !v.Clock {
			d.problem(item, key+" is two clock times", `e.g. ["06:00", "22:00"]`)
		}
		if !ok || !v.Clock {
			return false
		}
		v.S = math.Mod(v.S, day)
		m[i] = v
	}
	if m[0].S == m[1].S {
		d.problem(n, key+" begins and ends at one time", `e.g. ["06:00", "22:00"]`)
		return false
	}
	return true
}
