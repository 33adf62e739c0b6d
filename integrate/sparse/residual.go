package sparse

import "math"

// Tolerated is the largest backward error that SolveChecked accepts without another attempt.
const Tolerated = 1e-10

// SolveChecked is Solve with a test of its result, unless all multipliers were tame. It returns the componentwise backward error
// max |b − A x| / (|A||x| + |b|) (Oettli and Prager, Numer. Math. 6:405, 1964), which does not depend on the units of the rows, or 0 without
// a test. Above Tolerated it refines the solution once and, if that does not help, factorises anew with partial pivoting.
func (f *Factor) SolveChecked(b []float64) (float64, error) {
	if f.mode == diagonal && !f.wild {
		f.Solve(b)
		return 0, nil
	}
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
	f.Solve(f.left)
	for i, d := range f.left {
		x[i] += d
	}
	return f.backwardError(x)
}

// backwardError finds the residual of x and its componentwise size.
func (f *Factor) backwardError(x []float64) float64 {
	values, ptr := f.values, f.rptr[:len(x)+1]
	left, rhs := f.left[:len(x)], f.rhs[:len(x)]
	worst := 0.0
	a := 0
	for i, b := range rhs {
		r, size := b, math.Abs(b)
		end := int(ptr[i+1])
		at, cols := f.rpos[a:end], f.rcol[a:end]
		cols = cols[:len(at)]
		a = end
		for k, j := range at {
			t := values[j] * x[cols[k]]
			r -= t
			size += math.Abs(t)
		}
		left[i] = r
		if !(math.Abs(r) <= worst*size) {
			if r != r {
				return math.Inf(1)
			}
			worst = math.Abs(r) / size
		}
	}
	return worst
}

// transpose lists the pattern by rows.
func (f *Factor) transpose() {
	p := f.pat
	f.rptr = make([]int32, f.n+1)
	f.rcol, f.rpos = make([]int32, len(p.Row)), make([]int32, len(p.Row))
	for _, i := range p.Row {
		f.rptr[i+1]++
	}
	for i := range f.n {
		f.rptr[i+1] += f.rptr[i]
	}
	next := append([]int32(nil), f.rptr[:f.n]...)
	for j := range int32(f.n) {
		for k := p.Ptr[j]; k < p.Ptr[j+1]; k++ {
			i := p.Row[k]
			f.rcol[next[i]], f.rpos[next[i]] = j, k
			next[i]++
		}
	}
}
