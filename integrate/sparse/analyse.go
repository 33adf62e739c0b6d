package sparse

import (
	"math"
	"slices"
)

// Factor holds the LU factors of matrices with one pattern. Its memory is allocated by Analyse; Refactor and Solve allocate nothing,
// unless a matrix needs other pivots than its diagonal and more room than any before it.
//
// The factor is held as panels ("supernodes") of columns with the same rows below them. Panel s of w columns and r rows is three dense
// blocks one after the other in v: D (w×w by rows: L and U of the diagonal block, pivots inverted), U (w×r by rows) and the transpose of L
// (w×r, one column of L after the other), both with columns in the order of the panel's row list.
type Factor struct {
	n      int
	pat    *Pattern
	order  []int32 // unknown eliminated k-th
	plain  bool    // they are eliminated as they come
	panels []panel
	runs   []run
	rows   []int32 // row lists of the panels, ascending
	cuts   []cut   // a panel's row list cut by the panel that each row belongs to
	rel    []int32 // places of a panel's rows in the panels it updates
	spots  []int32 // for panels of one column with one or two rows: places in v that they update
	v      []float64
	slot   []int32 // place in v of each entry of the pattern
	x      []float64
	buf    []float64 // two rows of an update
	values []float64 // the matrix of the last Refactor
	rptr   []int32   // the pattern by rows: columns, and places in the pattern
	rcol   []int32
	rpos   []int32
	rhs    []float64
	left   []float64 // residual
	roots  []root
	pivots *pivoting // nil until a matrix needed it
	mode   mode
	wild   bool // elimination met multipliers beyond tame
	counts Counts
}

// Counts tells how often a Factor did what.
type Counts struct {
	Factorisations int // calls of Refactor
	Pivoted        int // factorisations that needed other pivots than the diagonal
	Refined        int // solutions that needed a step of iterative refinement
}

type mode int

const (
	unset    mode = iota // no factors
	diagonal             // panels hold the factors
	pivoted              // pivots holds the factors
)

// panel is a set of consecutive columns with the same rows below them.
type panel struct {
	col, w, r int32
	at        int32 // of its D block in v
	row       int32 // of its row list in rows
	cut, ncut int32 // its cuts
}

// cut is the part [a, b) of a panel's row list that lies in the columns of panel p; rel[at+j-a] is the place of row j ≥ a: the column
// within p for j < b, the place in p's row list beyond.
type cut struct {
	p, a, b int32
	at      int32
}

// root is the last column of a part of the matrix that nothing joins to the rest: where a singular part shows.
type root struct{ at, entry int32 } // places of its diagonal entry in v and in the pattern

// Analyse prepares the factorisation of matrices with pattern p: it chooses an order, finds the fill, and allocates. Where the unknowns are
// numbered so that elimination as they come fills hardly more than the order found, and waits no longer, they are taken as they come,
// which saves Solve two passes.
func Analyse(p *Pattern) *Factor {
	order := Order(p)
	cols := columns(p, order, math.MaxInt)
	fill := 0
	for _, c := range cols {
		fill += len(c)
	}
	as := make([]int32, p.N)
	for i := range as {
		as[i] = int32(i)
	}
	if c := columns(p, as, fill+fill/8); c != nil && height(c) <= height(cols)+height(cols)/8 {
		order, cols = as, c
	}
	return analyse(p, order, cols)
}

func analyse(p *Pattern, order []int32, cols [][]int32) *Factor {
	f := &Factor{n: p.N, pat: p}
	groups := amalgamate(cols, slices.IsSorted(order))
	f.order = make([]int32, 0, f.n)
	for _, g := range groups {
		for _, c := range g.cols {
			f.order = append(f.order, order[c])
		}
	}
	f.plain = slices.IsSorted(f.order)
	number := make([]int32, f.n) // from the first order to the final one
	k := int32(0)
	for _, g := range groups {
		for _, c := range g.cols {
			number[c] = k
			k++
		}
	}
	f.layPanels(groups, cols, number)
	f.linkPanels()
	f.placeEntries()
	f.findRuns()
	f.x = make([]float64, f.n)
	f.rhs = make([]float64, f.n)
	f.left = make([]float64, f.n)
	f.transpose()
	f.findRoots()
	return f
}

// layPanels fills panels and rows and allocates v.
func (f *Factor) layPanels(groups []group, cols [][]int32, number []int32) {
	col, at, widest := int32(0), int32(0), int32(0)
	for _, g := range groups {
		top := g.cols[len(g.cols)-1]
		p := panel{col: col, w: int32(len(g.cols)), r: int32(len(cols[top])), at: at, row: int32(len(f.rows))}
		list := make([]int32, 0, p.r)
		for _, i := range cols[top] {
			list = append(list, number[i])
		}
		f.rows = append(f.rows, sortedSet(list)...)
		f.panels = append(f.panels, p)
		col += p.w
		at += p.w*p.w + 2*p.w*p.r
		widest = max(widest, p.r)
	}
	f.v = make([]float64, at)
	f.buf = make([]float64, 2*widest)
}

// Size returns the number of stored entries of the factors, zeros in panels included.
func (f *Factor) Size() int { return len(f.v) }

// Order returns the order of elimination: Order()[k] is the unknown eliminated k-th. Unknowns renumbered like that are eliminated as they come.
func (f *Factor) Order() []int32 { return f.order }

// Counts returns what was done since Analyse.
func (f *Factor) Counts() Counts { return f.counts }
