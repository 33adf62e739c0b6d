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
	if re > mostRe {
		fre, _ = Churchill(mostRe, rough)
		return fre * (re / mostRe), fre / mostRe
	}
	p := pointAt(re)
	return p.churchill(rough)
}

// mostRe keeps Re¹² a number; beyond it f stays as it is.
const mostRe = 1e24

// point is what the formula takes of Re alone.
type point struct{ re, p, b, r float64 } // Re, (7/Re)^0.9, B, (Re/8)¹²

func pointAt(re float64) point {
	return point{re, math.Pow(7/re, 0.9), power16(37530 / re), power4(re/8) * power4(re/8) * power4(re/8)}
}

func power4(x float64) float64  { return x * x * (x * x) }
func power16(x float64) float64 { return power4(power4(x)) }

// churchill is the formula as 64·(1 + x)^(1/12), x = (Re/8)¹²/(A+B)^1.5, with the derivative by way of d ln x/d ln Re.
func (n *point) churchill(rough float64) (fre, slope float64) {
	sum := n.p + 0.27*rough
	l := -math.Log(sum)
	a := power16(2.457 * l)
	both := a + n.b
	x := n.r / (both * math.Sqrt(both))
	byLn := 12 - 1.5*16*(a*0.9*n.p/(sum*l)-n.b)/both
	fre = Laminar * math.Cbrt(math.Sqrt(math.Sqrt(1+x)))
	return fre, fre * x / (1 + x) * byLn / 12 / n.re
}
