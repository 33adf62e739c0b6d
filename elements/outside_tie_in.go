package elements

import "headfall/elements/quantity"

func init() {
	Register(Kind{
		Name: "tie_in", Room: Beyond,
		Doc:   "A pressurised connection to another system.",
		Law:   "p as stated, Pa, at its elevation z, m, whatever the flow",
		Valid: "a system so large that the plant does not move it", Source: "hydrostatics",
		Symbol: "M0 12H14M14 6V18M18 6V18M18 12H24",
		New:    func() Element { return &tieIn{} },
		Sample: "{elevation: 4 m, pressure: 2.5 bar(g)}",
	})
}

type tieIn struct {
	elevation, pressure float64 // m, Pa
	written             quantity.Value
}

func (e *tieIn) Bind(p *Params) {
	p.Length(&e.elevation, "elevation", Required, "of the connection, over the site datum")
	p.Number(&e.pressure, "pressure", quantity.Pressure, Required, "pressure there, (g) or (a)").With(&e.written)
}

func (e *tieIn) Ready() error {
	var f faults
	f.when(e.written.Gauge == quantity.None && e.written.Text != "", "say whether the pressure is (g) or (a)")
	f.when(e.written.Gauge == quantity.Absolute && e.pressure <= 0, "an absolute pressure is more than 0")
	return f.err()
}

func (e *tieIn) Outside() *Outside {
	return &Outside{Elevation: e.elevation, Pressure: e.pressure, Gauge: e.written.Gauge != quantity.Absolute, Pressed: true}
}
