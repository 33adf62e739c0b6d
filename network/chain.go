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
	back   bool              // seen from the other end: q counts against the parts' direction
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

const (
	nearEnough = 1e-7 // share of the flow: Newton's next step would be of the order of its square
	maxSolves  = 200
)

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
		if math.Abs(step) <= nearEnough*math.Abs(next) {
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
