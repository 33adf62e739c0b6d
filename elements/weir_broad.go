package elements

import "math"

// broadCrest is a wide flat crest of width b, m: Q = (⅔)^1.5·Cd·√g·b·h^1.5, or Q = c·b·h^1.5.
//
// Cd 0.864 unless stated: square edge, 0.08 ≤ h/L ≤ 0.33, h/(h+p) ≤ 0.35, L the length of the crest along the flow, m. Source: ISO 3846 (0.864 from memory).
type broadCrest struct {
	width, cd, c float64 // m, −, m^½/s
	byCd, byC    bool
}

func (e *broadCrest) bind(p *Params) {
	p.Length(&e.width, "width", Required, "width of the crest", Positive)
	p.Ratio(&e.cd, "cd", Optional, "discharge coefficient; default 0.864", Positive).Was(&e.byCd)
	p.bare(&e.c, "c", Optional, "weir coefficient, m^½/s (about 1.5)", Positive).Was(&e.byC)
}

func (e *broadCrest) law(f *faults) notchLaw {
	f.when(e.byCd && e.byC, "a weir takes cd or c, not both")
	l := notchLaw{power: 1.5, mouthed: e.width}
	if e.byC {
		l.factor = e.c * e.width
		return l
	}
	cd := 0.864
	if e.byCd {
		cd = e.cd
	}
	l.factor, l.rooted = 2.0/3*math.Sqrt(2.0/3)*cd*e.width, true
	return l
}
