package elements

import (
	"math"

	"headfall/elements/friction"
)

func init() {
	Register(Kind{
		Name: "pipe", Room: Parts,
		Doc:    "A straight round pipe running full.",
		Law:    "Δp = f·L/D·ρ·v²/2, Pa; f by Churchill from Re = ρvD/μ and ε/D, or fixed; L, D, ε in m, v in m/s, ρ in kg/m³, μ in Pa·s; inertia ρL/A·dQ/dt",
		Valid:  "running full; Re up to 10⁹, ε/D up to 0.05; the critical range (Re 2000–4000) is a bridge",
		Source: "Darcy–Weisbach; S. W. Churchill, Chemical Engineering 84(24), 91–92, 1977",
		Symbol: "M0 12H24",
		New:    func() Element { return &pipe{} },
		Sample: "{length: 24 m, bore: 82.5 mm, roughness: 0.05 mm}",
	})
}

type pipe struct {
	length, bore      float64 // m
	roughness, factor float64 // m; Darcy factor, −
	rough, fixed      bool    // which of the two was written
	inertia           bool
	law               pipeLaw
}

// pipeLaw is what Drop needs, worked out once.
type pipeLaw struct {
	table  *friction.Table // nil with a fixed factor
	re     float64         // Re = re·(ρ/μ)·Q, m⁻¹
	lose   float64         // Δp = lose·μ·(f·Re)·Q, m⁻³
	square float64         // with a fixed factor Δp = square·ρ·Q², m⁻⁴
}

func (e *pipe) Bind(p *Params) {
	p.Length(&e.length, "length", Required, "length along the pipe", Positive)
	p.Length(&e.bore, "bore", Required, "inside diameter", Positive)
	p.Length(&e.roughness, "roughness", Optional, "height of the wall's roughness, as for Colebrook; or friction", NotNegative).Was(&e.rough)
	p.bare(&e.factor, "friction", Optional, "fixed Darcy friction factor instead of a roughness", Positive).Was(&e.fixed)
	p.YesNo(&e.inertia, "inertia", Optional, "the mass of the liquid in it resists a change of flow").Or("no")
}

func (e *pipe) Ready() error {
	var f faults
	f.when(!e.rough && !e.fixed, "a pipe needs roughness (or friction, a fixed Darcy factor)")
	f.when(e.rough && e.fixed, "a pipe takes roughness or friction, not both")
	f.when(e.rough && e.roughness > 0.1*e.bore, "the roughness is more than a tenth of the bore")
	a := circle(e.bore)
	e.law = pipeLaw{
		re:     e.bore / a,
		lose:   e.length / (2 * e.bore * e.bore * a),
		square: e.factor * e.length / e.bore / (2 * a * a),
	}
	if !e.fixed && len(f) == 0 {
		e.law.table = friction.Shared(e.roughness / e.bore)
	}
	return f.err()
}

// Drop is Darcy–Weisbach with f·Re, which is finite at rest: Δp = μ·L/(2D²A)·(f·Re)·Q.
func (e *pipe) Drop(q float64, at *Local) (dp, slope float64) {
	l := &e.law
	if l.table == nil {
		return Quadratic(l.square*at.Fluid.Density, q, at.Band)
	}
	re := math.Abs(q) * l.re * at.Fluid.Density / at.Fluid.Dynamic
	fre, rise := l.table.FRe(re)
	k := l.lose * at.Fluid.Dynamic
	return k * fre * q, k * (fre + re*rise)
}

func (e *pipe) Even() bool      { return true }
func (e *pipe) Bore() float64   { return e.bore }
func (e *pipe) Length() float64 { return e.length }
func (e *pipe) Holds() float64  { return circle(e.bore) * e.length }

// Inertance returns ρL/A, kg/m⁴, or 0 when inertia is off.
func (e *pipe) Inertance(f *Fluid) float64 {
	if !e.inertia {
		return 0
	}
	return f.Density * e.length / circle(e.bore)
}

// Outside tells that the wall is rougher than the friction laws cover, or the flow faster.
func (e *pipe) Outside(q, _ float64, at *Local) string {
	switch {
	case !e.rough:
		return ""
	case e.roughness > 0.05*e.bore:
		return "the roughness of the pipe is more than 0.05 of its bore, the range of the friction laws"
	case math.Abs(q)*4*at.Fluid.Density > 1e9*math.Pi*e.bore*at.Fluid.Dynamic:
		return "the Reynolds number is more than 10⁹, the range of the friction laws"
	}
	return ""
}
