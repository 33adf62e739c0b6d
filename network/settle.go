package network

import "math"

// settler finds the pressures of the tees that balance their flows before a restart, lot by lot. What flows into the tees is the downhill gradient of a convex
// function of their pressures, so Newton's direction with an exact search along it gets there from anywhere; shut valves, dry ends and check
// valves make the balances so uneven that Newton's method with the integrator's damping does not.
type settler struct {
	manifolds []manifold
	of        [][2]int32 // of each tee: its manifold and its place there
	care
}

// deepest is how far under the lowest mouth of the plant the head at a tee may be, m: more than a vacuum could pull.
const deepest = 30

// lowestPressure returns the total pressure, Pa, that no tee falls below.
func (s *system) lowestPressure() float64 {
	z := math.Inf(1)
	for i := range s.lines {
		for _, m := range []*mouth{&s.lines[i].from, &s.lines[i].to} {
			switch m.kind {
			case toTee:
			case toWater:
				for _, row := range s.outside[m.at].point.Surface {
					z = math.Min(z, row[1])
				}
			default:
				z = math.Min(z, m.invert)
			}
		}
	}
	return s.atmosphere + s.gamma*(z-deepest)
}

func newSettler(s *system) *settler {
	if len(s.tees) == 0 {
		return nil
	}
	r := &settler{care: withCare}
	if s.rtol > coarse {
		r.care = coarseCare
	}
	r.manifolds, r.of = s.manifolds()
	return r
}

// Settled tells whether the tees are near enough to balance, and not lower than anything in the plant could pull them, f being the rates where the system was linearised last.
func (s *system) Settled(f []float64, implicit bool) bool {
	for i := range s.tees {
		t := &s.tees[i]
		if t.slow {
			continue
		}
		if !implicit && math.Abs(f[s.teeRow+i]) > offBalance*t.through+0.1*stillFlow || s.y[s.teeRow+i] < s.lowest {
			return false
		}
	}
	return true
}

// offBalance is the share of the flows through a tee by which it may be out of balance at the start of a step.
const offBalance = 1e-3

// Settle balances the tees at (t, y), changing y in place.
func (s *system) Settle(t float64, y []float64) {
	r := s.settler
	if r == nil {
		return
	}
	for i := range s.tees {
		if y[s.teeRow+i] < s.lowest { // where nothing flows in it may have strayed
			y[s.teeRow+i] = s.lowest + deepest*s.gamma
		}
	}
	s.look(t, y)
	for i := range r.manifolds {
		c := &r.manifolds[i]
		for k := range c.lot {
			if int(c.lot[k]) == k {
				r.settle(s, c, int32(k))
			}
		}
	}
}

// settle balances a lot.
func (r *settler) settle(s *system, c *manifold, lot int32) {
	tol := 1e-7 * s.gamma * levelCap
	for range r.most {
		c.balances(s, lot, true)
		if r.balanced(c) {
			return
		}
		copy(c.d, c.f)
		for i, t := range c.tees {
			c.x[i] = s.y[s.teeRow+int(t)]
		}
		if !c.factorise() {
			return
		}
		c.factor.Solve(c.d)
		most, left := 0.0, 0.0
		for i, d := range c.d {
			d = math.Abs(d)
			most = math.Max(most, d)
			if !r.still(c, i) && d > tol+r.round*math.Abs(c.x[i]) {
				left = math.Max(left, d)
			}
		}
		if left == 0 || math.IsNaN(most) {
			return
		}
		c.search(s, lot, most, r.turn)
	}
}

// care is how far the tees are brought to balance; the solver's own Newton steps do the rest.
type care struct {
	flow  float64 // m³/s, left out of balance
	share float64 // the same, of the flows through a tee
	turn  float64 // share of the slope along a direction that is left where the search along it ends
	round float64 // share of a pressure under which its corrections do not count
	most  int     // directions tried: where flows end in corners the descent is slow for next to nothing
}

var (
	withCare   = care{flow: 1e-16, share: 1e-9, turn: 0.01, most: 200}
	coarseCare = care{flow: 1e-10, share: 1e-6, turn: 0.1, round: 1e-14, most: 30}
)

// balanced tells that what is out of balance is next to nothing.
func (r *settler) balanced(c *manifold) bool {
	for i := range c.f {
		if !r.still(c, i) {
			return false
		}
	}
	return true
}

// still is balanced for one tee.
func (r *settler) still(c *manifold, i int) bool {
	return math.Abs(c.f[i]) <= r.flow+r.share*c.through[i]
}

// along returns f·d at x + part·d.
func (c *manifold) along(s *system, lot int32, part float64) (sum float64) {
	for i, d := range c.d {
		if d != 0 {
			s.y[s.teeRow+int(c.tees[i])] = c.x[i] + part*d
		}
	}
	c.balances(s, lot, false)
	for i, d := range c.d {
		sum += c.f[i] * d
	}
	return sum
}

// search goes along d until f·d has fallen to a share of what it was.
func (c *manifold) search(s *system, lot int32, most, turn float64) {
	start := 0.0
	for i, d := range c.d {
		start += c.f[i] * d
	}
	lo, hi, part := 0.0, math.Inf(1), math.Min(1, 10*s.gamma/most) // 10 m at first: where nothing is open, Newton's step is out of all bounds
	flo, fhi := start, 0.0
	for n := range 100 {
		g := c.along(s, lot, part)
		if math.Abs(g) <= turn*start {
			return
		}
		if g > 0 {
			lo, flo = part, g
		} else {
			hi, fhi = part, g
		}
		switch {
		case math.IsInf(hi, 1):
			part *= 8
		case n%3 == 2 || fhi == flo:
			part = lo + (hi-lo)/2
		default: // secant between the two sides
			part = lo + (hi-lo)*flo/(flo-fhi)
			if !(part > lo && part < hi) {
				part = lo + (hi-lo)/2
			}
		}
		if (hi-lo)*most <= 1e-12*s.gamma || lo >= 1 && part > 8 {
			return
		}
	}
}
