package scenarios

import (
	"fmt"
	"strings"

	"headfall/elements"
	"headfall/elements/quantity"
	"headfall/network"
)

// subject is one thing a condition may look at.
type subject struct {
	key     string
	is      network.Subject
	dim     quantity.Dim
	help    string
	classes []class
	unbound bool // it has no bound: it happens or not
}

var subjects = []subject{
	{"level", network.Level, quantity.Length, "level of a vessel above its base, or per cent of its gauge", []class{aVessel}, false},
	{"flow", network.Flow, quantity.Flow, "flow of a line, positive from its `from` to its `to`; or all that enters an outside point", []class{aLine, anOutside}, false},
	{"velocity", network.Velocity, quantity.Velocity, "velocity in a line", []class{aLine}, false},
	{"pressure", network.Pressure, quantity.Pressure, "gas pressure of a covered vessel", []class{aVessel}, false},
	{"crest", network.CrestHead, quantity.Head, "gauge pressure head at the high point of a line", []class{aLine}, false},
	{"opening", network.Opening, quantity.Ratio, "travel of a valve", []class{aValve}, false},
	{"difference", network.Difference, quantity.Length, "of the surface elevations of two vessels, the first less the second", []class{aVessel}, false},
	{"rising", network.Rising, quantity.Velocity, "how fast a level rises", []class{aVessel}, false},
	{"falling", network.Falling, quantity.Velocity, "how fast a level falls", []class{aVessel}, false},
	{"passed", network.Passed, quantity.Volume, "volume that passed a line forwards, or entered an outside point", []class{aLine, anOutside}, false},
	{"backflow", network.Backflow, quantity.Volume, "volume that passed a line backwards", []class{aLine}, false},
	{"spilled", network.Spilled, quantity.Volume, "volume that went over the rim of a vessel", []class{aVessel}, false},
	{"starts", network.Starts, quantity.Count, "starts of a pump", []class{aPump}, false},
	{"emptied", network.Emptied, quantity.Length, "a vessel that has drained to its empty_at", []class{aVessel}, true},
}

// bound is a condition as it is being read.
type bound struct {
	to           *network.Condition
	kind         *subject
	above, below *node
	vessel       *network.Vessel // a level's own vessel, of an alarm
	typo         bool            // the mapping had faults: what seems to be missing may be misspelt
}

// conditionFields are the keys that every condition has: one subject, one bound.
func (d *decoder) conditionFields(b *bound) []field {
	fields := make([]field, 0, len(subjects)+2)
	for i := range subjects {
		s := &subjects[i]
		style := aTag
		if s.is == network.Difference {
			style = aList
		}
		fields = append(fields, field{key: s.key, help: s.help, written: &writing{style: style, item: &writing{style: aTag}, least: 2}, read: func(n *node, _ string) {
			b.kind = s
			b.to.Subject = s.is
			b.to.Of = d.looksAt(n, s)
		}})
	}
	side := func(key, help string, to **node) field {
		return field{key: key, help: help, written: asText, read: func(n *node, _ string) { *to = n }}
	}
	return append(fields, side("above", "the bound: true, or held, when above it", &b.above), side("below", "the bound: true, or held, when below it", &b.below))
}

// looksAt reads the tag, or the two tags, of a subject.
func (d *decoder) looksAt(n *node, s *subject) []string {
	if s.is != network.Difference {
		return []string{d.refer(n, s.key, nil, s.classes...)}
	}
	if n.form != list || len(n.items) != 2 {
		d.problem(n, "difference is of two vessels", "e.g. difference: [T-1, T-2]")
		return nil
	}
	return []string{d.refer(n.items[0], s.key, nil, s.classes...), d.refer(n.items[1], s.key, nil, s.classes...)}
}

// finish reads the bound, whose dimension is known now, and reports whether the condition is whole.
func (d *decoder) finish(n *node, what string, b *bound) bool {
	b.to.Place = n.at
	if n.form != mapping {
		return false
	}
	count := 0
	for i := range subjects {
		if n.get(subjects[i].key) != nil {
			count++
		}
	}
	switch {
	case count > 1:
		d.problem(n, what+" looks at more than one thing", "write one for each")
		return false
	case b.kind == nil && b.vessel == nil:
		if count == 0 && !b.typo {
			d.problem(n, what+" looks at nothing", "e.g. {level: T-1, above: 1.2 m}")
		}
		return false
	case b.kind == nil:
		b.kind = &subjects[0]
		b.to.Subject, b.to.Of = network.Level, []string{b.vessel.Tag}
	}
	if b.kind.unbound {
		if side := first(b.above, b.below); side != nil {
			d.problem(side, b.kind.key+" has no bound", "")
		}
		return first(b.above, b.below) == nil
	}
	switch {
	case b.above != nil && b.below != nil:
		d.problem(n, what+" has two bounds", "write one with above and one with below")
		return false
	case b.above == nil && b.below == nil && b.typo:
		return false
	case b.above == nil && b.below == nil:
		d.problem(n, fmt.Sprintf("%s needs a bound: above or below", what), "e.g. below: 1.2 "+exampleUnit(b.kind.dim))
		return false
	}
	b.to.Above = b.above != nil
	return d.bound(first(b.above, b.below), b)
}

func first(a, b *node) *node {
	if a != nil {
		return a
	}
	return b
}

// bound reads the value of a bound.
func (d *decoder) bound(n *node, b *bound) bool {
	key := "below"
	if b.to.Above {
		key = "above"
	}
	if !d.text(n, key) {
		return false
	}
	b.to.Text = n.text
	if _, inShares := asShare(n.text); inShares && b.kind.is == network.Level {
		return d.gaugeBound(n, key, b)
	}
	v, ok := d.fixed(n, key, b.kind.dim)
	if !ok {
		return false
	}
	b.to.Bound = v.SI
	switch {
	case b.kind.is == network.Pressure && v.Gauge == quantity.None:
		d.problem(n, key+": a pressure here is over atmosphere, (g), or over vacuum, (a)", "write "+n.text+"(g) or "+n.text+"(a)")
		return false
	case b.kind.dim == quantity.Volume || b.kind.dim == quantity.Count:
		ok = d.check(n, key, v, []elements.Check{elements.NotNegative})
	case b.kind.is == network.Opening:
		ok = d.check(n, key, v, []elements.Check{elements.Share})
	}
	b.to.Gauge = v.Gauge == quantity.Gauge
	return ok
}

// asShare reads a text that is in per cent and nothing else.
func asShare(text string) (v quantity.Value, ok bool) {
	if !strings.Contains(text, "%") {
		return v, false
	}
	v, err := quantity.Parse(text, quantity.Ratio)
	return v, err == nil && v.Unit == "%"
}

// gaugeBound reads a level in per cent; the gauge is known when all vessels were read.
func (d *decoder) gaugeBound(n *node, key string, b *bound) bool {
	v, ok := d.fixed(n, key, quantity.Ratio)
	if !ok || len(b.to.Of) != 1 {
		return false
	}
	tag, to := b.to.Of[0], b.to
	d.after = append(d.after, func() {
		t := d.things[tag]
		if t == nil || t.vessel == nil {
			return // noted as unknown
		}
		if t.vessel.Gauge == nil {
			d.problem(n, fmt.Sprintf("%s: %s has no gauge, so its level has no per cent", key, tag), "write the level in m, or give the vessel a gauge")
			return
		}
		to.Bound = t.vessel.Gauge.Zero + v.SI*t.vessel.Gauge.Span
	})
	return true
}

// conditionField makes a field that holds a condition.
func (d *decoder) conditionField(p **network.Condition, key, help string) field {
	return field{key: key, help: help, written: &writing{style: aCondition}, read: func(n *node, _ string) {
		*p = d.condition(n, key)
	}}
}

// condition reads a condition that stands alone; nil when it had a fault.
func (d *decoder) condition(n *node, key string) *network.Condition {
	b := &bound{to: &network.Condition{}}
	b.typo = !d.mapping(n, key, "", d.conditionFields(b))
	if !d.finish(n, key, b) || b.typo {
		return nil
	}
	return b.to
}
