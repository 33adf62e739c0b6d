package network

import "math"

// marks are the levels of one vessel at which something is to be told — a limit broken, an alarm, the vessel empty — at any time of the run. Between the
// nearest of them above and below nothing needs to be looked at; how near the level came follows from its extremes.
type marks struct {
	all, ahead   []*tracker // ahead: not come true yet
	above, below float64    // m, of those ahead: from where they are true
}

// sortTrackers separates the level marks from what is followed step by step.
func (o *observer) sortTrackers() {
	o.marks = make([]marks, len(o.level))
	o.summed = len(o.histories) > 0
	for _, m := range o.trackers {
		i := m.level()
		if i >= 0 && m.window == nil {
			o.marks[i].all = append(o.marks[i].all, m)
			continue
		}
		if i >= 0 {
			o.watched[i] = true
		}
		switch m.probe.subject {
		case Passed, Backflow, Spilled:
			o.summed = true
		}
		o.followed = append(o.followed, m)
	}
	for i := range o.marks {
		o.marks[i].ahead = make([]*tracker, 0, len(o.marks[i].all))
	}
}

func (o *observer) beginMarks() {
	for i := range o.marks {
		b := &o.marks[i]
		b.ahead = append(b.ahead[:0], b.all...)
		b.near()
	}
}

// near finds the nearest of those ahead.
func (b *marks) near() {
	b.above, b.below = math.Inf(1), math.Inf(-1)
	for _, m := range b.ahead {
		switch at := m.probe.bound + m.sign*m.slack; { // NaN where there is no such level
		case m.sign > 0 && at < b.above:
			b.above = at
		case m.sign < 0 && at > b.below:
			b.below = at
		}
	}
}

// startMarks takes the marks that are passed just after something acted.
func (o *observer) startMarks() {
	for i := range o.marks {
		if b, h := &o.marks[i], o.now.level[i]; h > b.above || h < b.below {
			b.pass(func(m *tracker) { m.see(m.sign*(h-m.probe.bound), o.now.t) })
		}
	}
}

// passMarks finds when the marks were passed that the step just taken has passed.
func (o *observer) passMarks() {
	for i := range o.level {
		if e, b := &o.level[i], &o.marks[i]; e.high > b.above || e.low < b.below {
			b.pass(func(m *tracker) {
				m.on = true
				m.v = [3]float64{o.prev.level[i] - m.probe.bound, o.mid.level[i] - m.probe.bound, o.now.level[i] - m.probe.bound}
				m.step(o)
				if top := math.Max(m.sign*e.high, m.sign*e.low); top-m.sign*m.probe.bound > m.slack && math.IsNaN(m.first) {
					m.first = o.now.t // between two looks, and gone by the second
				}
			})
		}
	}
}

// pass hands the marks ahead to see, and drops those that have come true.
func (b *marks) pass(see func(*tracker)) {
	kept := b.ahead[:0]
	for _, m := range b.ahead {
		if see(m); math.IsNaN(m.first) {
			kept = append(kept, m)
		}
	}
	b.ahead = kept
	b.near()
}

// finishMarks tells how near the levels came to their marks, or how deep beyond.
func (o *observer) finishMarks() {
	for i := range o.marks {
		e := &o.level[i]
		for _, m := range o.marks[i].all {
			m.most, m.mostAt = e.high-m.probe.bound, e.highAt
			if m.sign < 0 {
				m.most, m.mostAt = m.probe.bound-e.low, e.lowAt
			}
		}
	}
}
