package integrate_test

import (
	"fmt"
	"math"

	"headfall/integrate"
	"headfall/integrate/sparse"
)

// tank drains through a hole: h' = −k·√h, and what ran out is an integral on which nothing depends. Its level is a solution until it is empty.
type tank struct{ k, area float64 }

func (tank) Dim() (n, m int) { return 1, 1 }
func (tank) Mass() []bool    { return []bool{true} }
func (tank) Pattern() *sparse.Pattern {
	return &sparse.Pattern{N: 1, Ptr: []int32{0, 1}, Row: []int32{0}}
}
func (tank) IntegralPattern() (p, c []int32) { return []int32{0, 1}, []int32{0} }
func (tank) Scale(_ []float64, rtol float64, scale []float64) {
	scale[0] = rtol // of a metre
}

func (s tank) Rates(_ float64, y, f, g []float64) {
	f[0] = -s.k * math.Sqrt(y[0])
	g[0] = -f[0] * s.area
}

func (s tank) Linearise(t float64, y, f, g []float64, lin *integrate.Linear) {
	s.Rates(t, y, f, g)
	lin.DfDy[0] = -s.k / (2 * math.Sqrt(y[0]))
	lin.DgDy[0] = -lin.DfDy[0] * s.area
	lin.DfDt[0], lin.DgDt[0] = 0, 0
}

// low is the event that the level falls through a mark.
type low struct{ mark float64 }

func (low) Len() int                           { return 1 }
func (low) Direction(int) int                  { return -1 }
func (e low) Values(_ float64, y, v []float64) { v[0] = y[0] - e.mark }

// A system is followed until something happens.
func ExampleSolver_Step() {
	s := integrate.NewSolver(tank{k: 0.001, area: 2}, integrate.Options{RTol: 1e-8})
	s.Reset()
	if err := s.Restart(0, []float64{4}); err != nil {
		fmt.Println(err)
		return
	}
	for {
		out, err := s.Step(10_000, low{mark: 1})
		if err != nil {
			fmt.Println(err)
			return
		}
		if out.Stop != integrate.Stepped {
			fmt.Printf("at %.1f s the level is %.3f m, and %.3f m³ have run out\n", out.T, s.Y()[0], s.Z()[0]) // closed form: 2·(√4 − √1)/k
			return
		}
	}
	// Output: at 2000.0 s the level is 1.000 m, and 6.000 m³ have run out
}
