package elements

import "headfall/elements/quantity"

func init() {
	Register(Kind{
		Name: "water", Room: Beyond,
		Doc:   "A body of water whose surface follows its own course.",
		Law:   "p = atmosphere at its surface z(t), m; straight lines between rows",
		Valid: "so large that the plant does not move it", Source: "hydrostatics",
		Symbol: "M2 8Q5 5 8 8T14 8T20 8M2 14Q5 11 8 14T14 14T20 14",
		New:    func() Element { return &bodyOfWater{} },
		Sample: "{surface: 2.4 m}",
	})
}

type bodyOfWater struct{ surface [][]float64 } // s, m

func (e *bodyOfWater) Bind(p *Params) {
	p.LevelRows(&e.surface, "surface", quantity.Length, Required, "elevation of the surface over the site datum, one value or rows of time and elevation")
}

func (e *bodyOfWater) Ready() error {
	var f faults
	f.when(len(e.surface) == 0, "a body of water needs its surface")
	for i := 1; i < len(e.surface); i++ {
		f.when(e.surface[i][0] < e.surface[i-1][0], "the times of the surface must not fall from row to row")
	}
	return f.err()
}

func (e *bodyOfWater) Outside() *Outside {
	o := &Outside{Surface: e.surface}
	if len(e.surface) > 0 {
		o.Elevation = e.surface[0][1]
	}
	return o
}
