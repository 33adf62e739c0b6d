package network

import "math"

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
	forbidden := l.own < 0 && (l.oneWay || b.depth == never) || l.own > 0 && a.depth == never
	if forbidden {
		const k = 1 / (settleTime * settleTime)
		l.push -= k * l.own
		l.pushQ -= k
		l.q, l.byQ = 0, 0
		return
	}
	if l.own >= 0 {
		l.q, l.byQ, l.byYa, _ = l.admit(&l.from.inlet, a.depth, l.own, 1, 0)
	} else {
		l.q, l.byQ, l.byYb, _ = l.admit(&l.to.inlet, b.depth, -l.own, 1, 0)
		l.q, l.byYb = -l.q, -l.byYb
	}
	if over := l.own - l.q; math.Abs(over) > 0 {
		l.push -= over / settleTime
		l.pushQ -= (1 - l.byQ) / settleTime
		l.pushYa += l.byYa / settleTime
		l.pushYb += l.byYb / settleTime
	}
}
