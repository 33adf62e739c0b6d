package elements

import "math"

func init() {
	Register(Kind{
		Name: "ball", Room: Trims,
		Doc:    "A ball of full bore turned by 90°.",
		Law:    "φ = x^2.2 (both −)",
		Valid:  inherent,
		Source: noSource + "; F_L " + fromIEC,
		Symbol: throughBody,
		New:    func() Element { return &curveTrim{curve: ball, fl: 0.74, fd: 0.99} },
		Sample: "{}",
	})
}

// ball returns φ and dφ/dx at travel x, all −.
func ball(x float64) (phi, slope float64) {
	p := math.Pow(x, 1.2)
	return p * x, 2.2 * p
}
