package friction

import "math"

// Colebrook returns the Darcy friction factor f (−) of turbulent flow,
//
//	1/√f = −2·log₁₀(ε/(3.7·D) + 2.51/(Re·√f)),
//
// solved to rounding for a Reynolds number Re above about 4000 and a relative roughness ε/D (both −). It is what Churchill's formula is checked
// against; nothing in a run calls it.
//
// Source: C. F. Colebrook, Turbulent flow in pipes, J. Inst. Civil Engineers 11, 133–156, 1939.
func Colebrook(re, rough float64) float64 {
	x := 7.0 // 1/√f
	for range 50 {
		a := rough/3.7 + 2.51*x/re
		g := x + 2*math.Log10(a)
		next := x - g/(1+2/math.Ln10*2.51/re/a)
		if math.Abs(next-x) <= 4e-16*x {
			break
		}
		x = next
	}
	return 1 / (x * x)
}

// FullyRough returns the Darcy friction factor f (−) that no longer depends on the Reynolds number, 1/√f = 2·log₁₀(3.7·D/ε), for a relative
// roughness ε/D (−).
//
// Source: T. von Kármán 1930; L. F. Moody, Friction factors for pipe flow, Trans. ASME 66, 671–684, 1944.
func FullyRough(rough float64) float64 {
	x := 2 * math.Log10(3.7/rough)
	return 1 / (x * x)
}
