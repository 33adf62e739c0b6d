package elements

import "headfall/elements/friction"

func init() {
	Register(Kind{
		Name: "fittings", Room: Parts,
		Doc:    "Bends, tees, open valves and other local losses on one bore.",
		Law:    "Δp = ΣK·ρ·v²/2, Pa; K (−) of the named fittings by L/D·f_T, v in m/s on the bore, ρ in kg/m³",
		Valid:  "turbulent flow, fittings some diameters apart; handbooks differ by 25 %",
		Source: "Crane Technical Paper 410; reducer, expander and strainer: common practice, no source",
		Symbol: "M0 12H8Q12 12 12 8T16 4M0 12H24",
		New:    func() Element { return &fittingSet{counts: map[string]int{}} },
		Sample: "{bore: 82.5 mm, elbow_90: 3, tee_run: 1, k: 0.4}",
	})
}

type fittingSet struct {
	bore    float64 // m, own
	hasBore bool
	counts  map[string]int
	k       float64 // extra loss coefficient, −
	place   Place
	square  float64 // Δp = square·ρ·Q², m⁻⁴
	total   float64 // ΣK
}

var fittingNames = friction.FittingNames()

func (e *fittingSet) Bind(p *Params) {
	p.Length(&e.bore, "bore", Optional, "bore that the coefficients refer to; default that of the part before it, else after it", Positive).Was(&e.hasBore)
	p.Counts(e.counts, "how many of each", fittingNames...)
	p.bare(&e.k, "k", Optional, "further loss coefficient", NotNegative).Or("0")
}

func (e *fittingSet) SetPlace(at Place) { e.place = at }

func (e *fittingSet) Ready() error {
	bore := e.bore
	if !e.hasBore {
		bore = e.place.nearestBore()
	}
	var f faults
	f.when(bore <= 0, "fittings need a bore: no pipe stands beside them, so write bore")
	if len(f) > 0 {
		return f.err()
	}
	e.total = e.k
	for _, name := range fittingNames { // in one order, so that sums are the same bits every time
		switch n := e.counts[name]; {
		case n < 0:
			f = append(f, name+": a count is 0 or more")
		case n > 0:
			k, _ := friction.FittingK(name, bore)
			e.total += float64(n) * k
		}
	}
	a := circle(bore)
	e.square = e.total / (2 * a * a)
	return f.err()
}

func (e *fittingSet) Drop(q float64, at *Local) (dp, slope float64) {
	if e.square == 0 {
		return 0, 0
	}
	return Quadratic(e.square*at.Fluid.Density, q, at.Band)
}

// Even tells that counted fittings lose the same both ways.
func (e *fittingSet) Even() bool { return true }

// Square is for any flow beyond the band.
func (e *fittingSet) Square(at *Local) (forward, back, from float64) {
	c := e.square * at.Fluid.Density
	return c, c, beyondBand(c, at)
}

// Bore returns the bore that was written; 0 when the fittings take that of their neighbour.
func (e *fittingSet) Bore() float64 { return e.bore }

// Reduces tells that a reducer or an expander is among them.
func (e *fittingSet) Reduces() bool { return e.counts["reducer"] > 0 || e.counts["expander"] > 0 }

// Coefficient returns the sum of the loss coefficients, −.
func (e *fittingSet) Coefficient() float64 { return e.total }

// nearestBore is the bore before, else after, m; 0 for none.
func (p Place) nearestBore() float64 {
	if p.BoreBefore > 0 {
		return p.BoreBefore
	}
	return p.BoreAfter
}
