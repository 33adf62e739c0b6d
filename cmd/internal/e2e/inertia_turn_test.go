package e2e

import "testing"

// A line with a mass of liquid and a check valve, or with a free fall, stops where it would turn: what swings once over stays over. Without friction the
// column of a U-tube from 1 m to 0 m would come to rest with its levels exchanged; friction keeps the second below that, the valve keeps it there.
func TestInertialOneWay(t *testing.T) {
	for _, method := range []string{"", "bdf"} {
		r := run(t, plant("20 min", "liquid: {water: 12 °C}", `
vessels:
  A: {shape: {box: {length: 1 m, width: 1 m, height: 3 m}}, base: 0 m, level: 2 m}
  B: {shape: {box: {length: 1 m, width: 1 m, height: 3 m}}, base: 0 m, level: 1 m}
lines:
  L: {from: A, to: B, entry: 0, exit: 0, parts: [{check_valve: {kv: 3000}}, {pipe: {length: 20 m, bore: 300 mm, roughness: 0.01 mm, inertia: yes}}]}`), how{method: method})
		a, b := r.Vessels["A"].EndLevel, r.Vessels["B"].EndLevel
		if !(b > a+0.1 && b < 2) || r.Lines["L"].Backward > 1e-6 {
			t.Errorf("%s: A %g m, B %g m, back %g m3", method, a, b, r.Lines["L"].Backward)
		}
		if r.Work.Steps > 2000 {
			t.Errorf("%s: %d steps", method, r.Work.Steps)
		}
	}
}
