package network

import (
	"fmt"
	"math"
)

// addCrowns watches the siphons: air breaks one that is under suction when the mouth that feeds it uncovers, and the flow over the crest sweeps
// the air out again when the pipe there would run full with a Froude number of 1 or more.
func (w *watcher) addCrowns() {
	s := w.sim.sys
	for i := range s.lines {
		l := &s.lines[i]
		for k := range l.crowns {
			c := &l.crowns[k]
			feeds := [2][]airPath{s.airPaths(i, &l.from), s.airPaths(i, &l.to)}
			own := view{lines: s.just(i)}
			fed := own
			for _, paths := range feeds {
				for _, p := range paths {
					fed.lines = append(fed.lines, int32(p.line))
				}
			}
			w.triggers = append(w.triggers,
				trigger{
					value:  func(*snapshot) float64 { return s.airMargin(l, c, &feeds) },
					active: func() bool { return c.primed && !s.vented(c) },
					dir:    -1, sees: fed, jumps: true,
					fire: func(t float64) {
						c.primed, c.rests = false, t+siphonRest
						w.sim.control.schedule(timed{at: c.rests})
						if f := w.sim.flag("siphon_broken", l.plan.Tag, t, "what stands under the crest upstream stays where it is"); f != nil {
							f.Says = fmt.Sprintf("air reaches the high point of %s and breaks the siphon", l.plan.Tag)
						}
					},
				},
				trigger{
					value:  func(*snapshot) float64 { return s.sweep(l, c) },
					active: func() bool { return !c.primed && !s.vented(c) && w.sim.t >= c.rests },
					dir:    1, sees: own, jumps: true,
					fire: func(t float64) {
						c.primed = true
						if f := w.sim.flag("siphon_primed", l.plan.Tag, t, "if that is not wanted, open a vent at the high point"); f != nil {
							f.Says = fmt.Sprintf("%s runs full over its high point and draws as a siphon", l.plan.Tag)
						}
					},
				})
		}
	}
}

// siphonRest is the time, s, that a siphon which broke stays broken at least: what breaks it takes about as long to come in, and as long to be swept out again.
// Without it a siphon whose mouth uncovers at the flow that primes it would break and prime endlessly. Common practice, no source.
const siphonRest = 5

func (s *system) vented(c *crown) bool { return c.broken || c.vent >= 0 && s.actuators[c.vent].to > 0 }

// airMargin is how far the mouth that feeds the high point is from drawing air, m, while the crest is under suction; more than 0 otherwise. A mouth in a
// vessel draws air at its onset depth; a tee lets in what its branches draw (feeds: the paths by which air may come to either end of the line).
func (s *system) airMargin(l *line, c *crown, feeds *[2][]airPath) float64 {
	m, paths := &l.from, feeds[0]
	if l.q < 0 {
		m, paths = &l.to, feeds[1]
	}
	if s.crownPressure(l, c) >= s.atmosphere {
		return 1
	}
	if m.kind == toVessel {
		return s.onsetMargin(m, math.Abs(l.q))
	}
	margin := 1.0
	for i := range paths {
		margin = math.Min(margin, s.pathMargin(&paths[i]))
	}
	return margin
}

// onsetMargin is the depth over a mouth in a vessel less that at which flow q leaving there draws air, m: half the bore over the invert of a mouth in
// a wall; in a floor the onset of gas pull-through, h = (Q/2.53√g)^0.4 (Lubin & Springer 1967).
func (s *system) onsetMargin(m *mouth, q float64) float64 {
	e := s.see(m)
	if m.inlet.form == sideInlet || m.inlet.form == slotInlet {
		return e.depth - m.width/2
	}
	return e.depth - math.Pow(q/(2.53*math.Sqrt(s.plan.Gravity)), 0.4)
}

// crownPressure is the static pressure at a high point, Pa absolute.
func (s *system) crownPressure(l *line, c *crown) float64 {
	f, m := &l.floors[c.fwd], &l.from
	if l.q < 0 {
		f, m = &l.floors[c.back], &l.to
	}
	e := s.see(m)
	return f.pressureAt(e.phi, l.q, s.gamma)
}

// sweep is the pipe Froude number at the high point, less 1, while liquid stands over the crest upstream.
func (s *system) sweep(l *line, c *crown) float64 {
	a, b := s.see(&l.from), s.see(&l.to)
	top := s.atmosphere + s.gamma*(c.plan.Elevation+c.bore)
	if math.Max(a.phi, b.phi) < top || c.bore == 0 {
		return -1
	}
	area := math.Pi / 4 * c.bore * c.bore
	return math.Abs(l.q)/area/math.Sqrt(s.plan.Gravity*c.bore) - 1
}
