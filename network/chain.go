package network

import (
	"math"

	"headfall/elements"
)

// chain is parts in series: it loses Σ wᵢ·Dropᵢ(q) + k±·q|q|, Pa, at flow q, m³/s, and is solved for the flow that loses a given pressure.
// k± holds what depends on the direction of flow: end losses, changes of bore, velocity heads.
type chain struct {
	parts  []elements.Part
	locals []*elements.Local // one a part
	weight []float64         // one a part; nil: all 1
	fwd    float64           // Pa/(m³/s)², for q > 0
	rev    float64           // Pa/(m³/s)², for q < 0
	band   float64           // Pa, of the quadratic term
	near   float64           // share of the flow at which the last step is taken
	back   bool              // seen from the other end: q counts against the parts' direction

	merged     bool // what follows holds, as the parts stand: at flows of from and more all but the others lose ahead·q², astern·q² in reverse
	from       float64
	ahead      float64 // Pa·s²/m⁶
	astern     float64
	others     []elements.Part
	otherPlace []*elements.Local
}

// merge sums up what is quadratic in the flow while the parts stand as they do.
func (c *chain) merge() {
	c.merged, c.from, c.ahead, c.astern = c.weight == nil && !c.back, 0, c.fwd, c.rev
	switch least, most := math.Min(c.fwd, c.rev), math.Max(c.fwd, c.rev); {
	case least < 1e-6*most: // see elements.TwoWay
		c.merged = false
	case least > 0:
		c.from = math.Sqrt(c.band/least) * (1 + 1e-15)
	}
	c.others, c.otherPlace = c.others[:0], c.otherPlace[:0]
	for i, p := range c.parts {
		s, ok := p.(elements.Squares)
		if !ok {
			c.others, c.otherPlace = append(c.others, p), append(c.otherPlace, c.locals[i])
			continue
		}
		forward, back, from := s.Square(c.locals[i])
		c.ahead, c.astern, c.from = c.ahead+forward, c.astern+back, math.Max(c.from, from)
	}
}

// dropMerged is drop at flows of from and more.
func (c *chain) dropMerged(q float64) (dp, slope float64) {
	k := c.ahead * q
	if q < 0 {
		k = -c.astern * q
	}
	dp, slope = k*q, 2*k
	for i, p := range c.others {
		d, s := p.Drop(q, c.otherPlace[i])
		dp += d
		slope += s
	}
	return dp, slope
}

// symmetric tells that the loss is the same both ways.
func (c *chain) symmetric() bool {
	if c.fwd != c.rev {
		return false
	}
	for _, p := range c.parts {
		if e, ok := p.(elements.Even); !ok || !e.Even() {
			return false
		}
	}
	return true
}

// drop returns the pressure lost at flow q, Pa, and its slope, Pa·s/m³.
func (c *chain) drop(q float64) (dp, slope float64) {
	if c.merged && math.Abs(q) >= c.from {
		return c.dropMerged(q)
	}
	if c.fwd > 0 || c.rev > 0 {
		dp, slope = elements.TwoWay(c.fwd, c.rev, q, c.band)
	}
	sign := 1.0
	if c.back {
		sign = -1
	}
	for i, p := range c.parts {
		d, s := p.Drop(sign*q, c.locals[i])
		d *= sign
		if c.weight != nil {
			d, s = d*c.weight[i], s*c.weight[i]
		}
		dp += d
		slope += s
	}
	return dp, slope
}

const maxSolves = 200

// nearEnough returns the share of a flow at which a step of Newton's method is the last, its error being of the order of the square: what is left is rounding,
// or in coarse runs, as those of samples are, a ten-thousandth of the tolerance.
func nearEnough(rtol float64) float64 {
	if rtol > coarse {
		return math.Min(1e-4, 1e-2*math.Sqrt(rtol))
	}
	return 1e-7
}

// solve returns the flow that loses dp and ∂q/∂dp, starting from guess q. The loss is increasing, so that the root is unique: Newton's method,
// kept within a bracket that grows from what was seen.
func (c *chain) solve(dp, q float64) (flow, slope float64) {
	lo, hi := math.Inf(-1), math.Inf(1)
	last := math.Inf(1)
	for i := 0; i < maxSolves; i++ {
		d, s := c.drop(q)
		r := dp - d
		if r == 0 {
			return q, 1 / s
		}
		if r > 0 {
			lo = q
		} else {
			hi = q
		}
		step := r / s
		next := q + step
		if math.Abs(step) <= c.near*math.Abs(next) {
			return next, 1 / s
		}
		// Newton on a function with |q|^p, p ≤ 2, halves its step at the very least; else the bracket is halved.
		if !(next > lo && next < hi) || math.Abs(step) > last {
			switch {
			case !math.IsInf(lo, 0) && !math.IsInf(hi, 0):
				next = lo + (hi-lo)/2
				if next <= lo || next >= hi {
					return q, 1 / s
				}
			case i > 8 && math.IsInf(hi, 1):
				next = lo + math.Max(math.Abs(lo), 1e-9)
			case i > 8:
				next = hi - math.Max(math.Abs(hi), 1e-9)
			}
		}
		last = math.Abs(next - q)
		q = next
	}
	_, s := c.drop(q)
	return q, 1 / s
}
