package integrate

import "math"

// Dense is the dense output of one step, a polynomial for each unknown and integral:
//
//	y(T0+θH) = (1−θ) Y0 + θ (Y1 + (1−θ) (K[0] + θ (K[1] + θ (K[2] + …)))),   0 ≤ θ ≤ 1
//
// and likewise z with Z0, Z1, KZ. The slices belong to the Solver and hold until its next Step, Restart or Reset.
type Dense struct {
	T0, H  float64
	Y0, Y1 []float64
	K      [][]float64
	Z0, Z1 []float64
	KZ     [][]float64

	ready bool // K and KZ are those of the step
}

func newDense(s *Solver, degree int) Dense {
	d := Dense{Y0: s.y0, Y1: s.y1, Z0: s.z0, Z1: s.z1}
	for range degree {
		d.K = append(d.K, make([]float64, s.n))
		d.KZ = append(d.KZ, make([]float64, s.m))
	}
	return d
}

// begin opens a step of h at t.
func (d *Dense) begin(t, h float64, s *Solver) {
	d.T0, d.H, d.ready = t, h, false
	copy(d.Y0, s.y)
	copy(d.Z0, s.z)
}

// end closes a step of no length, as after a Restart.
func (d *Dense) end(y, z []float64) {
	copy(d.Y1, y)
	copy(d.Z1, z)
	for k := range d.K {
		clear(d.K[k])
		clear(d.KZ[k])
	}
	d.ready = true
}

// Dense returns the polynomials of the last step.
func (s *Solver) Dense() *Dense {
	if d := &s.poly; !d.ready {
		s.step.polynomial(d.K, d.KZ)
		d.ready = true
	}
	return &s.poly
}

// Eval sets y to the unknowns at time t within the last step.
func (s *Solver) Eval(t float64, y []float64) {
	d := s.Dense()
	evaluate(d.place(t), d.Y0, d.Y1, d.K, y)
}

// EvalZ sets z to the integrals at time t within the last step.
func (s *Solver) EvalZ(t float64, z []float64) {
	d := s.Dense()
	evaluate(d.place(t), d.Z0, d.Z1, d.KZ, z)
}

// EvalOne returns unknown i at time t within the last step.
func (s *Solver) EvalOne(i int, t float64) float64 {
	return s.Dense().One(i, t)
}

// One returns unknown i at time t.
func (d *Dense) One(i int, t float64) float64 {
	x := d.place(t)
	inner := 0.0
	for k := len(d.K) - 1; k >= 0; k-- {
		inner = inner*x + d.K[k][i]
	}
	return (1-x)*d.Y0[i] + x*(d.Y1[i]+(1-x)*inner)
}

// OneZ returns integral i at time t.
func (d *Dense) OneZ(i int, t float64) float64 {
	x := d.place(t)
	inner := 0.0
	for k := len(d.KZ) - 1; k >= 0; k-- {
		inner = inner*x + d.KZ[k][i]
	}
	return (1-x)*d.Z0[i] + x*(d.Z1[i]+(1-x)*inner)
}

// Rate returns the time derivative of unknown i at time t.
func (d *Dense) Rate(i int, t float64) float64 {
	if d.H == 0 {
		return 0
	}
	x := d.place(t)
	inner, slope := 0.0, 0.0
	for k := len(d.K) - 1; k >= 0; k-- {
		slope = slope*x + inner
		inner = inner*x + d.K[k][i]
	}
	return (d.Y1[i] - d.Y0[i] + (1-2*x)*inner + x*(1-x)*slope) / d.H
}

// RateZ returns the time derivative of integral i at time t.
func (d *Dense) RateZ(i int, t float64) float64 {
	if d.H == 0 {
		return 0
	}
	x := d.place(t)
	inner, slope := 0.0, 0.0
	for k := len(d.KZ) - 1; k >= 0; k-- {
		slope = slope*x + inner
		inner = inner*x + d.KZ[k][i]
	}
	return (d.Z1[i] - d.Z0[i] + (1-2*x)*inner + x*(1-x)*slope) / d.H
}

// Turn returns the time between t0 and t1 at which the rate of unknown i, of opposite signs there, is zero.
func (d *Dense) Turn(i int, t0, t1 float64) float64 { return d.turn(i, t0, t1, d.Y0, d.Y1, d.K) }

// TurnZ is Turn for integral i.
func (d *Dense) TurnZ(i int, t0, t1 float64) float64 { return d.turn(i, t0, t1, d.Z0, d.Z1, d.KZ) }

func (d *Dense) turn(i int, t0, t1 float64, v0, v1 []float64, k [][]float64) float64 {
	if d.H == 0 {
		return t0
	}
	var c [6]float64 // of the rate as a polynomial in θ: that of θ(1−θ)θʲ is (j+1)θʲ − (j+2)θʲ⁺¹
	c[0] = v1[i] - v0[i]
	for j, kj := range k {
		c[j] += float64(j+1) * kj[i]
		c[j+1] -= float64(j+2) * kj[i]
	}
	rate := func(x float64) (r, slope float64) {
		for j := len(k); j >= 0; j-- {
			slope = slope*x + r
			r = r*x + c[j]
		}
		return r, slope
	}
	lo, hi := d.place(t0), d.place(t1)
	rising, _ := rate(hi)
	x := lo + (hi-lo)/2
	for range 60 { // Newton's method, halving where it would leave the bracket
		r, slope := rate(x)
		if (r > 0) == (rising > 0) {
			hi = x
		} else {
			lo = x
		}
		next := x - r/slope
		if !(next > lo && next < hi) {
			next = lo + (hi-lo)/2
		}
		if math.Abs(next-x) <= 1e-12 {
			break
		}
		x = next
	}
	return d.T0 + x*d.H
}

// Rates sets r to the time derivatives of all unknowns at time t.
func (d *Dense) Rates(t float64, r []float64) { d.rates(t, d.Y0, d.Y1, d.K, r) }

// RatesZ sets r to the time derivatives of all integrals at time t.
func (d *Dense) RatesZ(t float64, r []float64) { d.rates(t, d.Z0, d.Z1, d.KZ, r) }

func (d *Dense) rates(t float64, v0, v1 []float64, k [][]float64, r []float64) {
	if d.H == 0 {
		clear(r)
		return
	}
	x := d.place(t)
	v0, v1 = v0[:len(r)], v1[:len(r)]
	by := 1 / d.H
	// d/dθ of θ(1−θ)θʲ is (j+1)θʲ − (j+2)θʲ⁺¹
	for i := range r {
		r[i] = (v1[i] - v0[i]) * by
	}
	p := by
	for j, kj := range k {
		w := p * (float64(j+1) - float64(j+2)*x)
		p *= x
		kj = kj[:len(r)]
		for i := range r {
			r[i] += w * kj[i]
		}
	}
}

// place returns θ of a time; exactly 1 at the end of the step.
func (d *Dense) place(t float64) float64 {
	if d.H == 0 {
		return 1
	}
	return (t - d.T0) / d.H
}

// evaluate sets y to the polynomials at θ = x.
func evaluate(x float64, y0, y1 []float64, k [][]float64, y []float64) {
	a, b, c := 1-x, x, x*(1-x)
	y0, y1 = y0[:len(y)], y1[:len(y)]
	switch len(k) {
	case 2:
		p, q := k[0][:len(y)], k[1][:len(y)]
		for i := range y {
			y[i] = a*y0[i] + b*y1[i] + c*(p[i]+x*q[i])
		}
	case 3:
		p, q, r := k[0][:len(y)], k[1][:len(y)], k[2][:len(y)]
		for i := range y {
			y[i] = a*y0[i] + b*y1[i] + c*(p[i]+x*(q[i]+x*r[i]))
		}
	default:
		p, q, r, u := k[0][:len(y)], k[1][:len(y)], k[2][:len(y)], k[3][:len(y)]
		for i := range y {
			y[i] = a*y0[i] + b*y1[i] + c*(p[i]+x*(q[i]+x*(r[i]+x*u[i])))
		}
	}
}
