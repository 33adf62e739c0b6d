package elements_test

import (
	"math"
	"testing"

	"headfall/elements"
	"headfall/elements/elementtest"
)

func spill(t *testing.T, sample string, h, hd float64) float64 {
	t.Helper()
	q, _, _ := build[elements.Crest](t, elements.Parts, "weir", sample).Spill(h, hd, water1000())
	return q
}

func TestPublishedWeirs(t *testing.T) {
	b := elementtest.Load(t, "weirs")
	full := spill(t, "{rectangular: {width: 1 m, channel_width: 1 m, crest_height: 0.5 m}}", 0.2, 0)
	b.Hold(t, "W01", full)
	b.Hold(t, "W02", spill(t, "{rectangular: {width: 0.5 m, channel_width: 1 m, crest_height: 0.5 m}}", 0.2, 0))
	// Rehbock is another formula for the same weir: within 1 %.
	if want := b["W03"].Expected[0]; math.Abs(full/want-1) > 0.01 {
		t.Errorf("W03: %g, Rehbock %g", full, want)
	}
	const foot = 0.3048
	contracted := spill(t, "{rectangular: {width: 2 ft, channel_width: 4 ft, crest_height: 1 ft}}", 0.45*foot, 0) / (foot * foot * foot)
	b.HoldOne(t, "W04", 0, contracted)
	b.Hold(t, "W08", 1000*headOf(t, "{rectangular: {width: 1 m, c: 1.84}}", 0.02))
	for i, h := range []float64{0.06, 0.1, 0.15, 0.2, 0.3} {
		b.HoldOne(t, "W06", i, 1000*spill(t, "{v_notch: {angle: 90 deg}}", h, 0))
	}
	for i, s := range []string{"{rectangular: {width: 1 m, c: 1.7}}", "{v_notch: {angle: 60 deg, cd: 0.6}}"} {
		for j, ratio := range []float64{0.5, 0.8} {
			b.HoldOne(t, "W07", 2*i+j, spill(t, s, 0.3, 0.3*ratio)/spill(t, s, 0.3, 0))
		}
	}
}

// headOf finds the head, m, at which a weir passes q, m³/s.
func headOf(t *testing.T, sample string, q float64) float64 {
	lo, hi := 0.0, 1.0
	for range 60 {
		if h := (lo + hi) / 2; spill(t, sample, h, 0) < q {
			lo = h
		} else {
			hi = h
		}
	}
	return lo
}

// By definition: Cd against c, and a broad crest of Cd 1, which is the critical flow over it.
func TestWeirForms(t *testing.T) {
	for _, one := range []struct {
		sample string
		want   float64
	}{
		{"{rectangular: {width: 0.5 m, c: 1.7}}", 1.7 * 0.5 * math.Pow(0.2, 1.5)},
		{"{rectangular: {width: 0.5 m, cd: 0.6}}", 2.0 / 3 * 0.6 * math.Sqrt(2*g) * 0.5 * math.Pow(0.2, 1.5)},
		{"{rectangular: {width: 0.5 m, c: 1.7}, blocked: 20 %}", 0.8 * 1.7 * 0.5 * math.Pow(0.2, 1.5)},
		{"{broad_crested: {width: 2 m, cd: 1}}", math.Pow(2.0/3, 1.5) * math.Sqrt(g) * 2 * math.Pow(0.2, 1.5)},
		{"{v_notch: {angle: 90 deg, cd: 0.6}}", 8.0 / 15 * 0.6 * math.Sqrt(2*g) * math.Pow(0.2, 2.5)},
	} {
		if got := spill(t, one.sample, 0.2, -0.1); math.Abs(got/one.want-1) > 1e-12 {
			t.Errorf("%s: %.15g, wanted %.15g", one.sample, got, one.want)
		}
	}
}

func TestWeirFaults(t *testing.T) {
	for _, s := range []string{
		"{}", "{rectangular: {width: 1 m}}", "{rectangular: {width: 1 m, c: 1.7, cd: 0.6}}", "{rectangular: {width: 2 m, channel_width: 1 m, crest_height: 1 m}}",
		"{rectangular: {width: 1 m, channel_width: 1 m}}", "{v_notch: {angle: 150 deg}}", "{broad_crested: {width: 1 m, c: 1, cd: 1}}",
		"{rectangular: {width: 1 m, c: 1.7}, broad_crested: {width: 1 m}}",
	} {
		if _, err := elementtest.Build(elements.Parts, "weir", s); err == nil {
			t.Errorf("%s: taken", s)
		}
	}
}
