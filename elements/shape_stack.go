package elements

import "headfall/elements/shape"

func init() {
	Register(Kind{
		Name: "stack", Room: Shapes,
		Doc:    "Shapes piled from the bottom up.",
		Law:    "V = volume of the sections below + that of the section the level is in, m³",
		Valid:  "as its sections",
		Source: "solid geometry",
		Symbol: "M3 3V10H6V21H18V10H21V3",
		New:    func() Element { return &stack{} },
		Sample: "{sections: [{frustum: {bottom: {diameter: 0.5 m}, top: {diameter: 2 m}, height: 1 m}}, {upright_cylinder: {diameter: 2 m, height: 3 m}}]}",
	})
}

type stack struct{ sections []Shaped }

func (e *stack) Bind(p *Params) {
	p.Series(func(s Element, _ string) error {
		e.sections = append(e.sections, s.(Shaped))
		return nil
	}, "sections", Shapes, Required, "shapes from the bottom up")
}

func (e *stack) Ready() error {
	var f faults
	f.when(len(e.sections) == 0, "a stack needs sections")
	for _, s := range e.sections {
		if err := s.Ready(); err != nil {
			f.when(true, err.Error())
		}
	}
	return f.err()
}

// Shape piles the sections; the outlet is in the lowest one.
func (e *stack) Shape(outlet float64) (shape.Shape, error) {
	var all []shape.Shape
	for _, s := range e.sections {
		one, err := s.Shape(outlet)
		if err != nil {
			return nil, err
		}
		all, outlet = append(all, one), 0
	}
	return shape.Stack(all...)
}
