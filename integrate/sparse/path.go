package sparse

import "math"

// A path's columns wait for each other: every loop below is bound by the time from one result to the next. Peeled from both ends, as Order does,
// a chain gives a path of stride two, which is two such waits side by side.

// eliminatePath is eliminateLeaves for a path.
func (f *Factor) eliminatePath(r run) bool {
	n := int(r.s1 - r.s0)
	at := int(f.panels[r.s0].at)
	w := f.v[at : at+3*n]
	spots := f.spots[r.spot : int(r.spot)+n]
	if r.stride == 1 {
		d, ok := f.pathOne(w)
		f.v[spots[n-1]] += d
		return ok
	}
	d, e, ok := f.pathTwo(w)
	f.v[spots[n-2]] += d
	f.v[spots[n-1]] += e
	return ok
}

// pathOne eliminates along one chain and returns what the last column adds to the pivot after it.
func (f *Factor) pathOne(w []float64) (add float64, ok bool) {
	for len(w) >= 3 {
		d, u, l := w[0]+add, w[1], w[2]
		inv := 1 / d
		add = -(l * u) * inv
		l *= inv
		if !(math.Abs(l) <= tame) && !f.accept(l) || d == 0 {
			return 0, false
		}
		w[0], w[1], w[2] = inv, u*inv, l
		w = w[3:]
	}
	return add, true
}

// pathTwo is pathOne for two interleaved chains.
func (f *Factor) pathTwo(w []float64) (add0, add1 float64, ok bool) {
	for len(w) >= 6 {
		d0, u0, l0 := w[0]+add0, w[1], w[2]
		d1, u1, l1 := w[3]+add1, w[4], w[5]
		inv0, inv1 := 1/d0, 1/d1
		add0, add1 = -(l0*u0)*inv0, -(l1*u1)*inv1
		l0 *= inv0
		l1 *= inv1
		if !(math.Abs(l0) <= tame) && !f.accept(l0) || !(math.Abs(l1) <= tame) && !f.accept(l1) || d0 == 0 || d1 == 0 {
			return 0, 0, false
		}
		w[0], w[1], w[2], w[3], w[4], w[5] = inv0, u0*inv0, l0, inv1, u1*inv1, l1
		w = w[6:]
	}
	return add0, add1, true
}

// forwardPath takes L times what is known from the rest of x.
func forwardPath(x, w []float64, stride int) {
	if stride == 1 {
		t := x[0]
		for k := 1; k < len(x) && len(w) >= 3; k++ {
			t = x[k] - w[2]*t
			x[k] = t
			w = w[3:]
		}
		return
	}
	s, t := x[0], x[1]
	for x = x[2:]; len(x) >= 2 && len(w) >= 6; x, w = x[2:], w[6:] {
		s = x[0] - w[2]*s
		t = x[1] - w[5]*t
		x[0], x[1] = s, t
	}
}

// backwardPath solves with U, from the end.
func backwardPath(x, w []float64, stride int) {
	k := len(x) - 1
	if stride == 1 {
		t := x[k]
		for k--; k >= 0; k-- {
			q := w[3*k : 3*k+2 : 3*k+2]
			t = x[k]*q[0] - q[1]*t
			x[k] = t
		}
		return
	}
	s, t := x[k-1], x[k]
	for k -= 2; k >= 1; k -= 2 {
		q, y := w[3*k-3:3*k+2:3*k+2], x[k-1:k+1:k+1]
		s = y[0]*q[0] - q[1]*s
		t = y[1]*q[3] - q[4]*t
		y[0], y[1] = s, t
	}
}
