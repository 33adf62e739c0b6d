package elements

import "math"

const (
	fromIEC     = "typical values of IEC 60534-2-1, from memory"
	noSource    = "common practice, no source"
	throughBody = "M0 12H24"
)

func init() {
	trim := func(name, doc, law, source string, make func() Element) {
		Register(Kind{
			Name: name, Room: Trims, Doc: doc, Law: law,
			Valid:  "inherent, as made: travel x and share φ of Kv from 0 to 1",
			Source: source, Symbol: throughBody, New: make, Sample: "{}",
		})
	}
	trim("linear", "Kv grows with travel in a straight line.", "φ = x (both −)", "definition, IEC 60534-2-4; F_L "+fromIEC,
		func() Element { return &curveTrim{curve: straight, fl: 0.90, fd: 0.46} })
	trim("quick_opening", "Most of Kv comes in the first half of the travel.", "φ = x·(2 − x) (both −)", noSource+"; F_L "+fromIEC,
		func() Element { return &curveTrim{curve: quick, fl: 0.85, fd: 0.46} })
	trim("butterfly", "A disc turned by 90° in the bore.", "φ = 1 − cos(πx/2), the free area past a thin disc (both −)", noSource+"; F_L "+fromIEC,
		func() Element { return &curveTrim{curve: disc, fl: 0.62, fd: 0.57} })
	trim("ball", "A ball of full bore turned by 90°.", "φ = x^2.2 (both −)", noSource+"; F_L "+fromIEC,
		func() Element { return &curveTrim{curve: ball, fl: 0.74, fd: 0.99} })
}

// curveTrim is a trim without parameters.
type curveTrim struct {
	curve  func(x float64) (phi, slope float64)
	fl, fd float64 // −
}

func (e *curveTrim) Bind(*Params) {}
func (e *curveTrim) Ready() error { return nil }

// Share returns φ and dφ/dx at travel x, all −.
func (e *curveTrim) Share(x float64) (phi, slope float64) { return e.curve(x) }

// LiquidRecovery returns F_L and its source.
func (e *curveTrim) LiquidRecovery() (float64, string) { return e.fl, fromIEC }

// StyleModifier returns F_d (−) of IEC 60534-2-1.
func (e *curveTrim) StyleModifier() float64 { return e.fd }

func straight(x float64) (phi, slope float64) { return x, 1 }

func quick(x float64) (phi, slope float64) { return x * (2 - x), 2 - 2*x }

func disc(x float64) (phi, slope float64) {
	s, c := math.Sincos(math.Pi / 2 * x)
	if x >= 1 {
		return 1, s * math.Pi / 2
	}
	return 1 - c, s * math.Pi / 2
}

func ball(x float64) (phi, slope float64) {
	p := math.Pow(x, 1.2)
	return p * x, 2.2 * p
}
