package elements

import "math"

func init() {
	Register(Kind{
		Name: "equal_percentage", Room: Trims,
		Doc:    "Equal steps of travel change Kv by equal shares.",
		Law:    "φ = R^(x−1), R the rangeability (all −)",
		Valid:  "inherent, as made: travel x from 0 to 1",
		Source: "definition, IEC 60534-2-4; F_L " + fromIEC,
		Symbol: throughBody,
		New:    func() Element { return &equalPercentage{rangeability: 50} },
		Sample: "{rangeability: 50}",
	})
}

type equalPercentage struct {
	rangeability, ln float64 // −
}

func (e *equalPercentage) Bind(p *Params) {
	p.bare(&e.rangeability, "rangeability", Optional, "largest over smallest Kv that the trim controls", func(v float64) string {
		if v > 1 {
			return ""
		}
		return "more than 1"
	}).Or("50")
}

func (e *equalPercentage) Ready() error {
	e.ln = math.Log(e.rangeability)
	return nil
}

// Share returns φ and dφ/dx at travel x, all −.
func (e *equalPercentage) Share(x float64) (phi, slope float64) {
	phi = math.Exp((x - 1) * e.ln)
	return phi, phi * e.ln
}

// LiquidRecovery returns F_L and its source.
func (e *equalPercentage) LiquidRecovery() (float64, string) { return 0.90, fromIEC }
