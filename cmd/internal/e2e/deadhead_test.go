package e2e

import (
	"fmt"
	"testing"
)

// A pump that runs against shut valves and is then let go: by its curve and by a steady rate, whose pressure stands at its law's 100 km of head meanwhile.
// What it delivers afterwards is what it delivers through a valve that was never shut.
func TestDeadHead(t *testing.T) {
	for _, pump := range []string{"curve: [[0 m3/h, 14 m], [20 m3/h, 11 m], [32 m3/h, 6 m]], when_stopped: shut", "rate: 15 m3/h"} {
		text := func(open int, steps string) string {
			return plant("1 h", "liquid: {water: 12 °C}", fmt.Sprintf(`
vessels:
  T-1: {shape: {box: {length: 2 m, width: 2 m, height: 6 m}}, base: 0 m, level: 5 m, inflow: 15 m3/h}
  T-2: {shape: {box: {length: 2 m, width: 2 m, height: 6 m}}, base: 2 m, level: 0.5 m}
tees:
  HDR: {elevation: 1 m}
outside:
  AIR: {free_fall: {elevation: 3 m}}
lines:
  L-1: {from: T-1, to: HDR, parts: [{pump: {tag: P-1, %s, mode: on}}, {pipe: {length: 10 m, bore: 80 mm, roughness: 0.05 mm}}]}
  L-2: {from: HDR, to: T-2, enters: {centre: 5 m}, parts: [{pipe: {length: 10 m, bore: 80 mm, roughness: 0.05 mm}}, {valve: {tag: V-2, kv: 60, stroke: 10 s, open: %d %%}}]}
  L-3: {from: HDR, to: AIR, parts: [{pipe: {length: 10 m, bore: 80 mm, roughness: 0.05 mm}}, {valve: {tag: V-3, kv: 60, stroke: 10 s}}]}
%s`, pump, open, steps))
		}
		r := run(t, text(0, `
steps:
  - {id: s1, at: 10 min, valve: V-2, to: 100 %}
  - {id: s2, at: 12 min, valve: V-2, to: 0 %}
  - {id: s3, at: 20 min, valve: V-3, to: 50 %}
  - {id: s4, at: 30 min, valve: V-3, to: 0 %}`), how{})
		if r.Work.Steps > 3000 {
			t.Errorf("%s: %d steps", pump, r.Work.Steps)
		}
		open := run(t, text(100, "limits: [{flow: L-2, below: 100 m3/h}]"), how{})
		within(t, pump+": flow of L-2 at 11 min", at(t, r, r.Series.Flow["L-2"], 660), at(t, open, open.Series.Flow["L-2"], 10), 0.03)
		net := func(tag string) float64 { return r.Lines[tag].Forward - r.Lines[tag].Backward }
		if shut := net("L-1") - net("L-2") - net("L-3"); shut > 1e-9 || shut < -1e-9 {
			t.Errorf("%s: the header keeps %g m3", pump, shut)
		}
	}
}
