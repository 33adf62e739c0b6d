package friction

import "math"

// Laminar is f·Re of laminar flow in a round pipe (Hagen–Poiseuille).
const Laminar = 64.0

// Churchill returns f·Re and its derivative by Re, both dimensionless, of the Darcy friction factor
//
//	f = 8·[(8/Re)¹² + (A+B)^−1.5]^(1/12),  A = (2.457·ln 1/((7/Re)^0.9 + 0.27·ε/D))¹⁶,  B = (37530/Re)¹⁶
//
// for a Reynolds number Re ≥ 0 and a relative roughness ε/D (both −). One formula for laminar, critical and turbulent flow; f·Re is finite down to
// Re = 0, where it is 64, and never falls with Re. Within about 1 % of Colebrook–White when turbulent; the critical range is a plausible bridge,
// no more. Valid for ε/D up to 0.05.
//
// Source: S. W. Churchill, Friction-factor equation spans all fluid-flow regimes, Chemical Engineering 84(24), 91–92, 1977.
func Churchill(re, rough float64) (fre, slope float64) {
	if re < 256 { // the turbulent share is under 1e-34 there
		return Laminar, 0
	}
	p := math.Pow(7/re, 0.9)
	l := -math.Log(p + 0.27*rough)
	byLn := 0.9 * p / (p + 0.27*rough) // dl/d ln Re
	// Everything below is in logarithms, so that no power overflows: s = ln(A/B), x = ln of the turbulent over the laminar part.
	logB := 16 * math.Log(37530/re)
	s := 16 * math.Log(2.457*l*re/37530)
	sum, share := softplus(s)
	x := 12*math.Log(re/8) - 1.5*(logB+sum)
	byX := 12 - 1.5*(-16+share*16*(1+byLn/l))
	up, part := softplus(x)
	fre = Laminar * math.Exp(up/12)
	return fre, fre * part * byX / 12 / re
}

// softplus returns ln(1+eˣ) and its derivative.
func softplus(x float64) (v, slope float64) {
	if x > 0 {
		e := math.Exp(-x)
		return x + math.Log1p(e), 1 / (1 + e)
	}
	e := math.Exp(x)
	return math.Log1p(e), e / (1 + e)
}
