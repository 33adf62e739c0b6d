package network

// ventStart returns the opening of a high point's vent at the start.
func (sim *simulation) ventStart(a *actuator) float64 {
	l := &sim.sys.lines[a.line]
	for i := range l.crowns {
		if c := &l.crowns[i]; c.plan.Vent.Tag == a.tag && c.plan.Vent.Open {
			return 1
		}
	}
	return 0
}
