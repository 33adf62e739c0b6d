package shape

// narrowed returns the part of a slice between lo and hi, m over its bottom, with share·A − less, m², of its area. Outline and rim stay.
func narrowed(s slice, lo, hi, share, less float64) slice {
	if f, upside := s.piece.(*flipped); upside {
		// Counted from its narrow end, where the table is finest.
		under := slice{piece: f.piece, h: s.h, bent: s.bent, half: flipBack(s.halfWidth, s.h), rim: flipBack(s.perimeter, s.h)}
		return flip(narrowed(under, s.h-hi, s.h-lo, share, less))
	}
	half, rim := s.halfWidth, s.perimeter
	out := slice{h: hi - lo, bent: s.bent}
	out.half = func(z float64) float64 { return half(lo + z) }
	out.rim = func(z float64) float64 { return rim(lo + z) }
	whole := lo == 0 && hi == s.h && share == 1 && less == 0
	p, isPrism := s.piece.(prism)
	switch {
	case isPrism:
		out.piece = prismOf(share*p.area - less)
	case whole:
		out.piece = s.piece
	default:
		v, _ := s.at(lo)
		out.piece = search(&part{of: s.piece, z: lo, v: v, share: share, less: less}, hi-lo)
	}
	return out
}

func flipBack(f func(float64) float64, h float64) func(float64) float64 {
	return func(z float64) float64 { return f(h - z) }
}

// part is a stretch of a piece with a share of its area and less of it: V = share·(P(z₀ + z) − P(z₀)) − less·z.
type part struct {
	of          law
	z, v        float64 // m, m³ of the piece at the bottom of the part
	share, less float64 // 1, m²
}

func (p *part) eval(z float64) (v, area, grow float64) {
	v, area, grow = p.of.eval(p.z + z)
	return p.share*(v-p.v) - p.less*z, p.share*area - p.less, p.share * grow
}
