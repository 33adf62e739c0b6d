package elements_test

import (
	"math"
	"testing"

	"headfall/elements"
)

type opens interface {
	elements.Part
	Opens(x float64) (phi, slope float64)
	Recovers() (float64, string)
}

// A valve that closes tight passes nothing at 0 % and follows its trim from 5 % on; inherent keeps what the trim leaves.
func TestValveCloses(t *testing.T) {
	tight := build[opens](t, elements.Parts, "valve", "{tag: V-1, kv: 95, trim: equal_percentage}")
	inherent := build[opens](t, elements.Parts, "valve", "{tag: V-1, kv: 95, trim: equal_percentage, closes: inherent}")
	trim := build[elements.Trim](t, elements.Trims, "equal_percentage", "{}")
	for x := 0.0; x <= 1; x += 0.001 {
		a, sa := tight.Opens(x)
		b, _ := inherent.Opens(x)
		want, slope := trim.Share(x)
		if b != want || (x >= 0.05 && (a != want || sa != slope)) || a > want || sa <= 0 {
			t.Errorf("travel %g: tight %g, inherent %g, trim %g", x, a, b, want)
		}
	}
	left, slope := tight.Opens(0.05 - 1e-9)
	right, after := tight.Opens(0.05)
	if math.Abs(left-right) > 1e-9 || math.Abs(slope-after) > 1e-6 {
		t.Errorf("at 5 %%: %g, %g | %g, %g", left, slope, right, after)
	}
	at := water1000()
	at.Opening = 0
	if !tight.(elements.Shuts).Shut(at) || inherent.(elements.Shuts).Shut(at) {
		t.Error("tight is shut at 0 %, inherent is not")
	}
	leaky := build[opens](t, elements.Parts, "valve", "{tag: V-1, kv: 95, leaks: 0.5 %}")
	if phi, _ := leaky.Opens(0); phi != 0.005 || leaky.(elements.Shuts).Shut(at) {
		t.Errorf("a leak of 0.5 %% leaves %g", phi)
	}
	if phi, _ := leaky.Opens(1); phi != 1 {
		t.Errorf("wide open: %g", phi)
	}
}

// Of F_R only the asymptotes are known in closed form: laminar Q ∝ Δp, Kv untouched in thin liquids.
func TestThickLiquids(t *testing.T) {
	v := build[elements.Part](t, elements.Parts, "valve", "{tag: V-1, kv: 20, bore: 50 mm}")
	at := water1000()
	at.Fluid.Dynamic = 1e-3
	q := flowAt(1e5, at, v)
	if math.Abs(3600*q/20-1) > 1e-12 {
		t.Errorf("water at 1 bar: %.12g of Kv", 3600*q/20)
	}
	at.Fluid.Dynamic = 50 // Re_v of 1 or less
	a, b := flowAt(1e4, at, v), flowAt(2e4, at, v)
	if math.Abs(b/a-2) > 1e-6 {
		t.Errorf("twice the pressure brings %g times the flow", b/a)
	}
	// IEC 60534-2-1 annex A, laminar: F_R = 0.026/F_L·√(n·Re_v), Kv/d² = 0.008: n = 1 + 140·0.008^⅔.
	n := 1 + 140*math.Pow(0.008, 2.0/3)
	re := 0.0707 * 0.46 * 3600 * a / (50.0 / 1000 * math.Sqrt(20*0.9)) * math.Pow(0.81*0.008*0.008/1.6e-3+1, 0.25)
	if want := 0.026 / 0.9 * math.Sqrt(n*re); math.Abs(3600*a/(20*math.Sqrt(0.1))/want-1) > 1e-9 {
		t.Errorf("F_R %g, by the annex %g", 3600*a/(20*math.Sqrt(0.1)), want)
	}
	last := 0.0
	for mu := 100.0; mu > 1e-4; mu /= 1.3 { // thinner is never slower
		at.Fluid.Dynamic = mu
		if q := flowAt(1e4, at, v); q < last {
			t.Fatalf("μ %g: flow falls to %g from %g", mu, q, last)
		} else {
			last = q
		}
	}
}

func TestChoke(t *testing.T) {
	v := build[opens](t, elements.Parts, "valve", "{tag: V-1, kv: 95, trim: butterfly}")
	c := v.(elements.Chokes)
	if got := c.Recovery(nil); math.Abs(got-0.62*0.62) > 1e-15 {
		t.Errorf("F_L² of a butterfly %g", got)
	}
	if fl, source := build[opens](t, elements.Parts, "valve", "{tag: V-1, kv: 95, fl: 0.8}").Recovers(); fl != 0.8 || source != "stated" {
		t.Errorf("F_L %g, %s", fl, source)
	}
	if got := c.CriticalRatio(&elements.Fluid{Vapour: 2339}); math.Abs(got-(0.96-0.28*math.Sqrt(2339/22.064e6))) > 1e-15 {
		t.Errorf("F_F %g", got)
	}
}

func TestTableTrim(t *testing.T) {
	trim, err := elements.NewTableTrim([][]float64{{0, 0}, {0.3, 0.1}, {0.6, 0.4}, {1, 1}})
	if err != nil {
		t.Fatal(err)
	}
	for _, one := range [][3]float64{{0, 0, 1.0 / 3}, {0.15, 0.05, 1.0 / 3}, {0.3, 0.1, 1}, {0.5, 0.3, 1}, {0.6, 0.4, 1.5}, {1, 1, 1.5}} {
		phi, s := trim.Share(one[0])
		if math.Abs(phi-one[1]) > 1e-15 || math.Abs(s-one[2]) > 1e-12 {
			t.Errorf("travel %g: %g, %g", one[0], phi, s)
		}
	}
	for _, rows := range [][][]float64{
		nil, {{0, 0}}, {{0, 0}, {0.5, 1}}, {{0.1, 0}, {1, 1}}, {{0, 0}, {0.5, 0.6}, {0.5, 0.7}, {1, 1}}, {{0, 0.5}, {1, 0.4}}, {{0, 0}, {1, 0}}, {{0, 0}, {1, 1.2}}, {{0}, {1}},
	} {
		if _, err := elements.NewTableTrim(rows); err == nil {
			t.Errorf("%v: taken", rows)
		}
	}
}
