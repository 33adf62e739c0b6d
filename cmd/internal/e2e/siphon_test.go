package e2e

import (
	"strings"
	"testing"
)

// Siphons of whole plants: what breaks them, what primes them, what stays behind. Hydrostatics; the flow of a primed siphon is that of the same line
// without its high point.

// header is two tanks on a header 1 m up whose drain rises over 1.5 m and falls to −2 m; A is small and runs dry first.
func header(tee, assume, branch string) string {
	return plant("3 h", "liquid: {water: 12 °C}", `
vessels:
  A: {shape: {box: {length: 0.5 m, width: 0.5 m, height: 2 m}}, base: 0 m, level: 0.8 m}
  B: {shape: {box: {length: 3 m, width: 2 m, height: 2 m}}, base: 0 m, level: 0.9 m}
tees: {HDR: {`+tee+`}}
outside: {AIR: {free_fall: {elevation: -2 m}}}
lines:
  LA: {from: A, to: HDR, parts: [{pipe: {length: 3 m, bore: 40 mm, roughness: 0.05 mm}}`+branch+`]}
  LB: {from: B, to: HDR, parts: [{pipe: {length: 3 m, bore: 40 mm, roughness: 0.05 mm}}]}
  S:
    from: HDR
    to: AIR
    parts: [{pipe: {length: 2 m, bore: 50 mm, roughness: 0.05 mm}}, {high_point: {elevation: 1.5 m, primed: yes}}, {pipe: {length: 6 m, bore: 50 mm, roughness: 0.05 mm}}]
`+assume)
}

func TestHeaderAir(t *testing.T) {
	for name, c := range map[string]struct {
		text   string
		breaks bool
	}{
		"vents":            {header("elevation: 1 m", "", ""), true},
		"ignored":          {header("elevation: 1 m", "", ""), false},
		"low header":       {header("elevation: -3 m", "", ""), false},
		"valve shut first": {header("elevation: 1 m", "steps: [{id: s1, at: 60 s, valve: V, to: 0 %}]", ", {valve: {tag: V, kv: 60, open: 100 %}}"), false},
	} {
		t.Run(name, func(t *testing.T) {
			text := c.text
			if name == "ignored" {
				text = strings.Replace(text, "assume: {doubts: none}", "assume: {doubts: none, header_air: ignored}", 1)
			}
			r := run(t, text, how{})
			b := r.Vessels["B"]
			if c.breaks && b.EndLevel < 0.3 || !c.breaks && b.EndLevel > 0.1 {
				t.Errorf("B ends at %g m; broken %d times", b.EndLevel, flagged(r, "siphon_broken", "S"))
			}
		})
	}
}

// hump is a tank drained over high points.
func hump(level, points, more string) string {
	return plant("4 h", "liquid: {water: 12 °C}", `
vessels:
  A: {shape: {box: {length: 3 m, width: 2 m, height: 3 m}}, base: 0 m, level: `+level+`}
outside: {AIR: {free_fall: {elevation: -1 m}}}
lines:
  S: {from: A, leaves: {dip: 0.2 m}, to: AIR, parts: [{pipe: {length: 2 m, bore: 50 mm, roughness: 0.05 mm}}, `+points+`, {pipe: {length: 4 m, bore: 50 mm, roughness: 0.05 mm}}]}
`+more)
}

func TestHighPoints(t *testing.T) {
	for name, c := range map[string]struct {
		text   string
		ends   float64 // m
		abs    float64
		flag   string
		absent string
	}{
		"vented: what is under the crest stays":      {hump("2 m", "{high_point: {elevation: 1.2 m, vent: {tag: AV, open: yes}}}", ""), 1.2, 0.02, "", "siphon_primed"},
		"primed: down to its mouth, then it breaks":  {hump("2 m", "{high_point: {elevation: 1.2 m}}", ""), 0.2, 0.1, "siphon_broken", "siphon_primed"},
		"not primed: sweeps its air out":             {hump("2 m", "{high_point: {elevation: 1.2 m, primed: no}}", ""), 0.2, 0.1, "siphon_primed", ""},
		"vent opened half-way":                       {hump("2 m", "{high_point: {elevation: 1.2 m, vent: {tag: AV, open: no}}}", "steps: [{id: s1, when: {level: A, below: 0.8 m}, vent: AV, to: open}]"), 0.8, 0.01, "", "siphon_broken"},
		"two points, the lower vented":               {hump("2 m", "{high_point: {elevation: 1.2 m}}, {pipe: {length: 1 m, bore: 50 mm, roughness: 0.05 mm}}, {high_point: {elevation: 0.7 m, vent: {tag: AV, open: yes}}}", ""), 0.7, 0.02, "", ""},
		"two points, the higher vented":              {hump("2 m", "{high_point: {elevation: 1.2 m, vent: {tag: AV, open: yes}}}, {pipe: {length: 1 m, bore: 50 mm, roughness: 0.05 mm}}, {high_point: {elevation: 0.7 m}}", ""), 1.2, 0.02, "", ""},
		"two points, both full":                      {hump("2 m", "{high_point: {elevation: 1.2 m}}, {pipe: {length: 1 m, bore: 50 mm, roughness: 0.05 mm}}, {high_point: {elevation: 0.7 m}}", ""), 0.2, 0.1, "siphon_broken", ""},
		"under its crest and not primed: all stays":  {hump("1 m", "{high_point: {elevation: 1.2 m}}", ""), 1, 1e-9, "", "siphon_broken"},
		"vent shut again: the siphon does not start": {hump("1.1 m", "{high_point: {elevation: 1.2 m, vent: {tag: AV, open: yes}}}", "steps: [{id: s1, at: 60 s, vent: AV, to: shut}]"), 1.1, 1e-9, "", "siphon_primed"},
	} {
		t.Run(name, func(t *testing.T) {
			r := run(t, c.text, how{})
			near(t, "what stays", r.Vessels["A"].EndLevel, c.ends, c.abs)
			if c.flag != "" && flagged(r, c.flag, "S") == 0 || c.absent != "" && flagged(r, c.absent, "S") > 0 {
				for _, f := range r.Flags {
					t.Errorf("%s %s at %g", f.Kind, f.Where, f.From)
				}
			}
		})
	}
}
