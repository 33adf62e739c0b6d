package elements

import (
	"headfall/elements/quantity"
	"headfall/elements/shape"
)

func init() {
	Register(Kind{
		Name: "cone", Room: Heads,
		Doc:    "A cone; as a bottom it ends at its outlet.",
		Law:    "V = π·z/12·(D² + D·d + d²); V in m³, z, D, d in m",
		Valid:  "included angle under 180°, outlet under the diameter",
		Source: "solid geometry",
		Symbol: "M4 4V8L12 20L20 8V4",
		New:    func() Element { return &coneHead{} },
		Sample: "{depth: 0.9 m}",
	})
}

type coneHead struct {
	depth, angle, outlet float64 // m, rad, m
	byDepth, byAngle     bool
}

func (e *coneHead) Bind(p *Params) {
	p.Length(&e.depth, "depth", Optional, "depth, down to the outlet; or angle", Positive).Was(&e.byDepth)
	p.Number(&e.angle, "angle", quantity.Angle, Optional, "included angle", Positive).Was(&e.byAngle)
	p.Length(&e.outlet, "outlet", Optional, "bore of the outlet it ends at; default that of the bottom nozzle, else 50 mm", Positive)
}

func (e *coneHead) Ready() error {
	var f faults
	f.when(e.byDepth == e.byAngle, "a cone takes one of: depth, angle")
	return f.err()
}

func (e *coneHead) Head(diameter, outlet float64) (shape.Head, error) {
	if e.outlet > 0 {
		outlet = e.outlet
	}
	return shape.Cone(diameter, e.depth, e.angle, outlet)
}
