package network

import (
	"math"
)

var (
	always = math.Inf(1)
	never  = math.Inf(-1)
)

// inletLaw limits the flow that a mouth admits where liquid leaves a vessel through it. Depth y is over the invert, m; D is the bore, m.
//
//	floor mouth:  Q = (Q_w⁴ + Q_s⁴)^¼, Q_w = 1.7·πD·y^1.5, Q_s = 2.53·√g·y^2.5
//	side mouth:   critical flow Q = √(gA³/T) of the part-full circle at the depth for which y_c + A/2T is the depth over the invert
//	fade:         an ideal opening; the flow fades over the lowest 5 % of the bore
//
// Sources: weir over the lip with the broad-crest coefficient 1.7 m^½/s; onset of gas pull-through, Lubin & Springer, J. Fluid Mech. 29 (1967) 385;
// critical flow of open channels, any text on hydraulics.
type inletLaw struct {
	form    inletForm
	bore    float64 // m
	g       float64 // m/s²
	shallow float64 // m, depth over the invert under which the turn of the flow is eased
}

type inletForm int8

const (
	noInlet    inletForm = iota // a tee, a body of water: liquid is always there
	floorInlet                  // mouth in the floor, or dipping down
	sideInlet                   // mouth in a wall
	slotInlet                   // a rectangular opening: the weir of its width, held in bore
	fadeInlet                   // ideal
	dryInlet                    // the open air: nothing to draw
)

// shallowShare of the bore, and shallowLeast, m, are the depth over an invert within which the turn of a flow is eased; that of an ideal opening is the depth
// over which it fades. Under it next to nothing leaves whatever the law: common practice, no source.
const (
	shallowShare = 0.02
	shallowLeast = 1e-3
	fadeShare    = 0.05
)

// settle works out the shallow depth.
func (l *inletLaw) settle() {
	switch l.form {
	case noInlet, dryInlet:
		l.shallow = 0
	case fadeInlet:
		l.shallow = fadeShare * l.bore
	default:
		l.shallow = math.Max(shallowLeast, shallowShare*l.bore)
	}
}

// limit returns the largest flow admitted at depth y and its slope, both 0 at y ≤ 0.
func (l *inletLaw) limit(y float64) (q, slope float64) {
	if y <= 0 {
		return 0, 0
	}
	r := math.Sqrt(y)
	switch l.form {
	case floorInlet:
		w, dw := 1.7*math.Pi*l.bore*y*r, 1.5*1.7*math.Pi*l.bore*r
		k := 2.53 * math.Sqrt(l.g)
		s, ds := k*y*y*r, 2.5*k*y*r
		w3, s3 := w*w*w, s*s*s
		t := math.Sqrt(math.Sqrt(w3*w + s3*s))
		if t == 0 {
			return 0, 0
		}
		return t, (w3*dw + s3*ds) / (t * t * t)
	case slotInlet:
		return 1.7 * l.bore * y * r, 1.5 * 1.7 * l.bore * r
	case sideInlet:
		return criticalCircle(y, l.bore, l.g)
	}
	return always, 0
}

// ample tells quickly that a flow q is well within what the mouth admits at depth y.
func (l *inletLaw) ample(y, q float64) bool {
	if y < l.shallow {
		return false
	}
	switch l.form {
	case noInlet, fadeInlet:
		return true
	case floorInlet:
		w := 1.7 * math.Pi * l.bore // of the lip alone
		return w*w*y*y*y > 1.3*q*q
	case slotInlet:
		w := 1.7 * l.bore
		return w*w*y*y*y > 1.3*q*q
	case sideInlet:
		// The critical flow at depth y is never under that of the wide triangle 0.3·√(g·y⁵)·(D/y)^½ for y ≤ D, nor under 0.3·√g·D²·y^½ beyond.
		d := math.Min(y, l.bore)
		return 0.09*l.g*d*d*d*l.bore*math.Max(y, d) > 1.3*q*q
	}
	return false
}

// criticalCircle returns the critical flow, m³/s, in a part-full circle of diameter d, m, whose specific energy over the invert is e, m, and
// its slope by e: A = d²/8·(θ − sin θ), T = d·sin(θ/2), y = d/2·(1 − cos(θ/2)), e = y + A/2T, Q = √(gA³/T).
func criticalCircle(e, d, g float64) (q, slope float64) {
	x := e / d
	// e/d ≈ θ²/12 at the invert (parabola: y + y/3); found by Newton on u = θ/2 in (0, π).
	u := 2 * math.Asin(math.Min(0.98, math.Sqrt(0.74*x)))
	if x > 1.2 {
		u = math.Pi - 0.5/x
	}
	lo, hi := 0.0, math.Pi
	for i := 0; i < 60; i++ {
		f, df := circleEnergy(u)
		if f > x {
			hi = u
		} else {
			lo = u
		}
		next := u - (f-x)/df
		if !(next > lo && next < hi) {
			next = (lo + hi) / 2
		}
		if math.Abs(next-u) < 1e-14*u {
			u = next
			break
		}
		u = next
	}
	a, t := d*d/4*circleArea(u), d*math.Sin(u)
	if t <= 0 {
		return always, 0
	}
	q = math.Sqrt(g * a * a * a / t)
	// at the critical depth dQ/de = √(gA·T)·… : Q² = 2gA²(e − y) is stationary in y, so dQ/de = gA²/Q
	return q, g * a * a / q
}

// circleArea returns u − sin u·cos u without loss of figures near the invert, u = θ/2; the area is d²/4 of it.
func circleArea(u float64) float64 {
	if u < 0.02 {
		u2 := u * u
		return u * u2 * (2.0/3 - u2*(2.0/15-u2*4.0/315))
	}
	return u - math.Sin(u)*math.Cos(u)
}

// circleEnergy returns e/d = y/d + A/(2T·d) and its slope by u.
func circleEnergy(u float64) (e, slope float64) {
	sn, cs := math.Sincos(u)
	a := circleArea(u)
	// y/d = (1 − cos u)/2, A/(2Td) = a/(8 sin u); da/du = 2 sin²u
	half := math.Sin(u / 2)
	return half*half + a/(8*sn), sn/2 + (2*sn*sn*sn-a*cs)/(8*sn*sn)
}
