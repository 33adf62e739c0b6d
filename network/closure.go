package network

import (
	"fmt"
	"math"

	"headfall/elements"
	"headfall/elements/quantity"
)

// waveSpeed is the speed of a pressure wave in a water-filled steel pipe, m/s. It only serves to screen closures; common practice, 900 to 1400 by
// wall and material, no source.
const waveSpeed = 1200

// screenedVelocity is the velocity, m/s, under which stopping the flow at once is not flagged.
const screenedVelocity = 0.3

// screenClosure flags a valve that shuts against a flow faster than a pressure wave runs to the end of its line and back, 2L/a: the pressure then
// rises by up to ρ·a·Δv (Joukowsky 1898). The program never gives that as a design pressure.
func (sim *simulation) screenClosure(k int, t float64) {
	s := sim.sys
	a := &s.actuators[k]
	if a.line < 0 || a.kind != aValve || a.to > 0 || a.from == 0 {
		return
	}
	l := &s.lines[a.line]
	length := 0.0
	for _, f := range l.plan.Parts {
		if p, ok := f.Part.(elements.Long); ok {
			length += p.Length()
		}
	}
	if l.area == 0 || math.Abs(l.q)/l.area < screenedVelocity {
		return
	}
	back := 2 * length / waveSpeed
	if took := a.t1 - a.t0; took >= back || length == 0 {
		return
	}
	f := sim.flag("fast_closure", a.tag, t, "close slowly, the last fifth slowest")
	switch {
	case f == nil:
	case a.valve.Stroke == 0:
		f.Says = fmt.Sprintf("%s has no stroke time and shuts at once against a flow in %s: state its stroke; a quick closure needs a surge study", a.tag, l.plan.Tag)
	default:
		f.Says = fmt.Sprintf("%s shuts in %s, faster than a pressure wave runs through %s and back (%s): it needs a surge study", a.tag,
			quantity.FormatDuration(a.t1-a.t0), l.plan.Tag, quantity.FormatDuration(back))
	}
}
