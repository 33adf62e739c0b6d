package integrate

import "math"

// rosenbrock is the stepper of all Tableaus.
type rosenbrock struct {
	s   *Solver
	tab *Tableau
	control
	u       [][]float64 // Uᵢ
	uz      [][]float64 // of the integrals
	point   []float64   // where the stage's rates are taken
	sum     []float64   // Σ Cᵢⱼ/h Uⱼ
	rate    []float64
	zrate   []float64
	c       []float64 // a row of C divided by h
	extends []bool    // by stage
	stiffly bool
}

func (m *Tableau) stepper(s *Solver) stepper {
	k := m.stages()
	r := &rosenbrock{s: s, tab: m, control: control{q: float64(m.Embedded + 1)}, stiffly: m.stiffly()}
	for i := range k {
		r.u = append(r.u, make([]float64, s.n))
		r.uz = append(r.uz, make([]float64, s.m))
		r.extends = append(r.extends, m.extends(i))
	}
	r.point, r.sum, r.rate = make([]float64, s.n), make([]float64, s.n), make([]float64, s.n)
	r.zrate, r.c = make([]float64, s.m), make([]float64, k)
	return r
}

func (r *rosenbrock) order() int  { return r.tab.Embedded }
func (r *rosenbrock) degree() int { return len(r.tab.H) }

func (r *rosenbrock) attempt(h float64) (float64, error) {
	s, m := r.s, r.tab
	if err := s.factorise(1 / (h * m.Gamma)); err != nil {
		return 0, err
	}
	for i := range m.M {
		u := r.u[i]
		f, g := s.f, s.g
		if i > 0 {
			r.sums(i, h)
			f, g = r.rate, r.zrate
			s.rates(s.t+m.Node[i]*h, r.point, f, g)
		}
		r.assemble(i, h, f, u)
		if i == 0 {
			if _, err := s.factor.SolveChecked(u); err != nil {
				return 0, err
			}
		} else {
			s.factor.Solve(u)
		}
		r.integrals(i, h, g)
	}
	return r.finish(), nil
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

// integrals does stage i of the rows that nothing depends on: Uzᵢ = hγ (g + ∂g/∂y Uᵢ + Σ Cᵢⱼ/h Uzⱼ + dᵢ h ∂g/∂t). These are the same operations as
// for the unknowns, so what is invariant between the two stays so to rounding.
func (r *rosenbrock) integrals(i int, h float64, g []float64) {
	s := r.s
	hg, d := h*r.tab.Gamma, h*r.tab.D[i]
	u, uz := r.u[i], r.uz[i][:len(g)]
	combine(uz, r.c[:i], r.uz)
	byT, ptr := s.lin.DgDt[:len(g)], s.iptr[:len(g)+1]
	for k := range g {
		sum := g[k] + d*byT[k]
		for l := ptr[k]; l < ptr[k+1]; l++ {
			sum += s.lin.DgDy[l] * u[s.icol[l]]
		}
		uz[k] = hg * (sum + uz[k])
	}
}

func (r *rosenbrock) implicit() bool { return false }

// finish forms the result and the error estimate.
func (r *rosenbrock) finish() float64 {
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
	combine(s.z1, m.M, r.uz)
	bad := 0.0
	for k, sum := range s.z1 {
		s.z1[k] = s.z0[k] + sum
		bad += sum - sum
	}
	if bad != 0 {
		return math.NaN()
	}
	return norm(s.err, s.scale)
}

func (r *rosenbrock) polynomial(k, kz [][]float64) {
	h := r.tab.H
	if len(r.u) == 8 && len(h) == 3 {
		combine3(k[0], k[1], k[2], h[0], h[1], h[2], r.u)
		combine3(kz[0], kz[1], kz[2], h[0], h[1], h[2], r.uz)
		return
	}
	for i := range k {
		combine(k[i], h[i], r.u)
		combine(kz[i], h[i], r.uz)
	}
}

func (r *rosenbrock) restart()                    { r.control.restart() }
func (r *rosenbrock) accept(norm float64) float64 { return r.s.poly.H * r.control.accept(norm) }
func (r *rosenbrock) reject(norm float64) float64 { return r.s.poly.H * r.control.reject(norm) }
