package elements

import "headfall/elements/shape"

func init() {
	Register(Kind{
		Name: "frustum", Room: Shapes,
		Doc:    "A vessel with straight sides between two sections: a truncated cone or a hopper.",
		Law:    "rectangles: length and width straight over z; else √A straight over z; A in m², z in m",
		Valid:  "inside dimensions; both sections 1 cm² or more",
		Source: "solid geometry",
		Symbol: "M3 4L9 20H15L21 4",
		New:    func() Element { return &frustum{} },
		Sample: "{bottom: {diameter: 0.5 m}, top: {diameter: 2 m}, height: 2 m}",
	})
}

type frustum struct {
	bottom, top shape.Section
	height      float64 // m
}

func (e *frustum) Bind(p *Params) {
	p.Group(nil, "bottom", Required, "section at the bottom: diameter, or length and width, or area", section(&e.bottom))
	p.Group(nil, "top", Required, "section at the top, likewise", section(&e.top))
	p.Length(&e.height, "height", Required, "height between the sections", Positive)
}

// section declares one section.
func section(s *shape.Section) func(*Params) {
	return func(p *Params) {
		p.Length(&s.Diameter, "diameter", Optional, "diameter", Positive)
		p.Length(&s.Length, "length", Optional, "length of a rectangle", Positive)
		p.Length(&s.Width, "width", Optional, "width of a rectangle", Positive)
		p.area(&s.Area, "area", "area")
	}
}

func (e *frustum) Ready() error { return nil }
func (e *frustum) Shape(float64) (shape.Shape, error) {
	return shape.Frustum(e.bottom, e.top, e.height)
}
