package elements

import "headfall/elements/shape"

func init() {
	Register(Kind{
		Name: "upright_cylinder", Room: Shapes,
		Doc:    "A standing cylinder with a bottom and a top.",
		Law:    "V = V_bottom + π·D²/4·(h − depth) on the straight side; V in m³, h, D in m",
		Valid:  "inside dimensions; the heads fit into the height over all",
		Source: "solid geometry",
		Symbol: "M5 3V21H19V3",
		New:    func() Element { return &uprightCylinder{} },
		Sample: "{diameter: 3.2 m, height: 5.0 m, bottom: {cone: {depth: 0.9 m}}}",
	})
}

type uprightCylinder struct {
	diameter, height, straight float64 // m
	byHeight, byStraight       bool
	bottom, top                Header
}

func (e *uprightCylinder) Bind(p *Params) {
	p.Length(&e.diameter, "diameter", Required, "inside diameter", Positive)
	p.Length(&e.height, "height", Optional, "height over all, bottom and top included; or straight", Positive).Was(&e.byHeight)
	p.Length(&e.straight, "straight", Optional, "length of the straight side", Positive).Was(&e.byStraight)
	p.Nested(header(&e.bottom), "bottom", Heads, Optional, "its bottom").Or("flat")
	p.Nested(header(&e.top), "top", Heads, Optional, "its top").Or("flat")
}

func (e *uprightCylinder) Ready() error {
	var f faults
	f.when(e.byHeight == e.byStraight, "an upright_cylinder takes one of: height (over all), straight")
	f.ready(e.bottom, e.top)
	return f.err()
}

func (e *uprightCylinder) Shape(outlet float64) (shape.Shape, error) {
	bottom, err := headOf(e.bottom, e.diameter, outlet)
	if err != nil {
		return nil, err
	}
	top, err := headOf(e.top, e.diameter, 0)
	if err != nil {
		return nil, err
	}
	return shape.UprightCylinder(e.diameter, e.height, e.straight, bottom, top)
}

// header returns a setter of a nested head.
func header(to *Header) func(Element, string) error {
	return func(e Element, _ string) error {
		*to = e.(Header)
		return nil
	}
}

// headOf makes the geometry of a head; nil, which is flat, when there is none.
func headOf(h Header, diameter, outlet float64) (shape.Head, error) {
	if h == nil {
		return nil, nil
	}
	return h.Head(diameter, outlet)
}

// ready readies the heads that are there.
func (f *faults) ready(heads ...Header) {
	for _, h := range heads {
		if h == nil {
			continue
		}
		if err := h.Ready(); err != nil {
			f.when(true, err.Error())
		}
	}
}
