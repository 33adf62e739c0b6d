package network

import (
	"fmt"
	"math"
	"math/rand/v2"
	"testing"
)

// TestFlowTable: over random lines and pressures a table gives the flow that the law does, to what was asked for, and a slope that is its own.
func TestFlowTable(t *testing.T) {
	r := rand.New(rand.NewPCG(7, 8))
	for range 20 {
		s := newSketch(t, "water {temperature: 12 °C}")
		s.vessel("A", "box {length: 2 m, width: 1 m, height: 30 m}", 0, 1)
		s.vessel("B", "box {length: 2 m, width: 1 m, height: 30 m}", 0, 1)
		bore := 20 + 300*r.Float64()
		s.line("A", "B", fmt.Sprintf("pipe {length: %.3f m, bore: %.3f mm, roughness: %.4f mm}", 1+200*r.Float64(), bore, 0.5*r.Float64()),
			fmt.Sprintf("fittings {bore: %.3f mm, k: %.3f}", bore, 5*r.Float64()))
		_, sim := s.ready("")
		sys := sim.sys
		c := &sys.lines[0].chain
		c.merged = false
		for _, tol := range []float64{1e-7, 1e-9} {
			table := newFlowTable(c, 4e5, tol, sys.gamma)
			for range 2000 {
				dp := math.Exp(r.Float64()*math.Log(4e9)) * 1e-4
				if r.IntN(2) == 0 {
					dp = -dp
				}
				q, slope, ok := table.at(dp)
				if !ok {
					t.Fatalf("%g Pa is not in the table", dp)
				}
				allowed := 2 * tol * math.Max(1, easeBelow*sys.gamma/math.Max(math.Abs(dp), table.low))
				if math.Abs(dp) < table.low {
					allowed = 1e-3 // of what moves levels by two micrometres at most
				}
				if want, _ := c.solve(dp, 0); math.Abs(q/want-1) > allowed {
					t.Errorf("%g Pa: %g m³/s, want %g: off by %.2g, allowed %.2g", dp, q, want, q/want-1, allowed)
				}
				if alone, _ := table.flow(dp); alone != q {
					t.Errorf("%g Pa: %g and %g m³/s", dp, q, alone)
				}
				e := 1e-5 * dp
				up, _ := table.flow(dp + e)
				dn, _ := table.flow(dp - e)
				if d := (up - dn) / (2 * e); math.Abs(d/slope-1) > 1e-4 {
					t.Errorf("%g Pa: slope %g, by differences %g", dp, slope, d)
				}
			}
		}
	}
}
