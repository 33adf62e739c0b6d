// Package sparse factorises the sparse unsymmetric matrices of an implicit integrator: the pattern is analysed once, numbers change often.
package sparse

// Pattern is the pattern of a square matrix in compressed columns: column j has rows Row[Ptr[j]:Ptr[j+1]], ascending.
type Pattern struct {
	N   int
	Ptr []int32 // length N+1
	Row []int32 // length Ptr[N]
}
