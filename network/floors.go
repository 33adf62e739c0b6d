package network

import (
	"math"

	"headfall/elements"
)

// addFloors finds the points of a line whose pressure has a floor: the throats of its valves where the liquid's vapour pressure is known, and
// its crests.
func (s *system) addFloors(c *line) {
	for i, f := range c.plan.Parts {
		if h, ok := f.Part.(elements.Humps); ok {
			c.crowns = append(c.crowns, s.newCrown(c, h.Crown(), i))
		}
		if t, ok := f.Part.(elements.Chokes); ok && s.fluid.Checked {
			for _, back := range []bool{false, true} {
				w := s.upstream(c, i, back, true)
				w.throat, w.vapour = t, true
				w.pressure = t.CriticalRatio(&s.fluid) * s.fluid.Vapour
				w.z = s.elevationOf(c, i)
				c.floors = append(c.floors, w)
			}
		}
	}
	s.addBreak(c)
}

// addBreak gives a pipe to the open air without a high point a floor at its upper end, off unless a run breaks the line there (Changes.Break).
func (s *system) addBreak(c *line) {
	c.breakAt = -1
	if z := s.endElevation(&c.from); c.long && c.weir == nil && c.inertia == 0 && len(c.crowns) == 0 && c.to.kind == toAir && z > c.to.centre {
		f := s.upstream(c, 0, false, false)
		f.z, f.pressure, f.off = z, s.atmosphere, true
		c.breakAt = len(c.floors)
		c.floors = append(c.floors, f)
	}
}

// breakLine sets whether air stands throughout the run in the last high point of a line, or at its upper end where it has none.
func (c *line) breakLine(broken bool) {
	for k := range c.crowns {
		c.crowns[k].broken = broken && k == len(c.crowns)-1
	}
	if c.breakAt >= 0 {
		c.floors[c.breakAt].off = !broken
	}
}

// crown is a high point of a line: its two floors, one for each direction of flow, and whether it is full.
type crown struct {
	plan       *elements.Crown
	part       int
	vent       int // actuator of its vent; -1 for none
	primed     bool
	wasPrimed  bool    // at the start
	rests      float64 // s, until when it stays broken
	broken     bool    // air stands in it throughout this run (Changes.Break)
	fwd, back  int     // floors of the line
	bore       float64
	low, lowAt float64 // m gauge head
}

func (s *system) newCrown(c *line, plan *elements.Crown, i int) crown {
	k := crown{plan: plan, part: i, vent: -1, fwd: len(c.floors), back: len(c.floors) + 1, bore: s.boreAt(c.plan, i)}
	if plan.Vent.Given {
		k.vent = s.actuatorAt[plan.Vent.Tag]
	}
	for _, back := range []bool{false, true} {
		w := s.upstream(c, i, back, false)
		w.z = plan.Elevation
		c.floors = append(c.floors, w)
	}
	return k
}

// upstream builds the chain from one end of the line up to part i, with the velocity head there; with the part itself where it is a throat.
func (s *system) upstream(c *line, i int, back, itself bool) floor {
	f := floor{part: i, back: back, blend: blend}
	n := len(c.plan.Parts)
	f.up = chain{band: c.chain.band, near: c.chain.near, back: back, parts: make([]elements.Part, 0, n), locals: make([]*elements.Local, 0, n)}
	add := func(k int) {
		if _, ok := c.plan.Parts[k].Part.(elements.Crest); ok {
			return
		}
		if p, ok := c.plan.Parts[k].Part.(elements.Pumps); ok && !p.Drive().Curved {
			f.blend = steadyBlend
		}
		f.up.parts = append(f.up.parts, c.plan.Parts[k].Part)
		f.up.locals = append(f.up.locals, &c.locals[k])
	}
	f.base = velocityHead(s.fluid.Density, s.boreAt(c.plan, i))
	if back {
		for k := len(c.plan.Parts) - 1; k > i; k-- {
			add(k)
		}
	} else {
		for k := 0; k < i; k++ {
			add(k)
		}
	}
	if itself {
		add(i)
	}
	for _, d := range c.losses {
		if back && d.at > i {
			f.base += d.rev
		}
		if !back && d.at <= i {
			f.base += d.fwd
		}
	}
	f.up.fwd, f.up.rev = f.base, f.base
	f.up.weight = make([]float64, len(f.up.parts))
	for k := range f.up.weight {
		f.up.weight[k] = 1
	}
	return f
}

// boreAt returns the bore nearest to part i.
func (s *system) boreAt(l *Line, i int) float64 {
	for d := range l.Parts {
		for _, k := range []int{i - d, i + d} {
			if k >= 0 && k < len(l.Parts) {
				if b := boreOf(l.Parts[k].Part); b > 0 {
					return b
				}
			}
		}
	}
	return 0
}

// elevationOf estimates the elevation of part i: straight between the ends and high points of its line by the length of pipe between them. The
// file does not give it; the estimate only serves choking.
func (s *system) elevationOf(c *line, i int) float64 {
	type mark struct{ x, z float64 }
	var marks []mark
	x, at := 0.0, 0.0
	if z := s.endElevation(&c.from); !math.IsNaN(z) {
		marks = append(marks, mark{0, z})
	}
	for k, f := range c.plan.Parts {
		if k == i {
			at = x
		}
		if p, ok := f.Part.(elements.Long); ok {
			x += p.Length()
		}
		if h, ok := f.Part.(elements.Humps); ok {
			marks = append(marks, mark{x, h.Crown().Elevation})
		}
	}
	if z := s.endElevation(&c.to); !math.IsNaN(z) {
		marks = append(marks, mark{x, z})
	}
	if len(marks) == 0 {
		return 0
	}
	for k := 1; k < len(marks); k++ {
		if a, b := marks[k-1], marks[k]; at <= b.x {
			if b.x == a.x {
				return math.Min(a.z, b.z)
			}
			return a.z + (b.z-a.z)*(at-a.x)/(b.x-a.x)
		}
	}
	return marks[len(marks)-1].z
}

func (s *system) endElevation(m *mouth) float64 {
	switch m.kind {
	case toTee:
		return s.plan.Tees[m.at].Elevation
	case toWater:
		return s.outside[m.at].surface
	}
	return m.centre
}
