package elements

import (
	"math"

	"headfall/elements/quantity"
)

func init() {
	Register(Kind{
		Name: "breather", Room: Vents,
		Doc:    "A pressure and vacuum valve that lifts at its settings.",
		Law:    "as a hole, times a lift that goes from 0 at the set pressure difference to 1 at 1.1 times it, smoothly",
		Valid:  "air; no pop, no hysteresis",
		Source: "isentropic nozzle, compressible-flow textbooks; full lift at 10 % over the setting: common practice, no source",
		Symbol: "M3 18H9V6H15V18H21M7 10H17",
		New:    func() Element { return &breather{cd: 0.6} },
		Sample: "{opens_in: 2 mbar, opens_out: 15 mbar, bore: 80 mm}",
	})
}

type breather struct {
	in, out  float64 // Pa, pressure differences; their signs are not looked at
	bore, cd float64 // m, −
	area     float64 // m², Cd·A
}

func (e *breather) Bind(p *Params) {
	p.Number(&e.in, "opens_in", quantity.Pressure, Required, "vacuum inside at which it begins to let air in")
	p.Number(&e.out, "opens_out", quantity.Pressure, Required, "pressure inside at which it begins to let gas out", Positive)
	p.Length(&e.bore, "bore", Required, "clear bore when lifted", Positive)
	p.Ratio(&e.cd, "cd", Optional, "discharge coefficient when lifted", Coefficient).Or("0.6")
}

func (e *breather) Ready() error {
	var f faults
	f.when(e.in == 0, "opens_in must not be 0: that is a hole")
	e.area = e.cd * circle(e.bore)
	return f.err()
}

func (e *breather) Flow(p, p0, T float64, at *Local) (m, byP float64) {
	d, set, sign := p0-p, math.Abs(e.in), -1.0
	if d < 0 {
		d, set, sign = -d, e.out, 1
	}
	lift, byU := Step((d - set) / (0.1 * set))
	if lift == 0 {
		return 0, 0
	}
	g, byG := airIn(p, p0, T, &at.keep().air)
	a := e.area * at.Opening
	return a * lift * g, a * (lift*byG + sign*byU/(0.1*set)*g)
}

func (e *breather) Bore() float64 { return e.bore }
