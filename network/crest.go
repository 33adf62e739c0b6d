package network

import (
	"math"

	"headfall/elements"
)

// spill is the flow over a weir: from the surface over its own crest, and with parts after it no more than they carry away from a free
// surface at the crest, under the gas pressure of the vessel.
func (l *line) spill(a, b *end, gamma float64) {
	if len(l.chain.parts) == 0 && l.chain.fwd == 0 {
		l.overCrest(a, b, gamma)
		return
	}
	q, byH, _ := l.weir.Spill(a.depth, never, l.weirAt)
	if q <= 0 {
		l.q = 0
		return
	}
	drive, turn := elements.Join(a.phi-gamma*a.depth-b.phi-l.zero, joinHead*gamma)
	if drive <= 0 {
		l.q = 0
		return
	}
	c, s := l.flowAt(drive + l.zero)
	v, byQ, byC := elements.Min(q, c)
	by := byC * s * turn
	l.q, l.byA, l.byYa, l.byB = v, by, byQ*byH-by*gamma, -by
	l.byT = byC * l.openingRate(c, s)
}

// overCrest is the flow over a weir from one free surface to another, each under its own gas pressure. Liquid h over the crest that is pressed by δ more
// head of gas than the other side leaves through the depth h only:
//
//	Q = W(h + δ, h_d) − W(δ, h_d)
//
// W the law of the weir for heads h, h_d, m, on its two sides, 0 for heads of 0 or less, δ counted from 0 and no more than h + δ; for a rectangular weir that is
// the integral of the strips' discharge over the depth. It is nothing from an empty vessel, whatever the gas does, and W(h, h_d) at equal pressures.
func (l *line) overCrest(a, b *end, gamma float64) {
	h := a.depth
	hd, gas, vessel := never, l.to.air, l.to.kind == toVessel
	switch {
	case vessel:
		hd = b.depth + l.to.invert - l.crestZ
		gas = b.phi - gamma*(b.depth+l.to.invert)
		if b.depth < 0 {
			hd = never
		}
	case b.depth != never:
		hd = (b.phi-l.to.air)/gamma - l.crestZ
	}
	extra := (a.phi - gamma*(h+l.crestZ) - gas) / gamma
	if math.Abs(extra) < 1e-9 { // rounding of the pressures
		extra = 0
	}
	var byH, byHd, byE float64 // by h, hd and extra head
	if h+extra >= hd {
		l.q, byH, byHd, byE = l.pressed(h, hd, extra)
	} else {
		l.q, byHd, byH, byE = l.pressed(hd, h, -extra)
		l.q, byH, byHd = -l.q, -byH, -byHd // −∂/∂(−extra) = +
		if vessel {                        // a floor over the crest: its last liquid does not leave at once
			w, dw := l.to.inlet.wet(b.depth)
			byH, byHd, byE = byH*w, byHd*w+l.q*dw, byE*w
			l.q *= w
		}
	}
	// extra = (phi_a − phi_b)/γ − h + depth_b and constants, for a vessel; without phi_b and depth_b, for others.
	l.byA, l.byYa = byE/gamma, byH-byE
	switch {
	case vessel:
		l.byB, l.byYb = -byE/gamma, byHd+byE
	default:
		l.byB = byHd / gamma
	}
}

// pressed returns W(h + extra, hd) − W(min(extra, h+extra), hd) and its partials.
func (l *line) pressed(h, hd, extra float64) (q, byH, byHd, byE float64) {
	if h <= 0 || h+extra <= 0 {
		return 0, 0, 0, 0
	}
	q, byH, byHd = l.weir.Spill(h+extra, hd, l.weirAt)
	byE = byH
	if extra > 0 && extra > hd {
		q0, by0, byHd0 := l.weir.Spill(extra, hd, l.weirAt)
		q, byHd, byE = q-q0, byHd-byHd0, byE-by0
	}
	return q, byH, byHd, byE
}
