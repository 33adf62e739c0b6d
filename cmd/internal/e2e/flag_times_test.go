package e2e

import (
	"math"
	"strings"
	"testing"
)

// A flag begins when its state does, not when a step ends. A pump of a steady rate draws a box down in proportion to time, and air is pulled in from the depth
// of Lubin and Springer on, h = (Q/2.53√g)^0.4.
func TestFlagBeginsWithItsState(t *testing.T) {
	const rate = 6 / 3600.0
	r := run(t, plant("1 h", "liquid: {water: 12 °C}", `
vessels:
  A: {shape: {box: {length: 1 m, width: 1 m, height: 2 m}}, base: 0 m, level: 1 m}
outside:
  AIR: {free_fall: {elevation: 0 m}}
lines:
  L: {from: A, to: AIR, parts: [{pipe: {length: 1 m, bore: 100 mm, roughness: 0.05 mm}}, {pump: {tag: P, rate: 6 m3/h, mode: on}}]}`), how{})
	depth := math.Pow(rate/(2.53*math.Sqrt(9.80665)), 0.4)
	want := (1 - depth) / rate
	n := 0
	for _, f := range r.Flags {
		if f.Kind == "air_drawn_in" && f.Where == "L" && strings.Contains(f.Says, "pulls air") {
			n++
			near(t, "s", f.From, want, 0.05)
		}
	}
	if n != 1 {
		t.Errorf("%d flags: %+v", n, r.Flags)
	}
}
