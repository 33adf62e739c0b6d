package elements

func init() {
	Register(Kind{
		Name: "linear", Room: Trims,
		Doc:    "Kv grows with travel in a straight line.",
		Law:    "φ = x (both −)",
		Valid:  inherent,
		Source: "definition, IEC 60534-2-4; F_L " + fromIEC,
		Symbol: throughBody,
		New:    func() Element { return &curveTrim{curve: straight, fl: 0.90, fd: 0.46} },
		Sample: "{}",
	})
}

// straight returns φ and dφ/dx at travel x, all −.
func straight(x float64) (phi, slope float64) { return x, 1 }
