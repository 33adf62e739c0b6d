package friction

import "math"

// IntakeSubmergence returns the least depth, m, over a pump intake of bore D, m, at a velocity V, m/s, that keeps strong vortices away:
//
//	S = D·(1 + 2.3·Fr),  Fr = V/√(g·D),  g in m/s².
//
// Source: ANSI/HI 9.8.
func IntakeSubmergence(bore, velocity, g float64) float64 {
	return bore * (1 + 2.3*velocity/math.Sqrt(g*bore))
}

// GasPullThrough returns the depth, m, over a bottom drain at which gas begins to be drawn in without rotation, at a flow Q, m³/s: h = 0.69·(Q²/g)^0.2.
//
// Source: B. T. Lubin, G. S. Springer, J. Fluid Mech. 29, 385–390, 1967 (coefficient from memory).
func GasPullThrough(flow, g float64) float64 { return 0.69 * math.Pow(flow*flow/g, 0.2) }

// HarlemanDepth returns the depth, m, over a bottom drain at which the upper fluid begins to be drawn in, at a flow Q, m³/s: h = (Q/(2.05·√g))^0.4.
//
// Source: D. R. F. Harleman and others 1959 (coefficient from memory).
func HarlemanDepth(flow, g float64) float64 { return math.Pow(flow/(2.05*math.Sqrt(g)), 0.4) }

// GordonSubmergence returns the depth, m, over an intake of bore D, m, at a velocity V, m/s: S = C·V·√D, C 0.54 s·m^−½ with a symmetric approach, 0.72 with a
// lateral one.
//
// Source: J. L. Gordon, Vortices at intakes, Water Power, April 1970 (coefficients from memory).
func GordonSubmergence(bore, velocity float64, lateral bool) float64 {
	c := 0.54
	if lateral {
		c = 0.72
	}
	return c * velocity * math.Sqrt(bore)
}
