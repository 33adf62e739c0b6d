package elements

func init() {
	Register(Kind{
		Name: "free_fall", Room: Beyond,
		Doc:   "The end of a line, open to the air there; only receives.",
		Law:   "p = atmosphere at its elevation z, m",
		Valid: "the jet falls clear", Source: "hydrostatics",
		Symbol: "M4 4H12Q18 4 18 12V22",
		New:    func() Element { return &freeFall{} },
		Sample: "{elevation: 5.1 m}",
	})
}

type freeFall struct{ elevation float64 } // m

func (e *freeFall) Bind(p *Params) {
	p.Length(&e.elevation, "elevation", Required, "of the middle of the line's end, over the site datum")
}
func (e *freeFall) Ready() error { return nil }
func (e *freeFall) Outside() *Outside {
	return &Outside{FreeFall: true, Elevation: e.elevation}
}
