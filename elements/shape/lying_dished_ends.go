package shape

import "math"

// dishedEnds are two torispherical heads lying on their side. At height y over the axis the surface in one of them is bounded by the axis section of
// the head, ρ(z) its radius at depth z:
//
//	A(y) = 2·∫√(ρ² − y²) dz,  dA/dh = 2·y·∫dz/√(ρ² − y²)   over all z with ρ(z) > y
//
// The crown's share (ρ² = R_c² − z², z from its centre) is the segment of a circle of radius q = √(R_c² − y²) beyond m = √(R_c² − ρ₁²):
//
//	A_c = q²·θ − m·√(ρ₁² − y²),  θ = arctan(√(ρ₁² − y²)/m),  dA_c/dh = 2·y·θ
//
// The knuckle's share, an elliptic integral, is taken by a Gauss–Legendre rule of 28 points in ψ = ψ_max·sin τ, ρ = c + k·cos ψ, which leaves no
// singularity at the end. ρ₁ is the radius of the joint, where A is only smooth in √(h − h₁): two strips meet there. Source: solid geometry
// (D. Jones, Computing Fluid Tank Volumes, 2002, gives the same integrals).
type dishedEnds struct {
	dish *torispherical
	rule gauss
	bend float64 // rad, ψ at the joint
}

func (d *torispherical) ends() endPair {
	return &dishedEnds{dish: d, rule: newGauss(28), bend: math.Pi/2 - d.angle}
}

func (e *dishedEnds) depthAt(y float64) float64 { return e.dish.depthAt(math.Abs(y)) }

func (e *dishedEnds) split() (h float64, root bool) {
	if e.dish.knuckle == 0 {
		return 0, false
	}
	return e.dish.diameter/2 - e.dish.joint, true
}

// section returns the area of both, m², and dA/dh, m, at height h, m.
func (e *dishedEnds) section(h float64) (area, grow float64) {
	d := e.dish
	y := d.diameter/2 - h
	if y < d.joint {
		m := math.Sqrt(d.crown*d.crown - d.joint*d.joint)
		s := math.Sqrt((d.joint - y) * (d.joint + y))
		theta := math.Atan2(s, m)
		area, grow = (d.crown*d.crown-y*y)*theta-m*s, 2*y*theta
	}
	a, g := e.knuckle(y)
	return 2 * (area + a), 2 * (grow + g)
}

// knuckle returns the area and dA/dh in one knuckle at y, m over the axis.
func (e *dishedEnds) knuckle(y float64) (area, grow float64) {
	d := e.dish
	k, c := d.knuckle, d.diameter/2-d.knuckle
	if k == 0 {
		return 0, 0
	}
	far := math.Acos(math.Min(math.Max((y-c)/k, -1), 1)) // ψ where ρ = y
	short := math.Max(c-k-y, 0)                          // of there, where the circle of the knuckle does not reach that far in
	end := math.Pi / 2
	if far > e.bend {
		end = math.Asin(e.bend / far)
	}
	if far == 0 {
		// At the lowest line: the limit of dA/dh, π·√(k·R), as for an ellipsoid of that curvature.
		return 0, math.Pi * math.Sqrt(k*d.diameter/2)
	}
	for i, x := range e.rule.x {
		sin, cos := math.Sincos(end / 2 * (1 + x))
		psi := far * sin
		gap := 2*k*math.Sin((far+psi)/2)*math.Sin((far-psi)/2) + short // ρ − y
		root := math.Sqrt(gap * (gap + 2*y))
		dz := e.rule.w[i] * end * far * cos * k * math.Cos(psi) // twice: the chord has two halves
		area += dz * root
		grow += dz * y / root
	}
	return area, grow
}
