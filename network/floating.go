package network

// groundStiffness is added to the slope of the balance of a tee that no path joins to a vessel or the outside, m³/(s·Pa): its flows are determined, its
// pressure is not, and the equations would be singular. Flows are not touched.
const groundStiffness = 1e-15

// findFloating lists the diagonal slots of the tees that are joined to one another only.
func (s *system) findFloating() {
	held := make([]bool, len(s.tees))
	for changed := true; changed; {
		changed = false
		for i := range s.lines {
			l := &s.lines[i]
			a, b := l.from.kind != toTee || held[l.from.at], l.to.kind != toTee || held[l.to.at]
			if a == b {
				continue
			}
			m := &l.from
			if a {
				m = &l.to
			}
			held[m.at], changed = true, true
		}
	}
	s.floating = s.floating[:0]
	for i := range s.tees {
		if !held[i] {
			s.floating = append(s.floating, s.pat.Find(int32(s.teeRow+i), int32(s.teeRow+i)))
		}
	}
}
