package network

import (
	"math"

	"headfall/elements"
	"headfall/elements/friction"
)

// sideOpening is an opening in a wall and nothing else in its line, so tall against the head over it that its strips discharge each under their own head.
// A strip at elevation z under liquid on side A discharges, per area and for a coefficient of 1,
//
//	√(2g·(z_A + p_A/γ − max(z_B, z) − p_B/γ)),
//
// z_A, z_B surfaces, m over datum; p_A, p_B gas pressures, Pa; where z_B is under the strip it falls freely. Rectangular: Q = ⅔·Cd·b·√(2g)·(h₂^1.5 − h₁^1.5) for the part
// that falls freely; round: by quadrature, from 1½ diameters over the centre on by the series of the strips. The drowned share of the area passes the law of the
// opening for the difference of the heads. The coefficient is that of the law for the head over the centre, or for 1½ heights where that is less.
// For a vessel with a mouth in its wall on one side, and on the other a vessel with its mouth at the same height, a body of water, or a free fall within the
// height of the opening. Source: textbook formula of the large orifice; strip integration of the circular weir.
type sideOpening struct {
	low, high float64 // m over datum
	width     float64 // m, of a rectangle; 0: round
	area      float64 // m²
	g         float64
}

// sameHeight is the distance, m, within which two mouths are the same opening.
const sameHeight = 1e-3

// findSide makes a line a side opening where it is one.
func (s *system) findSide(c *line) {
	if len(c.plan.Parts) != 1 || c.inertia > 0 || c.chain.fwd+c.chain.rev > 0 {
		return
	}
	part := c.plan.Parts[0].Part
	mouthed, ok := part.(elements.Mouthed)
	own, wall := part.(elements.OwnEnd)
	if !ok || !wall || !own.OwnEnd() {
		return
	}
	m, other := &c.from, &c.to
	if !inWall(m) {
		m, other = other, m
	}
	if !inWall(m) || m.width == 0 {
		return
	}
	o := &sideOpening{low: m.centre - m.width/2, high: m.centre + m.width/2, g: s.plan.Gravity}
	switch other.kind {
	case toVessel:
		if !inWall(other) || math.Abs(other.centre-m.centre) > sameHeight {
			return
		}
	case toAir:
		if other.centre < o.low-sameHeight || other.centre > o.high+sameHeight {
			return
		}
	case toWater:
	default:
		return
	}
	o.area = math.Pi / 4 * m.width * m.width
	if w := mouthed.Mouth().Width; w > 0 {
		o.width, o.area = w, w*m.width
	}
	c.side = o
}

func inWall(m *mouth) bool {
	return m.kind == toVessel && (m.inlet.form == sideInlet || m.inlet.form == slotInlet)
}

// level returns the surface at an end, m over datum, the head of the gas there, m, and how the elevation counted in phi moves with the surface.
func (o *sideOpening) level(m *mouth, e *end, gamma float64) (z, gas, slope float64) {
	switch m.kind {
	case toVessel:
		z = e.depth + m.invert
		u, du := uncover(z, m.centre, m.width)
		return z, e.phi/gamma - u, du
	case toWater:
		return (e.phi - m.air) / gamma, m.air / gamma, 0
	}
	return never, m.air / gamma, 0
}

// strips is the flow of a line that is a side opening.
func (l *line) strips(a, b *end, gamma float64) {
	o := l.side
	za, ga, ua := o.level(&l.from, a, gamma)
	zb, gb, ub := o.level(&l.to, b, gamma)
	q, byZa, byZb, byE := o.through(l, za, zb, ga-gb, gamma)
	if q == 0 && zb > o.low {
		q, byZb, byZa, byE = o.through(l, zb, za, gb-ga, gamma)
		q, byZb, byZa = -q, -byZb, -byZa // and byE keeps its sign: both turn
	}
	l.q = q
	l.byA, l.byYa = o.partials(&l.from, byZa, byE, ua, gamma)
	l.byB, l.byYb = o.partials(&l.to, byZb, -byE, ub, gamma)
}

// partials turns those by surface and head of gas into those by phi and depth.
func (o *sideOpening) partials(m *mouth, byZ, byGas, slope, gamma float64) (byPhi, byDepth float64) {
	switch m.kind {
	case toVessel:
		return byGas / gamma, byZ - byGas*slope
	case toWater:
		return byZ / gamma, 0
	}
	return 0, 0
}

// through returns the flow from a surface at za to one at zb, extra more head of gas on the first, and its partials.
func (o *sideOpening) through(l *line, za, zb, extra, gamma float64) (q, byZa, byZb, byE float64) {
	if za <= o.low {
		return 0, 0, 0, 0
	}
	top := za + extra
	lo, hi := math.Max(o.low, math.Min(zb, o.high)), math.Min(za, o.high)
	if hi > lo && top > lo {
		c, byC := o.coefficient(l, top, gamma)
		v, byTop, byLo, byHi := o.free(top, lo, math.Min(hi, top))
		q, byE = c*v, c*byTop+byC*v
		byZa = byE
		if za < o.high && za < top {
			byZa += c * byHi
		}
		if zb > o.low && zb < o.high {
			byZb = c * byLo
		}
	}
	if d := top - zb; zb > o.low && d > 0 {
		e := math.Min(za, zb)
		share, byEdge := o.under(e)
		v, slope := l.flowAt(gamma * d)
		q += share * v
		by := share * slope * gamma
		byE, byZa, byZb = byE+by, byZa+by, byZb-by
		if za < zb {
			byZa += byEdge * v
		} else {
			byZb += byEdge * v
		}
	}
	return q, byZa, byZb, byE
}

// coefficient is Cd (−) of the law for the head of top over the centre, no less than 1½ heights, and its slope, 1/m.
func (o *sideOpening) coefficient(l *line, top, gamma float64) (cd, slope float64) {
	h, least := top-(o.low+o.high)/2, 1.5*(o.high-o.low)
	deep := h > least
	if !deep {
		h = least
	}
	q, s := l.flowAt(gamma * h)
	ideal := o.area * math.Sqrt(2*o.g*h)
	if deep {
		slope = (s*gamma - q/(2*h)) / ideal
	}
	return q / ideal, slope
}

// free is the flow, m³/s for a coefficient of 1, of the strips from lo to hi under a head that reaches to top ≥ hi, and its partials.
func (o *sideOpening) free(top, lo, hi float64) (q, byTop, byLo, byHi float64) {
	root := math.Sqrt(2 * o.g)
	rl, rh := math.Sqrt(top-lo), math.Sqrt(math.Max(0, top-hi))
	if o.width > 0 {
		c := o.width * root
		return friction.RectangularSide(o.width, top-hi, top-lo, o.g), c * (rl - rh), -c * rl, c * rh
	}
	d := o.high - o.low
	if h := top - (o.low+o.high)/2; lo <= o.low && hi >= o.high && h >= 1.5*d {
		v, by := friction.RoundSideDeep(h / d)
		v, by = v*math.Sqrt(h), by*math.Sqrt(h)/d+v/(2*math.Sqrt(h))
		return o.area * root * v, o.area * root * by, 0, 0
	}
	v, by := friction.RoundStrips((top-o.low)/d, (lo-o.low)/d, (hi-o.low)/d)
	k := root * d * d
	return k * math.Sqrt(d) * v, k / math.Sqrt(d) * by, -root * o.chord(lo) * rl, root * o.chord(hi) * rh
}

// chord is the width, m, of the round opening at elevation z.
func (o *sideOpening) chord(z float64) float64 {
	return 2 * math.Sqrt(math.Max(0, (z-o.low)*(o.high-z)))
}

// under is the share of the area under elevation z, and its slope, 1/m.
func (o *sideOpening) under(z float64) (share, slope float64) {
	d := o.high - o.low
	switch u := (z - o.low) / d; {
	case u <= 0:
		return 0, 0
	case u >= 1:
		return 1, 0
	case o.width > 0:
		return u, 1 / d
	default:
		return 1 / math.Pi * circleArea(math.Acos(1-2*u)), o.chord(z) / o.area
	}
}
