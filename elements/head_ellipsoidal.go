package elements

import "headfall/elements/shape"

func init() {
	Register(Kind{
		Name: "ellipsoidal", Room: Heads,
		Doc:    "Half an ellipsoid, 2:1 unless its depth is given.",
		Law:    "2:1: V = π·D³/24; V in m³, D in m",
		Valid:  "depth more than 0",
		Source: "solid geometry; ASME BPVC VIII-1 UG-32 (2:1)",
		Symbol: "M4 4V10A8 6 0 0 0 20 10V4",
		New:    func() Element { return &ellipsoidalHead{} },
		Sample: "{}",
	})
}

type ellipsoidalHead struct{ depth float64 } // m

func (e *ellipsoidalHead) Bind(p *Params) {
	p.Length(&e.depth, "depth", Optional, "depth; default a quarter of the diameter", Positive)
}
func (e *ellipsoidalHead) Ready() error { return nil }
func (e *ellipsoidalHead) Head(diameter, outlet float64) (shape.Head, error) {
	return shape.Ellipsoidal(diameter, e.depth, outlet)
}
