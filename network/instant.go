package network

import "math"

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
	s, d, y := sim.sys, sim.solver.Dense(), sim.obs.y
	for _, c := range s.slot[i].cols {
		if c >= 0 {
			y[c] = d.One(int(c), t)
		}
	}
	return s.lookAlong(i, t, y)
}

// lookAlong returns the flow of line i at (t, y); of y only what the line sees at its ends need be set, and its own flow where that is an unknown.
func (s *system) lookAlong(i int, t float64, y []float64) float64 {
	l := &s.lines[i]
	s.y = y
	for _, m := range [2]*mouth{&l.from, &l.to} {
		switch m.kind {
		case toVessel:
			s.lookInto(m.at, y)
		case toWater:
			b := &s.outside[m.at]
			b.surface = b.start + b.rate*(t-s.t0)
		}
	}
	for _, m := range l.moving {
		l.locals[m.local].Opening = s.actuators[m.actuator].at(t)
	}
	if l.row >= 0 {
		l.own = y[l.row]
	}
	a, b := s.see(&l.from), s.see(&l.to)
	l.evaluate(&a, &b, s.gamma)
	return l.q
}

// floorAt returns the total pressure at the floor of open vessel i at time t within the last step.
func (sim *simulation) floorAt(i int, t float64) float64 {
	v := sim.solver.EvalOne(i, t)
	if b := &sim.sys.basins[i]; b.holds(v) {
		return b.press + b.byV*v
	}
	st := sim.lookAt(i, t)
	return st.gas + sim.sys.gamma*st.surface
}

// turn returns when the flow of line i changes its sign between t0 and t1: by the polynomial of its integral, whose error does not move what passed each
// way, or by the law where that has no turn there. Where next to nothing passes meanwhile, as if the flow changed steadily.
func (sim *simulation) turn(i int, t0, t1, q0, q1 float64) float64 {
	if q := math.Max(math.Abs(q0), math.Abs(q1)); q < restFlow || q*(t1-t0) < littlePassed {
		return t0 + (t1-t0)*(q0/(q0-q1))
	}
	if d := sim.solver.Dense(); (d.RateZ(i, t0) < 0) == (q0 < 0) && (d.RateZ(i, t1) < 0) == (q1 < 0) {
		return d.TurnZ(i, t0, t1)
	}
	if l := &sim.sys.lines[i]; sim.sys.isPlain(l) { // it turns with the pressure between its ends, which is smoother
		drop := func(t float64) float64 { return sim.floorAt(l.from.at, t) - sim.floorAt(l.to.at, t) }
		if a, b := drop(t0), drop(t1); a*b < 0 {
			return turning(t0, t1, a, b, 1e-9, drop)
		}
	}
	return turning(t0, t1, q0, q1, 1e-9, func(t float64) float64 { return sim.flowAt(i, t) })
}

// littlePassed is a volume, m³, that is no matter for the books: ten microlitres.
const littlePassed = 1e-8
