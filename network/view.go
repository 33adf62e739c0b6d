package network

// view is what of the plant is looked at: all of it, or vessels, the flows of lines with what they see at their ends, and what lines and vessels have passed.
type view struct {
	whole     bool
	vessels   []int32
	lines     []int32
	integrals []int32
}

// just is the list of one vessel, line or integral.
func (s *system) just(i int) []int32 { return s.ids[i : i+1 : i+1] }

// views returns what a condition looks at.
func (p *probe) views(s *system) (v view) {
	var at []int32
	if len(p.at) == 1 && p.outside == nil {
		at = s.just(p.at[0])
	} else {
		for _, list := range [2][]int{p.at, p.outside} {
			for _, i := range list {
				at = append(at, int32(i))
			}
		}
	}
	switch p.subject {
	case Level, Emptied, Difference, Pressure:
		v.vessels = at
	case Flow, Velocity, CrestHead:
		v.lines = at
	case Passed, Backflow:
		v.integrals = at
	case Spilled:
		for _, i := range at {
			v.integrals = append(v.integrals, int32(len(s.lines))+i)
		}
	case Opening, Starts:
	default:
		v.whole = true
	}
	return v
}

// viewer gathers what several functions look at, each thing once.
type viewer struct {
	view
	reads                    []int32 // the unknowns that it takes; nil for all
	unknowns, lines, vessels []bool  // those that are in it
}

func newViewer(s *system) *viewer {
	v := &viewer{unknowns: make([]bool, s.n), lines: make([]bool, len(s.lines)), vessels: make([]bool, len(s.stations))}
	v.view = view{vessels: make([]int32, 0, len(s.stations)), lines: make([]int32, 0, len(s.lines))}
	v.reads = make([]int32, 0, s.n)
	return v
}

func (v *viewer) begin() {
	for _, i := range v.reads {
		v.unknowns[i] = false
	}
	for _, i := range v.view.lines {
		v.lines[i] = false
	}
	for _, i := range v.view.vessels {
		v.vessels[i] = false
	}
	v.whole, v.view.vessels, v.view.lines, v.integrals, v.reads = false, v.view.vessels[:0], v.view.lines[:0], v.integrals[:0], v.reads[:0]
}

// add takes in what one function looks at.
func (v *viewer) add(s *system, w *view) {
	v.whole = v.whole || w.whole
	for _, i := range w.vessels {
		if !v.vessels[i] {
			v.vessels[i] = true
			v.view.vessels = append(v.view.vessels, i)
			v.read(i)
			v.read(s.stations[i].massRow)
		}
	}
	for _, i := range w.lines {
		if !v.lines[i] {
			v.lines[i] = true
			v.view.lines = append(v.view.lines, i)
			for _, c := range s.slot[i].cols {
				v.read(c)
			}
		}
	}
	v.integrals = append(v.integrals, w.integrals...)
}

func (v *viewer) read(unknown int32) {
	if unknown >= 0 && !v.unknowns[unknown] {
		v.unknowns[unknown] = true
		v.reads = append(v.reads, unknown)
	}
}

// fill looks at it all at (t, y), of which only what it reads need be set, with integrals from the last step.
func (v *viewer) fill(sim *simulation, w *snapshot, t float64, y, f []float64) {
	s, d := sim.sys, sim.solver.Dense()
	w.t = t
	if v.whole {
		sim.fill(w, t, y, f)
		for i := range w.z {
			w.z[i] = d.OneZ(i, t)
		}
		return
	}
	for _, i := range v.view.vessels {
		if b := &s.basins[i]; b.holds(y[i]) {
			w.level[i] = b.at(y[i])
			continue
		}
		st := s.lookInto(int(i), y)
		w.level[i], w.gas[i] = st.level, st.gas
	}
	for _, i := range v.view.lines {
		w.q[i] = s.lookAlong(int(i), t, y)
	}
	for _, i := range v.integrals {
		w.z[i] = d.OneZ(int(i), t)
	}
}
