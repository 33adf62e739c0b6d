package scenarios

import (
	"fmt"
	"strings"

	"headfall/elements"
	"headfall/elements/quantity"
	"headfall/network"
)

// finish reads the bound, whose dimension is known now, and reports whether the condition is whole.
func (d *decoder) finish(n *node, what string, b *bound) bool {
	b.to.Place = n.at
	if n.form != mapping {
		return false
	}
	count := subjectsIn(n)
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
			d.problem(side, b.kind.key+" has no bound", "leave it out")
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
		d.problem(n, fmt.Sprintf("%s needs a bound: above or below", what), "e.g. below: "+d.usually(b.kind.key, b.kind.dim).example)
		return false
	}
	b.to.Above = b.above != nil
	return d.bound(first(b.above, b.below), b)
}

// subjectsIn counts what a condition looks at.
func subjectsIn(n *node) (count int) {
	for i := range subjects {
		if n.get(subjects[i].key) != nil {
			count++
		}
	}
	return count
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
	defer d.during(b.kind.key)()
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
