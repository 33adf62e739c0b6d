package e2e

import (
	"math"
	"strings"
	"testing"
)

// A covered vessel whose overflow falls into the open breathes over the sill: it fills, spills and drains as one with a wide hole in its roof, and its gas stays
// at the air's pressure. With its overflow blocked it is sealed, and holds back.
func TestGasLeavesByWeir(t *testing.T) {
	text := func(cover, weir string) string {
		return plant("2 h", "liquid: {water: 12 °C}", `
vessels:
  A:
    shape: {box: {length: 1 m, width: 1 m, height: 2 m}}
    base: 1 m
    level: 0.5 m
    inflow: [[0 h, 6 m3/h], [1 h, 6 m3/h], [1 h, 0 m3/h]]
    cover: `+cover+`
outside:
  AIR: {free_fall: {elevation: 0 m}}
lines:
  OVF: {from: A, leaves: {crest: 1.2 m}, to: AIR, parts: [{weir: {`+weir+`}}]}
  OUT: {from: A, to: AIR, parts: [{pipe: {length: 3 m, bore: 25 mm, roughness: 0.05 mm}}, {valve: {tag: V, kv: 20, open: 0 %}}]}
steps:
  - {id: s1, at: 65 min, valve: V, to: 100 %}`)
	}
	bare := "{gas: {pressure: 0 mbar(g), temperature: 15 °C}}"
	for _, weir := range []string{"rectangular: {width: 0.3 m, c: 1.7}", "v_notch: {angle: 90 deg}"} {
		r := run(t, text(bare, weir), how{})
		o := run(t, text("{vents: {H: {hole: {bore: 300 mm}}}}", weir), how{})
		near(t, weir+": end", r.Vessels["A"].EndLevel, o.Vessels["A"].EndLevel, 1e-4)
		near(t, weir+": peak", r.Vessels["A"].PeakLevel, o.Vessels["A"].PeakLevel, 1e-4)
		for i, p := range r.Series.Gas["A"] {
			if math.Abs(p) > 20 {
				t.Fatalf("%s: gas at %g Pa at %g s", weir, p, r.Series.Time[i])
			}
		}
		if r.Lines["OVF"].Forward < 4 {
			t.Errorf("%s: %g m3 overflows", weir, r.Lines["OVF"].Forward)
		}
	}
	// Into an open vessel beside it.
	beside := run(t, strings.NewReplacer("to: AIR, parts: [{weir", "to: S, parts: [{weir", "\noutside:", `
  S: {shape: {box: {length: 4 m, width: 2 m, height: 2 m}}, base: 1 m, level: 0.1 m}
outside:`).Replace(text(bare, "rectangular: {width: 0.3 m, c: 1.7}")), how{})
	for i, p := range beside.Series.Gas["A"] {
		if math.Abs(p) > 20 {
			t.Fatalf("beside: gas at %g Pa at %g s", p, beside.Series.Time[i])
		}
	}
	if beside.Lines["OVF"].Forward < 4 {
		t.Errorf("beside: %g m3 overflows", beside.Lines["OVF"].Forward)
	}
	shut := run(t, text(bare, "blocked: 100 %, rectangular: {width: 0.3 m, c: 1.7}"), how{})
	if p := at(t, shut, shut.Series.Gas["A"], 300); p < 3e4 {
		t.Errorf("blocked: gas at %g Pa after 5 min", p)
	}
}
