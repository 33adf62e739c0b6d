package elements

func init() {
	Register(Kind{
		Name: "high_point", Room: Parts,
		Doc:    "The highest place of a line between its ends: a crest that may siphon, lock air or draw it in.",
		Law:    "Δp = 0; the pressure there is looked at: atmosphere with its vent open, else down to the vapour pressure p_v, Pa",
		Valid:  "one liquid column; air is not carried along",
		Source: "hydrostatics",
		Symbol: "M0 18L12 6L24 18",
		New:    func() Element { return &highPoint{} },
		Sample: "{elevation: 7.9 m, vent: {tag: AV-3, open: no}}",
	})
}

type highPoint struct{ crown Crown }

func (e *highPoint) Bind(p *Params) {
	p.Length(&e.crown.Elevation, "elevation", Required, "of the top of the bore there, over the site datum")
	p.OwnDevice(&e.crown.Vent, "vent", "a vent there")
	p.YesNo(&e.crown.Primed, "primed", Optional, "full of liquid at the start; default: when an end's head stands above it").Was(&e.crown.PrimedSet)
}

func (e *highPoint) Ready() error { return nil }

// Drop is nothing: a high point has no loss of its own.
func (e *highPoint) Drop(float64, *Local) (dp, slope float64) { return 0, 0 }

func (e *highPoint) Crown() *Crown { return &e.crown }
