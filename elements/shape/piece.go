package shape

// piece is the geometry of one slice, z in m over its bottom, v in m³ from there.
type piece interface {
	at(z float64) (v, area float64)    // volume up to z and area there, m²
	level(v float64) (z, area float64) // inverse
}

// prism has the same area all the way up: V = A·z.
type prism struct {
	area float64 // m²
}

func (p prism) at(z float64) (v, area float64)    { return p.area * z, p.area }
func (p prism) level(v float64) (z, area float64) { return v / p.area, p.area }

// flipped is a piece upside down:
//
//	V(z) = V₀ − P(h − z),  V₀ = P(h)
type flipped struct {
	piece
	h, dv float64 // height, m, and volume, m³
}

func (f *flipped) at(z float64) (v, area float64) {
	v, area = f.piece.at(f.h - z)
	return f.dv - v, area
}

func (f *flipped) level(v float64) (z, area float64) {
	z, area = f.piece.level(max(f.dv-v, 0))
	return f.h - z, area
}

// flip turns a slice upside down.
func flip(s slice) slice {
	if _, same := s.piece.(prism); !same {
		dv, _ := s.at(s.h)
		s.piece = &flipped{piece: s.piece, h: s.h, dv: dv}
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
