package network

import "math"

// airPath is a way by which air may come to a tee, and from there into what the tee feeds: a branch with a mouth that may uncover, or an open end.
type airPath struct {
	tee   int // where the branch meets the header
	line  int
	mouth *mouth
	along bool  // air would run in the branch's direction
	via   []leg // from there to the tee that is looked at
}

// leg is a line between tees, and whether air would run in its direction.
type leg struct {
	line  int
	along bool
}

// airPaths lists the ways by which air may come to mouth m of line i, through any number of tees but not through the line itself; none where the file
// says that header air is ignored.
func (s *system) airPaths(i int, m *mouth) (paths []airPath) {
	if m.kind != toTee || s.plan.Assume.HeaderAir == "ignored" {
		return nil
	}
	seen := map[int]bool{m.at: true}
	var visit func(tee int, via []leg)
	visit = func(tee int, via []leg) {
		for k := range s.lines {
			l := &s.lines[k]
			for _, along := range []bool{false, true} {
				near, far := &l.from, &l.to
				if along {
					near, far = far, near
				}
				if k == i || near.kind != toTee || near.at != tee {
					continue
				}
				switch {
				case far.kind == toVessel || far.kind == toAir:
					paths = append(paths, airPath{tee: tee, line: k, mouth: far, along: along, via: via})
				case far.kind == toTee && !seen[far.at]:
					seen[far.at] = true
					visit(far.at, append(via[:len(via):len(via)], leg{k, along}))
				}
			}
		}
	}
	visit(m.at, nil)
	return paths
}

// pathMargin is how far a way is from letting air into its header, m: both the depth over its mouth less that of the onset of air, and the head of the
// header over that of the air at the mouth, at the elevation of the tee, must be gone. More than 0 where the way is shut, or the tee's elevation is not known.
func (s *system) pathMargin(p *airPath) float64 {
	z := s.plan.Tees[p.tee].Elevation
	if math.IsNaN(z) || !s.lets(p.line, p.along) {
		return 1
	}
	for _, g := range p.via {
		if !s.lets(g.line, g.along) {
			return 1
		}
	}
	air, depth := s.atmosphere, -1.0
	if p.mouth.kind == toVessel {
		q := 0.0
		if l := &s.lines[p.line]; (l.q > 0) == p.along {
			q = math.Abs(l.q)
		}
		air, depth = s.stations[p.mouth.at].gas, s.onsetMargin(p.mouth, q)
	}
	return math.Max(depth, (s.y[s.teeRow+p.tee]-air)/s.gamma-z)
}

// lets tells that air may run through a line in its direction, or against it.
func (s *system) lets(line int, along bool) bool {
	l := &s.lines[line]
	return !l.shut && (along || !l.oneWay)
}
