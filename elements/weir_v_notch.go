package elements

import (
	"math"

	"headfall/elements/quantity"
)

// vNotch is a sharp triangular notch of an included angle θ:
//
//	Q = 8/15·Ce·tan(θ/2)·√(2g)·(h + k_h)^2.5,
//
// Ce (−) and k_h, m, by Shen's curves over θ; with a stated cd k_h is 0.
//
// Valid: fully contracted, 20° ≤ θ ≤ 100°, h ≥ 0.06 m. Source: ISO 1438; J. Shen, Discharge characteristics of triangular-notch thin-plate weirs, USGS
// Water-Supply Paper 1617-B, 1981 (polynomials through the curves of the USBR Water Measurement Manual, from memory).
type vNotch struct {
	angle, cd float64 // rad, −
	byCd      bool
}

func (e *vNotch) bind(p *Params) {
	p.Number(&e.angle, "angle", quantity.Angle, Required, "included angle of the notch", func(v float64) string {
		if v > 0 && v < math.Pi {
			return ""
		}
		return "more than 0 and less than 180 deg"
	})
	p.Ratio(&e.cd, "cd", Optional, "discharge coefficient; default by Shen's curve over the angle", Positive).Was(&e.byCd)
}

func (e *vNotch) law(f *faults) notchLaw {
	ce, kh := e.cd, 0.0
	if !e.byCd {
		deg := e.angle * 180 / math.Pi
		f.when(deg < 20 || deg > 100, "without a cd the angle of a v_notch is from 20 to 100 deg")
		ce, kh = shen(deg)
	}
	return notchLaw{power: 2.5, kh: kh, rooted: true, factor: 8.0 / 15 * math.Sqrt2 * ce * math.Tan(e.angle/2)}
}

// shen returns Ce (−) and k_h, m, of an angle in degrees.
func shen(deg float64) (ce, kh float64) {
	ce = 0.607165052 + deg*(-0.000874466963+deg*6.10393334e-6)
	const foot = 0.3048
	kh = foot * (0.0144902648 + deg*(-0.00033955535+deg*(3.29819003e-6-1.06215442e-8*deg)))
	return ce, kh
}
