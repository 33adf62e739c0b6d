package sparse

import "math"

// Tolerated is the largest backward error that SolveChecked accepts without another attempt.
const Tolerated = 1e-10

// residue is b − A x and |A||x| + |b| for one row.
type residue struct{ r, size float64 }

// SolveChecked is Solve with a test of its result. It returns the componentwise backward error max |b − A x| / (|A||x| + |b|) (Oettli and
// Prager, Numer. Math. 6:405, 1964), which does not depend on the units of the rows. Above Tolerated it refines the solution once and, if that
// does not help, factorises anew with partial pivoting.
func (f *Factor) SolveChecked(b []float64) (float64, error) {
	copy(f.rhs, b)
	f.Solve(b)
	e := f.backwardError(b)
	if e <= Tolerated {
		return e, nil
	}
	f.counts.Refined++
	if e = f.refine(b); e <= Tolerated || f.mode == pivoted {
		return e, nil
	}
	if err := f.pivot(); err != nil {
		return e, err
	}
	copy(b, f.rhs)
	f.Solve(b)
	if e = f.backwardError(b); e > Tolerated {
		e = f.refine(b)
	}
	return e, nil
}

// refine adds the solution for the residual to x and returns the new backward error.
func (f *Factor) refine(x []float64) float64 {
	d := f.rhs
	for i := range d { // the right-hand side waits in check
		d[i], f.check[i].r = f.check[i].r, d[i]
	}
	f.Solve(d)
	for i := range d {
		x[i] += d[i]
		d[i] = f.check[i].r
	}
	return f.backwardError(x)
}

func (f *Factor) backwardError(x []float64) float64 {
	c := f.check
	for i, b := range f.rhs {
		c[i] = residue{b, math.Abs(b)}
	}
	start := f.pat.Ptr[0]
	for j, xj := range x {
		end := f.pat.Ptr[j+1]
		vals := f.values[start:end]
		for k, i := range f.pat.Row[start:end] {
			t := vals[k] * xj
			q := &c[i]
			q.r -= t
			q.size += math.Abs(t)
		}
		start = end
	}
	worst := 0.0
	for i := range c {
		if r := math.Abs(c[i].r); r > worst*c[i].size {
			worst = r / c[i].size
		} else if r != r {
			return math.Inf(1)
		}
	}
	return worst
}
