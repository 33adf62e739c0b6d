package shape

import (
	"fmt"
	"math"
	"testing"

	"gonum.org/v1/gonum/integrate/quad"
)

// integral is an oracle that shares nothing with the package: gonum's rule on many short pieces.
func integral(lo, hi float64, f func(float64) float64) (sum float64) {
	const pieces = 20
	for i := range pieces {
		a := lo + (hi-lo)*float64(i)/pieces
		sum += quad.Fixed(f, a, a+(hi-lo)/pieces, 24, nil, 0)
	}
	return sum
}

// Lying cylinders against the closed forms in the doc comments, to 1e-9 of the full volume.
func TestLyingAgainstClosedForms(t *testing.T) {
	const r, l = 1.2, 6.0
	cylinder := func(h float64) float64 { return l * (r*r*math.Acos(1-h/r) - (r-h)*math.Sqrt(h*(2*r-h))) }
	none := func(float64) float64 { return 0 }
	ellipsoid := func(d float64) func(float64) float64 {
		return func(h float64) float64 { return math.Pi * d / r * (r*h*h - h*h*h/3) }
	}
	cones := func(d float64) func(float64) float64 {
		return func(h float64) float64 {
			y := math.Abs(r - h)
			s := math.Sqrt(math.Max(r*r-y*y, 0))
			arcosh := 0.0
			if y > 0 {
				arcosh = math.Acosh(math.Max(r/y, 1))
			}
			v := 2 * d * (math.Pi*r*r/6 - 2*y*s/3 - r*r/3*math.Asin(math.Min(y/r, 1)) + y*y*y/(3*r)*arcosh)
			if h > r {
				return 2*math.Pi*r*r*d/3 - v
			}
			return v
		}
	}
	for _, c := range []struct {
		head Head
		ends func(float64) float64
	}{
		{must(Flat(2 * r)), none},
		{must(Ellipsoidal(2*r, 0, 0)), ellipsoid(r / 2)},
		{must(Hemispherical(2*r, 0)), ellipsoid(r)},
		{must(Cone(2*r, 0.7, 0, 0)), cones(0.7)},
		{must(Cone(2*r, 0, math.Pi/2, 0)), cones(r)},
	} {
		s := must(LyingCylinder(2*r, l, 0.012, c.head))
		full := cylinder(2*r) + c.ends(2*r)
		worst := 0.0
		for i := range 1001 {
			h := 2 * r * float64(i) / 1000
			v, _ := s.Volume(h)
			worst = math.Max(worst, math.Abs(v-cylinder(h)-c.ends(h))/full)
		}
		if worst > 1e-9 {
			t.Errorf("%s: %.2g of the full volume off", c.head.name(), worst)
		}
		t.Logf("%s: %.1e of the full volume", c.head.name(), worst)
	}
}

// Small depths keep their relative precision as well: V → (4/3)·L·√(2R)·h^1.5.
func TestLyingShallow(t *testing.T) {
	s := must(LyingCylinder(2.4, 6, 0.012, nil))
	for _, h := range []float64{1e-5, 1e-4, 1e-3} {
		v, _ := s.Volume(h)
		u := h / 1.2
		closeTo(t, fmt.Sprint("level ", h), v, 6*1.44*math.Sqrt2*math.Pow(u, 1.5)*(4./3-u/5-u*u/56), 1e-8)
	}
}

// Torispherical ends lying down, against a double integral in another order: the section of the head by vertical planes across the axis.
func TestLyingDished(t *testing.T) {
	const d, l = 2.4, 6.0
	for name, head := range heads(d) {
		dish, is := head.(*torispherical)
		if !is {
			continue
		}
		s := must(LyingCylinder(d, l, 0.012, head))
		// Two discs of radius rho each at depth z of the head, cut at level h.
		disc := func(h, rho float64) float64 {
			if rho <= math.Abs(d/2-h) || rho == 0 {
				if h < d/2 {
					return 0
				}
				return math.Pi * rho * rho
			}
			y := (d/2 - h) / rho
			return rho * rho * (math.Acos(y) - y*math.Sqrt(1-y*y))
		}
		worst := 0.0
		for _, h := range []float64{0.002, 0.01, 0.05, 0.1, 0.3, 0.9, 1.2, 1.7, 2.3, 2.4} {
			// Over the knuckle by its angle and over the crown by its own, both split where the disc first reaches the surface.
			cut := math.Abs(d/2 - h)
			c, k := d/2-dish.knuckle, dish.knuckle
			knuckle := func(psi float64) float64 { return disc(h, c+k*math.Cos(psi)) * k * math.Cos(psi) }
			crown := func(a float64) float64 { return disc(h, dish.crown*math.Sin(a)) * dish.crown * math.Sin(a) }
			bend := math.Pi/2 - dish.angle
			at := bend
			if k > 0 {
				at = math.Min(bend, math.Acos(math.Min(math.Max((cut-c)/k, -1), 1)))
			}
			ac := math.Min(dish.angle, math.Asin(cut/dish.crown))
			// Cubed variables take the half powers out where the pieces meet.
			toEnd := func(lo, hi float64, f func(float64) float64) float64 {
				w := hi - lo
				return integral(0, 1, func(x float64) float64 { return f(lo+w*x*x*x) * 3 * w * x * x })
			}
			ends := -toEnd(at, 0, knuckle) + toEnd(at, bend, knuckle) - toEnd(ac, 0, crown) + toEnd(ac, dish.angle, crown)
			v, _ := s.Volume(h)
			want := l*disc(h, d/2) + 2*ends
			full, _ := s.Volume(d)
			worst = math.Max(worst, math.Abs(v-want)/full)
			if !(math.Abs(v-want) <= 1e-9*full) {
				t.Errorf("%s at %g: %.12g, want %.12g (%.1e of full)", name, h, v, want, (v-want)/full)
			}
		}
		t.Logf("%s: %.1e of the full volume", name, worst)
		full, _ := s.Volume(d)
		closeTo(t, name+" full", full, math.Pi*d*d/4*l+2*turned(dish), 1e-9)
	}
}

// turned is the volume of a dished head as a body of revolution, ∫π·ρ²dz over both arcs.
func turned(d *torispherical) float64 {
	c, k := d.diameter/2-d.knuckle, d.knuckle
	knuckle := integral(0, math.Pi/2-d.angle, func(psi float64) float64 {
		rho := c + k*math.Cos(psi)
		return math.Pi * rho * rho * k * math.Cos(psi)
	})
	return knuckle + integral(0, d.angle, func(a float64) float64 {
		rho := d.crown * math.Sin(a)
		return math.Pi * rho * rho * d.crown * math.Sin(a)
	})
}

// Standing heads against ∫π·ρ²dz; the outlet in the pole adds less than a millionth.
func TestUprightDished(t *testing.T) {
	for name, head := range heads(2.4) {
		if d, is := head.(*torispherical); is {
			small := must(Torispherical(2.4, d.crown, d.knuckle, 0.012))
			closeTo(t, name, small.Volume(), turned(d), 1e-8)
			bore := circle(0.012)
			excess := bore * bore / (4 * math.Pi * d.crown) // of a prism over the cap under it
			closeTo(t, name+" with its outlet", small.Volume()-excess, turned(d), 1e-12)
		}
	}
}

// Closed forms of the plainest shapes.
func TestSolids(t *testing.T) {
	at := func(s Shape, err error) func(h float64) float64 {
		must(s, err)
		return func(h float64) float64 { v, _ := s.Volume(h); return v }
	}
	closeTo(t, "box", at(Box(4, 3, 2.2))(1.1), 13.2, 1e-15)
	closeTo(t, "cylinder", at(UprightCylinder(3.2, 5, 0, nil, nil))(2), math.Pi*2.56*2, 1e-15)
	closeTo(t, "cone to its outlet", must(Cone(3.2, 0.9, 0, 0.08)).Volume(), math.Pi*0.9/12*(3.2*3.2+3.2*0.08+0.08*0.08), 1e-14)
	closeTo(t, "cone by angle", must(Cone(2, 0, math.Pi/3, 0.1)).Depth(), 0.95*math.Sqrt(3), 1e-14)
	closeTo(t, "cone by angle, volume", must(Cone(2, 0, math.Pi/2, 0.1)).Volume(), math.Pi*0.95/12*(4+0.2+0.01), 1e-14)
	closeTo(t, "frustum of circles", at(Frustum(Section{Diameter: 1}, Section{Diameter: 3}, 2))(2), math.Pi*2/12*(1+3+9), 1e-14)
	closeTo(t, "frustum of areas", at(Frustum(Section{Area: 4}, Section{Area: 1}, 3))(3), 7, 1e-14)
	closeTo(t, "hopper", at(Frustum(Section{Length: 1, Width: 2}, Section{Length: 3, Width: 3}, 2))(2), 2./6*(2+4*2*2.5+9), 1e-14)
	closeTo(t, "roof cone", at(UprightCylinder(2, 0, 1, nil, must(Cone(2, 0.5, 0, 0))))(1.5), math.Pi*(1+0.5/3), 1e-5)
	round := at(Sphere(3, 0.012))
	closeTo(t, "sphere", round(3), math.Pi*27/6, 1e-8)
	closeTo(t, "half a sphere", round(1.5), math.Pi*27/12, 1e-8)
}
