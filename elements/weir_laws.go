package elements

import "math"

// fadeOver is the head, m, over which the corrections of the head come in: below it the standards say nothing, and nothing may flow at no head.
const fadeOver = 0.03

// free returns the flow, m³/s, at a head h > 0, m, that nothing drowns, and its derivative, m²/s.
func (l *notchLaw) free(h, g float64) (q, slope float64) {
	s, byU := Step(h / fadeOver)
	eff, byH := h+l.kh*s, 1+l.kh*byU/fadeOver
	root := math.Sqrt(eff)
	p, dp := eff*root, 1.5*root
	if l.power > 2 {
		p, dp = p*eff, 2.5*p
	}
	c := l.factor * l.clear
	if l.rooted {
		c *= math.Sqrt(g)
	}
	grow := 1 + l.alpha*h
	return c * grow * p, c * (grow*dp*byH + l.alpha*p)
}

// spill returns the flow, m³/s, from h down to hd ≤ h, both m over the crest, and its partials, m²/s.
//
// Drowned by Villemonte, (1 − (hd/h)ⁿ)^0.385, with a finite slope where both are level: y·((y²+ε²)/(1+ε²))^−0.3075, y = 1 − (hd/h)ⁿ, ε = 0.005. Exact
// at hd ≤ 0.
func (l *notchLaw) spill(h, hd, g float64) (q, byH, byHd float64) {
	if h <= 0 {
		return 0, 0, 0
	}
	q, byH = l.free(h, g)
	if hd <= 0 {
		return q, byH, 0
	}
	const eps2 = 0.005 * 0.005
	r := hd / h
	rn1 := math.Sqrt(r) // r^(n−1)
	if l.power > 2 {
		rn1 *= r
	}
	y := 1 - rn1*r
	w := y*y + eps2
	share := math.Pow(w/(1+eps2), -0.3075)
	v := y * share
	byY := share * (1 - 0.615*y*y/w)
	byR := -l.power * rn1 * byY
	return q * v, byH*v - q*byR*r/h, q * byR / h
}
