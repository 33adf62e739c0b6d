package elements

import "headfall/elements/shape"

func init() {
	Register(Kind{
		Name: "flat", Room: Heads,
		Doc:    "A flat bottom, top or end.",
		Law:    "depth 0",
		Valid:  "any diameter",
		Source: "solid geometry",
		Symbol: "M4 4V18H20V4",
		New:    func() Element { return &flatHead{} },
		Sample: "{}",
	})
}

type flatHead struct{}

func (e *flatHead) Bind(*Params) {}
func (e *flatHead) Ready() error { return nil }
func (e *flatHead) Head(diameter, _ float64) (shape.Head, error) {
	return shape.Flat(diameter)
}
