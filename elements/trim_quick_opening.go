package elements

func init() {
	Register(Kind{
		Name: "quick_opening", Room: Trims,
		Doc:    "Most of Kv comes in the first half of the travel.",
		Law:    "φ = x·(2 − x) (both −)",
		Valid:  inherent,
		Source: noSource + "; F_L " + fromIEC,
		Symbol: throughBody,
		New:    func() Element { return &curveTrim{curve: quick, fl: 0.85, fd: 0.46} },
		Sample: "{}",
	})
}

// quick returns φ and dφ/dx at travel x, all −.
func quick(x float64) (phi, slope float64) { return x * (2 - x), 2 - 2*x }
