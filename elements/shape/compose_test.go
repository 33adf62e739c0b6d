package shape

import (
	"math"
	"slices"
	"testing"
)

func TestStackCorners(t *testing.T) {
	s := must(Stack(
		must(UprightCylinder(2, 1, 0, nil, nil)),
		must(UprightCylinder(2.004, 1, 0, nil, nil)), // 0.4 % more area: no corner
		must(Frustum(Section{Diameter: 2.004}, Section{Diameter: 1}, 0.5)),
		must(Box(1, 1, 1)),
	))
	if want := []float64{2.5}; !slices.EqualFunc(s.Corners(), want, func(a, b float64) bool { return math.Abs(a-b) < 1e-12 }) {
		t.Errorf("corners %v, want %v", s.Corners(), want)
	}
	v, _ := s.Volume(3.5)
	closeTo(t, "stack", v, math.Pi*(1+1.002*1.002)+math.Pi*0.5/12*(2.004*2.004+2.004+1)+1, 1e-12)
	closeTo(t, "rim of the box", s.Perimeter(3.5), 4, 1e-15)
	closeTo(t, "rim of the cylinder", s.Perimeter(0.5), 2*math.Pi, 1e-15)
}

func TestInside(t *testing.T) {
	s := must(Inside(must(Box(4, 3, 2.2)), Internal{From: 0, To: 0.4, Voids: 0.42}, Internal{From: 1, To: 1.2, Displaces: 0.1}))
	for _, c := range [][2]float64{{0.2, 12 * 0.2 * 0.42}, {0.4, 12 * 0.4 * 0.42}, {1, 12 * (0.6 + 0.4*0.42)}, {1.1, 12*(0.7+0.4*0.42) - 0.05}, {2.2, 12*(1.8+0.4*0.42) - 0.1}} {
		v, _ := s.Volume(c[0])
		closeTo(t, "box with internals", v, c[1], 1e-14)
	}
	if want := []float64{0.4, 1, 1.2}; !slices.EqualFunc(s.Corners(), want, func(a, b float64) bool { return math.Abs(a-b) < 1e-12 }) {
		t.Errorf("corners %v, want %v", s.Corners(), want)
	}
	// In a curved shape: media and the room they leave make up the whole.
	whole := must(LyingCylinder(2.4, 6, 0, must(TorisphericalForm(2.4, "", 0))))
	part := must(Inside(whole, Internal{From: 0.3, To: 2, Voids: 0.42}))
	at := func(s Shape, h float64) float64 { v, _ := s.Volume(h); return v }
	for _, h := range []float64{0.2, 0.3, 0.9, 1.5, 2, 2.4} {
		in := math.Min(math.Max(h, 0.3), 2)
		closeTo(t, "media", at(part, h), at(whole, h)-0.58*(at(whole, in)-at(whole, 0.3)), 1e-12)
	}
	closeTo(t, "height", part.Height(), 2.4, 1e-14)
}

// A closed vessel's top is a corner, an open one's is not; the area over a pole is 1 % of the largest section.
func TestTop(t *testing.T) {
	if c := must(Box(1, 1, 1)).Corners(); len(c) != 0 {
		t.Errorf("a box has corners: %v", c)
	}
	s := must(Sphere(3, 0))
	if c := s.Corners(); len(c) != 1 || c[0] != s.Height() {
		t.Errorf("corners of a sphere: %v", c)
	}
	_, a := s.Volume(3.1)
	closeTo(t, "area over a sphere", a, 0.01*math.Pi*9/4, 1e-6)
	_, tip := s.Volume(0)
	closeTo(t, "area of its pole", tip, math.Pi*0.05*0.05/4, 1e-14)
}
