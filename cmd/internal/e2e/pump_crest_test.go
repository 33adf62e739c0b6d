package e2e

import (
	"math"
	"testing"
)

// A pump that lifts over a vented high point delivers what its curve gives at the height of the point and the losses up to it, however deep the line falls
// beyond: 11 m at 20 m³/h against 5 m of lift and 6 m of loss. In a closed one that is primed the falling leg helps.
func TestPumpOverHighPoint(t *testing.T) {
	text := func(point string) string {
		return plant("10 min", "liquid: {water: 12 °C}", `
vessels:
  A: {shape: {box: {length: 100 m, width: 100 m, height: 3 m}}, base: 0 m, level: 2 m}
outside:
  AIR: {free_fall: {elevation: -3 m}}
lines:
  L:
    from: A
    to: AIR
    inlet: full
    parts:
      - pump: {tag: P, curve: [[0 m3/h, 14 m], [20 m3/h, 11 m], [32 m3/h, 6 m]], mode: on, when_stopped: passes}
      - resistance: {quadratic: 194400 s2/m5}
      - high_point: {elevation: 7 m`+point+`}
      - resistance: {quadratic: 1000 s2/m5}`)
	}
	vented := run(t, text(", vent: {tag: AV, open: yes}"), how{})
	near(t, "vented, m3/h", at(t, vented, vented.Series.Flow["L"], 300)*3600, 20, 2e-3)
	closed := run(t, text(", primed: yes"), how{})
	if q := at(t, closed, closed.Series.Flow["L"], 300) * 3600; q < 24 {
		t.Errorf("closed: %g m3/h", q)
	}
}

// A valve behind a pump of a steady rate neither takes from the rate nor chokes while the liquid in it is far from boiling.
func TestSteadyPumpThroughValve(t *testing.T) {
	r := run(t, plant("10 min", "liquid: {water: 12 °C}", `
vessels:
  A: {shape: {box: {length: 100 m, width: 100 m, height: 3 m}}, base: 0 m, level: 2 m}
outside:
  AIR: {free_fall: {elevation: 7 m}}
lines:
  L: {from: A, to: AIR, inlet: full, parts: [{pump: {tag: P, rate: 10 m3/h, mode: on}}, {valve: {tag: V, kv: 10, open: 100 %}}, {resistance: {quadratic: 1000 s2/m5}}]}`), how{})
	head := 5 + 1e5*0.9995/9806.65 + 1000*math.Pow(10/3600.0, 2) // 10 m³/h through a Kv of 10 is one bar
	near(t, "m3/h", at(t, r, r.Series.Flow["L"], 300)*3600, 10*(1-1e-5*head), 1e-4)
	if n := flagged(r, "valve_choked", "L"); n != 0 {
		t.Errorf("%d flags of choking", n)
	}
}
