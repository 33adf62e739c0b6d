package elements

import "headfall/elements/shape"

func init() {
	Register(Kind{
		Name: "sphere", Room: Shapes,
		Doc:    "A sphere.",
		Law:    "V = π·h²·(3R − h)/3; V in m³, h, R in m",
		Valid:  "inside dimensions",
		Source: "solid geometry",
		Symbol: "M12 3A9 9 0 1 0 12 21A9 9 0 1 0 12 3",
		New:    func() Element { return &sphere{} },
		Sample: "{diameter: 3 m}",
	})
}

type sphere struct{ diameter float64 } // m

func (e *sphere) Bind(p *Params) {
	p.Length(&e.diameter, "diameter", Required, "inside diameter", Positive)
}
func (e *sphere) Ready() error { return nil }
func (e *sphere) Shape(outlet float64) (shape.Shape, error) {
	return shape.Sphere(e.diameter, outlet)
}
