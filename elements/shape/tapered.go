package shape

import "math"

// conic is a slice whose sides are straight and would meet in a point z0 below its bottom, m; −z0 above it when it narrows upwards:
//
//	A(z) = c·(z + z0)²
//	V(z) = c·z·(z² + 3·z·z0 + 3·z0²)/3
//	z(V) = w/(u² + u·z0 + z0²),  w = 3V/c,  u = ∛(z0³ + w)
//
// The inverse is in the form without cancellation (u³ − z0³ = w), good to a few units in the last place for any slenderness.
type conic struct {
	c, z0 float64 // dimensionless, m
}

func (p conic) eval(z float64) (v, area, grow float64) {
	r := z + p.z0
	return p.c * z * (z*z + 3*p.z0*r) / 3, p.c * r * r, 2 * p.c * r
}

func (p conic) level(v float64) (z, slope float64) {
	w := 3 * v / p.c
	u := math.Cbrt(p.z0*p.z0*p.z0 + w)
	return w / (u*u + u*p.z0 + p.z0*p.z0), 1 / (p.c * u * u)
}

// wedge is a slice whose area grows straight with the level:
//
//	A(z) = a + b·z,  V(z) = a·z + b·z²/2,  z(V) = 2V/(a + √(a² + 2bV))
type wedge struct {
	a, b float64 // m², m
}

func (p wedge) eval(z float64) (v, area, grow float64) {
	return z * (p.a + p.b*z/2), p.a + p.b*z, p.b
}

func (p wedge) level(v float64) (z, slope float64) {
	area := math.Sqrt(math.Max(p.a*p.a+2*p.b*v, 0))
	return 2 * v / (p.a + area), 1 / area
}

// tapered returns the slice of height h between areas a0 and a1, m², all sections alike (a truncated cone, or a pyramid).
func tapered(a0, a1, h float64) slice {
	if math.Abs(a1-a0) < 1e-9*a0 {
		return slice{piece: prismOf((a0 + a1) / 2), h: h}
	}
	s0, s1 := math.Sqrt(a0), math.Sqrt(a1)
	grow := (s1 - s0) / h
	return slice{piece: conic{c: grow * grow, z0: s0 / grow}, h: h}
}
