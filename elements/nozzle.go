package elements

func init() {
	Register(Kind{
		Name: "nozzle", Room: Parts,
		Doc:    "A mouthpiece of a usual type: sharp, rounded, a short tube running full, or a re-entrant tube running free.",
		Law:    "Q = Cd·A·√(2Δp/ρ), Cd by type: sharp 0.61, rounded 0.98, short_tube 0.82, re_entrant 0.51; Q in m³/s, A in m², Δp in Pa, ρ in kg/m³",
		Valid:  "Re above 10⁴, except sharp and a stated Cd, which fall off below as a thin plate does; short tube of 2–3 diameters",
		Source: "W. C. Unwin, Hydraulics, Encyclopaedia Britannica, 11th ed., 1911; Borda (re-entrant); Wu, Burton and Schoenau 2002 (low Re)",
		Symbol: "M0 12H24M6 4L18 9M6 20L18 15",
		New:    func() Element { return &nozzle{} },
		Sample: "{diameter: 40 mm, type: rounded}",
	})
}

var nozzleCd = map[string]float64{"sharp": 0.61, "rounded": 0.98, "short_tube": 0.82, "re_entrant": 0.51}

type nozzle struct {
	diameter float64 // m
	kind     string
	cd       float64 // −
	byType   bool
	byCd     bool
	law      opening
}

func (e *nozzle) Bind(p *Params) {
	p.Length(&e.diameter, "diameter", Required, "inside diameter of the mouth", Positive)
	p.Word(&e.kind, "type", Optional, "shape of the mouth; or cd", "sharp", "rounded", "short_tube", "re_entrant").Was(&e.byType)
	p.Ratio(&e.cd, "cd", Optional, "discharge coefficient instead of a type", Coefficient).Was(&e.byCd)
}

func (e *nozzle) Ready() error {
	var f faults
	f.when(e.byType == e.byCd, "a nozzle takes one of: type, cd")
	cd := e.cd
	if !e.byCd {
		cd = nozzleCd[e.kind]
	}
	f.when(cd <= 0, "unknown type of nozzle")
	if len(f) == 0 {
		e.law = newOpening(1/(cd*cd), circle(e.diameter), e.diameter, e.byCd || e.kind == "sharp")
	}
	return f.err()
}

func (e *nozzle) Drop(q float64, at *Local) (dp, slope float64) { return e.law.drop(q, at) }
func (e *nozzle) OwnEnd() bool                                  { return true }
func (e *nozzle) Mouth() Mouth                                  { return Mouth{Diameter: e.diameter} }
