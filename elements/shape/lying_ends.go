package shape

import "math"

// endPair is the liquid in the two ends of a lying cylinder, h in m over its lowest line, up to the axis.
type endPair interface {
	section(h float64) (area, grow float64) // m², dA/dh in m
	depthAt(y float64) float64              // of one end, m, at y, m off the axis
	// split returns the level, m, at which a new strip must start, and whether the area there starts with a root; 0: none.
	split() (h float64, root bool)
}

// ellipsoidEnds are two half ellipsoids, together a whole one of half axes R, R, d, m:
//
//	A(h) = π·(d/R)·(2·R·h − h²),  V(h) = π·(d/R)·(R·h² − h³/3)
type ellipsoidEnds struct{ d, r float64 }

func (e *ellipsoidal) ends() endPair { return ellipsoidEnds{e.depth, e.diameter / 2} }

func (e ellipsoidEnds) section(h float64) (area, grow float64) {
	p := math.Pi * e.d / e.r
	return p * h * (2*e.r - h), 2 * p * (e.r - h)
}

func (e ellipsoidEnds) depthAt(y float64) float64 {
	return e.d * math.Sqrt(math.Max(1-y*y/e.r/e.r, 0))
}

func (e ellipsoidEnds) split() (h float64, root bool) { return 0, false }

// coneEnds are two cones lying on their side, of radius R and depth d, m. For both, y = R − h over the axis and s = √(R² − y²):
//
//	A(h) = 2·d·(s − (y²/R)·arcosh(R/y)),  dA/dh = (4·d·y/R)·arcosh(R/y)
//	V(h) = 2·d·(π·R²/6 − 2·y·s/3 − (R²/3)·arcsin(y/R) + (y³/(3R))·arcosh(R/y))
//
// Source: D. Jones, Computing Fluid Tank Volumes, Chemical Processing (2002), conical heads; derived here from the chord integral.
type coneEnds struct{ d, r float64 }

func (c *cone) ends() endPair { return coneEnds{c.down(0), c.diameter / 2} }

func (e coneEnds) section(h float64) (area, grow float64) {
	y, s := math.Max(e.r-h, 0), math.Sqrt(h*(2*e.r-h))
	if y == 0 {
		return 2 * e.d * s, 0
	}
	arcosh := math.Asinh(s / y)
	return 2 * e.d * (s - y*y/e.r*arcosh), 4 * e.d * y / e.r * arcosh
}

func (e coneEnds) depthAt(y float64) float64 { return e.d * (1 - math.Abs(y)/e.r) }

// split: the upper strip has the finer cells that y²·ln y near the axis asks for.
func (e coneEnds) split() (h float64, root bool) { return e.r / 2, false }
