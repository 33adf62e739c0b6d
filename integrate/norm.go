package integrate

import "math"

// block is the number of unknowns that share one mean in the error norm.
const block = 64

// norm returns the maximum over blocks of 64 unknowns of the root mean square of e/scale in each: a plain mean would dilute the error of one vessel in a
// large quiet plant, and a plain maximum takes more steps for nothing. It is NaN if any e is.
func norm(e, scale []float64) float64 {
	worst := 0.0
	for len(e) > 0 {
		n := min(block, len(e))
		// An even share: no block is much smaller than the others.
		if len(e) > block && len(e) < 2*block {
			n = len(e) / 2
		}
		a, b := e[:n], scale[:n]
		s0, s1 := 0.0, 0.0
		k := 0
		for ; k+1 < n; k += 2 {
			p, q := a[k]/b[k], a[k+1]/b[k+1]
			s0 += p * p
			s1 += q * q
		}
		if k < n {
			p := a[k] / b[k]
			s0 += p * p
		}
		if s := (s0 + s1) / float64(n); !(s <= worst) {
			worst = s
			if s != s {
				return s
			}
		}
		e, scale = e[n:], scale[n:]
	}
	return math.Sqrt(worst)
}

// worst returns the index of the largest e/scale, or of the first that is not a number; -1 if all are zero.
func worst(e, scale []float64) int {
	at, most := -1, 0.0
	for i := range e {
		q := math.Abs(e[i] / scale[i])
		if q != q {
			return i
		}
		if q > most {
			at, most = i, q
		}
	}
	return at
}
