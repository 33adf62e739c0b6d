package friction

import (
	"math"
	"testing"
)

// differ returns the central difference of f at x.
func differ(f func(float64) (float64, float64), x float64) float64 {
	h := 1e-5 * x
	a, _ := f(x - h)
	b, _ := f(x + h)
	return (b - a) / (2 * h)
}

func TestSlopesOfFriction(t *testing.T) {
	for _, rough := range []float64{0, 1e-4, 0.05} {
		tab := NewTable(rough)
		last := 0.0
		for re := 1.0; re < 1e11; re *= 1.013 {
			formula := func(re float64) (float64, float64) { return Churchill(re, rough) }
			v, s := formula(re)
			if d := differ(formula, re); math.Abs(s-d) > 1e-6*(v/re+math.Abs(d)) {
				t.Fatalf("Churchill, Re %g, ε/D %g: slope %g, by differences %g", re, rough, s, d)
			}
			v, s = tab.FRe(re)
			if d := differ(tab.FRe, re); math.Abs(s-d) > 1e-5*(v/re+math.Abs(d)) {
				t.Fatalf("table, Re %g, ε/D %g: slope %g, by differences %g", re, rough, s, d)
			}
			if v < last*(1-1e-15) || s < -1e-15*v/re {
				t.Fatalf("table, Re %g, ε/D %g: f·Re falls", re, rough)
			}
			last = v
		}
	}
}

// A table is smooth over the joints of its cells and octaves and where it begins and ends.
func TestTableJoints(t *testing.T) {
	tab := NewTable(1e-3)
	for _, re := range []float64{512, 1024, 2048, 2056, 4096, 8192, 1 << 20, 1 << 30} {
		a, sa := tab.FRe(math.Nextafter(re, 0))
		b, sb := tab.FRe(re)
		if math.Abs(a/b-1) > 1e-12 || math.Abs(sa-sb) > 1e-9*b/re {
			t.Errorf("Re %g: %.15g, %g | %.15g, %g", re, a, sa, b, sb)
		}
	}
	for _, re := range []float64{0, 1e-300, 1e20, 1e30} {
		if v, s := tab.FRe(re); math.IsNaN(v) || math.IsInf(v, 0) || math.IsNaN(s) {
			t.Errorf("Re %g: %g, %g", re, v, s)
		}
		if v, s := Churchill(re, 0); math.IsNaN(v) || math.IsInf(v, 0) || math.IsNaN(s) {
			t.Errorf("formula, Re %g: %g, %g", re, v, s)
		}
	}
}

func TestSlopeOfThinPlate(t *testing.T) {
	for re := 1e-12; re < 4e4; re *= 1.37 {
		v, s := ThinPlate(re)
		if d := differ(ThinPlate, re); math.Abs(s-d) > 1e-5*(v/re+math.Abs(d)) {
			t.Errorf("Re %g: slope %g, by differences %g", re, s, d)
		}
		if v*v > 1.3 || s*re/v > 0.51 || s*re/v < -0.5 {
			t.Errorf("Re %g: factor %g, exponent %g", re, v, s*re/v)
		}
	}
	if v, _ := ThinPlate(3.9999e4); math.Abs(v-1) > 1e-10 {
		t.Errorf("joins 1 with a step of %g", v-1)
	}
}

func TestSharedTables(t *testing.T) {
	if Shared(1e-3) != Shared(1e-3) {
		t.Error("one roughness has two tables")
	}
	done := make(chan *Table)
	for i := range 8 {
		go func() { done <- Shared(float64(i%3) * 1e-5) }()
	}
	for range 8 {
		<-done
	}
}
