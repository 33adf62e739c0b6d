package sparse

// columns returns, for the symmetric pattern p + pᵀ renumbered by order, the rows below the diagonal of each column of the factor, ascending:
// struct(j) = adj(j) ∪ ⋃ struct(c)\{j} over the children c of j, the parent of a column being its first row (Liu, SIAM J. Matrix Anal.
// Appl. 11:134, 1990). It gives up, returning nil, beyond limit rows in all.
func columns(p *Pattern, order []int32, limit int) [][]int32 {
	n := p.N
	number := inverse(order)
	adj := adjacency(p)
	cols := make([][]int32, n)
	children := make([][]int32, n)
	mark := make([]int32, n)
	for j := range int32(n) {
		mark[j] = j + 1
		var s []int32
		add := func(i int32) {
			if i > j && mark[i] != j+1 {
				mark[i] = j + 1
				s = append(s, i)
			}
		}
		for _, i := range adj[order[j]] {
			add(number[i])
		}
		for _, c := range children[j] {
			for _, i := range cols[c] {
				add(i)
			}
		}
		if limit -= len(s); limit < 0 {
			return nil
		}
		cols[j] = sortedSet(s)
		if len(s) > 0 {
			children[cols[j][0]] = append(children[cols[j][0]], j)
		}
	}
	return cols
}

// height returns the largest number of columns of which each waits for the one before: the height of the elimination tree.
func height(cols [][]int32) int {
	h := make([]int, len(cols))
	most := 0
	for j, c := range cols {
		h[j]++
		most = max(most, h[j])
		if len(c) > 0 {
			h[c[0]] = max(h[c[0]], h[j])
		}
	}
	return most
}

func inverse(order []int32) []int32 {
	inv := make([]int32, len(order))
	for k, i := range order {
		inv[i] = int32(k)
	}
	return inv
}

// group is a set of columns stored as one dense panel. The last of cols is the group's top: all others are its descendants.
type group struct {
	cols []int32 // in the order of elimination
	nnz  int     // entries of the factor's lower half that are not stored zeros
}

// amalgamate joins columns with their parents' where the panel then holds few zeros (Ashcraft and Grimes, ACM Trans. Math. Softw. 15:291,
// 1989), if asked only where that does not change the order of columns. Columns with one or two rows below the diagonal stay alone: trees have only such, and have their own loops.
func amalgamate(cols [][]int32, inOrder bool) []group {
	groups := make([]group, len(cols))
	for j := range cols {
		groups[j] = group{cols: []int32{int32(j)}, nnz: 1 + len(cols[j])}
	}
	for j, s := range cols {
		if len(s) < 3 && !(len(s) > 0 && len(groups[j].cols) > 1) {
			continue
		}
		g, p := &groups[j], &groups[s[0]]
		if inOrder && p.cols[0] != int32(j)+1 {
			continue
		}
		w, r := len(g.cols)+len(p.cols), len(cols[s[0]])
		stored, nnz := w*(w+1)/2+w*r, g.nnz+p.nnz
		if worthJoining(w, stored, nnz) {
			p.cols, p.nnz = append(g.cols, p.cols...), nnz
			g.cols = nil
		}
	}
	joined := groups[:0]
	for _, g := range groups {
		if g.cols != nil {
			joined = append(joined, g)
		}
	}
	return joined
}

// worthJoining says whether a panel of w columns may store so many zeros: they are the price of longer loops, and narrow panels need those most.
func worthJoining(w, stored, nnz int) bool {
	zeros := stored - nnz
	switch {
	case w <= 4:
		return zeros*3 <= stored
	case w <= 16:
		return zeros*5 <= stored
	default:
		return zeros*10 <= stored
	}
}
