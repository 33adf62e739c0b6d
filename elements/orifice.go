package elements

import (
	"math"

	"headfall/elements/friction"
)

func init() {
	Register(Kind{
		Name: "orifice", Room: Parts,
		Doc:    "A sharp-edged opening in a wall, at a free end, or a plate between pipes.",
		Law:    "wall or free end: Q = Cd·A·√(2Δp/ρ); between pipes the permanent loss of ISO 5167-2 from C = Cd and β; Cd falls off at low Re; Q in m³/s, A in m², Δp in Pa, ρ in kg/m³",
		Valid:  "sharp edge, no cavitation; between pipes 0.1 ≤ β ≤ 0.75",
		Source: "Torricelli; ISO 5167-2:2003, 5.4; D. Wu, R. Burton, G. Schoenau, Int. J. Fluid Power 3(3), 13–19, 2002",
		Symbol: "M0 12H24M12 3V10M12 14V21",
		New:    func() Element { return &orifice{loss: "permanent"} },
		Sample: "{diameter: 40 mm, cd: 0.62}",
	})
}

type orifice struct {
	diameter, area, width, height float64 // m, m², m, m
	byDiameter, byArea            bool
	byWidth, byHeight             bool
	cd, blocked                   float64 // −
	loss                          string  // permanent | whole
	place                         Place
	law                           opening
	clear                         float64 // m², open area
	wall                          bool    // the whole jet energy is lost
}

func (e *orifice) Bind(p *Params) {
	p.Length(&e.diameter, "diameter", Optional, "diameter of a round opening; or area; or width and height", Positive).Was(&e.byDiameter)
	p.area(&e.area, "area", "area of the opening").Was(&e.byArea)
	p.Length(&e.width, "width", Optional, "width of a rectangular opening", Positive).Was(&e.byWidth)
	p.Length(&e.height, "height", Optional, "height of a rectangular opening", Positive).Was(&e.byHeight)
	p.Ratio(&e.cd, "cd", Required, "discharge coefficient; of a plate between pipes the C of ISO 5167-2", Coefficient)
	p.Word(&e.loss, "loss", Optional, "between pipes: the permanent loss, or the whole jet energy", "permanent", "whole").Or("permanent")
	p.Ratio(&e.blocked, "blocked", Optional, "share of the area that is blocked", Share).Or("0 %")
}

func (e *orifice) SetPlace(at Place) { e.place = at }

func (e *orifice) Ready() error {
	var f faults
	ways := 0
	for _, given := range []bool{e.byDiameter, e.byArea, e.byWidth || e.byHeight} {
		if given {
			ways++
		}
	}
	f.when(ways != 1, "an orifice takes one of: diameter, area, width and height")
	f.when(e.byWidth != e.byHeight, "a rectangular orifice needs width and height")
	if len(f) > 0 {
		return f.err()
	}
	nominal := e.nominal()
	e.clear = nominal * (1 - e.blocked)
	counted := max(e.clear, 1e-6*nominal) // keeps numbers finite; a wholly blocked one is shut
	d := math.Sqrt(counted * 4 / math.Pi)
	pipe := e.pipeBore()
	e.wall = e.loss == "whole" || e.place.FromWall || e.place.ToWall || pipe == 0
	k := 1 / (e.cd * e.cd)
	if !e.wall {
		f.when(d >= pipe, "the orifice is not smaller than the pipe it stands in (loss: whole keeps the law of a wall)")
		k = friction.PermanentLoss(e.cd, min(d/pipe, 0.999))
	}
	e.law = newOpening(k, counted, d, true)
	return f.err()
}

// nominal is the area before anything is blocked, m².
func (e *orifice) nominal() float64 {
	switch {
	case e.byDiameter:
		return circle(e.diameter)
	case e.byArea:
		return e.area
	}
	return e.width * e.height
}

// pipeBore is the bore of the pipe the plate stands in, the narrower one, m; 0 for none.
func (e *orifice) pipeBore() float64 {
	a, b := e.place.BoreBefore, e.place.BoreAfter
	if a > 0 && b > 0 {
		return min(a, b)
	}
	return max(a, b)
}

func (e *orifice) Drop(q float64, at *Local) (dp, slope float64) { return e.law.drop(q, at) }

// OwnEnd tells that the jet's energy is in the law, so that no end loss comes on top.
func (e *orifice) OwnEnd() bool { return e.wall }

// Shut tells that the opening is wholly blocked.
func (e *orifice) Shut(*Local) bool { return e.clear <= 0 }

// Mouth is the clear opening; a blocked share is taken off the diameter, or off the width.
func (e *orifice) Mouth() Mouth {
	if e.byWidth {
		return Mouth{Diameter: math.Sqrt(e.clear * 4 / math.Pi), Width: e.width * (1 - e.blocked), Height: e.height}
	}
	return Mouth{Diameter: math.Sqrt(e.clear * 4 / math.Pi)}
}

// Outside tells that a plate between pipes has a ratio of bores that ISO 5167-2 does not cover.
func (e *orifice) Outside(float64, float64, *Local) string {
	if beta := math.Sqrt(e.clear*4/math.Pi) / e.pipeBore(); !e.wall && e.clear > 0 && (beta < 0.1 || beta > 0.75) {
		return "the ratio of the orifice to its pipe is not between 0.1 and 0.75, the range of ISO 5167-2"
	}
	return ""
}
