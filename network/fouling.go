package network

// addFouling watches the volumes after which lines get their extra loss.
func (w *watcher) addFouling(upsets []*Upset) {
	s := w.sim.sys
	for _, u := range upsets {
		i, ok := s.lineAt[u.Target]
		if u.Kind != ExtraLoss || !ok {
			continue
		}
		l := &s.lines[i]
		fired := false
		w.begun = append(w.begun, func() { fired = false })
		w.triggers = append(w.triggers, trigger{
			value: func(n *snapshot) float64 {
				f, _ := w.sim.led.passed(i, n.z[i])
				return f - u.After
			},
			active: func() bool { return !fired && u.After > 0 },
			dir:    1, sees: view{integrals: s.just(i)},
			fire: func(float64) {
				fired = true
				s.foul(l, u.Value)
			},
		})
	}
}

// unfouled is what a line was before it got its extra loss.
type unfouled struct {
	fwd, rev float64
	table    *flowTable
	floors   []float64
}

// foul gives a line the loss coefficient k, on its first bore, besides its own.
func (s *system) foul(l *line, k float64) {
	if l.clean == nil {
		l.clean = &unfouled{fwd: l.chain.fwd, rev: l.chain.rev, table: l.table}
		for i := range l.floors {
			l.clean.floors = append(l.clean.floors, l.floors[i].base)
		}
	}
	l.table = nil
	s.setLoss(l, k*velocityHead(s.fluid.Density, l.plan.endBore(false)))
}

// unfoul takes what foul gave away again.
func (s *system) unfoul(l *line) {
	if l.clean == nil {
		return
	}
	s.setLoss(l, 0)
	l.table, l.clean = l.clean.table, nil
}

// setLoss adds c, Pa/(m³/s)², to the losses of a clean line.
func (s *system) setLoss(l *line, c float64) {
	l.stale = true
	l.chain.fwd, l.chain.rev = l.clean.fwd+c, l.clean.rev+c
	for i := range l.floors {
		f := &l.floors[i]
		f.base = l.clean.floors[i] + c
		f.up.fwd, f.up.rev = f.base, f.base
	}
}
