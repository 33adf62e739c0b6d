package network

// Reload takes over numbers of the plant that were changed since the model was compiled; the plant must have been made ready for them by Refresh or
// Touch. What Compile worked out from numbers is worked out again in place; the numbering of the unknowns, the pattern of their equations and the
// analysis of the matrix stay. Runs are then the same, to the bit, as those of a model compiled anew.
func (m *Model) Reload() error {
	s := m.sys
	s.fluid = m.plan.Liquid.Fluid()
	s.atmosphere = m.plan.Atmosphere
	s.gamma = s.fluid.Density * m.plan.Gravity
	for i := range s.stations {
		old := &s.stations[i]
		st := newStation(old.plan, m.plan)
		st.spillTo, st.massRow, st.inflowZ = old.spillTo, old.massRow, old.inflowZ
		s.stations[i] = st
	}
	for i := range s.outside {
		o := s.outside[i].plan
		s.outside[i] = beyond{}
		s.outside[i].init(o, s)
	}
	s.actuators = s.actuators[:0]
	for i := range s.lines {
		if err := s.recompile(i); err != nil {
			return err
		}
		if l := &s.lines[i]; (l.inertia > 0) != (l.row >= 0) { // an unknown came or went
			return m.anew()
		}
	}
	s.meetOutside()
	s.addAirways()
	s.linkAirways()
	s.shareTables()
	return m.lookAnew()
}

// recompile compiles line i again where it stands, in the room that it had.
func (s *system) recompile(i int) error {
	l := &s.lines[i]
	plan, row, c := l.plan, l.row, &l.chain
	*l = line{locals: l.locals[:0], acts: l.acts[:0], ranged: l.ranged[:0],
		chain: chain{parts: c.parts[:0], locals: c.locals[:0], others: c.others[:0], otherPlace: c.otherPlace[:0]}}
	err := s.compileLine(l, plan, i)
	l.row = row
	return err
}

// lookAnew makes what watches runs again, and gives what observes them the bounds that follow from numbers.
func (m *Model) lookAnew() (err error) {
	if m.sim == nil {
		return nil
	}
	m.sim.obs.readNumbers()
	m.sim.watch, err = newWatcher(m.sim)
	return err
}

// anew compiles from the beginning.
func (m *Model) anew() error {
	fresh, err := Compile(m.plan, m.opt)
	if err != nil {
		return err
	}
	*m = *fresh
	return nil
}
