package friction

import "math"

// Taps is where an orifice plate's pressures are taken.
type Taps int

// The taps of ISO 5167-2.
const (
	Corner Taps = iota
	Flange
	DAndHalfD
)

// ReaderHarris returns the discharge coefficient C (−) of a square-edged orifice plate in a pipe by Reader-Harris and Gallagher, for a pipe bore D, m,
// a diameter ratio β = d/D (−) and a Reynolds number on the pipe (−).
//
//	C = 0.5961 + 0.0261β² − 0.216β⁸ + 0.000521(10⁶β/Re)^0.7 + (0.0188 + 0.0063A)β^3.5(10⁶/Re)^0.3 + taps,  A = (19000β/Re)^0.8
//
// Valid for 0.1 ≤ β ≤ 0.75, D from 50 to 1000 mm, Re above 5000. Source: ISO 5167-2:2003, 5.3.2.1.
func ReaderHarris(bore, beta, re float64, taps Taps) float64 {
	b2 := beta * beta
	b4 := b2 * b2
	a := math.Pow(19000*beta/re, 0.8)
	c := 0.5961 + 0.0261*b2 - 0.216*b4*b4 + 0.000521*math.Pow(1e6*beta/re, 0.7) +
		(0.0188+0.0063*a)*math.Pow(beta, 3.5)*math.Pow(1e6/re, 0.3)
	var l1, l2 float64
	switch taps {
	case Flange:
		l1 = 0.0254 / bore
		l2 = l1
	case DAndHalfD:
		l1, l2 = 1, 0.47
	}
	m := 2 * l2 / (1 - beta)
	c += (0.043 + 0.080*math.Exp(-10*l1) - 0.123*math.Exp(-7*l1)) * (1 - 0.11*a) * b4 / (1 - b4)
	c -= 0.031 * (m - 0.8*math.Pow(m, 1.1)) * math.Pow(beta, 1.3)
	if bore < 0.07112 {
		c += 0.011 * (0.75 - beta) * (2.8 - bore/0.0254)
	}
	return c
}

// PermanentLoss returns the loss coefficient K (−), on the orifice's own diameter, that an orifice plate leaves in a pipe:
//
//	Δϖ = Δp·(s − Cβ²)/(s + Cβ²),  s = √(1 − β⁴(1 − C²)),  Δp = (1 − β⁴)/C²·ρv²/2
//
// for a discharge coefficient C (−) and a diameter ratio β (−). Source: ISO 5167-2:2003, 5.4.
func PermanentLoss(c, beta float64) float64 {
	b2 := beta * beta
	b4 := b2 * b2
	s := math.Sqrt(1 - b4*(1-c*c))
	return (s - c*b2) / (s + c*b2) * (1 - b4) / (c * c)
}

// ThinPlate returns the factor (−) by which the discharge coefficient of a sharp orifice changes at a low Reynolds number Re on its own diameter, and
// its derivative by Re:
//
//	1 + 1.07·exp(−0.126·√Re) − 2.07·exp(−0.246·√Re).
//
// It goes as √Re towards zero, passes 1.13 near Re 150 and is 1 above 4·10⁴, where what is left out is under 2·10⁻¹¹.
// Correlation scatter 10 %. Source: D. Wu, R. Burton, G. Schoenau, An empirical discharge coefficient model for orifice flow, Int. J. Fluid Power
// 3(3), 13–19, 2002 (coefficients from memory).
func ThinPlate(re float64) (factor, slope float64) {
	if re > 4e4 {
		return 1, 0
	}
	r := math.Sqrt(re)
	a, b := 1.07*math.Exp(-0.126*r), 2.07*math.Exp(-0.246*r)
	if r < 1e-3 { // the difference of nearly equal numbers, by its series
		const first, second = 2.07*0.246 - 1.07*0.126, (1.07*0.126*0.126 - 2.07*0.246*0.246) / 2
		return r * (first + second*r), (first/2/max(r, 1e-150) + second)
	}
	return 1 + a - b, (0.246*b - 0.126*a) / (2 * r)
}

// LongOrifice returns the discharge coefficient (−) of a long orifice of length over diameter between 2 and 10 at a Reynolds number Re (−) from 10 to
// 2·10⁴ on its own diameter; above that it no longer depends on Re.
//
//	1/Cd = 1/C + 20/Re·(1 + 2.25·L/d) − 0.005·L/d / (1 + 7.5·(log₁₀ 0.00015·Re)²),  C = 0.827 − 0.0085·L/d
//
// Source: A. Lichtarowicz, R. K. Duggins, E. Markland, Discharge coefficients for incompressible non-cavitating flow through long orifices,
// J. Mech. Eng. Sci. 7(2), 210–219, 1965 (coefficients from memory).
func LongOrifice(ratio, re float64) float64 {
	l := math.Log10(0.00015 * re)
	return 1 / (1/(0.827-0.0085*ratio) + 20/re*(1+2.25*ratio) - 0.005*ratio/(1+7.5*l*l))
}

// SharpOrifice returns the discharge coefficient (−) measured on sharp-edged round orifices discharging freely under a head h, m, for a diameter d, m:
//
//	C = 0.6075 + 0.0098/√h − 0.0037·d, h in feet and d in inches.
//
// It helps to choose a Cd; no part uses it. Valid: d from 25 to 75 mm, h from 0.2 to 3 m, less sure beyond.
// Source: Mair, Proc. Inst. Civil Engineers 84, fitted by W. C. Unwin, Hydraulics, Encyclopaedia Britannica, 11th ed., 1911.
func SharpOrifice(head, diameter float64) float64 {
	return 0.6075 + 0.0098/math.Sqrt(head/0.3048) - 0.0037*diameter/0.0254
}
