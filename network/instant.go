package network

// The functions below look at one line or vessel at a time within the last step, without the rest of the plant.

// lookAt sets vessel i as at time t.
func (sim *simulation) lookAt(i int, t float64) *station {
	st := &sim.sys.stations[i]
	m := st.mass
	if st.massRow >= 0 {
		m = sim.solver.EvalOne(int(st.massRow), t)
	}
	st.look(sim.solver.EvalOne(i, t), m)
	return st
}

func (sim *simulation) gasAt(i int, t float64) float64   { return sim.lookAt(i, t).gas }
func (sim *simulation) spillAt(i int, t float64) float64 { return sim.lookAt(i, t).spill }

// flowAt returns the flow of line i at time t within the last step.
func (sim *simulation) flowAt(i int, t float64) float64 {
	s := sim.sys
	l := &s.lines[i]
	s.y = sim.obs.y
	for _, m := range []*mouth{&l.from, &l.to} {
		switch m.kind {
		case toVessel:
			sim.lookAt(m.at, t)
		case toTee:
			s.y[s.teeRow+m.at] = sim.solver.EvalOne(s.teeRow+m.at, t)
		case toWater:
			b := &s.outside[m.at]
			b.surface = b.start + b.rate*(t-s.t0)
		}
	}
	for _, m := range l.moving {
		l.locals[m.local].Opening = s.actuators[m.actuator].at(t)
	}
	if l.row >= 0 {
		l.own = sim.solver.EvalOne(int(l.row), t)
	}
	a, b := s.see(&l.from), s.see(&l.to)
	l.evaluate(&a, &b, s.gamma)
	return l.q
}

// turn returns when the flow of line i changes its sign between t0 and t1: by the polynomial of its integral, whose error does not move what passed each
// way, or by the law where that has no turn there.
func (sim *simulation) turn(i int, t0, t1, q0, q1 float64) float64 {
	if d := sim.solver.Dense(); (d.RateZ(i, t0) < 0) == (q0 < 0) && (d.RateZ(i, t1) < 0) == (q1 < 0) {
		return d.TurnZ(i, t0, t1)
	}
	return turning(t0, t1, q0, q1, 1e-9, func(t float64) float64 { return sim.flowAt(i, t) })
}
