package sparse

import (
	"fmt"
	"math"
)

// SingularError tells that a matrix could not be factorised: no pivot was found in a column.
type SingularError struct {
	Column int     // the unknown whose column has no pivot
	Pivot  float64 // the largest candidate, relative to its row and to the column's largest entry
}

func (e *SingularError) Error() string {
	return fmt.Sprintf("matrix is singular at unknown %d (largest pivot %.3g)", e.Column, e.Pivot)
}

// negligible is the share of a column's largest entry below which what elimination left of it is rounding.
const negligible = 1e-15

// threshold is the share of the largest candidate that makes the diagonal the pivot all the same.
const threshold = 0.1

// pivoting is a column-by-column LU with threshold partial pivoting on rows scaled to a largest entry of one (Gilbert and Peierls, SIAM J.
// Sci. Stat. Comput. 9:862, 1988). Column k of the factors is for unknown order[k]; its fill is found by depth-first search
// each time. Memory grows to the largest fill met and is kept.
type pivoting struct {
	pat    *Pattern
	order  []int32
	scale  []float64 // of rows
	lptr   []int32
	lrow   []int32 // rows as in the matrix
	lval   []float64
	uptr   []int32
	urow   []int32 // places in the order of pivots
	uval   []float64
	inv    []float64 // inverse pivots
	pivRow []int32   // row that is pivot of column k
	pivOf  []int32   // column that a row is pivot of, -1 if none yet
	x      []float64
	mark   []int32
	found  []int32 // rows reached, in topological order from the end
	stack  []int32
	next   []int32

	largest float64 // entry of the present column before elimination
}

func newPivoting(p *Pattern, order []int32) *pivoting {
	n := p.N
	g := &pivoting{pat: p, order: order}
	for _, s := range []*[]int32{&g.pivRow, &g.pivOf, &g.mark, &g.found, &g.stack, &g.next} {
		*s = make([]int32, n)
	}
	g.scale, g.inv, g.x = make([]float64, n), make([]float64, n), make([]float64, n)
	g.lptr, g.uptr = make([]int32, n+1), make([]int32, n+1)
	return g
}

func (g *pivoting) factorise(values []float64) error {
	g.scaleRows(values)
	g.lrow, g.lval, g.urow, g.uval = g.lrow[:0], g.lval[:0], g.urow[:0], g.uval[:0]
	for i := range g.pivOf {
		g.pivOf[i], g.mark[i] = -1, -1
	}
	for k := range int32(g.pat.N) {
		g.lptr[k], g.uptr[k] = int32(len(g.lrow)), int32(len(g.urow))
		top := g.reach(k)
		g.column(k, top, values)
		if err := g.choose(k, top); err != nil {
			return err
		}
	}
	g.lptr[g.pat.N], g.uptr[g.pat.N] = int32(len(g.lrow)), int32(len(g.urow))
	return nil
}

func (g *pivoting) scaleRows(values []float64) {
	clear(g.scale)
	for k, i := range g.pat.Row {
		g.scale[i] = max(g.scale[i], math.Abs(values[k]))
	}
	for i, s := range g.scale {
		if s > 0 {
			g.scale[i] = 1 / s
		}
	}
}

// reach finds the rows of column k of the factors: all that the column's entries lead to through earlier columns of L. They are left in
// found[top:], in an order in which each comes before those that it leads to.
func (g *pivoting) reach(k int32) (top int) {
	top = g.pat.N
	j := g.order[k]
	for _, start := range g.pat.Row[g.pat.Ptr[j]:g.pat.Ptr[j+1]] {
		if g.mark[start] == k {
			continue
		}
		g.mark[start] = k
		g.stack[0], g.next[0] = start, g.firstOf(start)
		for depth := 0; depth >= 0; {
			i := g.stack[depth]
			end := g.endOf(i)
			for g.next[depth] < end && g.mark[g.lrow[g.next[depth]]] == k {
				g.next[depth]++
			}
			if g.next[depth] == end {
				top--
				g.found[top] = i
				depth--
				continue
			}
			child := g.lrow[g.next[depth]]
			g.next[depth]++
			g.mark[child] = k
			depth++
			g.stack[depth], g.next[depth] = child, g.firstOf(child)
		}
	}
	return top
}

func (g *pivoting) firstOf(row int32) int32 {
	if c := g.pivOf[row]; c >= 0 {
		return g.lptr[c]
	}
	return 0
}

func (g *pivoting) endOf(row int32) int32 {
	if c := g.pivOf[row]; c >= 0 {
		return g.lptr[c+1]
	}
	return 0
}

// column solves for column k: x = L⁻¹ A(:, order[k]) on the rows found.
func (g *pivoting) column(k int32, top int, values []float64) {
	for _, i := range g.found[top:] {
		g.x[i] = 0
	}
	j := g.order[k]
	g.largest = 0
	for p := g.pat.Ptr[j]; p < g.pat.Ptr[j+1]; p++ {
		i := g.pat.Row[p]
		g.x[i] = values[p] * g.scale[i]
		g.largest = max(g.largest, math.Abs(g.x[i]))
	}
	for _, i := range g.found[top:] {
		c := g.pivOf[i]
		if c < 0 {
			continue
		}
		t := g.x[i]
		for p := g.lptr[c]; p < g.lptr[c+1]; p++ {
			g.x[g.lrow[p]] -= g.lval[p] * t
		}
	}
}

// choose picks the pivot of column k and stores the column.
func (g *pivoting) choose(k int32, top int) error {
	diag := g.order[k]
	best, row, largest := 0.0, int32(-1), g.largest
	for _, i := range g.found[top:] {
		if a := math.Abs(g.x[i]); g.pivOf[i] < 0 && a > best {
			best, row = a, i
		}
	}
	if row < 0 || best < negligible*largest || math.IsInf(best, 1) {
		return &SingularError{Column: int(diag), Pivot: best / largest}
	}
	if g.mark[diag] == k && g.pivOf[diag] < 0 && math.Abs(g.x[diag]) >= threshold*best {
		row = diag
	}
	inv := 1 / g.x[row]
	g.inv[k], g.pivRow[k] = inv, row
	for _, i := range g.found[top:] {
		if c := g.pivOf[i]; c >= 0 {
			g.urow, g.uval = append(g.urow, c), append(g.uval, g.x[i])
		} else if i != row {
			g.lrow, g.lval = append(g.lrow, i), append(g.lval, g.x[i]*inv)
		}
	}
	g.pivOf[row] = k
	g.lptr[k+1], g.uptr[k+1] = int32(len(g.lrow)), int32(len(g.urow))
	return nil
}

// solve overwrites b by the solution.
func (g *pivoting) solve(b []float64) {
	n := g.pat.N
	for i := range b {
		b[i] *= g.scale[i]
	}
	for k := range n {
		t := b[g.pivRow[k]]
		g.x[k] = t
		for p := g.lptr[k]; p < g.lptr[k+1]; p++ {
			b[g.lrow[p]] -= g.lval[p] * t
		}
	}
	for k := n - 1; k >= 0; k-- {
		t := g.x[k] * g.inv[k]
		g.x[k] = t
		for p := g.uptr[k]; p < g.uptr[k+1]; p++ {
			g.x[g.urow[p]] -= g.uval[p] * t
		}
	}
	for k, j := range g.order {
		b[j] = g.x[k]
	}
}
