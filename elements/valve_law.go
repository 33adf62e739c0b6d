package elements

import "math"

// valveLaw is what Drop needs, worked out once.
type valveLaw struct {
	square    float64 // Δp = square·ρ·Q² wide open, m⁻⁴
	thick     reynoldsFactor
	recovery  float64 // F_L², −
	least     float64 // share of Kv that leaks, −
	joinBelow float64 // travel under which φ is led to 0, −; 0 for none
}

// Opens returns the share of Kv at travel x and its slope, all −: the trim, led to 0 below 5 % of travel where the valve closes tight, and the leak.
func (e *valve) Opens(x float64) (phi, slope float64) {
	x = min(max(x, 0), 1)
	phi, slope = e.trim.Share(x)
	if u := x / 0.05; x < e.law.joinBelow {
		w, byX := u*(2-u), (2-2*u)/0.05
		phi, slope = phi*w, slope*w+phi*byX
	}
	return e.law.least + (1-e.law.least)*phi, (1 - e.law.least) * slope
}

// opened is Opens at the present travel, worked out once for each.
func (e *valve) opened(at *Local) (phi, slope float64) {
	m := &at.keep().opened
	if !m.known || m.at != at.Opening {
		m.phi, m.slope = e.Opens(at.Opening)
		m.known, m.at = true, at.Opening
	}
	return m.phi, m.slope
}

// leastShare is the share of Kv below which a valve counts as shut.
const leastShare = 1e-7

func (e *valve) Drop(q float64, at *Local) (dp, slope float64) {
	phi, _ := e.opened(at)
	dp, slope, _ = e.drop(q, max(phi, leastShare), at)
	return dp, slope
}

// Square is for flows so turbulent that F_R is 1.
func (e *valve) Square(at *Local) (forward, back, from float64) {
	phi, _ := e.opened(at)
	phi = max(phi, leastShare)
	c := e.law.square * at.Fluid.Density / (phi * phi)
	perFlow := e.law.thick.re * at.Fluid.Density / (at.Fluid.Dynamic * math.Sqrt(phi))
	return c, c, max(beyondBand(c, at), e.law.thick.turbulent/perFlow*(1+1e-15))
}

// DropByOpening returns ∂Δp/∂x, Pa, at flow q. Δp depends on q/φ, and through F_R on Re_v ∝ q/√φ, which gives it from the slope by q.
func (e *valve) DropByOpening(q float64, at *Local) float64 {
	phi, byX := e.opened(at)
	phi = max(phi, leastShare)
	dp, slope, bend := e.drop(q, phi, at)
	return (e.bends(q, phi, at) - q*slope - bend*dp) / phi * byX
}

// bends is what the change of F_R's own slope adds within the band: there the law is a cubic to its edge, whose Re_v moves as √φ.
func (e *valve) bends(q, phi float64, at *Local) float64 {
	c := e.law.square * at.Fluid.Density / (phi * phi)
	edge := math.Sqrt(at.Band / c)
	re := e.law.thick.re * at.Fluid.Density / (at.Fluid.Dynamic * math.Sqrt(phi)) * edge
	if math.Abs(q) >= edge || re >= e.law.thick.turbulent {
		return 0
	}
	const d = 1e-4
	factor, _ := e.law.thick.at(re)
	_, more := e.law.thick.at(re * (1 + d))
	_, less := e.law.thick.at(re * (1 - d))
	u := q / edge
	return at.Band / (factor * factor) * (more - less) / (4 * d) * u * (1 - u*u)
}

// drop is the law at a share φ; bend is d ln F_R/d ln Re_v.
func (e *valve) drop(q, phi float64, at *Local) (dp, slope, bend float64) {
	c := e.law.square * at.Fluid.Density / (phi * phi)
	a := math.Abs(q)
	perFlow := e.law.thick.re * at.Fluid.Density / (at.Fluid.Dynamic * math.Sqrt(phi))
	inBand := c*a*a < at.Band
	if inBand {
		a = math.Sqrt(at.Band / c)
	}
	if perFlow*a >= e.law.thick.turbulent {
		dp, slope = Quadratic(c, q, at.Band)
		return dp, slope, 0
	}
	factor, bend := e.law.thick.at(perFlow * a)
	dp = c * a * a / (factor * factor)
	slope = dp / a * (2 - 2*bend)
	if inBand {
		dp, slope = Within(q, a, dp, slope)
		return dp, slope, bend
	}
	return math.Copysign(dp, q), slope, bend
}
