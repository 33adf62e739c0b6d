package shape

import "math"

// knuckle is the slice of a torus that joins a crown to the straight side, y below the tangent line, from the joint at y = u (z = u − y, w = w₀ there):
//
//	A = π·(c + w)²,  w = √(k² − y²),  dA/dz = 2·π·y·(1 + c/w)
//	V = π·∫(c² + w² + 2·c·w)dy = G(u) − G(y),  G(y) = π·((c² + k²)·y − y³/3 + c·(y·w + k²·arcsin(y/k)))
//
// The differences are taken in closed form, so that no digits are lost near the joint:
//
//	w² = w₀² + z·(u + y)
//	V = π·(z·(c² + w₀² + u·z − z²/3) + c·(z·w₀ − y·(w − w₀) + k²·φ)),  sin φ = z·(u + y)/(u·w + y·w₀)
type knuckle struct {
	c, k  float64 // m, radius of the circle of knuckle centres, knuckle radius
	u, w0 float64 // m
}

// newKnuckle returns the knuckle whose joint lies at an angle, rad, from the axis, seen from the centre of the crown.
func newKnuckle(c, k, angle float64) knuckle {
	sin, cos := math.Sincos(angle)
	return knuckle{c: c, k: k, u: k * cos, w0: k * sin}
}

func (n knuckle) eval(z float64) (v, area, grow float64) {
	y := n.u - z
	rise := z * (n.u + y)
	w := math.Sqrt(n.w0*n.w0 + rise)
	phi := math.Atan2(rise/(n.u*w+y*n.w0), (n.w0*w+n.u*y)/(n.k*n.k))
	v = z*(n.c*n.c+n.w0*n.w0+n.u*z-z*z/3) + n.c*(z*n.w0-y*rise/(w+n.w0)+n.k*n.k*phi)
	return math.Pi * v, math.Pi * (n.c + w) * (n.c + w), 2 * math.Pi * y * (1 + n.c/w)
}
