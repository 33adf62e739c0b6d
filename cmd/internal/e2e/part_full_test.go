package e2e

import (
	"context"
	"math"
	"strings"
	"testing"

	"headfall/network"
	"headfall/network/study"
	"headfall/scenarios"
)

// wide is a tank on a drain far too wide for what comes through the small pipe before it.
func wide(bore, point string) string {
	return plant("3 h", "liquid: {water: 12 °C}", `
vessels:
  A: {shape: {box: {length: 3 m, width: 2 m, height: 3 m}}, base: 0 m, level: 2 m}
outside: {AIR: {free_fall: {elevation: -1 m}}}
lines:
  D: {from: A, to: AIR, parts: [{pipe: {length: 40 m, bore: 50 mm, roughness: 0.05 mm}}, `+point+`{pipe: {length: 4 m, bore: `+bore+`, roughness: 0.05 mm}}]}`)
}

// A drain that runs part full is calculated once more with air standing in it. With air at the upper end the flow is that of the entry alone,
// Q = A·√(2gh/(1 + K)), h over the mouth; with air at a high point that of the part before it.
func TestBroken(t *testing.T) {
	with := how{changes: network.Changes{Break: map[string]bool{"D": true}}}
	short := plant("3 h", "liquid: {water: 12 °C}", `
vessels:
  A: {shape: {box: {length: 3 m, width: 2 m, height: 3 m}}, base: 0 m, level: 0.5 m}
outside: {AIR: {free_fall: {elevation: -5 m}}}
lines:
  D: {from: A, to: AIR, parts: [{pipe: {length: 6 m, bore: 100 mm, roughness: 0.05 mm}}]}`)
	full, broken := run(t, short, how{}), run(t, short, with)
	within(t, "entry alone", broken.Series.Flow["D"][0], circle(0.1)*math.Sqrt(2*g0*0.5/1.5), 1e-3)
	if !(full.Series.Flow["D"][0] > 1.5*broken.Series.Flow["D"][0]) {
		t.Error("a broken line carries as much as a full one")
	}
	hump := wide("50 mm", "{high_point: {elevation: -0.5 m}}, ")
	full, broken = run(t, hump, how{}), run(t, hump, with)
	if a, b := full.Series.Flow["D"][0], broken.Series.Flow["D"][0]; b > a {
		t.Errorf("%g, broken %g", a, b)
	}
	vented := run(t, wide("50 mm", "{high_point: {elevation: -0.5 m, vent: {tag: AV, open: yes}}}, "), how{})
	within(t, "as an open vent", broken.Series.Flow["D"][0], vented.Series.Flow["D"][0], 1e-9)
	// What a run changed does not stay for the next.
	m := compile(t, short, how{})
	for _, ch := range []network.Changes{{}, with.changes, {}} {
		r, err := m.Run(context.Background(), network.RunOptions{Series: true, Changes: ch})
		if err != nil {
			t.Fatal(err)
		}
		if low := r.Series.Flow["D"][0] < 0.03; low != (ch.Break != nil) {
			t.Errorf("%g with %v", r.Series.Flow["D"][0], ch.Break)
		}
	}
}

// The judgement gives both answers, and says whether the line surges or vents itself.
func TestPartFullBothAnswers(t *testing.T) {
	for bore, word := range map[string]string{"100 mm": "surges", "200 mm": "vents itself"} {
		text := wide(bore, "{high_point: {elevation: -0.5 m, primed: yes}}, ")
		text = strings.Replace(text, "{pipe: {length: 40 m, bore: 50 mm", "{orifice: {diameter: 40 mm, cd: 0.6}}, {pipe: {length: 4 m, bore: "+bore, 1)
		r, err := study.Judge(context.Background(), func() (*network.Plant, error) {
			p, err := scenarios.Load("plant.yaml", []byte(text), scenarios.Options{})
			if err == nil {
				err = p.Refresh()
			}
			return p, err
		}, study.Options{Samples: -1})
		if err != nil {
			t.Fatal(err)
		}
		found := false
		for _, f := range r.Flags {
			found = found || f.Kind == "part_full" && f.Where == "D" && strings.Contains(f.Says, word) && strings.Contains(f.Says, "with air standing in it, it carries at most")
		}
		if !found {
			for _, f := range r.Flags {
				t.Error(*f)
			}
			t.Error("no part_full flag that ", word)
		}
	}
}
