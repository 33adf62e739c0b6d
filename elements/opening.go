package elements

import (
	"math"

	"headfall/elements/friction"
)

// opening is the law that orifices and nozzles share:
//
//	Δp = ρ/2·(Q/(Cd·A))², Pa; Q in m³/s, A in m², ρ in kg/m³, Cd (−),
//
// with Cd falling off at a low Reynolds number on the opening's own diameter as a thin plate's does, when falls is set. Below the band the odd
// cubic of Within carries it to zero.
type opening struct {
	square float64 // Δp = square·ρ·Q² at a high Reynolds number, m⁻⁴
	re     float64 // Re = re·(ρ/μ)·Q, m⁻¹
	falls  bool
}

// newOpening takes the loss coefficient K (−) on the area, m², and the equivalent diameter, m.
func newOpening(k, area, diameter float64, falls bool) opening {
	return opening{square: k / (2 * area * area), re: 4 / (math.Pi * diameter), falls: falls}
}

func (o *opening) drop(q float64, at *Local) (dp, slope float64) {
	c := o.square * at.Fluid.Density
	a := math.Abs(q)
	re := a * o.re * at.Fluid.Density / at.Fluid.Dynamic
	if !o.falls || re > 4e4 {
		return Quadratic(c, q, at.Band)
	}
	if c*a*a >= at.Band {
		dp, slope = o.thin(c, a, re)
		return math.Copysign(dp, q), slope
	}
	edge := math.Sqrt(at.Band / c)
	dp, slope = o.thin(c, edge, edge*o.re*at.Fluid.Density/at.Fluid.Dynamic)
	return Within(q, edge, dp, slope)
}

// thin is c·q²/g² with the thin plate's factor g(Re), for q > 0.
func (o *opening) thin(c, q, re float64) (dp, slope float64) {
	g, byRe := friction.ThinPlate(re)
	w := q / g
	return c * w * w, 2 * c * w / g * (1 - byRe*re/g)
}
