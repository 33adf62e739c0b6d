package network

import (
	"math"

	"headfall/integrate/sparse"
)

// settler finds the pressures of the tees that balance their flows before a restart. What flows into the tees is the downhill gradient of a convex
// function of their pressures, so Newton's direction with an exact search along it gets there from anywhere; shut valves, dry ends and check
// valves make the balances so uneven that Newton's method with the integrator's damping does not.
type settler struct {
	pat     sparse.Pattern
	factor  *sparse.Factor
	values  []float64
	lines   []int32    // that touch a tee
	slots   [][4]int32 // of each: (from,from), (from,to), (to,from), (to,to); -1 where an end is no tee
	ends    [][2]int32 // tees at the ends; -1
	diag    []int32
	f, d    []float64
	through []float64 // flows of the lines of each tee, without their signs, m³/s
	sound   bool      // factor holds the slopes of the present state
	x       []float64
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

// newSettler fixes the pattern of the balances of the tees.
func newSettler(s *system) *settler {
	n := len(s.tees)
	if n == 0 {
		return nil
	}
	c := withCare
	if s.rtol > coarse {
		c = coarseCare
	}
	r := &settler{care: c, f: make([]float64, n), through: make([]float64, n), d: make([]float64, n), x: make([]float64, n), diag: make([]int32, n)}
	b := &patternBuilder{n: n}
	for i := range n {
		b.add(int32(i), int32(i))
	}
	tee := func(m *mouth) int32 {
		if m.kind == toTee {
			return int32(m.at)
		}
		return -1
	}
	for i := range s.lines {
		a, z := tee(&s.lines[i].from), tee(&s.lines[i].to)
		if a < 0 && z < 0 {
			continue
		}
		r.lines, r.ends = append(r.lines, int32(i)), append(r.ends, [2]int32{a, z})
		b.add(a, z)
		b.add(z, a)
	}
	r.pat.N = n
	r.pat.Ptr, r.pat.Row = b.columns()
	for _, e := range r.ends {
		r.slots = append(r.slots, [4]int32{r.pat.Find(e[0], e[0]), r.pat.Find(e[0], e[1]), r.pat.Find(e[1], e[0]), r.pat.Find(e[1], e[1])})
	}
	for i := range n {
		r.diag[i] = r.pat.Find(int32(i), int32(i))
	}
	r.factor = sparse.Analyse(&r.pat)
	r.values = make([]float64, len(r.pat.Row))
	return r
}

// settleFloor is added to the slopes of the balances, m³/(s·Pa): nothing against any open path. Where nothing is open the direction is then still
// downhill, and a pressure that means nothing is left alone.
const settleFloor = 1e-15

// balances fills f with what flows into each tee, m³/s, and the matrix with minus its slopes.
func (r *settler) balances(s *system, matrix bool) {
	clear(r.f)
	clear(r.through)
	if matrix {
		clear(r.values)
	}
	var a, b end
	for k, i := range r.lines {
		l := &s.lines[i]
		s.meet(&l.from, &a)
		s.meet(&l.to, &b)
		l.evaluate(&a, &b, s.gamma)
		e, sl := r.ends[k], &r.slots[k]
		if e[0] >= 0 {
			r.f[e[0]] -= l.q
			r.through[e[0]] += math.Abs(l.q)
		}
		if e[1] >= 0 {
			r.f[e[1]] += l.q
			r.through[e[1]] += math.Abs(l.q)
		}
		if !matrix {
			continue
		}
		for j, v := range [4]float64{l.byA, l.byB, -l.byA, -l.byB} {
			if sl[j] >= 0 {
				r.values[sl[j]] += v
			}
		}
	}
	if matrix {
		for _, k := range r.diag {
			r.values[k] += settleFloor
		}
	}
	for i := range s.tees {
		if s.tees[i].slow { // its pressure follows from inertia, not from a balance of flows
			r.f[i] = 0
			if matrix {
				r.hold(i)
			}
		}
	}
}

// hold keeps a tee where it is.
func (r *settler) hold(i int) {
	for j := range r.pat.N {
		for k := r.pat.Ptr[j]; k < r.pat.Ptr[j+1]; k++ {
			if int(r.pat.Row[k]) == i || j == i {
				r.values[k] = 0
			}
		}
	}
	r.values[r.diag[i]] = 1
}

// along returns f·d at x + part·d.
func (r *settler) along(s *system, part float64) (sum float64) {
	for i, d := range r.d {
		s.y[s.teeRow+i] = r.x[i] + part*d
	}
	r.balances(s, false)
	for i, d := range r.d {
		sum += r.f[i] * d
	}
	return sum
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
	tol := 1e-7 * s.gamma * levelCap
	for range r.most {
		r.balances(s, true)
		if r.balanced() {
			return
		}
		copy(r.d, r.f)
		copy(r.x, s.y[s.teeRow:s.teeRow+len(r.x)])
		if r.factor.Refactor(r.values) != nil {
			return
		}
		r.factor.Solve(r.d)
		most, left := 0.0, 0.0
		for i, d := range r.d {
			d = math.Abs(d)
			most = math.Max(most, d)
			if !r.still(i) && d > tol+r.round*math.Abs(r.x[i]) {
				left = math.Max(left, d)
			}
		}
		if left == 0 || math.IsNaN(most) {
			return
		}
		r.search(s, most)
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
func (r *settler) balanced() bool {
	for i := range r.f {
		if !r.still(i) {
			return false
		}
	}
	return true
}

// still is balanced for one tee.
func (r *settler) still(i int) bool { return math.Abs(r.f[i]) <= r.flow+r.share*r.through[i] }

// search goes along d until f·d has fallen to a share of what it was.
func (r *settler) search(s *system, most float64) {
	start := 0.0
	for i, d := range r.d {
		start += r.f[i] * d
	}
	lo, hi, part := 0.0, math.Inf(1), math.Min(1, 10*s.gamma/most) // 10 m at first: where nothing is open, Newton's step is out of all bounds
	flo, fhi := start, 0.0
	for n := range 100 {
		g := r.along(s, part)
		if math.Abs(g) <= r.turn*start {
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
