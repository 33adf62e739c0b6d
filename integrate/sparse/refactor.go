package sparse

import "math"

// growth is the largest multiplier that elimination on the diagonal may meet; beyond it other pivots are looked for. It is loose because
// rows may be in different units: what matters is caught by the backward error of SolveChecked.
const growth = 1e10

// cancelled is the share of a root's entry to its pivot beyond which the pivot may be rounding. Pivoting then finds out whether the matrix is
// singular.
const cancelled = 1e13

// tame is the largest multiplier that threshold partial pivoting would have allowed. While no multiplier is larger, elimination on the diagonal is
// as stable, and SolveChecked trusts it.
const tame = 1 / threshold

// accept notes a multiplier that is not tame; false if it is not below growth, or not a number.
func (f *Factor) accept(l float64) bool {
	f.wild = true
	return math.Abs(l) < growth
}

// Refactor factorises the matrix with these values, in the order of the pattern. The slice must not change before the next Refactor:
// SolveChecked measures its residual with it. It eliminates on the diagonal while the pivots allow, and with threshold partial
// pivoting otherwise.
func (f *Factor) Refactor(values []float64) error {
	f.values = values
	f.counts.Factorisations++
	if f.eliminate() {
		f.mode = diagonal
		return nil
	}
	return f.pivot()
}

// pivot factorises with threshold partial pivoting.
func (f *Factor) pivot() error {
	f.counts.Pivoted++
	f.mode = unset
	if f.pivots == nil {
		f.pivots = newPivoting(f.pat, f.order)
	}
	if err := f.pivots.factorise(f.values); err != nil {
		return err
	}
	f.mode = pivoted
	return nil
}

// eliminate factorises on the diagonal and returns whether all multipliers stayed below growth.
func (f *Factor) eliminate() bool {
	v := f.v
	clear(v)
	f.wild = false
	for k, s := range f.slot {
		v[s] = f.values[k]
	}
	for _, r := range f.runs {
		ok := true
		switch r.kind {
		case lone:
			ok = f.eliminateLone(r)
		case leaf:
			ok = f.eliminateLeaves(r)
		case path:
			ok = f.eliminatePath(r)
		case twig:
			ok = f.eliminateTwigs(r)
		default:
			for s := r.s0; s < r.s1 && ok; s++ {
				if p := &f.panels[s]; r.kind == column {
					ok = f.eliminateColumn(p)
				} else {
					ok = f.eliminateBlock(p)
				}
			}
		}
		if !ok {
			return false
		}
	}
	for _, r := range f.roots {
		if !(math.Abs(f.values[r.entry]*v[r.at]) < cancelled) { // a pivot that is left over from cancellation
			return false
		}
	}
	return true
}

func (f *Factor) eliminateLone(r run) bool {
	ok := true
	for s := r.s0; s < r.s1; s++ {
		d := &f.v[f.panels[s].at]
		*d = 1 / *d
		ok = ok && math.Abs(*d) <= math.MaxFloat64
	}
	return ok
}

// eliminateLeaves does panels of three numbers: pivot, u, l. The pivot is replaced by its inverse and u scaled by it, which keeps the
// division out of Solve.
func (f *Factor) eliminateLeaves(r run) bool {
	n := int(r.s1 - r.s0)
	at := int(f.panels[r.s0].at)
	v, w := f.v, f.v[at:at+3*n]
	for _, t := range f.spots[r.spot : int(r.spot)+n] {
		d, u, l := w[0], w[1], w[2]
		inv := 1 / d
		l *= inv
		if !(math.Abs(l) <= tame) && !f.accept(l) || d == 0 {
			return false
		}
		v[t] -= l * u
		w[0], w[1], w[2] = inv, u*inv, l
		w = w[3:]
	}
	return true
}

// eliminateTwigs does panels of five numbers: pivot, two of U, two of L.
func (f *Factor) eliminateTwigs(r run) bool {
	n := int(r.s1 - r.s0)
	at := int(f.panels[r.s0].at)
	v, w := f.v, f.v[at:at+5*n]
	spots := f.spots[r.spot : int(r.spot)+4*n]
	for range n {
		d, u0, u1, l0, l1 := w[0], w[1], w[2], w[3], w[4]
		inv := 1 / d
		l0 *= inv
		l1 *= inv
		if l := max(math.Abs(l0), math.Abs(l1)); !(l <= tame) && !f.accept(l) || d == 0 {
			return false
		}
		t := spots[:4]
		v[t[0]] -= l0 * u0
		v[t[1]] -= l0 * u1
		v[t[2]] -= l1 * u0
		v[t[3]] -= l1 * u1
		w[0], w[1], w[2], w[3], w[4] = inv, u0*inv, u1*inv, l0, l1
		w, spots = w[5:], spots[4:]
	}
	return true
}

// eliminateColumn does a panel of one column and updates its ancestors straight away.
func (f *Factor) eliminateColumn(p *panel) bool {
	r := p.r
	w := f.v[p.at : p.at+1+2*r]
	u, l := w[1:1+r], w[1+r:]
	d := w[0]
	inv := 1 / d
	largest := 0.0
	for i := range l {
		l[i] *= inv
		largest = max(largest, math.Abs(l[i]))
	}
	if !(largest <= tame) && !f.accept(largest) || d == 0 {
		return false
	}
	for _, c := range f.cuts[p.cut : p.cut+p.ncut] {
		q := &f.panels[c.p]
		rel := f.rel[c.at : c.at+r-c.a]
		in := c.b - c.a
		dq, uq, lq := f.blocks(q)
		for i := range in {
			k := rel[i]
			li, ui := l[c.a+i], u[c.a+i]
			subtract(dq[k*q.w:(k+1)*q.w], rel[:in], u[c.a:c.b], li)
			subtract(uq[k*q.r:(k+1)*q.r], rel[in:], u[c.b:], li)
			subtract(lq[k*q.r:(k+1)*q.r], rel[in:], l[c.b:], ui)
		}
	}
	for i := range u {
		u[i] *= inv
	}
	w[0] = inv
	return true
}

// blocks returns the three blocks of a panel: D, U and the transpose of L.
func (f *Factor) blocks(p *panel) (d, u, l []float64) {
	a := p.at + p.w*p.w
	b := a + p.w*p.r
	return f.v[p.at:a], f.v[a:b], f.v[b : b+p.w*p.r]
}

// subtract takes factor·x from the places rel of y.
func subtract(y []float64, rel []int32, x []float64, factor float64) {
	x = x[:len(rel)]
	for m, k := range rel {
		y[k] -= factor * x[m]
	}
}
