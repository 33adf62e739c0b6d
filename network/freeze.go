package network

import (
	"math"

	"headfall/elements"
)

// begin puts what a run may have changed in the system back to the plan.
func (s *system) begin(ch *Changes) {
	for i := range s.outside {
		b := &s.outside[i]
		if rows := Rows(b.point.Surface); len(rows) > 0 {
			b.start, b.rate = rows.piece(0)
			b.surface = b.start
		}
	}
	for i := range s.stations {
		st := &s.stations[i]
		for k := range st.vents {
			v := &st.vents[k]
			v.at.Opening = 1 - v.plan.Blocked
			if b, ok := ch.BlockVent[v.plan.Tag]; ok {
				v.at.Opening = 1 - b
			}
		}
		if st.closed {
			st.mass = st.startMass()
		}
	}
	for i := range s.lines {
		l := &s.lines[i]
		l.lastDp, l.lastQ, l.lastS = 0, 0, 0
		l.stale = true
		s.unfoul(l)
		l.setLeak(math.Max(s.plan.Assume.CheckLeak, ch.CheckLeak))
		for k := range l.locals {
			l.locals[k].Strength = 1
		}
		l.breakLine(ch.Break[l.plan.Tag])
		for k := range l.crowns {
			c := &l.crowns[k]
			c.rests = 0
			c.primed = c.plan.Primed || !c.plan.PrimedSet && s.headAbove(l, c.plan.Elevation)
		}
	}
	for _, a := range s.actuators {
		if w, ok := ch.Weaken[a.tag]; ok {
			s.lines[a.line].locals[a.part].Strength = w
		}
	}
}

// headAbove tells whether at the start the liquid at some end of the line stands over elevation z.
func (s *system) headAbove(l *line, z float64) bool {
	for _, m := range []*mouth{&l.from, &l.to} {
		switch m.kind {
		case toVessel:
			if st := &s.stations[m.at]; st.base+st.plan.StartLevel() > z {
				return true
			}
		case toWater:
			if s.outside[m.at].surface > z {
				return true
			}
		case toPressure:
			if s.outside[m.at].phi-s.atmosphere > s.gamma*z {
				return true
			}
		}
	}
	return false
}

// freeze makes every opening, inflow and outside level one straight piece from the present time on.
func (s *system) freeze(sim *simulation) {
	t := sim.t
	s.t0 = t
	for i := range s.outside {
		b := &s.outside[i]
		if rows := Rows(b.point.Surface); len(rows) > 0 {
			b.start, b.rate = rows.piece(t)
			b.surface = b.start
		}
	}
	for i := range s.stations {
		st := &s.stations[i]
		st.inflow, st.inflowRate = sim.control.inflowOf(st.plan, t)
	}
	for i := range s.lines {
		s.freezeLine(&s.lines[i], t)
	}
	s.freezeDriven()
	s.sortPlain()
	s.sortStations()
	s.lowest = s.lowestPressure()
	for i := range s.tees {
		s.freezeTee(&s.tees[i])
	}
	if s.settler != nil {
		for i := range s.settler.manifolds {
			s.settler.manifolds[i].divide(s)
		}
	}
}

// inflowOf returns the inflow of a vessel just after t and its slope: its own course, or what a step set it to, and its batches.
func (c *control) inflowOf(v *Vessel, t float64) (q, rate float64) {
	if o, ok := c.inflows[v.Tag]; ok {
		q = o.value
	} else {
		q, rate = v.Inflow.piece(t)
	}
	for _, b := range v.Batches {
		if c.runs(b) && t >= b.At.S && t < b.At.S+b.Over {
			q += b.Volume / b.Over
		}
	}
	return q, rate
}

// freezeLine sets what moves in a line, and whether it is shut.
func (s *system) freezeLine(l *line, t float64) {
	l.moving = l.moving[:0]
	for _, k := range l.acts {
		a := &s.actuators[k]
		if x := a.at(t); x != l.locals[a.part].Opening {
			l.locals[a.part].Opening = x
			l.stale = true
		}
		if r := a.rate(t); r != 0 && a.kind == aValve {
			l.moving = append(l.moving, mover{part: l.inChain(a.part), local: a.part, actuator: int(k), rate: r})
		}
	}
	for i := range l.crowns {
		s.freezeCrown(l, &l.crowns[i])
	}
	if !l.stale && len(l.moving) == 0 {
		return
	}
	l.stale = len(l.moving) > 0
	l.cell.forget()
	l.inRange = [2]float64{}
	for i := range l.floors {
		l.floors[i].easyFlow = 0
	}
	if l.chain.merged = false; len(l.moving) == 0 {
		l.chain.merge()
	}
	l.shut = false
	for i, f := range l.plan.Parts {
		if sh, ok := f.Part.(elements.Shuts); ok && sh.Shut(&l.locals[i]) && !l.moves(i) {
			l.shut = true
		}
	}
	l.zero = 0
	if !l.shut && l.sources {
		for i, p := range l.chain.parts {
			d, _ := p.Drop(0, l.chain.locals[i])
			l.zero += d
		}
	}
}

// inChain returns the place of part i of the line in its chain.
func (l *line) inChain(i int) int {
	if l.weir != nil {
		return i - 1
	}
	return i
}

func (l *line) moves(part int) bool {
	for _, m := range l.moving {
		if m.local == part {
			return true
		}
	}
	return false
}

// freezeCrown sets the floor pressures of a high point.
func (s *system) freezeCrown(l *line, c *crown) {
	p := s.atmosphere
	vented := s.vented(c)
	if !vented && c.primed {
		p = s.fluid.Vapour
	}
	for _, k := range []int{c.fwd, c.back} {
		l.floors[k].pressure = p
		l.floors[k].vapour = !vented && c.primed
	}
}

// freezeDriven gives the lines at tees their stiffness: none where a running pump of a steady rate drives the tee, through other tees or not.
func (s *system) freezeDriven() {
	more := false
	for i := range s.lines {
		l := &s.lines[i]
		l.stiff, l.whole = 0, false
		if l.gmin > 0 {
			l.stiff = teeStiffness
		}
		if l.steady && l.gmin > 0 && !l.shut {
			l.stiff, more = 0, true
		}
	}
	for i := range s.tees {
		s.tees[i].driven = false
	}
	for more {
		more = false
		for i := range s.tees {
			t := &s.tees[i]
			for _, k := range t.lines {
				if l := &s.lines[k.line]; !t.driven && !l.shut && l.stiff == 0 {
					t.driven, more = true, true
				}
			}
			for _, k := range t.lines {
				if t.driven {
					s.lines[k.line].stiff = 0
				}
			}
		}
	}
}

// freezeTee decides how the pressure of a tee is determined.
func (s *system) freezeTee(t *teeSlots) {
	t.slow = false
	if !t.inertial {
		return
	}
	open := 0
	for _, k := range t.lines {
		l := &s.lines[k.line]
		if l.shut {
			continue
		}
		if !l.carries() {
			return
		}
		open++
	}
	t.slow = open > 0
	for _, k := range t.lines {
		if l := &s.lines[k.line]; t.slow {
			l.whole, l.stiff = true, 0
		}
	}
}

// project makes the flows of inertial lines fit their shut valves and the balances of tees where they alone meet: the change is spread over the
// open lines of the tee in proportion to 1/inertance, as an instant pressure pulse would.
func (sim *simulation) project() {
	s := sim.sys
	for _, k := range s.inertial {
		if l := &s.lines[k]; l.shut && !l.parted {
			sim.y[l.row] = 0
		}
	}
	for range 200 {
		worst := 0.0
		for i := range s.tees {
			t := &s.tees[i]
			if !t.slow {
				continue
			}
			var sum, ease float64
			for _, k := range t.lines {
				if l := &s.lines[k.line]; !l.shut {
					sum += k.sign * sim.y[l.row]
					ease += 1 / l.inertia
				}
			}
			for _, k := range t.lines {
				if l := &s.lines[k.line]; !l.shut {
					sim.y[l.row] -= k.sign * sum / (l.inertia * ease)
				}
			}
			worst = math.Max(worst, math.Abs(sum))
		}
		if worst < 1e-18 {
			return
		}
	}
}

// guessTees starts the pressure of every tee at the mean of what its lines see beyond it.
func (s *system) guessTees(y []float64) {
	for i := range s.tees {
		y[s.teeRow+i] = s.atmosphere
	}
	for range len(s.tees) + 1 {
		moved := 0.0
		for i := range s.tees {
			t := &s.tees[i]
			var sum float64
			for _, k := range t.lines {
				l := &s.lines[k.line]
				far := &l.from
				if k.sign < 0 {
					far = &l.to
				}
				sum += s.startPhi(far, y)
			}
			if n := float64(len(t.lines)); n > 0 {
				old := y[s.teeRow+i]
				y[s.teeRow+i] = sum / n
				moved = math.Max(moved, math.Abs(y[s.teeRow+i]-old))
			}
		}
		if moved < 100 {
			return
		}
	}
}

// startPhi is the total pressure at a mouth at the start.
func (s *system) startPhi(m *mouth, y []float64) float64 {
	switch m.kind {
	case toVessel:
		st := &s.stations[m.at]
		gas := s.atmosphere
		if st.closed {
			gas = st.plan.Cover.Pressure
		}
		return gas + s.gamma*math.Max(st.base+st.plan.StartLevel(), m.centre)
	case toTee:
		return y[s.teeRow+m.at]
	case toWater:
		return s.atmosphere + s.gamma*s.outside[m.at].surface
	}
	return s.outside[m.at].phi
}

// setVent opens or shuts a vent of a cover.
func (s *system) setVent(tag string, open float64) {
	for i := range s.stations {
		for k := range s.stations[i].vents {
			if v := &s.stations[i].vents[k]; v.plan.Tag == tag {
				v.at.Opening = open * (1 - v.plan.Blocked)
			}
		}
	}
}

// unknownName names unknown i for people.
func (s *system) unknownName(i int) string {
	switch {
	case i < 0:
		return ""
	case i < len(s.stations):
		return s.stations[i].plan.Tag
	case i < s.teeRow:
		for k := range s.stations {
			if int(s.stations[k].massRow) == i {
				return s.stations[k].plan.Tag + " (gas)"
			}
		}
	case i < s.flowRow:
		return s.plan.Tees[i-s.teeRow].Tag
	}
	for _, k := range s.inertial {
		if int(s.lines[k].row) == i {
			return s.lines[k].plan.Tag
		}
	}
	return ""
}
