package scenarios

import (
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
