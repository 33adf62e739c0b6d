package elements

import (
	"headfall/elements/quantity"
	"headfall/elements/shape"
)

func init() {
	head := func(name, doc, law, valid, symbol, sample string, make func() Element) {
		Register(Kind{Name: name, Room: Heads, Doc: doc, Law: law, Valid: valid, Source: headSource[name], Symbol: symbol, New: make, Sample: sample})
	}
	head("flat", "A flat bottom, top or end.", "depth 0", "any diameter", "M4 4V18H20V4", "{}",
		func() Element { return &flatHead{} })
	head("cone", "A cone; as a bottom it ends at its outlet.", "V = π·z/12·(D² + D·d + d²); V in m³, z, D, d in m", "included angle under 180°, outlet under the diameter",
		"M4 4V8L12 20L20 8V4", "{depth: 0.9 m}", func() Element { return &coneHead{} })
	head("ellipsoidal", "Half an ellipsoid, 2:1 unless its depth is given.", "2:1: V = π·D³/24; V in m³, D in m", "depth more than 0",
		"M4 4V10A8 6 0 0 0 20 10V4", "{}", func() Element { return &ellipsoidalHead{} })
	head("hemispherical", "Half a sphere.", "V = π·D³/12; V in m³, D in m", "any diameter",
		"M4 4V10A8 8 0 0 0 20 10V4", "{}", func() Element { return &hemisphericalHead{} })
	head("torispherical", "A dish of a spherical crown and a knuckle.", "depth = R − √((R − k)² − (D/2 − k)²); crown R, knuckle k, D in m", "R at least D/2, k at most D/2",
		"M4 4V9Q4 14 8 15Q12 16 16 15Q20 14 20 9V4", "{form: din_28011}", func() Element { return &torisphericalHead{} })
}

var headSource = map[string]string{
	"flat":          "solid geometry",
	"cone":          "solid geometry",
	"ellipsoidal":   "solid geometry; ASME BPVC VIII-1 UG-32 (2:1)",
	"hemispherical": "solid geometry",
	"torispherical": "solid geometry; ASME BPVC VIII-1 UG-32, DIN 28011, DIN 28013",
}

type flatHead struct{}

func (e *flatHead) Bind(*Params) {}
func (e *flatHead) Ready() error { return nil }
func (e *flatHead) Head(diameter, _ float64) (shape.Head, error) {
	return shape.Flat(diameter)
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

type ellipsoidalHead struct{ depth float64 } // m

func (e *ellipsoidalHead) Bind(p *Params) {
	p.Length(&e.depth, "depth", Optional, "depth; default a quarter of the diameter", Positive)
}
func (e *ellipsoidalHead) Ready() error { return nil }
func (e *ellipsoidalHead) Head(diameter, outlet float64) (shape.Head, error) {
	return shape.Ellipsoidal(diameter, e.depth, outlet)
}

type hemisphericalHead struct{}

func (e *hemisphericalHead) Bind(*Params) {}
func (e *hemisphericalHead) Ready() error { return nil }
func (e *hemisphericalHead) Head(diameter, outlet float64) (shape.Head, error) {
	return shape.Hemispherical(diameter, outlet)
}

type torisphericalHead struct {
	form                    string
	crown, knuckle          float64 // m
	hasForm, isCrown, isKnu bool
}

func (e *torisphericalHead) Bind(p *Params) {
	p.Word(&e.form, "form", Optional, "usual proportions; or crown_radius and knuckle_radius", shape.Forms()...).Was(&e.hasForm).Or("asme_fd")
	p.Length(&e.crown, "crown_radius", Optional, "radius of the crown", Positive).Was(&e.isCrown)
	p.Length(&e.knuckle, "knuckle_radius", Optional, "radius of the knuckle", Positive).Was(&e.isKnu)
}

func (e *torisphericalHead) Ready() error {
	var f faults
	f.when(e.isCrown != e.isKnu, "crown_radius and knuckle_radius go together")
	f.when(e.hasForm && e.isCrown, "a torispherical head takes a form, or crown_radius and knuckle_radius, not both")
	return f.err()
}

func (e *torisphericalHead) Head(diameter, outlet float64) (shape.Head, error) {
	if e.isCrown {
		return shape.Torispherical(diameter, e.crown, e.knuckle, outlet)
	}
	return shape.TorisphericalForm(diameter, e.form, outlet)
}
