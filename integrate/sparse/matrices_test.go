package sparse

import "math/rand/v2"

// chain is the pattern of n unknowns in a row.
func chain(n int) *Pattern {
	edges := make([][2]int, 0, n)
	for i := 0; i+1 < n; i++ {
		edges = append(edges, [2]int{i, i + 1})
	}
	return graph(n, edges)
}

// bothEnds is a chain numbered from both ends.
func bothEnds(n int) *Pattern {
	var edges [][2]int
	for i := 0; i+2 < n; i++ {
		edges = append(edges, [2]int{i, i + 2})
	}
	return graph(n, append(edges, [2]int{n - 2, n - 1}))
}

// grid is the pattern of m×m unknowns joined to their neighbours.
func grid(m int) *Pattern {
	var edges [][2]int
	for r := range m {
		for c := range m {
			if c+1 < m {
				edges = append(edges, [2]int{r*m + c, r*m + c + 1})
			}
			if r+1 < m {
				edges = append(edges, [2]int{r*m + c, r*m + c + m})
			}
		}
	}
	return graph(m*m, edges)
}

// tree is the pattern of a random tree.
func tree(n int, rng *rand.Rand) *Pattern {
	edges := make([][2]int, 0, n)
	for i := 1; i < n; i++ {
		edges = append(edges, [2]int{rng.IntN(i), i})
	}
	return graph(n, edges)
}

// graph is the pattern with both entries of each edge and the diagonal.
func graph(n int, edges [][2]int) *Pattern {
	at := make([][]int32, n)
	for i := range at {
		at[i] = []int32{int32(i)}
	}
	for _, e := range edges {
		at[e[0]] = append(at[e[0]], int32(e[1]))
		at[e[1]] = append(at[e[1]], int32(e[0]))
	}
	return fromColumns(at)
}

func fromColumns(cols [][]int32) *Pattern {
	p := &Pattern{N: len(cols), Ptr: []int32{0}}
	for _, c := range cols {
		p.Row = append(p.Row, sortedSet(c)...)
		p.Ptr = append(p.Ptr, int32(len(p.Row)))
	}
	return p
}

// renumbered is a pattern with its unknowns in the order of elimination.
func renumbered(p *Pattern) *Pattern {
	order := Analyse(p).Order()
	number := inverse(order)
	cols := make([][]int32, p.N)
	for k, j := range order {
		for _, i := range p.Row[p.Ptr[j]:p.Ptr[j+1]] {
			cols[k] = append(cols[k], number[i])
		}
	}
	return fromColumns(cols)
}

// random is an unsymmetric pattern with the diagonal and about extra entries a column.
func random(n, extra int, rng *rand.Rand) *Pattern {
	cols := make([][]int32, n)
	for j := range cols {
		cols[j] = []int32{int32(j)}
		for range extra {
			if rng.IntN(2) == 0 {
				cols[j] = append(cols[j], int32(rng.IntN(n)))
			}
		}
	}
	return fromColumns(cols)
}

// dominant fills a pattern with random numbers and a diagonal that needs no pivoting.
func dominant(p *Pattern, rng *rand.Rand) []float64 {
	v := make([]float64, len(p.Row))
	for j := range p.N {
		sum, diag := 0.1, 0
		for k := p.Ptr[j]; k < p.Ptr[j+1]; k++ {
			v[k] = rng.NormFloat64()
			if p.Row[k] == int32(j) {
				diag = int(k)
			} else {
				sum += max(v[k], -v[k])
			}
		}
		v[diag] = sum
	}
	return v
}
