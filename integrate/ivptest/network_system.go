package ivptest

import (
	"math"

	"headfall/integrate"
	"headfall/integrate/sparse"
)

var _ integrate.System = (*Network)(nil)

// Dim implements integrate.System.
func (w *Network) Dim() (n, m int) { return len(w.Base), len(w.Metered) }

// Mass implements integrate.System.
func (w *Network) Mass() []bool {
	mass := make([]bool, len(w.Base))
	for i := range mass {
		mass[i] = w.Tee == nil || !w.Tee[i]
	}
	return mass
}

// Pattern implements integrate.System.
func (w *Network) Pattern() *sparse.Pattern { return w.pattern }

// IntegralPattern implements integrate.System.
func (w *Network) IntegralPattern() (ptr, cols []int32) {
	ptr = []int32{0}
	for _, k := range w.Metered {
		p := w.Pipes[k]
		cols = append(cols, int32(p.A))
		if p.B >= 0 {
			cols = append(cols, int32(p.B))
		}
		ptr = append(ptr, int32(len(cols)))
	}
	return ptr, cols
}

// Rates implements integrate.System.
func (w *Network) Rates(_ float64, y, f, g []float64) {
	clear(f)
	for k, p := range w.Pipes {
		out := Outlet
		if p.B >= 0 {
			out = y[p.B]
		}
		q, _ := w.Law(y[p.A] - out)
		f[p.A] -= q
		if p.B >= 0 {
			f[p.B] += q
		}
		w.q[k] = q
	}
	for i, k := range w.Metered {
		g[i] = w.q[k]
	}
}

// Linearise implements integrate.System.
func (w *Network) Linearise(_ float64, y, f, g []float64, lin *integrate.Linear) {
	clear(f)
	clear(lin.DfDy)
	for k, p := range w.Pipes {
		out := Outlet
		if p.B >= 0 {
			out = y[p.B]
		}
		q, d := w.Law(y[p.A] - out)
		s := &w.slots[k]
		f[p.A] -= q
		lin.DfDy[s[0]] -= d
		if p.B >= 0 {
			f[p.B] += q
			lin.DfDy[s[1]] += d
			lin.DfDy[s[2]] += d
			lin.DfDy[s[3]] -= d
		}
		w.q[k] = q
	}
	clear(lin.DfDt)
	clear(lin.DgDt)
	at := 0
	for i, k := range w.Metered {
		g[i] = w.q[k]
		p, out := w.Pipes[k], Outlet
		if p.B >= 0 {
			out = y[p.B]
		}
		_, d := w.Law(y[p.A] - out)
		lin.DgDy[at] = d
		at++
		if p.B >= 0 {
			lin.DgDy[at] = -d
			at++
		}
	}
}

// Scale implements integrate.System.
func (w *Network) Scale(y []float64, rtol float64, scale []float64) {
	limit := w.Cap
	if limit == 0 {
		limit = math.Inf(1)
	}
	for i := range scale {
		scale[i] = 1e-8 + math.Min(rtol*math.Abs(y[i]-w.Base[i]), limit)
	}
}
