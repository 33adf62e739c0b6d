package elements

import (
	"math"

	"headfall/elements/quantity"
)

func init() {
	Register(Kind{
		Name: "resistance", Room: Parts,
		Doc:    "A given head loss: linear, quadratic, both, or by rows of flow and head.",
		Law:    "H = R₁·Q + R₂·Q·|Q|, or a smooth curve through rows; Δp = ρ·g·H; H in m of the liquid, Q in m³/s, R₁ in s/m², R₂ in s²/m⁵",
		Valid:  "as stated; rows are mirrored for reverse flow and go on straight beyond the last",
		Source: "definition",
		Symbol: "M0 12H4L6 6L10 18L14 6L18 18L20 12H24",
		New:    func() Element { return &resistance{} },
		Sample: "{quadratic: 1500 s2/m5}",
	})
}

type resistance struct {
	linear, quadratic     float64 // s/m²; s²/m⁵
	rows                  [][]float64
	isLinear, isQuadratic bool
	isRows                bool
	curve                 monotone
}

func (e *resistance) Bind(p *Params) {
	p.Number(&e.linear, "linear", quantity.ResistanceLinear, Optional, "head lost over flow", Positive).Was(&e.isLinear)
	p.Number(&e.quadratic, "quadratic", quantity.ResistanceQuadratic, Optional, "head lost over flow squared", Positive).Was(&e.isQuadratic)
	p.Table(&e.rows, "rows", Optional, "flow and head lost, both rising", quantity.Flow, quantity.Head).Was(&e.isRows)
}

func (e *resistance) Ready() error {
	var f faults
	f.when(!e.isLinear && !e.isQuadratic && !e.isRows, "a resistance needs linear, quadratic or rows")
	f.when(e.isRows && (e.isLinear || e.isQuadratic), "a resistance takes rows, or linear and quadratic, not both")
	if !e.isRows {
		return f.err()
	}
	x, y := []float64{0}, []float64{0}
	for i, r := range e.rows {
		if i == 0 && r[0] == 0 && r[1] == 0 {
			continue
		}
		n := len(x) - 1
		f.when(r[0] <= x[n] || r[1] <= y[n], "rows of flow and head must both rise, from 0")
		x, y = append(x, r[0]), append(y, r[1])
	}
	f.when(len(x) < 2, "rows need a flow and a head above 0")
	if len(f) == 0 {
		e.curve = newMonotone(x, y)
	}
	return f.err()
}

func (e *resistance) Drop(q float64, at *Local) (dp, slope float64) {
	perHead := at.Fluid.Density * at.Gravity
	if e.isRows {
		h, s := e.curve.odd(q)
		return perHead * h, perHead * s
	}
	if e.isLinear {
		k := perHead * e.linear
		if !e.isQuadratic { // the linear part alone already is straight through zero
			return k * q, k
		}
		c := perHead * e.quadratic
		return q * (k + c*math.Abs(q)), k + 2*c*math.Abs(q)
	}
	return Quadratic(perHead*e.quadratic, q, at.Band)
}
