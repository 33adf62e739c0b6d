package network

import (
	"fmt"
	"math"
	"math/rand/v2"
	"testing"
)

// TestFlowCell: over random lines and pressures in any order a cell gives the flow that the law does, to what was asked for, a slope that is its own, and the same
// flow whatever was asked before.
func TestFlowCell(t *testing.T) {
	r := rand.New(rand.NewPCG(9, 10))
	for range 40 {
		s := newSketch(t, "water {temperature: 12 °C}")
		s.vessel("A", "box {length: 2 m, width: 1 m, height: 30 m}", 0, 1)
		s.vessel("B", "box {length: 2 m, width: 1 m, height: 30 m}", 0, 1)
		bore := 20 + 300*r.Float64()
		parts := []string{fmt.Sprintf("pipe {length: %.3f m, bore: %.3f mm, roughness: %.4f mm}", 1+200*r.Float64(), bore, 0.5*r.Float64()),
			fmt.Sprintf("valve {tag: V, kv: %.3f, trim: equal_percentage, open: %.1f %%}", bore, 5+90*r.Float64())}
		if r.IntN(3) == 0 {
			parts = append(parts, "pump {tag: P, curve: [[0 m3/h, 10 m], [20 m3/h, 8 m], [45 m3/h, 4 m]], mode: \"on\", when_stopped: passes}")
		}
		s.line("A", "B", parts...)
		_, sim := s.ready("")
		l := &sim.sys.lines[0]
		lift, _ := l.chain.drop(0)
		for _, tol := range []float64{1e-7, 1e-9} {
			one, other := flowCell{tol: tol}, flowCell{tol: tol}
			near := 1.0
			for range 2000 {
				if r.IntN(4) == 0 {
					near = math.Exp(r.Float64()*math.Log(4e7)) * leastTabled * 1.001
					if r.IntN(2) == 0 {
						near = -near
					}
				}
				d := near * (1 + 0.3*r.Float64())
				if math.Abs(d) < 1e-6*math.Abs(lift) {
					continue // Δp itself is rounded to that
				}
				q, slope := one.at(&l.chain, d, lift)
				want, law := l.chain.solve(lift+d, 0)
				if math.Abs(q/want-1) > 3*tol || math.Abs(slope/law-1) > 1e-3 {
					t.Errorf("%g Pa: %g m³/s, want %g: off by %.2g, allowed %.2g; slope off by %.2g", d, q, want, q/want-1, 3*tol, slope/law-1)
				}
				e := 1e-6 * d
				up, _ := one.at(&l.chain, d+e, lift)
				dn, _ := one.at(&l.chain, d-e, lift)
				if f := (up - dn) / (2 * e); math.Abs(f/slope-1) > 1e-4 {
					t.Errorf("%g Pa: slope %g, by differences %g", d, slope, f)
				}
				if r.IntN(3) == 0 {
					other.at(&l.chain, -d, lift)
					if again, _ := other.at(&l.chain, d, lift); math.Abs(again/q-1) > 1e-8 { // slopes of thick flow in valves are good to two figures: the last of it depends on the guess
						t.Errorf("%g Pa: %g m³/s, asked after others %g", d, q, again)
					}
				}
			}
		}
	}
}
