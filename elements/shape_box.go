package elements

import "headfall/elements/shape"

func init() {
	Register(Kind{
		Name: "box", Room: Shapes,
		Doc:    "A rectangular tank or pit.",
		Law:    "V = l·w·h; V in m³, l, w, h in m",
		Valid:  "inside dimensions",
		Source: "solid geometry",
		Symbol: "M3 5V20H21V5",
		New:    func() Element { return &box{} },
		Sample: "{length: 4 m, width: 3 m, height: 2.2 m}",
	})
}

type box struct{ length, width, height float64 } // m

func (e *box) Bind(p *Params) {
	p.Length(&e.length, "length", Required, "inside length", Positive)
	p.Length(&e.width, "width", Required, "inside width", Positive)
	p.Length(&e.height, "height", Required, "inside height", Positive)
}
func (e *box) Ready() error { return nil }
func (e *box) Shape(float64) (shape.Shape, error) {
	return shape.Box(e.length, e.width, e.height)
}
