package ivptest

import (
	"math"
	"slices"

	"headfall/integrate/sparse"
)

// Law is a pipe: the flow q and its slope for a difference of head.
type Law func(head float64) (q, slope float64)

// Conduct is the law q = k·head.
func Conduct(k float64) Law {
	return func(head float64) (q, slope float64) { return k * head, k }
}

// Rough is q = k·head/(head²+ε²)^¼, which is like a root for large heads and straight through zero.
func Rough(k, eps float64) Law {
	return func(head float64) (q, slope float64) {
		s := head*head + eps*eps
		r := k / math.Sqrt(math.Sqrt(s))
		return r * head, r * (1 - 0.5*head*head/s)
	}
}

// Network is tanks of unit area, and tees without storage, joined by pipes. Its unknowns are heads; its integrals the volumes that have passed the
// metered pipes.
type Network struct {
	Base    []float64 // of each tank or tee
	Level   []float64 // at the start, over the base
	Tee     []bool    // nil = none
	Pipes   []Pipe
	Metered []int // pipes
	Law     Law
	Cap     float64 // largest scale, 0 = none

	pattern *sparse.Pattern
	slots   [][4]int32 // of a pipe: aa, ab, ba, bb
	q       []float64
}

// Pipe joins two unknowns, or one to the outside at head Outlet when B is −1.
type Pipe struct{ A, B int }

// Outlet is the head outside.
const Outlet = -1.0

// Chain is n tanks in a falling row that drain through the last, alternately full.
func Chain(n int, law Law) *Network {
	w := &Network{Law: law, Metered: []int{n - 1}}
	for i := range n {
		w.Base = append(w.Base, 0.02*float64(n-i-1))
		w.Level = append(w.Level, 2-float64(i%2))
		w.Pipes = append(w.Pipes, Pipe{i, i + 1})
	}
	w.Pipes[n-1].B = -1
	return w.Prepare()
}

// Grid is m×m tanks that drain through the last; every third row and column meets in a tee when tees is set.
func Grid(m int, law Law, tees bool) *Network {
	w := &Network{Law: law, Base: make([]float64, m*m), Tee: make([]bool, m*m)}
	for r := range m {
		for c := range m {
			id := r*m + c
			w.Level = append(w.Level, 1.5+0.5*math.Sin(12.9898*float64(r+1)+78.233*float64(c+1)))
			w.Tee[id] = tees && r%3 == 1 && c%3 == 1
			if c+1 < m {
				w.Pipes = append(w.Pipes, Pipe{id, id + 1})
			}
			if r+1 < m {
				w.Pipes = append(w.Pipes, Pipe{id, id + m})
			}
		}
	}
	w.Metered = []int{len(w.Pipes)}
	w.Pipes = append(w.Pipes, Pipe{m*m - 1, -1})
	return w.Prepare()
}

// Prepare lays out the pattern of a Network put together by hand.
func (w *Network) Prepare() *Network {
	n := len(w.Base)
	cols := make([][]int32, n)
	for i := range cols {
		cols[i] = []int32{int32(i)}
	}
	for _, p := range w.Pipes {
		if p.B >= 0 {
			cols[p.A], cols[p.B] = append(cols[p.A], int32(p.B)), append(cols[p.B], int32(p.A))
		}
	}
	w.pattern = &sparse.Pattern{N: n, Ptr: []int32{0}}
	for j, c := range cols {
		slices.Sort(c)
		c = slices.Compact(c) // pipes may run side by side
		cols[j] = c
		w.pattern.Row = append(w.pattern.Row, c...)
		w.pattern.Ptr = append(w.pattern.Ptr, int32(len(w.pattern.Row)))
	}
	at := func(i, j int) int32 {
		k, _ := slices.BinarySearch(cols[j], int32(i))
		return w.pattern.Ptr[j] + int32(k)
	}
	for _, p := range w.Pipes {
		s := [4]int32{at(p.A, p.A), -1, -1, -1}
		if p.B >= 0 {
			s[1], s[2], s[3] = at(p.A, p.B), at(p.B, p.A), at(p.B, p.B)
		}
		w.slots = append(w.slots, s)
	}
	w.q = make([]float64, len(w.Pipes))
	return w
}

// Close takes away the drain, the last pipe.
func (w *Network) Close() {
	n := len(w.Pipes) - 1
	w.Pipes, w.slots, w.Metered = w.Pipes[:n], w.slots[:n], nil
}

// Start returns the heads at the start.
func (w *Network) Start() []float64 {
	y := make([]float64, len(w.Base))
	for i := range y {
		y[i] = w.Base[i] + w.Level[i]
	}
	return y
}

// Volume returns the sum of the levels of the tanks.
func (w *Network) Volume(y []float64) float64 {
	sum := 0.0
	for i := range y {
		if w.Tee == nil || !w.Tee[i] {
			sum += y[i] - w.Base[i]
		}
	}
	return sum
}
