package sparse

import "math"

// eliminateBlock factorises a panel of several columns and updates its ancestors.
func (f *Factor) eliminateBlock(p *panel) bool {
	d, u, l := f.blocks(p)
	if !f.eliminateDense(d, u, l, int(p.w), int(p.r)) {
		return false
	}
	w, r := int(p.w), int(p.r)
	out0, out1 := f.buf[:r], f.buf[r:2*r]
	for _, c := range f.cuts[p.cut : p.cut+p.ncut] {
		q := &f.panels[c.p]
		a, in := int(c.a), int(c.b-c.a)
		rel := f.rel[c.at : int(c.at)+r-a]
		dq, uq, lq := f.blocks(q)
		for i := 0; i < in; i += 2 {
			j := min(i+1, in-1) // the last row of an odd cut is computed twice and used once
			combine(out0, out1, l, u, w, r, a+i, a+j, a)
			for n, out := i, out0; n <= j; n, out = n+1, out1 {
				k := rel[n]
				scatter(dq[k*q.w:(k+1)*q.w], rel[:in], out)
				scatter(uq[k*q.r:(k+1)*q.r], rel[in:], out[in:])
			}
			if a+in < r {
				combine(out0, out1, u, l, w, r, a+i, a+j, a+in)
				for n, out := i, out0; n <= j; n, out = n+1, out1 {
					k := rel[n]
					scatter(lq[k*q.r:(k+1)*q.r], rel[in:], out)
				}
			}
		}
	}
	return true
}

// eliminateDense factorises the w×(w+r) and (w+r)×w parts of a panel in place; pivots are left inverted.
func (f *Factor) eliminateDense(d, u, l []float64, w, r int) bool {
	for k := range w {
		pivot := d[k*w+k]
		inv := 1 / pivot
		d[k*w+k] = inv
		lk := l[k*r : (k+1)*r]
		largest := 0.0
		for i := range lk {
			lk[i] *= inv
			largest = max(largest, math.Abs(lk[i]))
		}
		dk, uk := d[k*w:(k+1)*w], u[k*r:(k+1)*r]
		for i := k + 1; i < w; i++ {
			di := d[i*w : (i+1)*w]
			m := di[k] * inv
			di[k] = m
			largest = max(largest, math.Abs(m))
			if m != 0 {
				axpy(di[k+1:], dk[k+1:], m)
				axpy(u[i*r:(i+1)*r], uk, m)
			}
			if n := dk[i]; n != 0 {
				axpy(l[i*r:(i+1)*r], lk, n)
			}
		}
		if !(largest <= tame) && !f.accept(largest) || !(math.Abs(inv) <= math.MaxFloat64) {
			return false
		}
	}
	return true
}

// axpy takes m·x from y.
func axpy(y, x []float64, m float64) {
	y = y[:len(x)]
	for len(x) >= 4 && len(y) >= 4 {
		y[0] -= m * x[0]
		y[1] -= m * x[1]
		y[2] -= m * x[2]
		y[3] -= m * x[3]
		x, y = x[4:], y[4:]
	}
	for i := range x {
		y[i] -= m * x[i]
	}
}

// combine sets out0[m] = Σ_k c[k·r+i]·x[k·r+from+m] and out1 likewise for j, for all m < r − from: two rows of the product of a
// transposed w×r block with another.
func combine(out0, out1, c, x []float64, w, r, i, j, from int) {
	n := r - from
	m := 0
	for ; m+4 <= n; m += 4 {
		var a0, a1, a2, a3, b0, b1, b2, b3 float64
		for k, at := 0, from+m; k < w; k, at = k+1, at+r {
			ci, cj := c[k*r+i], c[k*r+j]
			y := x[at : at+4 : at+4]
			a0 += ci * y[0]
			a1 += ci * y[1]
			a2 += ci * y[2]
			a3 += ci * y[3]
			b0 += cj * y[0]
			b1 += cj * y[1]
			b2 += cj * y[2]
			b3 += cj * y[3]
		}
		p, q := out0[m:m+4:m+4], out1[m:m+4:m+4]
		p[0], p[1], p[2], p[3] = a0, a1, a2, a3
		q[0], q[1], q[2], q[3] = b0, b1, b2, b3
	}
	for ; m < n; m++ {
		var a, b float64
		for k, at := 0, from+m; k < w; k, at = k+1, at+r {
			a += c[k*r+i] * x[at]
			b += c[k*r+j] * x[at]
		}
		out0[m], out1[m] = a, b
	}
}

// scatter takes x from the places rel of y.
func scatter(y []float64, rel []int32, x []float64) {
	x = x[:len(rel)]
	for m, k := range rel {
		y[k] -= x[m]
	}
}
