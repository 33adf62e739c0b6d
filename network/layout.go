package network

import "sort"

// fills tells whether anything may come into the vessel from outside the plant other than by lines.
func (p *Plant) fills(v *Vessel) bool {
	for _, st := range p.Steps {
		if st.Action == SetInflow && st.Target == v.Tag {
			return true
		}
	}
	return len(v.Inflow) > 0 || len(v.Batches) > 0
}

// slots are the places of one line in the equations: the rows that its flow goes into, the columns of what moves it, and for each pair the
// place of their value in the matrix.
type slots struct {
	from, to int32    // rows; -1 outside the plant
	cols     [5]int32 // V and gas mass (or tee) at each end, own flow; -1 unused
	inFrom   [5]int32 // value slots of ∂/∂cols in row from
	inTo     [5]int32
	inOwn    [5]int32 // in the row of an inertial flow
	inZ      [5]int32 // in the integrals
}

type rimSlots struct{ own, other, z int32 } // ∂spill/∂V in its row, in that of the vessel it spills to, in the integrals

type gasSlots struct{ byV, byM int32 } // in the row of the gas mass

// teeSlots are the lines that meet at a tee.
type teeSlots struct {
	lines    []teeLine
	slow     bool    // all open lines carry columns: the balance is differentiated
	inertial bool    // some line is inertial
	driven   bool    // by a running pump of a steady rate
	ease     float64 // what one pascal more would send out of the tee, m³/(s·Pa), when it was linearised last
	direct   float64 // the share of it that goes to vessels and outside the plant
	through  float64 // flows of its lines then, added up without their signs, m³/s
}

type teeLine struct {
	line int32
	sign float64
	cols [5]int32 // slots in the row of the tee
}

// layout fixes the pattern of the equations and resolves every slot once.
func (s *system) layout() {
	s.m = len(s.lines) + len(s.stations)
	for i := range s.stations {
		if s.plan.fills(s.stations[i].plan) {
			s.stations[i].inflowZ = s.m
			s.m++
		}
	}
	s.ids = make([]int32, max(s.n, s.m, len(s.actuators)))
	for i := range s.ids {
		s.ids[i] = int32(i)
	}
	s.mass = make([]bool, s.n)
	for i := range s.mass {
		s.mass[i] = i < s.teeRow || i >= s.flowRow
	}
	s.slot = make([]slots, len(s.lines))
	s.tees = make([]teeSlots, len(s.teeAt))
	b := &patternBuilder{n: s.n}
	for i := range s.n {
		b.add(int32(i), int32(i))
	}
	for i := range s.lines {
		s.place(i, b)
	}
	for i := range s.tees {
		for _, k := range s.tees[i].lines {
			if s.tees[i].inertial {
				for _, c := range s.slot[k.line].cols {
					b.add(int32(s.teeRow+i), c)
				}
			}
		}
	}
	for i := range s.stations {
		st := &s.stations[i]
		b.add(st.spillTo, int32(i))
		b.add(st.massRow, int32(i))
		for k := range st.airways {
			if far := st.airways[k].far; far.kind == toVessel {
				b.add(st.massRow, int32(far.at))
			}
		}
	}
	s.pat.N, s.pat.Ptr, s.pat.Row = s.n, nil, nil
	s.pat.Ptr, s.pat.Row = b.columns()
	s.resolve()
	s.linkAirways()
	s.findFloating()
	s.settler = newSettler(s)
}

// place notes the rows and columns of line i.
func (s *system) place(i int, b *patternBuilder) {
	l, sl := &s.lines[i], &s.slot[i]
	for k := range sl.cols {
		sl.cols[k] = -1
	}
	end := func(m *mouth, k int, sign float64) int32 {
		switch m.kind {
		case toVessel:
			sl.cols[k], sl.cols[k+1] = int32(m.at), s.stations[m.at].massRow
			return int32(m.at)
		case toTee:
			sl.cols[k] = int32(s.teeRow + m.at)
			t := &s.tees[m.at]
			t.lines = append(t.lines, teeLine{line: int32(i), sign: sign})
			t.inertial = t.inertial || l.inertia > 0
			return sl.cols[k]
		}
		return -1
	}
	sl.from, sl.to = end(&l.from, 0, -1), end(&l.to, 2, +1)
	sl.cols[4] = l.row
	for _, c := range sl.cols {
		b.add(sl.from, c)
		b.add(sl.to, c)
		b.add(l.row, c)
	}
}

// resolve finds the slot of every contribution in the finished pattern.
func (s *system) resolve() {
	find := s.pat.Find
	s.iPtr = append(s.iPtr[:0], 0)
	s.iCol = s.iCol[:0]
	for i := range s.lines {
		sl := &s.slot[i]
		for k, c := range sl.cols {
			sl.inFrom[k], sl.inTo[k], sl.inOwn[k], sl.inZ[k] = find(sl.from, c), find(sl.to, c), find(s.lines[i].row, c), -1
			if c >= 0 {
				sl.inZ[k] = int32(len(s.iCol))
				s.iCol = append(s.iCol, c)
			}
		}
		s.iPtr = append(s.iPtr, int32(len(s.iCol)))
	}
	s.rims, s.gasS = make([]rimSlots, len(s.stations)), make([]gasSlots, len(s.stations))
	for i := range s.stations {
		st := &s.stations[i]
		s.rims[i] = rimSlots{find(int32(i), int32(i)), find(st.spillTo, int32(i)), int32(len(s.iCol))}
		s.iCol = append(s.iCol, int32(i))
		s.iPtr = append(s.iPtr, int32(len(s.iCol)))
		s.gasS[i] = gasSlots{find(st.massRow, int32(i)), find(st.massRow, st.massRow)}
	}
	for len(s.iPtr) <= s.m { // inflows depend on time alone
		s.iPtr = append(s.iPtr, int32(len(s.iCol)))
	}
	for i := range s.tees {
		for k := range s.tees[i].lines {
			tl := &s.tees[i].lines[k]
			for j, c := range s.slot[tl.line].cols {
				tl.cols[j] = -1
				if s.tees[i].inertial {
					tl.cols[j] = find(int32(s.teeRow+i), c)
				}
			}
		}
	}
}

// patternBuilder collects the entries of a square matrix.
type patternBuilder struct {
	n    int
	keys []int64
}

func (b *patternBuilder) add(row, col int32) {
	if row >= 0 && col >= 0 {
		b.keys = append(b.keys, int64(col)<<32|int64(row))
	}
}

// columns returns the pattern in compressed columns.
func (b *patternBuilder) columns() (ptr, row []int32) {
	sort.Slice(b.keys, func(i, j int) bool { return b.keys[i] < b.keys[j] })
	ptr = make([]int32, b.n+1)
	var last int64 = -1
	for _, k := range b.keys {
		if k == last {
			continue
		}
		last = k
		row = append(row, int32(k))
		ptr[k>>32+1]++
	}
	for i := range b.n {
		ptr[i+1] += ptr[i]
	}
	return ptr, row
}
