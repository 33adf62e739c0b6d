package shape

import (
	"math"
	"testing"
)

// specimen is one vessel of those every property is tried on.
type specimen struct {
	name  string
	shape Shape
}

// must takes the error out of a constructor's answer; a fault here is the test's.
func must[T any](x T, err error) T {
	if err != nil {
		panic(err)
	}
	return x
}

func heads(d float64) map[string]Head {
	return map[string]Head{
		"flat":          must(Flat(d)),
		"cone":          must(Cone(d, 0.3*d, 0, 0)),
		"cone_60":       must(Cone(d, 0, math.Pi/3, 0.02*d)),
		"cone_blunt":    must(Cone(d, 0.02*d, 0, 0.3*d)),
		"ellipsoidal":   must(Ellipsoidal(d, 0, 0)),
		"shallow":       must(Ellipsoidal(d, 0.05*d, 0)),
		"hemispherical": must(Hemispherical(d, 0)),
		"asme_fd":       must(TorisphericalForm(d, "", 0)),
		"din_28011":     must(TorisphericalForm(d, "din_28011", 0)),
		"din_28013":     must(TorisphericalForm(d, "din_28013", 0)),
		"dished":        must(Torispherical(d, 0.8*d, 0, 0)),
		"tight_knuckle": must(Torispherical(d, d, 0.001*d, 0)),
		"near_sphere":   must(Torispherical(d, 0.52*d, 0.4*d, 0)),
		"long_knuckle":  must(Torispherical(d, 0.9*d, 0.3*d, 0)),
	}
}

func specimens() []specimen {
	var all []specimen
	add := func(name string, s Shape, err error) { all = append(all, specimen{name, must(s, err)}) }
	for _, d := range []float64{0.4, 2.4, 30} {
		for name, head := range heads(d) {
			s, err := UprightCylinder(d, 0, 2*d, head, head)
			add("upright "+name, s, err)
			s, err = LyingCylinder(d, 2.5*d, 0, head)
			add("lying "+name, s, err)
		}
		s, err := Sphere(d, 0)
		add("sphere", s, err)
	}
	cone := must(UprightCylinder(3.2, 5, 0, must(Cone(3.2, 0.9, 0, 0)), nil))
	box := must(Box(4, 3, 2.2))
	lying := must(LyingCylinder(2.4, 6, 0, must(TorisphericalForm(2.4, "", 0))))
	all = append(all, specimen{"cone bottom", cone}, specimen{"box", box})
	s, err := Frustum(Section{Diameter: 0.3}, Section{Diameter: 2}, 1.5)
	add("frustum widening", s, err)
	s, err = Frustum(Section{Diameter: 2}, Section{Diameter: 1.999}, 1.5)
	add("frustum barely narrowing", s, err)
	s, err = Frustum(Section{Length: 0.2, Width: 3}, Section{Length: 4, Width: 2}, 1.5)
	add("frustum crossing", s, err)
	s, err = Frustum(Section{Length: 3, Width: 3}, Section{Length: 0.1, Width: 0.2}, 1.5)
	add("frustum narrowing", s, err)
	s, err = Frustum(Section{Length: 3, Width: 3}, Section{Length: 3, Width: 4}, 1.5)
	add("frustum wedge", s, err)
	s, err = Frustum(Section{Area: 1}, Section{Diameter: 3}, 1.5)
	add("frustum areas", s, err)
	rows := [][2]float64{{0, 0}, {0.5, 0.2}, {1, 2}, {1.5, 3.5}, {2, 5.012}, {4, 6}}
	s, err = Table(rows, false)
	add("table straight", s, err)
	s, err = Table(rows, true)
	add("table smooth", s, err)
	s, err = Stack(box, lying, cone, must(Sphere(2, 0)))
	add("stack", s, err)
	for _, in := range []specimen{{"cone bottom", cone}, {"lying", lying}, {"box", box}} {
		s, err = Inside(in.shape, Internal{From: 0.3, To: 0.9, Voids: 0.42}, Internal{From: 0.8, To: 1.2, Displaces: 0.1}, Internal{From: 2, To: 2.1, Voids: 0.999})
		add("inside "+in.name, s, err)
	}
	return all
}

// close tells whether two numbers agree to a relative tolerance.
func closeTo(t *testing.T, what string, got, want, tol float64) {
	t.Helper()
	if !(math.Abs(got-want) <= tol*math.Abs(want)) {
		t.Errorf("%s: got %.15g, want %.15g (off by %.2g, allowed %.2g)", what, got, want, got/want-1, tol)
	}
}
