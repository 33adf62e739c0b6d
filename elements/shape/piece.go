package shape

// piece is the geometry of one slice, z in m over its bottom, v in m³ from there.
type piece interface {
	law
	level(v float64) (z, slope float64) // inverse of eval, and dz/dV = 1/A, 1/m²
}

// law is volume, m³, area A, m², and dA/dz, m, of a slice at z, m over its bottom. A is over zero.
type law interface {
	eval(z float64) (v, area, grow float64)
}

// prism has the same area all the way up: V = A·z.
type prism struct {
	area  float64 // m²
	slope float64 // 1/m², 1/area
}

func prismOf(area float64) prism { return prism{area, 1 / area} }

func (p prism) eval(z float64) (v, area, grow float64) { return p.area * z, p.area, 0 }
func (p prism) level(v float64) (z, slope float64)     { return v * p.slope, p.slope }

// flipped is a piece upside down:
//
//	V(z) = V₀ − P(h − z),  V₀ = P(h)
type flipped struct {
	piece
	h, dv float64 // height, m, and volume, m³
}

func (f *flipped) eval(z float64) (v, area, grow float64) {
	v, area, grow = f.piece.eval(f.h - z)
	return f.dv - v, area, -grow
}

func (f *flipped) level(v float64) (z, slope float64) {
	z, slope = f.piece.level(max(f.dv-v, 0))
	return f.h - z, slope
}

// flip turns a slice upside down.
func flip(s slice) slice {
	switch p := s.piece.(type) {
	case prism:
	case *flipped:
		s.piece = p.piece
	default:
		dv, _ := s.at(s.h)
		s.piece = &flipped{piece: p, h: s.h, dv: dv}
	}
	upside := func(f func(float64) float64) func(float64) float64 {
		if f == nil {
			return nil
		}
		h := s.h
		return func(z float64) float64 { return f(h - z) }
	}
	s.half, s.rim = upside(s.half), upside(s.rim)
	return s
}

// flipAll turns a pile of slices upside down.
func flipAll(slices []slice) []slice {
	turned := make([]slice, 0, len(slices))
	for i := len(slices) - 1; i >= 0; i-- {
		turned = append(turned, flip(slices[i]))
	}
	return turned
}
