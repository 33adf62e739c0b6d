package elements

import (
	"headfall/elements/friction"
	"headfall/elements/quantity"
)

func init() {
	Register(Kind{
		Name: "valve", Room: Parts,
		Doc:    "A valve that people move: its position follows the steps at its stroke rate.",
		Law:    "Δp = 10⁵ Pa·(ρ/1000)·(Q/(Kv·φ(x)·F_R))², Q in m³/h, Kv in m³/h, φ by trim and travel x, F_R for thick liquids; choked above F_L²·(p₁ − F_F·p_v)",
		Valid:  "turbulent flow, or thick liquids by F_R; no fittings between valve and pipe allowed for",
		Source: "IEC 60534-2-1; trims IEC 60534-2-4 or as the trim says",
		Symbol: "M0 12H2M22 12H24M2 5V19L22 5V19Z",
		New:    func() Element { return &valve{closes: "tight", trim: &curveTrim{curve: straight, fl: 0.90, fd: 0.46}} },
		Sample: "{tag: V-1, kv: 95, trim: equal_percentage, stroke: 15 s}",
	})
}

type valve struct {
	kv, cv, k, bore, leaks, fl   float64 // m³/h; US gal/min; −; m; −; −
	byKv, byCv, byK, byBore, own bool    // own: fl was written
	closes                       string  // tight | inherent
	trim                         Trim
	act                          Actuator
	place                        Place
	law                          valveLaw
}

func (e *valve) Bind(p *Params) {
	p.Name(&e.act.Tag, "tag", Required, "tag of the valve")
	p.Number(&e.kv, "kv", quantity.Kv, Optional, "flow coefficient wide open; or cv; or k and bore", Positive).Was(&e.byKv)
	p.Number(&e.cv, "cv", quantity.Cv, Optional, "flow coefficient in US units", Positive).Was(&e.byCv)
	p.bare(&e.k, "k", Optional, "loss coefficient wide open, on its bore", Positive).Was(&e.byK)
	p.Length(&e.bore, "bore", Optional, "bore of the valve", Positive).Was(&e.byBore)
	p.Nested(e.setTrim, "trim", Trims, Optional, "how Kv follows travel").Or("linear")
	p.Ratio(&e.act.Open, "open", Optional, "travel at the start", Share).Or("0 %")
	p.Ratio(&e.act.Normally, "normally", Optional, "usual travel", Share).Or("0 %")
	p.Number(&e.act.Stroke, "stroke", quantity.Time, Optional, "time of full travel", NotNegative).Or("0 s")
	p.Ratio(&e.leaks, "leaks", Optional, "share of Kv that passes when shut", Share).Or("0 %")
	p.Word(&e.closes, "closes", Optional, "tight: shut at 0 %; inherent: keeps what its trim leaves", "tight", "inherent").Or("tight")
	p.Ratio(&e.fl, "fl", Optional, "liquid pressure recovery factor; default by trim", Coefficient).Was(&e.own)
	p.bare(&e.act.Turns, "turns", Optional, "turns of the handwheel for full travel", Positive)
	p.Name(&e.act.Location, "location", Optional, "where it is found")
	p.Name(&e.act.Lock, "lock", Optional, "lock or seal on it")
}

func (e *valve) setTrim(t Element, _ string) error {
	e.trim = t.(Trim)
	return nil
}

func (e *valve) SetPlace(at Place) { e.place = at }

func (e *valve) Ready() error {
	var f faults
	ways := 0
	for _, given := range []bool{e.byKv, e.byCv, e.byK} {
		if given {
			ways++
		}
	}
	f.when(ways != 1, "a valve takes one of: kv, cv, k with bore")
	f.when(e.byK && !e.byBore, "k needs the bore that it refers to")
	if err := e.trim.Ready(); err != nil {
		f.when(true, err.Error())
	}
	if len(f) > 0 {
		return f.err()
	}
	kv := e.Kv()
	fl, _ := e.Recovers()
	bore := e.bore
	if !e.byBore {
		bore = e.place.nearestBore()
	}
	e.law = valveLaw{square: friction.QuadraticOfKv(kv), recovery: fl * fl, least: e.leaks}
	e.law.thick = newReynoldsFactor(kv, bore, fl, styleOf(e.trim))
	if at0, _ := e.trim.Share(0); e.closes == "tight" && at0 > 0 {
		e.law.joinBelow = 0.05
	}
	return nil
}

// Kv returns the flow coefficient wide open, m³/h at 1 bar.
func (e *valve) Kv() float64 {
	switch {
	case e.byCv:
		return e.cv / friction.CvOfKv
	case e.byK:
		return friction.KvOfK(e.k, e.bore)
	}
	return e.kv
}

// Recovers returns F_L (−) and where it is from.
func (e *valve) Recovers() (fl float64, source string) {
	if e.own {
		return e.fl, "stated"
	}
	return e.trim.LiquidRecovery()
}

func (e *valve) Tag() string         { return e.act.Tag }
func (e *valve) Actuator() *Actuator { return &e.act }

// Bore returns the valve's own bore, m; 0 when none was written.
func (e *valve) Bore() float64 { return e.bore }

// Shut tells that nothing passes at this travel.
func (e *valve) Shut(at *Local) bool {
	phi, _ := e.Opens(at.Opening)
	return phi < leastShare
}

// Recovery returns F_L², −.
func (e *valve) Recovery(*Local) float64 { return e.law.recovery }

// CriticalRatio returns F_F, −, with the critical pressure of water.
func (e *valve) CriticalRatio(f *Fluid) float64 {
	return friction.CriticalRatio(f.Vapour, friction.CriticalPressureOfWater)
}
