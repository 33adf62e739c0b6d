package shape

import (
	"errors"
	"math"
	"strings"
	"testing"
)

// What is wrong is said in one go, each fault naming its parameter.
func TestFaults(t *testing.T) {
	shape := func(_ Shape, err error) error { return err }
	head := func(_ Head, err error) error { return err }
	box := must(Box(1, 1, 1))
	fits := must(Flat(2))
	for _, c := range []struct {
		err  error
		says []string
	}{
		{shape(UprightCylinder(0, -1, 0, nil, nil)), []string{"upright_cylinder", "diameter must be more than zero", "height must be more than zero"}},
		{shape(UprightCylinder(1, 0, 0, nil, nil)), []string{"height over all or its straight side"}},
		{shape(UprightCylinder(1, 2, 1, nil, nil)), []string{"not both"}},
		{shape(UprightCylinder(1, 2, 0, fits, nil)), []string{"bottom is made for a diameter of 2 m, the cylinder has 1 m"}},
		{shape(UprightCylinder(2, 0.6, 0, must(Ellipsoidal(2, 0, 0)), must(Ellipsoidal(2, 0, 0)))), []string{"height 600 mm is over all", "take, 1 m"}},
		{shape(UprightCylinder(0.005, 2, 0, nil, nil)), []string{"least section of a vessel is 1 cm²"}},
		{shape(LyingCylinder(1, 0, 0, nil)), []string{"length must be more than zero"}},
		{shape(LyingCylinder(0.3, 0.1, 0.29, nil)), []string{"outlet 290 mm is larger"}},
		{shape(Sphere(math.NaN(), 0)), []string{"diameter"}},
		{shape(Sphere(1, 1)), []string{"outlet 1 m does not fit in a diameter of 1 m"}},
		{shape(Box(1, -1, 0)), []string{"width", "height"}},
		{shape(Frustum(Section{}, Section{Diameter: 1, Area: 1}, 1)), []string{"bottom: give a diameter", "top: give a diameter"}},
		{shape(Frustum(Section{Length: 1}, Section{Area: 1e-6}, 1)), []string{"bottom: width", "top is only 0.01 cm²"}},
		{shape(Table(nil, false)), []string{"rows are missing"}},
		{shape(Table([][2]float64{{0, 1}, {1, 2}}, false)), []string{"row 1: at level 0"}},
		{shape(Table([][2]float64{{1, 0}, {2, 2}}, false)), []string{"row 1: there is no volume at level 1 m"}},
		{shape(Table([][2]float64{{-1, 0}, {2, 2}}, false)), []string{"row 1: levels and volumes start at 0"}},
		{shape(Table([][2]float64{{0, 0}}, false)), []string{"two rows"}},
		{shape(Table([][2]float64{{0, 0}, {1, 1}, {1, 2}, {2, 1.5}}, true)), []string{"row 3", "row 4"}},
		{shape(Table([][2]float64{{0.5, 1}, {0.4, 2}}, false)), []string{"row 2"}},
		{shape(Stack()), []string{"sections are missing"}},
		{shape(Inside(box, Internal{From: 0.5, To: 0.2, Voids: 2})), []string{"from and to", "voids is a share"}},
		{shape(Inside(box, Internal{From: 0.5, To: 0.6, Displaces: 0.2})), []string{"leaves no room for liquid at level 500 mm"}},
		{shape(Inside(box, Internal{From: 0.5, To: 0.6})), []string{"give voids or displaces"}},
		{head(Cone(1, 0, 0, 0)), []string{"depth or its included angle"}},
		{head(Cone(1, 1, 1, 0)), []string{"not both"}},
		{head(Cone(1, 0, math.Pi, 0)), []string{"between 0° and 180°, not 180°"}},
		{head(Cone(1, -1, 0, 2)), []string{"depth", "outlet 2 m does not fit"}},
		{head(Ellipsoidal(1, -1, 0)), []string{"depth must not be negative"}},
		{head(Torispherical(1, 0.4, 0.6, 0)), []string{"crown_radius 400 mm is less than half"}},
		{head(Torispherical(1, 1, 0.6, 0)), []string{"knuckle_radius 600 mm is more than half"}},
		{head(Torispherical(1, 1, 0.4, 0.9)), []string{"outlet 900 mm is wider than the crown"}},
		{head(TorisphericalForm(1, "kloepper", 0)), []string{`form "kloepper" is not known`, "asme_fd, din_28011, din_28013"}},
	} {
		var fault *Fault
		if !errors.As(c.err, &fault) {
			t.Errorf("no fault found that says %q", c.says)
			continue
		}
		for _, words := range c.says {
			if !strings.Contains(c.err.Error(), words) {
				t.Errorf("%q does not say %q", c.err, words)
			}
		}
	}
}
