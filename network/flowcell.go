package network

import "math"

// flowCell is the one cell, of the table that a line of its own kind would have, in which the line was asked last: cubic Hermite in x = √|Δp − zero|, zero what its
// pumps lose at no flow. Cells are halves of halves of an octave of x, the first whose middle is good to tol; which they are depends on the law alone, so that a flow
// does not depend on what was asked before. It holds while the parts stand as they do.
type flowCell struct {
	tol    float64 // relative error
	back   bool
	lo, hi float64 // √Pa: the span of x; empty where nothing was asked yet
	scale  float64 // 1/(hi − lo)
	cube   tableCell
	v, m   [2]float64 // |Q| at the ends and its slope by x
}

// firstHalvings of an octave are hardly ever enough; after lastHalvings a corner of the law lies in the cell.
const (
	firstHalvings = 3
	lastHalvings  = 16
)

// leastTabled and mostTabled are the pressures, Pa, between which a flow is taken from a cell: under it, a micrometre of liquid, the cells would be many, and beyond
// it is nothing that any pump makes.
const (
	leastTabled = 0.01
	mostTabled  = 1e12
)

// forget makes it a cell that was not asked yet.
func (t *flowCell) forget() { t.lo, t.hi = 0, 0 }

// at returns the flow of the chain and ∂q/∂Δp at d = Δp − zero, leastTabled ≤ |d| ≤ mostTabled.
func (t *flowCell) at(c *chain, d, zero float64) (q, slope float64) {
	x := math.Sqrt(math.Abs(d))
	if !(x >= t.lo && x < t.hi) || t.back != (d < 0) {
		t.find(c, x, d < 0, zero)
	}
	u, k := (x-t.lo)*t.scale, &t.cube
	q = k[0] + u*(k[1]+u*(k[2]+u*k[3]))
	slope = (k[1] + u*(2*k[2]+3*u*k[3])) * t.scale * 0.5 / x
	if t.back {
		q = -q
	}
	return q, slope
}

// find works out the cell of x.
func (t *flowCell) find(c *chain, x float64, back bool, zero float64) {
	_, e := math.Frexp(x)
	octave := math.Ldexp(1, e-1)
	w := math.Ldexp(octave, -firstHalvings)
	lo := octave + w*math.Floor((x-octave)/w)
	t.ends(c, lo, lo+w, back, zero)
	for k := firstHalvings; ; k++ {
		w = t.hi - t.lo
		t.cube, t.scale = hermite(t.v[0], t.v[1], t.m[0]*w, t.m[1]*w), 1/w
		mid := t.lo + w/2
		guess := middle(&t.cube)
		v, m := t.law(c, mid, zero, guess)
		off := math.Abs(guess-v) + math.Abs(steepness(&t.cube)-m*w)/4 // the slope tells of corners between the middle and the ends
		if k == lastHalvings || off < t.tol*v {
			return
		}
		if x < mid {
			t.hi, t.v[1], t.m[1] = mid, v, m
		} else {
			t.lo, t.v[0], t.m[0] = mid, v, m
		}
	}
}

// ends works out the law at both ends of a cell, from what is known of the last.
func (t *flowCell) ends(c *chain, lo, hi float64, back bool, zero float64) {
	known := t.hi > 0 && t.back == back
	switch {
	case known && t.hi == lo:
		t.v[0], t.m[0] = t.v[1], t.m[1]
		t.v[1], t.m[1] = t.law(c, hi, zero, t.v[0]+t.m[0]*(hi-lo))
	case known && t.lo == hi:
		t.v[1], t.m[1] = t.v[0], t.m[0]
		t.v[0], t.m[0] = t.law(c, lo, zero, t.v[1]-t.m[1]*(hi-lo))
	default:
		guess := 0.0
		if known && t.v[0] < absurdFlow {
			guess = t.v[0] * lo / t.lo
		}
		t.back = back
		t.v[0], t.m[0] = t.law(c, lo, zero, guess)
		t.v[1], t.m[1] = t.law(c, hi, zero, t.v[0]+t.m[0]*(hi-lo))
	}
	t.lo, t.hi = lo, hi
}

// law returns |Q| at x and its slope by x, starting from a guess of |Q|.
func (t *flowCell) law(c *chain, x, zero, guess float64) (v, slope float64) {
	sign := 1.0
	if t.back {
		sign = -1
	}
	q, _ := c.solve(zero+sign*x*x, sign*guess)
	_, s := c.drop(q) // that of solve is of the flow before its last correction
	return sign * q, 2 * x / s
}
