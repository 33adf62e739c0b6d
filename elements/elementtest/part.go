package elementtest

import (
	"math"
	"math/rand/v2"
	"sort"
	"testing"

	"headfall/elements"
)

// locals are surroundings a part may meet: thin and thick liquids, narrow and wide bands.
func locals() []*elements.Local {
	water := elements.Fluid{Name: "water", Density: 999.5, Dynamic: 1.24e-3, Vapour: 1400, Checked: true}
	thick := elements.Fluid{Name: "thick", Density: 1200, Dynamic: 0.5}
	thin := elements.Fluid{Name: "thin", Density: 700, Dynamic: 2e-4}
	var all []*elements.Local
	for _, f := range []elements.Fluid{water, thick, thin} {
		for _, band := range []float64{1, 0.01} {
			for _, opening := range []float64{1, 0.3, 0.04} {
				all = append(all, &elements.Local{Fluid: &f, Opening: opening, Gravity: 9.80665, Band: band})
			}
		}
	}
	return all
}

// flows are flows of every size both ways, rising, with 0 among them; m³/s.
func flows(r *rand.Rand) []float64 {
	all := []float64{0, 1e-300, -1e-300, 1e12, -1e12}
	for range 300 {
		q := math.Exp(r.Float64()*math.Log(1e14)) * 1e-13
		all = append(all, q, -q*(1+r.Float64()))
	}
	sort.Float64s(all)
	return all
}

func part(t *testing.T, e elements.Part) {
	_, lifts := e.(elements.Pumps)
	_, crest := e.(elements.Crest)
	_, humps := e.(elements.Humps)
	r := rand.New(rand.NewPCG(1, 2))
	for _, at := range locals() {
		q := flows(r)
		slopes(t, e, q, at)
		if !lifts && !crest && !humps {
			passive(t, e, q, at)
		}
		claims(t, e, q, at)
		if th, ok := e.(elements.Throttles); ok {
			throttles(t, e, th, q, at)
		}
		if n := testing.AllocsPerRun(20, func() { e.Drop(0.01, at) }); n != 0 {
			t.Errorf("Drop: %g allocations", n)
		}
	}
	if c, ok := e.(elements.Crest); ok {
		spills(t, c, locals()[0])
	}
	for _, bore := range []elements.Place{{}, {BoreBefore: 0.1, BoreAfter: 0.08}, {BoreAfter: 0.1, First: true, FromWall: true}} {
		if p, ok := e.(elements.Placed); ok {
			p.SetPlace(bore)
			if err := e.Ready(); err == nil {
				passive(t, e, flows(r), locals()[0])
			}
		}
	}
}

// claims holds a part to what it says of itself: that it loses the same both ways, that its drop is a square beyond some flow.
func claims(t *testing.T, e elements.Part, q []float64, at *elements.Local) {
	t.Helper()
	if even, ok := e.(elements.Even); ok && even.Even() {
		for _, q := range q {
			a, byA := e.Drop(q, at)
			if b, byB := e.Drop(-q, at); a != -b || byA != byB {
				t.Fatalf("Q %g: drop %g, slope %g; the other way %g, %g", q, a, byA, b, byB)
			}
		}
	}
	s, ok := e.(elements.Squares)
	if !ok {
		return
	}
	forward, back, from := s.Square(at)
	for _, q := range append(q, from, -from, from*1.01) {
		c := forward
		if q < 0 {
			c = back
		}
		if a := math.Abs(q); a >= from {
			if dp, slope := e.Drop(q, at); !near(dp, c*a*q, 1e-13, 0) || !near(slope, 2*c*a, 1e-13, 0) {
				t.Fatalf("Q %g, %s, band %g, opening %g: drop %g, slope %g, not the square %g, %g", q, at.Fluid.Name, at.Band, at.Opening, dp, slope, c*a*q, 2*c*a)
			}
		}
	}
}

// slopes holds the slope against central differences.
func slopes(t *testing.T, e elements.Part, q []float64, at *elements.Local) {
	t.Helper()
	for _, q := range q {
		dp, slope := e.Drop(q, at)
		if !finite(dp, slope) {
			t.Fatalf("Q %g: drop %g, slope %g", q, dp, slope)
		}
		h := 1e-6 * math.Abs(q)
		a, _ := e.Drop(q-h, at)
		b, _ := e.Drop(q+h, at)
		if wide := (q + h) - (q - h); wide > 0 && !near((b-a)/wide, slope, 1e-4, 1e-9*math.Abs(dp)/h) {
			t.Fatalf("Q %g, %s, band %g, opening %g: slope %g, by differences %g", q, at.Fluid.Name, at.Band, at.Opening, slope, (b-a)/wide)
		}
	}
}

// passive holds the drop to zero at zero, increasing, and straight through zero.
func passive(t *testing.T, e elements.Part, q []float64, at *elements.Local) {
	t.Helper()
	if dp, slope := e.Drop(0, at); dp != 0 || slope <= 0 {
		t.Fatalf("at rest, %s, opening %g: drop %g, slope %g", at.Fluid.Name, at.Opening, dp, slope)
	}
	last := math.Inf(-1)
	for _, q := range q {
		dp, slope := e.Drop(q, at)
		if dp <= last && q != 0 && math.Abs(q) > 1e-300 || slope <= 0 {
			t.Fatalf("Q %g, %s, band %g: drop %g after %g, slope %g", q, at.Fluid.Name, at.Band, dp, last, slope)
		}
		last = dp
	}
	_, at0 := e.Drop(0, at)
	if dp, _ := e.Drop(1e-20, at); !near(dp/1e-20, at0, 1e-6, 0) {
		t.Fatalf("%s: not straight through zero: %g, %g", at.Fluid.Name, dp/1e-20, at0)
	}
}

// throttles holds the derivative by the opening against central differences.
func throttles(t *testing.T, e elements.Part, th elements.Throttles, q []float64, at *elements.Local) {
	t.Helper()
	for _, q := range q {
		got := th.DropByOpening(q, at)
		h := 1e-6 * at.Opening
		lo, hi := *at, *at
		lo.Opening -= h
		hi.Opening = math.Min(hi.Opening+h, 1)
		a, _ := e.Drop(q, &lo)
		b, _ := e.Drop(q, &hi)
		dp, _ := e.Drop(q, at)
		if want := (b - a) / (hi.Opening - lo.Opening); !near(got, want, 1e-3, 1e-4*math.Abs(dp)+1e-280) {
			t.Fatalf("Q %g, %s, opening %g: ∂Δp/∂x %g, by differences %g", q, at.Fluid.Name, at.Opening, got, want)
		}
	}
}

// spills holds a weir's flow to zero at no head, growing with the head, falling with what drowns it, and its partials to differences.
func spills(t *testing.T, e elements.Crest, at *elements.Local) {
	t.Helper()
	heads := []float64{-1, -1e-6, 0, 1e-5, 1e-4, 0.003, 0.01, 0.031, 0.05, 0.0501, 0.2, 0.5, 3}
	for _, h := range heads {
		for _, hd := range append(heads, h, h*(1-1e-9), h*0.999) {
			q, byH, byHd := e.Spill(h, hd, at)
			if !finite(q, byH, byHd) || byH < 0 || byHd > 0 || (h <= 0 && hd <= 0 && q != 0) || (h == hd && q != 0) {
				t.Fatalf("h %g, hd %g: flow %g, %g, %g", h, hd, q, byH, byHd)
			}
			back, _, _ := e.Spill(hd, h, at)
			if back != -q {
				t.Fatalf("h %g, hd %g: %g one way, %g back", h, hd, q, back)
			}
			d := 1e-7 * (math.Abs(h) + math.Abs(hd) + 1e-5)
			a, _, _ := e.Spill(h-d, hd, at)
			b, _, _ := e.Spill(h+d, hd, at)
			c, _, _ := e.Spill(h, hd+d, at)
			f, _, _ := e.Spill(h, hd-d, at)
			if x, y := (b-a)/(2*d), (c-f)/(2*d); !near(x, byH, 1e-3, 2e-3) || !near(y, byHd, 1e-3, 2e-3) {
				t.Fatalf("h %g, hd %g: partials %g and %g, by differences %g and %g", h, hd, byH, byHd, x, y)
			}
		}
	}
	if n := testing.AllocsPerRun(20, func() { e.Spill(0.2, 0.1, at) }); n != 0 {
		t.Errorf("Spill: %g allocations", n)
	}
}
