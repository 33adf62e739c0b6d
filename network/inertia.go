package network

import (
	"math"

	"headfall/elements"
)

// settleTime is the time, s, within which an inertial flow is brought under a limit of its ends: short against anything that is planned.
const settleTime = 1e-3

// carry is a line whose flow is an unknown of the plant: ρL/A·dq/dt = phi_from − phi_to − Σ Drop(q). What an end does not admit, or a check
// valve forbids, is taken off the flow within settleTime.
func (l *line) carry(a, b *end, gamma float64) {
	l.push, l.pushA, l.pushB, l.pushQ, l.pushYa, l.pushYb, l.pushT = 0, 0, 0, 0, 0, 0, 0
	if l.shut {
		l.q, l.byQ = 0, 0
		l.pushQ = -1 / settleTime
		l.push = -l.own / settleTime
		return
	}
	drop, slope := l.chain.drop(l.own)
	l.push = (a.phi - b.phi - drop) / l.inertia
	l.pushA, l.pushB = 1/l.inertia, -1/l.inertia
	l.pushQ = -slope / l.inertia
	for _, m := range l.moving {
		l.pushT -= m.rate * dropByOpening(l.chain.parts[m.part], l.own, l.chain.locals[m.part]) / l.inertia
	}
	l.q, l.byQ = l.own, 1
	onlyOn, onlyBack := l.oneWay || b.depth == never, a.depth == never
	if onlyOn || onlyBack {
		l.turnBack(onlyOn, onlyBack)
	}
	own, byOwn := l.q, l.byQ
	if own == 0 && byOwn == 0 {
		l.keepWhole()
		return
	}
	if own >= 0 {
		l.q, l.byQ, l.byYa = l.from.inlet.carried(a.depth, own, byOwn)
	} else {
		l.q, l.byQ, l.byYb = l.to.inlet.carried(b.depth, -own, byOwn)
		l.q, l.byYb = -l.q, -l.byYb
	}
	if over := own - l.q; math.Abs(over) > 0 {
		l.push -= over / settleTime
		l.pushQ -= (byOwn - l.byQ) / settleTime
		l.pushYa += l.byYa / settleTime
		l.pushYb += l.byYb / settleTime
	}
	l.keepWhole()
}

// keepWhole makes a line at a tee whose balance is differentiated pass its unknown and nothing else: only then does the tee keep no volume. Where an end
// admits less, or nothing may come back, the unknown is brought there within settleTime.
func (l *line) keepWhole() {
	if l.whole {
		l.q, l.byQ, l.byYa, l.byYb = l.own, 1, 0, 0
	}
}

// turnSpeed is the velocity, m/s, over which a one-way line with a mass of liquid takes up flow: 0.01 mm/s.
const turnSpeed = 1e-5

// turnBack lets the flow of the unknown x = own (or −own, where liquid may only come back) through one way only: q = Join(x), and below nothing it is held by
//
//	dx/dt += x²/2δτ²  for −δ < x < 0,  −(x + δ/2)/τ²  below,
//
// τ = settleTime, δ the flow at turnSpeed: once differentiable, and so stiff that x is nothing to speak of.
func (l *line) turnBack(onlyOn, onlyBack bool) {
	const k = 1 / (settleTime * settleTime)
	if onlyOn && onlyBack {
		l.push -= l.own / settleTime
		l.pushQ -= 1 / settleTime
		l.q, l.byQ = 0, 0
		return
	}
	x, sign := l.own, 1.0
	if onlyBack {
		x, sign = -x, -1
	}
	d := turnSpeed * math.Max(l.area, 1e-6)
	l.q, l.byQ = elements.Join(x, d)
	l.q *= sign
	switch {
	case x <= -d:
		l.push -= sign * k * (x + d/2)
		l.pushQ -= k
	case x < 0:
		l.push += sign * k * x * x / (2 * d)
		l.pushQ += k * x / d
	}
}

// carried returns what an inlet lets through at depth y of the flow q of an unknown, with the partials by the unknown, byOwn that of q, and by y.
func (l *inletLaw) carried(y, q, byOwn float64) (q1, by, byY float64) {
	if q == 0 || l.ample(y, q) {
		return q, byOwn, 0
	}
	q1, byQ, byY := l.admit(y, q)
	return q1, byOwn * byQ, byY
}
