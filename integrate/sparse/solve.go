package sparse

// Solve overwrites b by the solution of A x = b with the factors of the last Refactor.
func (f *Factor) Solve(b []float64) {
	switch f.mode {
	case diagonal:
		f.solve(b)
	case pivoted:
		f.pivots.solve(b)
	default:
		panic("sparse: Solve without factors")
	}
}

func (f *Factor) solve(b []float64) {
	x := b
	if !f.plain {
		x = f.x
		for k, i := range f.order {
			x[k] = b[i]
		}
	}
	for _, r := range f.runs {
		f.forward(r, x)
	}
	for k := len(f.runs) - 1; k >= 0; k-- {
		f.backward(f.runs[k], x)
	}
	if !f.plain {
		for k, i := range f.order {
			b[i] = x[k]
		}
	}
}

func (f *Factor) forward(r run, x []float64) {
	p := &f.panels[r.s0]
	n := int(r.s1 - r.s0)
	switch r.kind {
	case lone:
	case leaf:
		w := f.v[p.at : int(p.at)+3*n]
		rows := f.rows[p.row : int(p.row)+n]
		own := x[p.col:]
		for k, i := range rows {
			x[i] -= w[2] * own[k]
			w = w[3:]
		}
	case path:
		forwardPath(x[p.col:int(p.col)+n+int(r.stride)], f.v[p.at:int(p.at)+3*n], int(r.stride))
	case twig:
		w := f.v[p.at : int(p.at)+5*n]
		rows := f.rows[p.row : int(p.row)+2*n]
		for _, t := range x[p.col : int(p.col)+n] {
			x[rows[0]] -= w[3] * t
			x[rows[1]] -= w[4] * t
			w, rows = w[5:], rows[2:]
		}
	default:
		for s := r.s0; s < r.s1; s++ {
			if q := &f.panels[s]; r.kind == column {
				subtract(x, f.rows[q.row:q.row+q.r], f.v[q.at+1+q.r:q.at+1+2*q.r], x[q.col])
			} else {
				f.forwardBlock(q, x)
			}
		}
	}
}

func (f *Factor) backward(r run, x []float64) {
	p := &f.panels[r.s0]
	n := int(r.s1 - r.s0)
	switch r.kind {
	case lone:
		for k, d := range f.v[p.at : int(p.at)+n] {
			x[int(p.col)+k] *= d
		}
	case leaf:
		w := f.v[p.at : int(p.at)+3*n]
		rows := f.rows[p.row : int(p.row)+n]
		own := x[p.col : int(p.col)+n]
		for k := n - 1; k >= 0; k-- {
			q := w[3*k : 3*k+2 : 3*k+2]
			own[k] = own[k]*q[0] - q[1]*x[rows[k]]
		}
	case path:
		backwardPath(x[p.col:int(p.col)+n+int(r.stride)], f.v[p.at:int(p.at)+3*n], int(r.stride))
	case twig:
		w := f.v[p.at : int(p.at)+5*n]
		rows := f.rows[p.row : int(p.row)+2*n]
		own := x[p.col : int(p.col)+n]
		for k := n - 1; k >= 0; k-- {
			q := w[5*k : 5*k+3 : 5*k+3]
			own[k] = own[k]*q[0] - (q[1]*x[rows[2*k]] + q[2]*x[rows[2*k+1]])
		}
	default:
		for s := r.s1 - 1; s >= r.s0; s-- {
			if q := &f.panels[s]; r.kind == column {
				sum := gatherDot(x, f.rows[q.row:q.row+q.r], f.v[q.at+1:q.at+1+q.r])
				x[q.col] = x[q.col]*f.v[q.at] - sum
			} else {
				f.backwardBlock(q, x)
			}
		}
	}
}

// gatherDot returns the product of u with the places rows of x.
func gatherDot(x []float64, rows []int32, u []float64) float64 {
	u = u[:len(rows)]
	a, b := 0.0, 0.0
	k := 0
	for ; k+1 < len(rows); k += 2 {
		a += u[k] * x[rows[k]]
		b += u[k+1] * x[rows[k+1]]
	}
	if k < len(rows) {
		a += u[k] * x[rows[k]]
	}
	return a + b
}

// forwardBlock solves with the unit lower triangle of D, then takes L times that from the rows below, two columns at a time.
func (f *Factor) forwardBlock(p *panel, x []float64) {
	w, r := int(p.w), int(p.r)
	d, _, l := f.blocks(p)
	own := x[p.col : int(p.col)+w]
	for i := 1; i < w; i++ {
		own[i] -= dot(d[i*w:i*w+i], own)
	}
	rows := f.rows[p.row : p.row+p.r]
	k := 0
	for ; k+2 <= w; k += 2 {
		s, t := own[k], own[k+1]
		l0, l1 := l[k*r:(k+1)*r], l[(k+1)*r:(k+2)*r]
		l0, l1 = l0[:len(rows)], l1[:len(rows)]
		for m, i := range rows {
			x[i] -= l0[m]*s + l1[m]*t
		}
	}
	if k < w {
		subtract(x, rows, l[k*r:(k+1)*r], own[k])
	}
}

// backwardBlock takes U times the rows below from the right-hand side, then solves with the upper triangle of D.
func (f *Factor) backwardBlock(p *panel, x []float64) {
	w, r := int(p.w), int(p.r)
	d, u, _ := f.blocks(p)
	own := x[p.col : int(p.col)+w]
	below := f.buf[:r]
	for m, i := range f.rows[p.row : p.row+p.r] {
		below[m] = x[i]
	}
	for k := w - 1; k >= 0; k-- {
		sum := dot(u[k*r:(k+1)*r], below) + dot(d[k*w+k+1:(k+1)*w], own[k+1:])
		own[k] = (own[k] - sum) * d[k*w+k]
	}
}

// dot returns Σ a[i]·b[i] over the length of a.
func dot(a, b []float64) float64 {
	b = b[:len(a)]
	var s0, s1, s2, s3 float64
	for len(a) >= 4 && len(b) >= 4 {
		s0 += a[0] * b[0]
		s1 += a[1] * b[1]
		s2 += a[2] * b[2]
		s3 += a[3] * b[3]
		a, b = a[4:], b[4:]
	}
	for i := range a {
		s0 += a[i] * b[i]
	}
	return (s0 + s2) + (s1 + s3)
}
