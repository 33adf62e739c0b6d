package integrate

import "math"

// rosenbrock is the stepper of all Tableaus.
type rosenbrock struct {
	s   *Solver
	tab *Tableau
	control
	u       [][]float64 // Uᵢ
	g       [][]float64 // rates of the integrals
	point   []float64   // where the stage's rates are taken
	sum     []float64   // Σ Cᵢⱼ/h Uⱼ
	rate    []float64
	mean    []float64    // Σ of stages by which the integrals move with the unknowns
	byStage []float64    // weights of the integrals' rates; see weights
	along   [][]float64  // the same for their polynomial
	midway  [2][]float64 // what stages add half-way to the unknowns and to their rates; see half
	midwayZ []float64    // weights of the integrals' rates in their rates half-way
	byY     []float64    // ∂g/∂y and ∂g/∂t where the step begins
	byT     []float64
	c       []float64 // a row of C divided by h
	extends []bool    // by stage
	stiffly bool
	busy    int // integrals that moved in the last attempt
}

func (m *Tableau) stepper(s *Solver) stepper {
	k := m.stages()
	r := &rosenbrock{s: s, tab: m, control: control{q: float64(m.Embedded + 1)}, stiffly: m.stiffly()}
	for i := range k {
		r.u = append(r.u, make([]float64, s.n))
		r.g = append(r.g, make([]float64, s.m))
		r.extends = append(r.extends, m.extends(i))
	}
	r.point, r.sum, r.rate = make([]float64, s.n), make([]float64, s.n), make([]float64, s.n)
	r.mean, r.c = make([]float64, s.n), make([]float64, k)
	r.byStage = m.weights(m.M)
	r.midway = [2][]float64{make([]float64, k), make([]float64, k)}
	r.midwayZ = make([]float64, k)
	part := 0.25 // θ(1−θ)θʲ at θ = ½; its derivative there is j times that
	for j, h := range m.H {
		r.along = append(r.along, m.weights(h))
		for i, w := range r.along[j] {
			r.midwayZ[i] += part * 2 * float64(j) * w
		}
		for i, v := range h {
			r.midway[0][i] += part * v
			r.midway[1][i] += part * 2 * float64(j) * v
		}
		part /= 2
	}
	return r
}

func (r *rosenbrock) order() int  { return r.tab.Embedded }
func (r *rosenbrock) degree() int { return len(r.tab.H) }

func (r *rosenbrock) attempt(h float64) (float64, error) {
	s, m := r.s, r.tab
	r.byY, r.byT = s.lin.DgDy, s.lin.DgDt
	if err := s.factorise(1 / (h * m.Gamma)); err != nil {
		return 0, err
	}
	for i := range m.M {
		u := r.u[i]
		f := s.f
		if i == 0 {
			copy(r.g[0], s.g)
		} else {
			r.sums(i, h)
			f = r.rate
			s.rates(s.t+m.Node[i]*h, r.point, f, r.g[i])
		}
		r.assemble(i, h, f, u)
		if i == 0 {
			if _, err := s.factor.SolveChecked(u); err != nil {
				return 0, err
			}
		} else {
			s.factor.Solve(u)
		}
	}
	r.busy = s.m
	if s.idler != nil {
		r.busy = s.idler.Busy()
	}
	return r.finish(h), nil
}

// sums forms the stage's point and Σ Cᵢⱼ/h Uⱼ in one pass.
func (r *rosenbrock) sums(i int, h float64) {
	m, c := r.tab, r.c[:i]
	for j := range c {
		c[j] = m.C[i][j] / h
	}
	if r.extends[i] {
		extendPoint(r.point, r.u[i-1])
		combine(r.sum, c, r.u)
		return
	}
	stagePoint(r.point, r.sum, r.s.y0, m.A[i], c, r.u)
}

// assemble puts the right-hand side of stage i into b.
func (r *rosenbrock) assemble(i int, h float64, f, b []float64) {
	s := r.s
	f = f[:len(b)]
	switch {
	case i == 0:
		copy(b, f)
	case s.algebraic:
		sum, mass := r.sum[:len(b)], s.mass[:len(b)]
		for k := range b {
			b[k] = f[k]
			if mass[k] {
				b[k] += sum[k]
			}
		}
	default:
		sum := r.sum[:len(b)]
		for k := range b {
			b[k] = f[k] + sum[k]
		}
	}
	if d := h * r.tab.D[i]; d != 0 && s.moving {
		ft := s.lin.DfDt[:len(b)]
		for k := range b {
			b[k] += d * ft[k]
		}
	}
}

func (r *rosenbrock) implicit() bool { return false }

// finish forms the result and the error estimate.
func (r *rosenbrock) finish(h float64) float64 {
	s, m := r.s, r.tab
	last := len(m.M) - 1
	if r.stiffly {
		addPoint(s.y1, r.point, r.u[last])
		copy(s.err, r.u[last])
	} else {
		copy(s.y1, s.y0)
		clear(s.err)
		for j, u := range r.u {
			for k := range u {
				s.y1[k] += m.M[j] * u[k]
				s.err[k] += m.E[j] * u[k]
			}
		}
	}
	z1 := s.z1[:r.busy]
	r.integrals(z1, h, r.byStage)
	bad := 0.0
	for k, sum := range z1 {
		z1[k] = s.z0[k] + sum
		bad += sum - sum
	}
	copy(s.z1[r.busy:], s.z0[r.busy:])
	if bad != 0 {
		return math.NaN()
	}
	return norm(s.err, s.scale)
}

// weights returns ω with Σ mᵢUzᵢ = h Σ ωᵢ(gᵢ + ∂g/∂y Uᵢ + dᵢ h ∂g/∂t) for the stages of a row that nothing depends on,
// Uzᵢ = hγ (gᵢ + ∂g/∂y Uᵢ + dᵢ h ∂g/∂t + Σ Cᵢⱼ/h Uzⱼ): these are linear in what stands in brackets, with constants of the method.
func (m *Tableau) weights(of []float64) []float64 {
	k := m.stages()
	w := make([]float64, k)
	x := make([]float64, k)
	for j := range k {
		clear(x)
		for i := j; i < k; i++ {
			if i == j {
				x[i] = 1
			}
			for l := j; l < i; l++ {
				x[i] += m.C[i][l] * x[l]
			}
			x[i] *= m.Gamma
			w[j] += of[i] * x[i]
		}
	}
	return w
}

// integrals sets z to h Σ ωᵢ(gᵢ + ∂g/∂y Uᵢ + dᵢ h ∂g/∂t), the change of the first integrals.
func (r *rosenbrock) integrals(z []float64, h float64, weight []float64) {
	s := r.s
	combine(z, weight, r.g)
	combine(r.mean, weight, r.u)
	d := 0.0
	for i, w := range weight {
		d += w * h * r.tab.D[i]
	}
	ptr, u := s.iptr[:len(z)+1], r.mean
	byT, by, col := r.byT[:len(z)], r.byY, s.icol
	l := ptr[0]
	for k := range z {
		sum, end := z[k]+d*byT[k], ptr[k+1]
		for ; l+1 < end; l += 2 {
			sum += by[l]*u[col[l]] + by[l+1]*u[col[l+1]]
		}
		if l < end {
			sum += by[l] * u[col[l]]
			l++
		}
		z[k] = h * sum
	}
}

func (r *rosenbrock) polynomial(k [][]float64) {
	for i := range k {
		combine(k[i], r.tab.H[i], r.u)
	}
}

func (r *rosenbrock) polynomialZ(kz [][]float64) {
	for i := range kz {
		clear(kz[i][r.busy:])
		r.integrals(kz[i][:r.busy], r.s.poly.H, r.along[i])
	}
}

func (r *rosenbrock) row(i int) (k inner) {
	for j, h := range r.tab.H {
		for l, u := range r.u {
			k[j] += h[l] * u[i]
		}
	}
	return k
}

func (r *rosenbrock) rowZ(i int) (k inner) {
	if i >= r.busy {
		return k
	}
	s, h := r.s, r.s.poly.H
	for j, weight := range r.along {
		sum := 0.0
		for l, w := range weight {
			in := r.g[l][i] + h*r.tab.D[l]*r.byT[i]
			for p := s.iptr[i]; p < s.iptr[i+1]; p++ {
				in += r.byY[p] * r.u[l][s.icol[p]]
			}
			sum += w * in
		}
		k[j] = h * sum
	}
	return k
}

func (r *rosenbrock) half(y, rate []float64) { combine2(y, rate, r.midway[0], r.midway[1], r.u) }

func (r *rosenbrock) halfZ(rate []float64) {
	n := min(len(rate), r.busy)
	r.integrals(rate[:n], r.s.poly.H, r.midwayZ)
	clear(rate[n:])
}

func (r *rosenbrock) restart()                    { r.control.restart() }
func (r *rosenbrock) accept(norm float64) float64 { return r.s.poly.H * r.control.accept(norm) }
func (r *rosenbrock) reject(norm float64) float64 { return r.s.poly.H * r.control.reject(norm) }
