package network

// basin is what lines between floors need of an open vessel: its level and the pressure at its floor, which are straight lines in its volume while it
// stands under its rim and its section does not change. Basins are kept apart from stations, small and in a row, since most vessels of large plants need
// no more at most times.
type basin struct {
	lo, hi       float64 // m³: the span in which the following holds; empty where the section changes
	level, slope float64 // the liquid stands level + slope·V above base, m
	press, byV   float64 // and the total pressure at the floor is press + byV·V, Pa
	full         float64 // m³, under the top of the shape
}

// at returns the level at volume v within the span, m above base.
func (b *basin) at(v float64) float64 { return b.level + b.slope*v }

// holds tells whether v lies within the span.
func (b *basin) holds(v float64) bool { return v > b.lo && v < b.hi }

// rebase fits the basin of vessel i to where it stands, which look has set.
func (s *system) rebase(i int, v float64) {
	st, b := &s.stations[i], &s.basins[i]
	b.lo, b.hi = 0, 0
	if st.spill > 0 {
		return
	}
	lo, hi := st.shape.Straight(v)
	if top, _ := st.shape.Volume(st.rim); hi > top {
		hi = top
	}
	*b = basin{lo: lo, hi: hi, level: st.level - st.slope*v, slope: st.slope, full: st.full}
	b.press, b.byV = s.atmosphere+s.gamma*(st.base+b.level), s.gamma*b.slope
}

// sortStations separates the vessels that only plain lines meet from those of which more is asked: covered ones, and those that fill from outside.
func (s *system) sortStations() {
	for i := range s.stations {
		st := &s.stations[i]
		s.isWide[i] = st.closed || st.inflow != 0 || st.inflowRate != 0
		s.basins[i] = basin{}
	}
	for _, i := range s.rest {
		for _, m := range [2]*mouth{&s.lines[i].from, &s.lines[i].to} {
			if m.kind == toVessel {
				s.isWide[m.at] = true
			}
		}
	}
	s.wide, s.narrow = s.wide[:0], s.narrow[:0]
	for i, is := range s.isWide {
		if is {
			s.wide = append(s.wide, int32(i))
		} else {
			s.narrow = append(s.narrow, int32(i))
		}
	}
}

// lookAtVessels sets the pressures at the floors, and the stations of all but those vessels that stand within the span of their basin; these others are
// s.wide and s.odd. It notes which vessels are bare.
func (s *system) lookAtVessels(y []float64) {
	floor, basins, deep, isBare := s.floor, s.basins, s.deep, s.isBare
	bare := false
	for _, i := range s.wide {
		s.lookInto(int(i), y)
		isBare[i] = y[i] < deep[i]
		bare = bare || isBare[i]
	}
	s.odd = s.odd[:0]
	for _, i := range s.narrow {
		b, v := &basins[i], y[i]
		shallow := v < deep[i]
		isBare[i] = shallow
		bare = bare || shallow
		if b.holds(v) {
			floor[i] = b.press + b.byV*v
			continue
		}
		s.lookInto(int(i), y)
		s.rebase(int(i), v)
		s.odd = append(s.odd, i)
	}
	s.bare = bare
}

// lookInto sets the station of vessel i and the pressure at its floor.
func (s *system) lookInto(i int, y []float64) *station {
	st := &s.stations[i]
	m := st.mass
	if st.massRow >= 0 {
		m = y[st.massRow]
	}
	st.look(y[i], m)
	s.floor[i] = st.gas + s.gamma*st.surface
	return st
}

// lookAll sets every station.
func (s *system) lookAll(y []float64) {
	for i := range s.stations {
		s.lookInto(i, y)
	}
}

// slopeOf returns dh/dV of vessel i where it was looked at last, 1/m².
func (s *system) slopeOf(i int) float64 {
	if b := &s.basins[i]; !s.isWide[i] && b.lo < b.hi {
		return b.slope
	}
	return s.stations[i].slope
}

// levelOf returns the level of vessel i where it stands at volume v and was looked at last, m above base.
func (s *system) levelOf(i int, v float64) float64 {
	if b := &s.basins[i]; b.holds(v) {
		return b.at(v)
	}
	return s.stations[i].level
}
