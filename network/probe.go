package network

import (
	"fmt"
	"math"
)

// probe is a condition made ready for a compiled plant: it turns a state into value − bound, so that it is positive above the bound.
type probe struct {
	plan    *Condition
	subject Subject
	at      []int // vessels, lines, actuators, by subject
	outside []int // lines that meet the outside point, with their signs
	sign    []float64
	bound   float64
	above   bool
	rating  bool // a pressure that a cover withstands: judged on the adiabatic where the gas space is tight
}

// newProbe resolves the tags of a condition.
func (s *system) newProbe(c *Condition) (*probe, error) {
	p := &probe{plan: c, subject: c.Subject, above: c.Above && c.Subject != Emptied}
	for _, tag := range c.Of {
		if !s.resolve1(p, tag) {
			return nil, fmt.Errorf("%s has no such number to look at", tag)
		}
	}
	p.readBound(s)
	return p, nil
}

// readBound takes the bound from the plan as its numbers are now.
func (p *probe) readBound(s *system) {
	p.bound = p.plan.Bound
	switch {
	case p.subject == Pressure && p.plan.Gauge:
		p.bound += s.atmosphere
	case p.subject == Emptied:
		p.bound, _ = s.plan.EmptyLevel(s.plan.Vessels[p.at[0]])
	}
}

func (s *system) resolve1(p *probe, tag string) bool {
	var k int
	var ok bool
	switch p.subject {
	case Level, Difference, Rising, Falling, Spilled, Emptied, Pressure:
		k, ok = s.vesselAt[tag]
	case Opening, Starts:
		k, ok = s.actuatorAt[tag]
	default:
		k, ok = s.lineAt[tag]
		if o, beyond := s.outsideAt[tag]; beyond && !ok {
			p.meet(s, o)
			return true
		}
	}
	p.at = append(p.at, k)
	return ok
}

// meet makes the probe look at all lines that meet outside point o, positive for what enters it.
func (p *probe) meet(s *system, o int) {
	for i := range s.lines {
		l := &s.lines[i]
		if l.to.outside() && l.to.at == o {
			p.outside, p.sign = append(p.outside, i), append(p.sign, 1)
		}
		if l.from.outside() && l.from.at == o {
			p.outside, p.sign = append(p.outside, i), append(p.sign, -1)
		}
	}
}

func (m *mouth) outside() bool { return m.kind == toAir || m.kind == toWater || m.kind == toPressure }

// ofLevels tells that the condition is one of levels alone.
func (p *probe) ofLevels() bool {
	return p.subject == Level || p.subject == Emptied || p.subject == Difference
}

// snapshot is the plant at one instant.
type snapshot struct {
	t     float64
	q     []float64 // of the lines, m³/s
	level []float64
	gas   []float64 // Pa absolute
	spill []float64
	dv    []float64 // rates of volume, m³/s
	z     []float64 // integrals
}

func (s *system) newSnapshot() snapshot {
	nv, nl := len(s.stations), len(s.lines)
	return snapshot{q: make([]float64, nl), level: make([]float64, nv), gas: make([]float64, nv), spill: make([]float64, nv),
		dv: make([]float64, s.n), z: make([]float64, s.m)}
}

// value returns value − bound at a snapshot that belongs to the present state of the system.
func (p *probe) value(sim *simulation, w *snapshot) float64 {
	v := p.raw(sim, w)
	return v - p.bound
}

// raw returns the subject's value in SI units.
func (p *probe) raw(sim *simulation, w *snapshot) float64 {
	s := sim.sys
	switch p.subject {
	case Level, Emptied:
		return w.level[p.at[0]]
	case Difference:
		a, b := p.at[0], p.at[1]
		return math.Abs(s.stations[a].base + w.level[a] - s.stations[b].base - w.level[b])
	case Pressure:
		if p.rating {
			return s.ratedPressure(p.at[0], w.gas[p.at[0]])
		}
		return w.gas[p.at[0]]
	case Rising, Falling:
		i := p.at[0]
		r := w.dv[i] * s.slopeOf(i)
		if p.subject == Falling {
			r = -r
		}
		return r
	case Opening:
		return s.actuators[p.at[0]].at(w.t)
	case Starts:
		return float64(len(s.actuators[p.at[0]].starts))
	case Spilled:
		return w.z[len(s.lines)+p.at[0]]
	}
	return p.ofLine(sim, w)
}

func (p *probe) ofLine(sim *simulation, w *snapshot) float64 {
	s := sim.sys
	if p.outside != nil {
		var sum float64
		for k, i := range p.outside {
			if p.subject == Passed || p.subject == Backflow {
				f, b := sim.led.passed(i, w.z[i])
				if p.sign[k] < 0 {
					f, b = b, f
				}
				if p.subject == Backflow {
					f = b
				}
				sum += f
				continue
			}
			sum += p.sign[k] * w.q[i]
		}
		return sum
	}
	i := p.at[0]
	l := &s.lines[i]
	switch p.subject {
	case Flow:
		return w.q[i]
	case Velocity:
		if l.area == 0 {
			return 0
		}
		return math.Abs(w.q[i]) / l.area
	case Passed:
		f, _ := sim.led.passed(i, w.z[i])
		return f
	case Backflow:
		_, b := sim.led.passed(i, w.z[i])
		return b
	case CrestHead:
		return s.crestHead(i)
	}
	return math.NaN()
}

// crestHead returns the lowest gauge pressure head, m of liquid, at the high points of line i in the present state; NaN when it has none.
func (s *system) crestHead(i int) float64 {
	l := &s.lines[i]
	low := math.NaN()
	a, b := s.see(&l.from), s.see(&l.to)
	for k := range l.crowns {
		c := &l.crowns[k]
		f, phi := &l.floors[c.fwd], a.phi
		if l.q < 0 {
			f, phi = &l.floors[c.back], b.phi
		}
		p := math.Max(f.pressureAt(phi, l.q, s.gamma), math.Min(f.pressure, s.atmosphere))
		if h := (p - s.atmosphere) / s.gamma; !(h >= low) {
			low = h
		}
	}
	return low
}
