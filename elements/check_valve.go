package elements

import (
	"headfall/elements/friction"
	"headfall/elements/quantity"
)

func init() {
	Register(Kind{
		Name: "check_valve", Room: Parts,
		Doc:    "Lets liquid through in the line's direction only.",
		Law:    "open: Δp = 10⁵ Pa·(ρ/1000)·(Q/Kv)², Q in m³/h, Kv in m³/h at 1 bar; shut up to its cracking pressure; in reverse a share of Kv leaks",
		Valid:  "turbulent flow; no slam: it follows the flow",
		Source: "IEC 60534-1, definition of Kv",
		Symbol: "M4 6V18L18 12L4 6M18 6V18M0 12H4M18 12H24",
		New:    func() Element { return &checkValve{} },
		Sample: "{tag: NRV-1, kv: 60}",
	})
}

type checkValve struct {
	tag             string
	kv, crack, leak float64 // m³/h; Pa; −
	square          float64 // Δp = square·ρ·Q², m⁻⁴
}

func (e *checkValve) Bind(p *Params) {
	p.Name(&e.tag, "tag", Optional, "tag of the check valve")
	p.Number(&e.kv, "kv", quantity.Kv, Required, "flow coefficient when open", Positive)
	p.Number(&e.crack, "cracks_at", quantity.Pressure, Optional, "pressure across it at which it opens", NotNegative).Or("0 mbar")
	p.Ratio(&e.leak, "leaks", Optional, "share of Kv that passes in reverse", Share).Or("0 %")
}

func (e *checkValve) Ready() error {
	e.square = friction.QuadraticOfKv(e.kv)
	return nil
}

// Drop is the loss of the open valve, without the cracking pressure; in reverse it is that of what leaks, a Kv that is the leak's share as large. Of a
// tight valve it is the same both ways, and nothing flows in reverse: that is the line's affair, as is the cracking pressure.
func (e *checkValve) Drop(q float64, at *Local) (dp, slope float64) {
	c := e.square * at.Fluid.Density
	leak := max(e.leak, at.Leak)
	if leak <= 0 {
		return Quadratic(c, q, at.Band)
	}
	return TwoWay(c, c/(leak*leak), q, at.Band)
}

// Square is for any flow beyond the band of either way.
func (e *checkValve) Square(at *Local) (forward, back, from float64) {
	c := e.square * at.Fluid.Density
	forward, back = c, c
	if leak := max(e.leak, at.Leak); leak > 0 {
		back = c / (leak * leak)
		forward = max(c, 1e-6*back)
	}
	return forward, back, beyondBand(c, at)
}

func (e *checkValve) Tag() string       { return e.tag }
func (e *checkValve) Cracking() float64 { return e.crack }
func (e *checkValve) Leak() float64     { return e.leak }
