package network

import (
	"testing"

	"headfall/integrate"
)

// TestNoAllocations: once compiled and begun, a plant of every kind of line is looked at, linearised and stepped without any allocation.
func TestNoAllocations(t *testing.T) {
	for _, b := range benches() {
		t.Run(b.name, func(t *testing.T) {
			s := newSketch(t, b.liquid)
			b.build(s)
			_, sim := s.ready("")
			sys := sim.sys
			n, m := sys.Dim()
			_, cols := sys.IntegralPattern()
			f, g := make([]float64, n), make([]float64, m)
			lin := &integrate.Linear{DfDy: make([]float64, len(sys.Pattern().Row)), DgDy: make([]float64, len(cols)), DfDt: make([]float64, n), DgDt: make([]float64, m)}
			y := append([]float64(nil), sim.y...)
			if a := testing.AllocsPerRun(20, func() { sys.Rates(0, y, f, g) }); a > 0 {
				t.Errorf("Rates allocates %g times", a)
			}
			if a := testing.AllocsPerRun(20, func() { sys.Linearise(0, y, f, g, lin) }); a > 0 {
				t.Errorf("Linearise allocates %g times", a)
			}
			if err := sim.solver.Restart(0, sim.y); err != nil {
				t.Fatal(err)
			}
			sim.watch.arm()
			step := func() {
				if _, err := sim.solver.Step(1e4, sim.watch); err != nil {
					t.Fatal(err)
				}
			}
			for range 3 {
				step()
			}
			if sim.solver.Stats().Steps == 0 {
				t.Fatal("no step")
			}
			if a := testing.AllocsPerRun(1, step); a > 0 {
				t.Errorf("Step allocates %g times", a)
			}
		})
	}
}
