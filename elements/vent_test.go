package elements_test

import (
	"math"
	"testing"

	"headfall/elements"
)

const atmosphere, warm = 101325.0, 288.15

func TestHoleBothWays(t *testing.T) {
	v := build[elements.Vent](t, elements.Vents, "hole", "{bore: 50 mm}")
	half := build[elements.Vent](t, elements.Vents, "hole", "{bore: 50 mm, blocked: 50 %}")
	at := &elements.Local{Opening: 1}
	if m, byP := v.Flow(atmosphere, atmosphere, warm, at); m != 0 || byP >= 0 {
		t.Errorf("in balance: %g, %g", m, byP)
	}
	for _, d := range []float64{1, 100, 3000} {
		in, _ := v.Flow(atmosphere-d, atmosphere, warm, at)
		out, _ := v.Flow(atmosphere+d, atmosphere, warm, at)
		little, _ := half.Flow(atmosphere-d, atmosphere, warm, at)
		// Nearly incompressible: ṁ = Cd·A·√(2ρΔp).
		want := 0.6 * math.Pi / 4 * 0.0025 * math.Sqrt(2*atmosphere/(elements.AirConstant*warm)*d)
		if math.Abs(in/want-1) > d/atmosphere || math.Abs(out/want+1) > d/atmosphere || math.Abs(little/in-0.5) > 1e-12 {
			t.Errorf("%g Pa: in %g, out %g, incompressible %g, half blocked %g", d, in, out, want, little)
		}
	}
	for _, edge := range []float64{-1, 1} { // C¹ where the band ends, on either side
		a, sa := v.Flow(atmosphere+edge*(1-1e-9), atmosphere, warm, at)
		b, sb := v.Flow(atmosphere+edge*(1+1e-9), atmosphere, warm, at)
		if math.Abs(a/b-1) > 1e-8 || math.Abs(sa/sb-1) > 1e-6 {
			t.Errorf("at %g Pa: %g, %g | %g, %g", edge, a, sa, b, sb)
		}
	}
	_, left := v.Flow(atmosphere-1e-9, atmosphere, warm, at)
	_, right := v.Flow(atmosphere+1e-9, atmosphere, warm, at)
	if math.Abs(left/right-1) > 1e-7 {
		t.Errorf("two slopes in balance: %g, %g", left, right)
	}
}

func TestBreatherLifts(t *testing.T) {
	v := build[elements.Vent](t, elements.Vents, "breather", "{opens_in: 2 mbar, opens_out: 15 mbar, bore: 80 mm}")
	open := build[elements.Vent](t, elements.Vents, "hole", "{bore: 80 mm}")
	at := &elements.Local{Opening: 1}
	for _, one := range []struct{ over, lift float64 }{{-199, 0}, {-210, 0.5}, {-221, 1}, {0, 0}, {1499, 0}, {1575, 0.5}, {1651, 1}} {
		got, _ := v.Flow(atmosphere+one.over, atmosphere, warm, at)
		full, _ := open.Flow(atmosphere+one.over, atmosphere, warm, at)
		if math.Abs(got-one.lift*full) > 1e-9 {
			t.Errorf("%g Pa: %g of %g", one.over, got, full)
		}
	}
}

func TestPadHolds(t *testing.T) {
	v := build[elements.Vent](t, elements.Vents, "pad", "{pressure: 20 mbar(g), capacity: 60 m3/h}")
	at := &elements.Local{Opening: 1}
	full := 60.0 / 3600 * atmosphere / (elements.AirConstant * warm)
	for _, one := range []struct{ over, want float64 }{{0, full}, {1799, full}, {2000, 0}, {2201, -full}} {
		if got, _ := v.Flow(atmosphere+one.over, atmosphere, warm, at); math.Abs(got-one.want) > 1e-12 {
			t.Errorf("%g Pa: %g, wanted %g", one.over, got, one.want)
		}
	}
}
