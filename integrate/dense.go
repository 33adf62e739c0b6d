package integrate

import "math"

// Dense is the dense output of one step, a polynomial for each unknown and integral:
//
//	y(T0+θH) = (1−θ) Y0 + θ (Y1 + (1−θ) (k₀ + θ (k₁ + θ (k₂ + …)))),   0 ≤ θ ≤ 1
//
// and likewise z with Z0, Z1. The slices belong to the Solver and hold until its next Step, Restart or Reset. The inner coefficients k are worked out when
// they are asked for: of one unknown, or of all.
type Dense struct {
	T0, H  float64
	Y0, Y1 []float64
	Z0, Z1 []float64

	step        stepper
	k, kz       [][]float64 // once full, fullZ
	full, fullZ bool
}

// inner are the inner coefficients of one unknown.
type inner [highest - 1]float64

func newDense(s *Solver, step stepper) Dense {
	d := Dense{Y0: s.y0, Y1: s.y1, Z0: s.z0, Z1: s.z1, step: step}
	for range step.degree() {
		d.k = append(d.k, make([]float64, s.n))
		d.kz = append(d.kz, make([]float64, s.m))
	}
	return d
}

// begin opens a step of h at t.
func (d *Dense) begin(t, h float64, s *Solver) {
	d.T0, d.H, d.full, d.fullZ = t, h, false, false
	copy(d.Y0, s.y)
	copy(d.Z0, s.z)
}

// end closes a step of no length, as after a Restart.
func (d *Dense) end(y, z []float64) {
	copy(d.Y1, y)
	copy(d.Z1, z)
	for k := range d.k {
		clear(d.k[k])
		clear(d.kz[k])
	}
	d.full, d.fullZ = true, true
}

// fill works out the coefficients of all unknowns.
func (d *Dense) fill() {
	if !d.full {
		d.step.polynomial(d.k)
		d.full = true
	}
}

// fillZ is fill for the integrals.
func (d *Dense) fillZ() {
	if !d.fullZ {
		d.step.polynomialZ(d.kz)
		d.fullZ = true
	}
}

// row returns the coefficients of unknown i.
func (d *Dense) row(i int) (c inner) {
	if !d.full {
		return d.step.row(i)
	}
	for j, k := range d.k {
		c[j] = k[i]
	}
	return c
}

// rowZ returns the coefficients of integral i.
func (d *Dense) rowZ(i int) (c inner) {
	if !d.fullZ {
		return d.step.rowZ(i)
	}
	for j, k := range d.kz {
		c[j] = k[i]
	}
	return c
}

// value returns the polynomial between v0 and v1 at θ = x.
func (c *inner) value(x, v0, v1 float64) float64 {
	in := 0.0
	for k := len(c) - 1; k >= 0; k-- {
		in = in*x + c[k]
	}
	return (1-x)*v0 + x*(v1+(1-x)*in)
}

// slope returns its derivative by θ.
func (c *inner) slope(x, v0, v1 float64) float64 {
	in, by := 0.0, 0.0
	for k := len(c) - 1; k >= 0; k-- {
		by = by*x + in
		in = in*x + c[k]
	}
	return v1 - v0 + (1-2*x)*in + x*(1-x)*by
}

// Dense returns the polynomials of the last step.
func (s *Solver) Dense() *Dense { return &s.poly }

// Eval sets y to the unknowns at time t within the last step.
func (s *Solver) Eval(t float64, y []float64) {
	d := &s.poly
	d.fill()
	evaluate(d.place(t), d.Y0, d.Y1, d.k, y)
}

// EvalZ sets z to the integrals at time t within the last step.
func (s *Solver) EvalZ(t float64, z []float64) {
	d := &s.poly
	d.fillZ()
	evaluate(d.place(t), d.Z0, d.Z1, d.kz, z)
}

// EvalOne returns unknown i at time t within the last step.
func (s *Solver) EvalOne(i int, t float64) float64 { return s.poly.One(i, t) }

// One returns unknown i at time t.
func (d *Dense) One(i int, t float64) float64 {
	c := d.row(i)
	return c.value(d.place(t), d.Y0[i], d.Y1[i])
}

// OneZ returns integral i at time t.
func (d *Dense) OneZ(i int, t float64) float64 {
	c := d.rowZ(i)
	return c.value(d.place(t), d.Z0[i], d.Z1[i])
}

// Rate returns the time derivative of unknown i at time t.
func (d *Dense) Rate(i int, t float64) float64 {
	if d.H == 0 {
		return 0
	}
	c := d.row(i)
	return c.slope(d.place(t), d.Y0[i], d.Y1[i]) / d.H
}

// RateZ returns the time derivative of integral i at time t.
func (d *Dense) RateZ(i int, t float64) float64 {
	if d.H == 0 {
		return 0
	}
	c := d.rowZ(i)
	return c.slope(d.place(t), d.Z0[i], d.Z1[i]) / d.H
}

// Half sets y to the unknowns half-way through the step and rate to their derivatives by time, which is cheaper than both at any other time.
func (d *Dense) Half(y, rate []float64) {
	if d.H == 0 {
		copy(y, d.Y1)
		clear(rate)
		return
	}
	d.step.half(y, rate)
	by := 1 / d.H
	y0, y1 := d.Y0[:len(y)], d.Y1[:len(y)]
	rate = rate[:len(y)]
	for i, a := range y0 {
		b := y1[i]
		y[i] += (a + b) / 2
		rate[i] = (rate[i] + (b - a)) * by
	}
}

// HalfZ sets rate to the derivatives of the integrals by time half-way through the step.
func (d *Dense) HalfZ(rate []float64) {
	if d.H == 0 {
		clear(rate)
		return
	}
	d.step.halfZ(rate)
	by := 1 / d.H
	z0, z1 := d.Z0[:len(rate)], d.Z1[:len(rate)]
	for i, r := range rate {
		rate[i] = (r + (z1[i] - z0[i])) * by
	}
}

// Turn returns the time between t0 and t1 at which the rate of unknown i, of opposite signs there, is zero.
func (d *Dense) Turn(i int, t0, t1 float64) float64 { return d.turn(t0, t1, d.Y1[i]-d.Y0[i], d.row(i)) }

// TurnZ is Turn for integral i.
func (d *Dense) TurnZ(i int, t0, t1 float64) float64 {
	return d.turn(t0, t1, d.Z1[i]-d.Z0[i], d.rowZ(i))
}

func (d *Dense) turn(t0, t1, change float64, k inner) float64 {
	if d.H == 0 {
		return t0
	}
	var c [6]float64 // of the rate as a polynomial in θ: that of θ(1−θ)θʲ is (j+1)θʲ − (j+2)θʲ⁺¹
	c[0] = change
	for j, v := range k {
		c[j] += float64(j+1) * v
		c[j+1] -= float64(j+2) * v
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
