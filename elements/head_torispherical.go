package elements

import "headfall/elements/shape"

func init() {
	Register(Kind{
		Name: "torispherical", Room: Heads,
		Doc:    "A dish of a spherical crown and a knuckle.",
		Law:    "depth = R − √((R − k)² − (D/2 − k)²); crown R, knuckle k, D in m",
		Valid:  "R at least D/2, k at most D/2",
		Source: "solid geometry; ASME BPVC VIII-1 UG-32, DIN 28011, DIN 28013",
		Symbol: "M4 4V9Q4 14 8 15Q12 16 16 15Q20 14 20 9V4",
		New:    func() Element { return &torisphericalHead{} },
		Sample: "{form: din_28011}",
	})
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
