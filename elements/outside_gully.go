package elements

import "headfall/elements/quantity"

func init() {
	Register(Kind{
		Name: "gully", Room: Beyond,
		Doc:   "A free fall into something that can be overloaded.",
		Law:   "p = atmosphere at its elevation z, m; flagged above its capacity, m³/s",
		Valid: "it does not back up into the line", Source: "hydrostatics",
		Symbol: "M3 6H21L17 20H7ZM8 10H16M9 14H15",
		New:    func() Element { return &gully{} },
		Sample: "{elevation: 5 m, capacity: 6 L/s}",
	})
}

type gully struct{ elevation, capacity float64 } // m, m³/s

func (e *gully) Bind(p *Params) {
	p.Length(&e.elevation, "elevation", Required, "of the line's end there, over the site datum")
	p.Number(&e.capacity, "capacity", quantity.Flow, Required, "flow that it can take away", Positive)
}
func (e *gully) Ready() error { return nil }
func (e *gully) Outside() *Outside {
	return &Outside{FreeFall: true, Elevation: e.elevation, Capacity: e.capacity}
}
