package elements

import "headfall/elements/shape"

func init() {
	Register(Kind{
		Name: "hemispherical", Room: Heads,
		Doc:    "Half a sphere.",
		Law:    "V = π·D³/12; V in m³, D in m",
		Valid:  "any diameter",
		Source: "solid geometry",
		Symbol: "M4 4V10A8 8 0 0 0 20 10V4",
		New:    func() Element { return &hemisphericalHead{} },
		Sample: "{}",
	})
}

type hemisphericalHead struct{}

func (e *hemisphericalHead) Bind(*Params) {}
func (e *hemisphericalHead) Ready() error { return nil }
func (e *hemisphericalHead) Head(diameter, outlet float64) (shape.Head, error) {
	return shape.Hemispherical(diameter, outlet)
}
