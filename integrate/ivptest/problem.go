// Package ivptest holds problems with known answers for package integrate.
package ivptest

import (
	"math"

	"headfall/integrate"
	"headfall/integrate/sparse"
)

// Problem is a small System given by plain functions and full matrices, with its answer.
type Problem struct {
	Name      string
	Algebraic []bool // by unknown; nil = none
	Integrals int
	T0, T1    float64
	Y0        []float64
	Absolute  float64 // scale is rtol·(|y| + Absolute); 0 means 1
	// F fills the rates of unknowns and integrals.
	F func(t float64, y, f, g []float64)
	// D fills ∂f/∂y, ∂g/∂y, ∂f/∂t and ∂g/∂t. Matrices come zeroed, by rows.
	D func(t float64, y []float64, fy, gy [][]float64, ft, gt []float64)
	// Exact fills the solution, where it is known at all times.
	Exact func(t float64, y []float64)
	// End is the solution at T1 where only that is known.
	End []float64

	pattern *sparse.Pattern
	fy, gy  [][]float64
}

var _ integrate.System = (*Problem)(nil)

// Dim implements integrate.System.
func (p *Problem) Dim() (n, m int) { return len(p.Y0), p.Integrals }

// Mass implements integrate.System.
func (p *Problem) Mass() []bool {
	mass := make([]bool, len(p.Y0))
	for i := range mass {
		mass[i] = p.Algebraic == nil || !p.Algebraic[i]
	}
	return mass
}

// Pattern implements integrate.System: all entries.
func (p *Problem) Pattern() *sparse.Pattern {
	if p.pattern == nil {
		n := len(p.Y0)
		p.pattern = &sparse.Pattern{N: n, Ptr: []int32{0}}
		for range n {
			for i := range n {
				p.pattern.Row = append(p.pattern.Row, int32(i))
			}
			p.pattern.Ptr = append(p.pattern.Ptr, int32(len(p.pattern.Row)))
		}
		p.fy, p.gy = matrix(n, n), matrix(p.Integrals, n)
	}
	return p.pattern
}

// IntegralPattern implements integrate.System: all entries.
func (p *Problem) IntegralPattern() (ptr, cols []int32) {
	ptr = []int32{0}
	for range p.Integrals {
		for j := range p.Y0 {
			cols = append(cols, int32(j))
		}
		ptr = append(ptr, int32(len(cols)))
	}
	return ptr, cols
}

// Rates implements integrate.System.
func (p *Problem) Rates(t float64, y, f, g []float64) { p.F(t, y, f, g) }

// Linearise implements integrate.System.
func (p *Problem) Linearise(t float64, y, f, g []float64, lin *integrate.Linear) {
	p.F(t, y, f, g)
	for _, rows := range [][][]float64{p.fy, p.gy} {
		for _, r := range rows {
			clear(r)
		}
	}
	clear(lin.DfDt)
	clear(lin.DgDt)
	p.D(t, y, p.fy, p.gy, lin.DfDt, lin.DgDt)
	n := len(y)
	for j := range n {
		for i := range n {
			lin.DfDy[j*n+i] = p.fy[i][j]
		}
	}
	for i, r := range p.gy {
		copy(lin.DgDy[i*n:], r)
	}
}

// Scale implements integrate.System.
func (p *Problem) Scale(y []float64, rtol float64, scale []float64) {
	a := p.Absolute
	if a == 0 {
		a = 1
	}
	for i := range y {
		scale[i] = rtol * (math.Abs(y[i]) + a)
	}
}

func matrix(m, n int) [][]float64 {
	rows := make([][]float64, m)
	for i := range rows {
		rows[i] = make([]float64, n)
	}
	return rows
}
