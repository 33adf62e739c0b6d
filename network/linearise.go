package network

import (
	"math"

	"headfall/integrate"
)

// teeStiffness is added to the slopes of every line at a tee, m³/(s·Pa), alike in all rows so that the balance stays exact: nothing against any
// open path, but where one-way ends just take up flow, or all is shut, it keeps a pressure that means nothing from being thrown about. A pump of a
// steady rate hardly answers to pressure: tees that it drives go without (freezeDriven).
const teeStiffness = 1e-12

// Linearise fills f and g with all their partial derivatives: each line's block by its own end conditions, chained to the unknowns and
// scattered into the slots.
func (s *system) Linearise(t float64, y, f, g []float64, lin *integrate.Linear) {
	clear(lin.DfDy)
	clear(lin.DgDy)
	clear(lin.DfDt)
	clear(lin.DgDt)
	s.look(t, y)
	clear(f)
	clear(g[len(s.lines):])
	s.busy = len(s.lines)
	for i := range s.tees {
		s.tees[i].ease, s.tees[i].direct, s.tees[i].through = 0, 0, 0
	}
	for _, list := range [2][]int32{s.wide, s.odd} {
		for _, i := range list {
			s.addVessel(int(i), t, f, g, lin)
			s.lineariseVessel(int(i), lin)
		}
	}
	s.linearisePlain(f, g, lin)
	for _, i := range s.rest {
		s.lineariseLine(int(i), f, g, lin)
	}
	s.lineariseTees(f, lin)
}

// lineariseLine adds the flow of line i and its partials.
func (s *system) lineariseLine(i int, f, g []float64, lin *integrate.Linear) {
	l, sl := &s.lines[i], &s.slot[i]
	a, b := s.see(&l.from), s.see(&l.to)
	l.evaluate(&a, &b, s.gamma)
	g[i] = l.q
	if l.gmin > 0 {
		l.byA, l.byB = l.byA+l.stiff, l.byB-l.stiff
		s.ease(l)
	}
	d := [5]float64{l.byA*a.phiV + l.byYa*a.depV, l.byA * a.phiN, l.byB*b.phiV + l.byYb*b.depV, l.byB * b.phiN, l.byQ}
	if l.from.kind == toTee {
		d[0] = l.byA
	}
	if l.to.kind == toTee {
		d[2] = l.byB
	}
	dt := l.byT + l.byA*a.phiT + l.byB*b.phiT
	if sl.from >= 0 {
		f[sl.from] -= l.q
		lin.DfDt[sl.from] -= dt
	}
	if sl.to >= 0 {
		f[sl.to] += l.q
		lin.DfDt[sl.to] += dt
	}
	for k, v := range d {
		if sl.inZ[k] < 0 {
			continue
		}
		lin.DgDy[sl.inZ[k]] = v
		if p := sl.inFrom[k]; p >= 0 {
			lin.DfDy[p] -= v
		}
		if p := sl.inTo[k]; p >= 0 {
			lin.DfDy[p] += v
		}
	}
	lin.DgDt[i] = dt
	if l.row >= 0 {
		s.lineariseOwn(i, &a, &b, f, lin)
	}
}

// ease adds a line's slope to the tees at its ends.
func (s *system) ease(l *line) {
	between := l.from.kind == toTee && l.to.kind == toTee
	if l.from.kind == toTee {
		s.tees[l.from.at].add(l.byA, l.byA-l.stiff, l.q, between)
	}
	if l.to.kind == toTee {
		s.tees[l.to.at].add(-l.byB, -l.byB-l.stiff, l.q, between)
	}
}

// add notes a line of the tee: its slope with and without what keeps it from nothing, its flow, and whether it leads to another tee.
func (t *teeSlots) add(slope, own, q float64, between bool) {
	t.ease += slope
	if !between {
		t.direct += own
	}
	t.through += math.Abs(q)
}

// lineariseVessel adds the partials of inflow, spill and vents of vessel i.
func (s *system) lineariseVessel(i int, lin *integrate.Linear) {
	st, r := &s.stations[i], &s.rims[i]
	lin.DfDt[i] += st.inflowRate
	if st.inflowZ >= 0 {
		lin.DgDt[st.inflowZ] = st.inflowRate
	}
	if st.spillV != 0 {
		lin.DfDy[r.own] -= st.spillV
		if r.other >= 0 {
			lin.DfDy[r.other] += st.spillV
		}
		lin.DgDy[r.z] = st.spillV
	}
	if st.massRow >= 0 {
		for k := range st.vents {
			v := &st.vents[k]
			_, byP := v.vent.Flow(st.gas, s.atmosphere, st.temp, &v.at)
			lin.DfDy[s.gasS[i].byV] += byP * st.gasV
			lin.DfDy[s.gasS[i].byM] += byP * st.gasN
		}
	}
}

// push5 returns the partials of an inertial line's dq/dt by its columns.
func (l *line) push5(a, b *end) [5]float64 {
	d := [5]float64{l.pushA*a.phiV + l.pushYa*a.depV, l.pushA * a.phiN, l.pushB*b.phiV + l.pushYb*b.depV, l.pushB * b.phiN, l.pushQ}
	if l.from.kind == toTee {
		d[0] = l.pushA
	}
	if l.to.kind == toTee {
		d[2] = l.pushB
	}
	return d
}

func (s *system) lineariseOwn(i int, a, b *end, f []float64, lin *integrate.Linear) {
	l, sl := &s.lines[i], &s.slot[i]
	f[l.row] = l.push
	lin.DfDt[l.row] = l.pushT + l.pushA*a.phiT + l.pushB*b.phiT
	for k, v := range l.push5(a, b) {
		if p := sl.inOwn[k]; p >= 0 {
			lin.DfDy[p] += v
		}
	}
}

// lineariseTees replaces the rows of tees whose balance is differentiated.
func (s *system) lineariseTees(f []float64, lin *integrate.Linear) {
	s.balanceTees(f)
	for _, k := range s.floating {
		lin.DfDy[k] -= groundStiffness
	}
	for i := range s.tees {
		t := &s.tees[i]
		if !t.slow {
			continue
		}
		for _, k := range t.lines {
			for _, p := range k.cols {
				if p >= 0 {
					lin.DfDy[p] = 0
				}
			}
		}
		lin.DfDt[s.teeRow+i] = 0
		for _, k := range t.lines {
			l := &s.lines[k.line]
			if l.shut {
				continue
			}
			w := k.sign
			a, b := s.see(&l.from), s.see(&l.to)
			for j, v := range l.push5(&a, &b) {
				if p := k.cols[j]; p >= 0 {
					lin.DfDy[p] += w * v
				}
			}
			lin.DfDt[s.teeRow+i] += w * (l.pushT + l.pushA*a.phiT + l.pushB*b.phiT)
		}
	}
}
