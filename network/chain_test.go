package network

import (
	"math"
	"math/rand/v2"
	"testing"
)

// TestChainSolves: the flow that a chain is solved for loses the pressure it was asked for, to rounding, from any guess; parts whose loss moves by
// more than its last digit from one flow to the next included.
func TestChainSolves(t *testing.T) {
	const box = "box {length: 2 m, width: 1 m, height: 3 m}"
	s := newSketch(t, "water {temperature: 12 °C}")
	s.vessel("A", box, 0.5, 1)
	s.vessel("B", box, 3, 1)
	s.line("A", "B", "pump {tag: P-1, curve: [[0 m3/h, 14 m], [20 m3/h, 11 m]], when_stopped: passes}", "resistance {quadratic: 1500 s2/m5}")
	s.line("A", "B", "pump {tag: P-2, curve: [[0 m3/h, 14 m], [20 m3/h, 11 m], [32 m3/h, 6 m]], mode: on, when_stopped: passes}", "pipe {length: 30 m, bore: 80 mm, roughness: 0.05 mm}")
	s.line("A", "B", "pipe {length: 30 m, bore: 80 mm, roughness: 0.05 mm}", "valve {tag: V-1, kv: 60, open: 30 %}", "pipe {length: 2 m, bore: 40 mm, roughness: 0.5 mm}")
	s.line("A", "B", "orifice {diameter: 20 mm, cd: 0.6}")
	s.line("A", "B", "pipe {length: 30 m, bore: 80 mm, roughness: 0.05 mm}", "check_valve {tag: N-1, kv: 60, leaks: 0.1 %}")
	s.line("A", "B", "resistance {rows: [[1 m3/h, 0.1 m], [4 m3/h, 2 m], [5 m3/h, 2.1 m]]}", "pipe {length: 3 m, bore: 80 mm, friction: 0.02}")
	_, sim := s.ready("")
	r := rand.New(rand.NewPCG(3, 4))
	for i := range sim.sys.lines {
		c := &sim.sys.lines[i].chain
		for range 20000 {
			dp := 1e5 * r.NormFloat64() * math.Pow(10, -6*r.Float64())
			guess := 0.05 * r.NormFloat64()
			q, slope := c.solve(dp, guess)
			d, byQ := c.drop(q)
			noise := 4e-16 * (math.Abs(dp) + 1.5e5) / byQ // pumps lose a small difference of large heads
			if off := math.Abs(d-dp) / byQ; !(off <= 1e-14*math.Abs(q)+8*noise+1e-20) {
				t.Fatalf("%s at %.17g Pa from %.17g: flow %.17g is off by %.2g", sim.sys.lines[i].plan.Tag, dp, guess, q, off)
			}
			if math.Abs(slope*byQ-1) > 1e-5 { // it is that at a flow up to nearEnough aside, which shows where a check valve takes up flow
				t.Fatalf("%s at %.17g Pa: slope %g, %g", sim.sys.lines[i].plan.Tag, dp, slope, 1/byQ)
			}
		}
	}
}
