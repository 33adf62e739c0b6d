package friction_test

import (
	"math"
	"testing"

	"headfall/elements/elementtest"
	"headfall/elements/friction"
)

const g = 9.80665

func TestFrictionFactors(t *testing.T) {
	b := elementtest.Load(t, "friction")
	points := [][2]float64{{4000, 0}, {1e4, 0}, {1e5, 0}, {1e6, 0}, {1e7, 0}, {1e5, 1e-4}, {1e6, 1e-4}, {1e5, 1e-3}, {1e6, 1e-3}, {1e4, 0.01}, {1e5, 0.01}, {1e5, 0.05}}
	for i, p := range points {
		b.HoldOne(t, "F01", i, friction.Colebrook(p[0], p[1]))
	}
	for i, p := range [][2]float64{{1000, 0}, {2000, 0}, {3000, 1e-4}, {4000, 0}, {1e4, 0}, {1e5, 1e-4}, {1e6, 1e-4}, {1e5, 0.01}} {
		fre, _ := friction.Churchill(p[0], p[1])
		b.HoldOne(t, "F02", i, fre/p[0])
		fre, _ = friction.Shared(p[1]).FRe(p[0])
		b.HoldOne(t, "F02", i, fre/p[0])
	}
	for i, re := range []float64{100, 1000, 2000} {
		fre, _ := friction.Shared(0).FRe(re)
		b.HoldOne(t, "F03", i, fre/re)
	}
	for i, rough := range []float64{0.001, 0.01, 0.05} {
		b.HoldOne(t, "F04", i, friction.FullyRough(rough))
		b.HoldOne(t, "F04", i, friction.Colebrook(1e8, rough))
	}
	b.Hold(t, "F05", friction.Colebrook(2.7e5, 0.0008))
	b.Hold(t, "F06", friction.Colebrook(90040, 0))
}

// Churchill is an explicit stand-in for Colebrook; 2 % is what is said of it.
func TestChurchillAgainstColebrook(t *testing.T) {
	for _, rough := range []float64{0, 1e-5, 1e-4, 1e-3, 1e-2} {
		for re := 1e4; re < 1e8; re *= 1.7 {
			fre, _ := friction.Churchill(re, rough)
			if want := friction.Colebrook(re, rough); math.Abs(fre/re/want-1) > 0.025 {
				t.Errorf("Re %g, ε/D %g: %g, Colebrook %g", re, rough, fre/re, want)
			}
		}
	}
}

func TestDischargeCoefficients(t *testing.T) {
	b := elementtest.Load(t, "orifices")
	for i, feet := range []float64{1, 2, 4, 10, 20} {
		b.HoldOne(t, "O02", i, friction.SharpOrifice(feet*0.3048, 0.0127))
	}
	for i, p := range [][2]float64{{1, 1}, {2, 2}, {9, 3}} {
		b.HoldOne(t, "O03", i, friction.SharpOrifice(p[0]*0.3048, p[1]*0.0254))
	}
	plates := []struct {
		beta, re float64
		taps     friction.Taps
	}{{0.5, 1e4, friction.Corner}, {0.5, 1e5, friction.Corner}, {0.5, 1e8, friction.Corner}, {0.75, 1e6, friction.Corner}, {0.2, 1e5, friction.Corner},
		{0.6, 1e5, friction.Flange}, {0.5, 1e6, friction.DAndHalfD}}
	for i, p := range plates {
		b.HoldOne(t, "O09", i, friction.ReaderHarris(0.1, p.beta, p.re, p.taps))
	}
	for i, re := range []float64{1, 10, 100, 1000, 1e4} {
		factor, _ := friction.ThinPlate(re)
		b.HoldOne(t, "O10", i, 0.61*factor)
	}
	for i, p := range [][2]float64{{2, 2e4}, {2, 2000}, {5, 1000}, {10, 500}} {
		b.HoldOne(t, "O11", i, friction.LongOrifice(p[0], p[1]))
	}
}

func TestSideOpenings(t *testing.T) {
	b := elementtest.Load(t, "orifices")
	q := 0.62 * friction.RectangularSide(1, 0.1, 0.6, g)
	b.Hold(t, "O12", q, q/(0.62*0.5*math.Sqrt(2*g*0.35)))
	for i, r := range []float64{0.25, 0.5, 0.75, 1} {
		v, _ := friction.CircularSide(r)
		b.HoldOne(t, "O13", i, v)
	}
	for i, r := range []float64{1, 1.5, 2, 3} {
		b.HoldOne(t, "O14", i, friction.CentreLine(r))
	}
	if v, _ := friction.CircularSide(1); math.Abs(v-8.0/15) > 1e-9 {
		t.Errorf("brimful: %.12g, exactly %.12g", v, 8.0/15)
	}
	for _, r := range []float64{0.01, 0.3, 0.8, 1.4, 5} {
		_, slope := friction.CircularSide(r)
		lo, _ := friction.CircularSide(r - 1e-5)
		hi, _ := friction.CircularSide(r + 1e-5)
		if d := (hi - lo) / 2e-5; math.Abs(slope/d-1) > 1e-6 {
			t.Errorf("h/D %g: slope %g, by differences %g", r, slope, d)
		}
	}
}

func TestFittingsAndValves(t *testing.T) {
	b := elementtest.Load(t, "valves")
	b.Hold(t, "K02", friction.KOfKv(100, 0.08), 100*friction.CvOfKv, 100/friction.CvOfKv)
	for i, d := range []float64{0.0525, 0.1023, 0.1541} {
		b.HoldOne(t, "K04", i, friction.SteelFriction(d))
	}
	k := func(name string) float64 {
		v, ok := friction.FittingK(name, 0.1023)
		if !ok {
			t.Fatalf("no fitting %q", name)
		}
		return v
	}
	b.Hold(t, "K05", k("elbow_90"), k("elbow_90_long"), k("tee_branch"), k("tee_run"), k("gate_open"), k("globe_open"), k("ball_open"),
		k("swing_check"), k("swing_check")/2, k("butterfly_open"))
	b.Hold(t, "K06", friction.SharpEntry, friction.Exit, friction.RoundedEntry, friction.ReentrantEntry)
	b.Hold(t, "K07", friction.Expansion(0.5, 1), friction.Contraction(0.5, 1))
	if d := friction.KvOfK(friction.KOfKv(95, 0.08), 0.08); math.Abs(d-95) > 1e-9 {
		t.Errorf("Kv 95 there and back: %g", d)
	}
	for _, f := range friction.Fittings() {
		if f.Source == "" || f.Says == "" || (f.Ratio > 0) == (f.K > 0) {
			t.Errorf("%+v", f)
		}
	}
}

func TestSubmergence(t *testing.T) {
	b := elementtest.Load(t, "submergence")
	for i, p := range [][2]float64{{0.3, 1.5}, {0.1, 2}, {0.05, 1.2}} {
		b.HoldOne(t, "S01", i, friction.IntakeSubmergence(p[0], p[1], g))
	}
	for i, p := range [][2]float64{{0.3, 1.5}, {0.05, 1.2}} {
		q := math.Pi / 4 * p[0] * p[0] * p[1]
		b.HoldOne(t, "S02", 2*i, friction.GasPullThrough(q, g))
		b.HoldOne(t, "S02", 2*i+1, friction.HarlemanDepth(q, g))
	}
	b.Hold(t, "S05", friction.GordonSubmergence(0.3, 1.5, false), friction.GordonSubmergence(0.3, 1.5, true))
}

// An orifice plate's permanent loss is near 1 − β^1.9 of the pressure difference: ISO 5167-2, 5.4, note.
func TestPermanentLoss(t *testing.T) {
	for _, beta := range []float64{0.2, 0.4, 0.6, 0.75} {
		const c = 0.6
		b4 := beta * beta * beta * beta
		share := friction.PermanentLoss(c, beta) * c * c / (1 - b4)
		if want := 1 - math.Pow(beta, 1.9); math.Abs(share-want) > 0.035 {
			t.Errorf("β %g: %g of the difference, about %g", beta, share, want)
		}
	}
}
