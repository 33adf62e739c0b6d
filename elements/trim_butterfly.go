package elements

import "math"

func init() {
	Register(Kind{
		Name: "butterfly", Room: Trims,
		Doc:    "A disc turned by 90° in the bore.",
		Law:    "φ = 1 − cos(πx/2), the free area past a thin disc (both −)",
		Valid:  inherent,
		Source: noSource + "; F_L " + fromIEC,
		Symbol: throughBody,
		New:    func() Element { return &curveTrim{curve: disc, fl: 0.62, fd: 0.57} },
		Sample: "{}",
	})
}

// disc returns φ and dφ/dx at travel x, all −.
func disc(x float64) (phi, slope float64) {
	s, c := math.Sincos(math.Pi / 2 * x)
	if x >= 1 {
		return 1, s * math.Pi / 2
	}
	return 1 - c, s * math.Pi / 2
}
