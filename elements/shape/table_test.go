package shape

import (
	"math"
	"slices"
	"testing"
)

// Corners are where the area jumps by more than 1 %; smaller kinks are rounded over and do not move the volume by 1.3 µm of level.
func TestTableCorners(t *testing.T) {
	rows := [][2]float64{{0, 0}, {1, 2}, {2, 4.01}, {3, 7}, {4, 10.03}}
	s := must(Table(rows, false))
	if want := []float64{2, 3}; !slices.Equal(s.Corners(), want) {
		t.Errorf("corners %v, want %v", s.Corners(), want)
	}
	for _, r := range rows {
		v, a := s.Volume(r[0])
		if math.Abs(v-r[1]) > 1.3e-6*a {
			t.Errorf("at %g m: %g m³, the table says %g", r[0], v, r[1])
		}
	}
	_, below := s.Volume(1 - 0.6e-3)
	_, at := s.Volume(1)
	_, above := s.Volume(1 + 0.6e-3)
	closeTo(t, "area below the kink", below, 2, 1e-12)
	closeTo(t, "area at the kink", at, 2.005, 1e-9)
	closeTo(t, "area above the kink", above, 2.01, 1e-12)
}

// Table of a cylinder reproduces the cylinder; a smooth one reproduces a lying cylinder far better than a straight one.
func TestTableOfACylinder(t *testing.T) {
	rows := func(s Shape, n int) (rows [][2]float64) {
		for i := range n + 1 {
			h := s.Height() * float64(i) / float64(n)
			v, _ := s.Volume(h)
			rows = append(rows, [2]float64{h, v})
		}
		return rows
	}
	worst := func(a, b Shape) (off float64) {
		full, _ := a.Volume(a.Height())
		for i := range 1001 {
			h := a.Height() * float64(i) / 1000
			va, _ := a.Volume(h)
			vb, _ := b.Volume(h)
			off = math.Max(off, math.Abs(va-vb)/full)
		}
		return off
	}
	upright := must(UprightCylinder(2, 3, 0, nil, nil))
	for _, smooth := range []bool{false, true} {
		s := must(Table(rows(upright, 7), smooth))
		if off := worst(upright, s); off > 1e-14 {
			t.Errorf("cylinder, smooth %t: %.2g off", smooth, off)
		}
		if len(s.Corners()) != 0 {
			t.Errorf("a cylinder has corners: %v", s.Corners())
		}
	}
	lying := must(LyingCylinder(2.4, 6, 0, nil))
	straight, smooth := must(Table(rows(lying, 24), false)), must(Table(rows(lying, 24), true))
	t.Logf("lying cylinder in 24 rows: straight %.1e, smooth %.1e of the full volume", worst(lying, straight), worst(lying, smooth))
	if worst(lying, smooth) > worst(lying, straight)/2 {
		t.Error("the smooth table is no better")
	}
}

// A table that starts above the lowest point goes straight down to it.
func TestTableFromAHeel(t *testing.T) {
	s := must(Table([][2]float64{{0.5, 1}, {1, 3}}, false))
	v, a := s.Volume(0.25)
	closeTo(t, "heel", v, 0.5, 1e-14)
	closeTo(t, "heel's area", a, 2, 1e-14)
}

// Smooth tables pass through their rows and keep 1 cm² whatever the rows.
func TestSmoothRough(t *testing.T) {
	rows := [][2]float64{{0, 0}, {1, 1e-4}, {1.01, 5}, {2, 5.0002}, {2.5, 9}, {6, 9.01}}
	s := must(Table(rows, true))
	for _, r := range rows {
		v, _ := s.Volume(r[0])
		if math.Abs(v-r[1]) > 1e-12 {
			t.Errorf("at %g m: %g m³, the table says %g", r[0], v, r[1])
		}
	}
	for i := range 60001 {
		if _, a := s.Volume(float64(i) / 10000); a < minArea*(1-1e-9) {
			t.Fatalf("area %g at %g", a, float64(i)/10000)
		}
	}
}
