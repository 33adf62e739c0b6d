package elements

import "math"

func init() {
	Register(Kind{
		Name: "weir", Room: Parts,
		Doc: "A weir at the head of its line: flow over its own crest from a free surface, drowned by the level just below it.",
		Law: "rectangular Q = ⅔·Cd·√(2g)·b·h^1.5 or c·b·h^1.5, or Kindsvater–Carter; v_notch Q = 8/15·Ce·tan(θ/2)·√(2g)·(h+k)^2.5; broad_crested Q = (⅔)^1.5·Cd·√g·b·h^1.5; " +
			"drowned by y·(y²+ε²)^−0.3075, y = 1 − (h₂/h)ⁿ, n = 1.5 or 2.5; Q in m³/s, b, h in m, c in m^½/s",
		Valid:  "aired nappe; ISO 1438: h above 0.03 m (v_notch 0.06 m); drowned within 5 %, of a broad crest on the low side",
		Source: "ISO 1438; ISO 3846; Kindsvater and Carter 1957; J. R. Villemonte, Eng. News-Record 139, 866–869, 1947",
		Symbol: "M0 12H24M12 12V22M6 7L12 12",
		New:    func() Element { return &weir{} },
		Sample: "{rectangular: {width: 0.5 m, c: 1.7}}",
	})
}

type weir struct {
	rectangular rectangularNotch
	vee         vNotch
	broad       broadCrest
	isRect      bool
	isVee       bool
	isBroad     bool
	blocked     float64 // share
	law         notchLaw
}

// notchLaw is Q(h) = factor·√g^root·(h + kh·s)^power, with s going from 0 to 1 over the first 30 mm, so that nothing flows at h = 0.
type notchLaw struct {
	factor  float64 // m^½/s or, with root, the share before √g; times m of width where the power is 1.5
	rooted  bool    // times √g
	alpha   float64 // factor is multiplied by 1 + alpha·h, 1/m (Kindsvater–Carter: Ce grows with h/p)
	kh      float64 // m
	power   float64 // 1.5 or 2.5, also Villemonte's exponent
	clear   float64 // share that is not blocked
	mouthed float64 // m, width at the crest; for reports
}

func (e *weir) Bind(p *Params) {
	p.Group(&e.isRect, "rectangular", Optional, "a straight horizontal crest, sharp", e.rectangular.bind)
	p.Group(&e.isVee, "v_notch", Optional, "a triangular notch, sharp", e.vee.bind)
	p.Group(&e.isBroad, "broad_crested", Optional, "a wide flat crest", e.broad.bind)
	p.Ratio(&e.blocked, "blocked", Optional, "share of its width that is blocked", Share).Or("0 %")
}

func (e *weir) Ready() error {
	var f faults
	ways := 0
	for _, given := range []bool{e.isRect, e.isVee, e.isBroad} {
		if given {
			ways++
		}
	}
	f.when(ways != 1, "a weir is one of: rectangular, v_notch, broad_crested")
	if len(f) > 0 {
		return f.err()
	}
	switch {
	case e.isRect:
		e.law = e.rectangular.law(&f)
	case e.isVee:
		e.law = e.vee.law(&f)
	default:
		e.law = e.broad.law(&f)
	}
	e.law.clear = 1 - e.blocked
	return f.err()
}

// Spill returns the flow, m³/s, from the higher of two surfaces h and hd, m over the crest, with its partials; negative when hd is the higher one.
func (e *weir) Spill(h, hd float64, at *Local) (q, byH, byHd float64) {
	if hd > h {
		q, byHd, byH = e.law.spill(hd, h, at.Gravity)
		return -q, -byH, -byHd
	}
	return e.law.spill(h, hd, at.Gravity)
}

// Drop is nothing: the flow of a weir is set by depth.
func (e *weir) Drop(float64, *Local) (dp, slope float64) { return 0, 0 }

func (e *weir) OwnEnd() bool { return true }

// Shut tells that the weir is wholly blocked.
func (e *weir) Shut(*Local) bool { return e.blocked >= 1 }

// CrestWidth returns the clear width at the crest, m; 0 of a notch that comes to a point.
func (e *weir) CrestWidth() float64 { return e.law.mouthed * e.law.clear }

// Gap returns the clear area, m², of the opening above the crest up to h, m, over it, as air passes it.
func (e *weir) Gap(h float64) float64 {
	if e.isVee {
		return math.Tan(e.vee.angle/2) * h * h * e.law.clear
	}
	return e.CrestWidth() * h
}

// Outside tells that the head passes 2.5 times the height of the crest, up to which Kindsvater and Carter measured.
func (e *weir) Outside(_, h float64, _ *Local) string {
	if e.isRect && e.rectangular.hasChannel && h > 2.5*e.rectangular.height {
		return "the head over the weir is more than 2.5 crest heights, the range of Kindsvater and Carter"
	}
	return ""
}
