// Package sparse factorises the sparse unsymmetric matrices of an implicit integrator: the pattern is analysed once, numbers change often.
package sparse

import "slices"

// Pattern is the pattern of a square matrix in compressed columns: column j has rows Row[Ptr[j]:Ptr[j+1]], ascending.
type Pattern struct {
	N   int
	Ptr []int32 // length N+1
	Row []int32 // length Ptr[N]
}

// Find returns the place of an entry, or -1 when it is not in the pattern.
func (p *Pattern) Find(row, col int32) int32 {
	if row < 0 || col < 0 {
		return -1
	}
	a, b := p.Ptr[col], p.Ptr[col+1]
	if k, ok := slices.BinarySearch(p.Row[a:b], row); ok {
		return a + int32(k)
	}
	return -1
}
