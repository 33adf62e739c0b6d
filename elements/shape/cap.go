package shape

import "math"

// bowl is a slice whose area is a quadratic of the level, as in spheres, ellipsoids and hoppers with two different slopes:
//
//	A(z) = a + b·z + c·z²,  V(z) = a·z + b·z²/2 + c·z³/3
type bowl struct{ a, b, c float64 } // m², m, 1

func (p bowl) eval(z float64) (v, area, grow float64) {
	return z * (p.a + z*(p.b/2+z*p.c/3)), p.a + z*(p.b+z*p.c), p.b + 2*p.c*z
}

// quadratic returns the slice of height h of a quadratic area.
func quadratic(a, b, c, h float64) slice {
	switch {
	case h <= 0:
		return slice{}
	case math.Abs(c*h) <= 1e-13*math.Abs(b) && math.Abs(b*h) <= 1e-13*a:
		return slice{piece: prismOf(a), h: h}
	case math.Abs(c*h) <= 1e-13*math.Abs(b):
		return slice{piece: wedge{a, b}, h: h}
	}
	return slice{piece: search(bowl{a, b, c}, h), h: h}
}

// capOf returns the slices from the pole of an ellipsoid of revolution up to height h ≤ d, d its vertical half axis and r the radius at d, m:
//
//	A(z) = π·(r/d)²·(2·d·z − z²), but nowhere less than the tip area, m²
//
// A sphere has r = d. The pole is a small prism, so that nothing is singular there.
func capOf(r, d, h, tip float64) []slice {
	p := math.Pi * (r / d) * (r / d)
	q := tip / p / d
	// Where the area is that of the tip; in the form without cancellation, from 2dz − z² = q·d.
	z := q / (1 + math.Sqrt(math.Max(1-q/d, 0)))
	if q >= d || z >= h {
		return []slice{{piece: prismOf(math.Max(tip, p*h*(2*d-h))), h: h}}
	}
	pole := slice{piece: prismOf(tip), h: z, bent: true}
	pole.half = func(z float64) float64 { return r / d * math.Sqrt(math.Max(z*(2*d-z), 0)) }
	rest := quadratic(tip, 2*p*(d-z), -p, h-z)
	rest.bent = true
	return []slice{pole, rest}
}
