package elements

import "headfall/elements/shape"

func init() {
	Register(Kind{
		Name: "lying_cylinder", Room: Shapes,
		Doc:    "A lying cylinder with two like ends.",
		Law:    "A = 2·L·√(h·(D − h)) + ends; A in m², L between tangent lines, D, h in m",
		Valid:  "inside dimensions, axis level",
		Source: "solid geometry",
		Symbol: "M5 6H19Q23 12 19 18H5Q1 12 5 6",
		New:    func() Element { return &lyingCylinder{} },
		Sample: "{diameter: 2.4 m, length: 6 m, ends: ellipsoidal}",
	})
}

type lyingCylinder struct {
	diameter, length float64 // m
	ends             Header
}

func (e *lyingCylinder) Bind(p *Params) {
	p.Length(&e.diameter, "diameter", Required, "inside diameter", Positive)
	p.Length(&e.length, "length", Required, "length between tangent lines", Positive)
	p.Nested(header(&e.ends), "ends", Heads, Optional, "both ends").Or("flat")
}

func (e *lyingCylinder) Ready() error {
	var f faults
	f.ready(e.ends)
	return f.err()
}

func (e *lyingCylinder) Shape(outlet float64) (shape.Shape, error) {
	ends, err := headOf(e.ends, e.diameter, 0)
	if err != nil {
		return nil, err
	}
	return shape.LyingCylinder(e.diameter, e.length, outlet, ends)
}
