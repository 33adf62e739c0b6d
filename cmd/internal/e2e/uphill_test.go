package e2e

import (
	"strings"
	"testing"

	"headfall/scenarios"
)

// Heights that cannot be over one datum are warned of, and their neighbours are not.
func TestUphill(t *testing.T) {
	text := func(base string) string {
		return plant("10 min", "liquid: {water: 12 °C}", `
vessels:
  A: {shape: {box: {length: 1 m, width: 1 m, height: 2 m}}, base: 2 m, level: 1 m, rim: 1.8 m, spills_to: B}
  B: {shape: {box: {length: 1 m, width: 1 m, height: 2 m}}, base: `+base+`, level: 0.1 m}
lines:
  W: {from: A, to: B, leaves: {crest: 1.5 m}, parts: [{weir: {rectangular: {width: 0.3 m, c: 1.7}}}]}
  L: {from: A, to: B, enters: {centre: 0.1 m}, parts: [{pipe: {length: 3 m, bore: 25 mm, roughness: 0.05 mm}}]}`)
	}
	for base, want := range map[string][]string{
		"0 m":   nil,
		"3.6 m": {"W cannot spill from A to B"},
		"4 m":   {"A cannot spill to B", "W cannot spill from A to B", "L cannot run from A to B"},
	} {
		p, err := scenarios.Load("x.yaml", []byte(text(base)), scenarios.Options{})
		if err != nil {
			t.Fatal(err)
		}
		if err := p.Refresh(); err != nil {
			t.Fatal(err)
		}
		faults, warnings := p.Validate()
		if len(faults) > 0 || len(warnings) != len(want) {
			t.Fatalf("%s: %v, %v", base, faults, warnings)
		}
		for i, w := range want {
			if !strings.Contains(warnings[i].Says, w) || warnings[i].Hint == "" {
				t.Errorf("%s: %+v, want %s", base, warnings[i], w)
			}
		}
	}
}
