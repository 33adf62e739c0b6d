package shape

import "math"

// Cone returns a conical head for diameter, m, given by its depth, m, or its included angle, rad (the other 0).
//
// As a bottom it ends at its outlet, m (0: 50 mm, or a quarter of the diameter when that is less), and depth is down to that outlet:
//
//	tan(angle/2) = (D − d)/(2·depth)
//	V = π·depth·(D² + D·d + d²)/12
//
// As a top it ends at an outlet that was given, else in its point, with no section under that of the default outlet. As the end of a lying
// cylinder it always runs to its point. D, d in m, V in m³. Source: solid geometry. Range: 0 < angle < 180°, outlet < diameter.
func Cone(diameter, depth, angle, outlet float64) (Head, error) {
	var f faults
	checkHead(&f, diameter, outlet)
	switch {
	case depth == 0 && angle == 0:
		f.add("give its depth or its included angle")
	case depth != 0 && angle != 0:
		f.add("give its depth or its included angle, not both")
	case depth != 0:
		f.positive("depth", depth)
	case !(angle > 0 && angle < math.Pi):
		f.add("angle is the included angle and must lie between 0° and 180°, not %.5g°", angle*180/math.Pi)
	}
	if err := f.err("cone"); err != nil {
		return nil, err
	}
	return &cone{headBase: headBase{"cone", diameter}, depth: depth, angle: angle, outlet: outlet}, nil
}

type cone struct {
	headBase
	depth, angle, outlet float64 // as given
}

// down returns the depth, m, to where the bore is d, m.
func (c *cone) down(d float64) float64 {
	if c.depth > 0 {
		return c.depth
	}
	return (c.diameter - d) / 2 / math.Tan(c.angle/2)
}

func (c *cone) bore() float64 {
	return math.Sqrt(tipArea(outletOr(c.outlet, c.diameter)) * 4 / math.Pi)
}
func (c *cone) Depth() float64  { return c.down(c.bore()) }
func (c *cone) Volume() float64 { return volumeOf(c.bottom()) }

func (c *cone) bottom() []slice {
	d := c.bore()
	return []slice{tapered(circle(d), circle(c.diameter), c.down(d))}
}

func (c *cone) top() []slice {
	if c.outlet > 0 {
		return c.bottom()
	}
	// To the point, but never narrower than the default outlet.
	d, depth := c.bore(), c.down(0)
	tip := depth * d / c.diameter
	return []slice{
		{piece: prismOf(circle(d)), h: tip, half: func(z float64) float64 { return z * c.diameter / depth / 2 }},
		tapered(circle(d), circle(c.diameter), depth-tip),
	}
}
