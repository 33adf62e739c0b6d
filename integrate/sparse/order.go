package sparse

// Order returns an order in which to eliminate the unknowns of a matrix with the pattern p + pᵀ: order[k] is eliminated k-th.
// It is the approximate minimum degree of Amestoy, Davis and Duff (SIAM J. Matrix Anal. Appl. 17:886, 1996) on a quotient graph, with
// element absorption, indistinguishable unknowns merged, and ties taken first-in first-out: leaves of a tree are then peeled from
// all sides at once, which gives the processor independent work.
func Order(p *Pattern) []int32 {
	g := newQuotient(p)
	for len(g.order) < g.n {
		g.eliminate(g.buckets.popMin())
	}
	return g.order
}

// quotient is the graph that is left after some eliminations. An eliminated unknown lives on as an element: a clique of its members.
type quotient struct {
	n       int
	vars    [][]int32 // unknowns adjacent to an unknown other than through an element
	elems   [][]int32 // elements that an unknown is a member of
	members [][]int32 // live members of an element
	size    []int32   // weight of the members of an element, 0 once absorbed
	weight  []int32   // unknowns that an unknown stands for, 0 once eliminated or merged
	degree  []int32
	merged  []int32 // linked list of unknowns merged into another, -1 at its end
	last    []int32 // last of that list
	mark    []int32
	stamp   int32
	outside []int32 // weight of an element outside the present pivot's members
	seen    []int32 // stamp at which outside was set
	hash    []int32
	buckets *buckets
	order   []int32
}

func newQuotient(p *Pattern) *quotient {
	n := p.N
	g := &quotient{n: n, vars: adjacency(p), elems: make([][]int32, n), members: make([][]int32, n), buckets: newBuckets(n)}
	for _, s := range []*[]int32{&g.size, &g.weight, &g.degree, &g.merged, &g.last, &g.mark, &g.outside, &g.seen, &g.hash} {
		*s = make([]int32, n)
	}
	g.order = make([]int32, 0, n)
	for i := range int32(n) {
		g.weight[i], g.merged[i], g.last[i] = 1, -1, i
		g.degree[i] = int32(len(g.vars[i]))
		g.buckets.push(i, g.degree[i])
	}
	return g
}

// adjacency returns the neighbours of each unknown in p + pᵀ, ascending, without the diagonal.
func adjacency(p *Pattern) [][]int32 {
	n := p.N
	count := make([]int32, n+1)
	for j := range int32(n) {
		for _, i := range p.Row[p.Ptr[j]:p.Ptr[j+1]] {
			if i != j {
				count[i]++
				count[j]++
			}
		}
	}
	flat := make([]int32, 0, 2*len(p.Row))
	adj := make([][]int32, n)
	for i := range adj {
		start := len(flat)
		flat = flat[:start+int(count[i])]
		adj[i] = flat[start:start:len(flat)]
	}
	for j := range int32(n) {
		for _, i := range p.Row[p.Ptr[j]:p.Ptr[j+1]] {
			if i != j {
				adj[i] = append(adj[i], j)
				adj[j] = append(adj[j], i)
			}
		}
	}
	for i := range adj {
		adj[i] = sortedSet(adj[i])
	}
	return adj
}

// eliminate makes p an element and brings the degrees of its members up to date.
func (g *quotient) eliminate(p int32) {
	lp := g.form(p)
	total := int32(0)
	for _, i := range lp {
		total += g.weight[i]
	}
	g.emit(p)
	g.weight[p] = 0
	g.measure(lp)
	kept := lp[:0]
	for _, i := range lp {
		g.buckets.remove(i)
		if d, alone := g.prune(i, p, total); alone {
			total -= g.weight[i]
			g.emit(i)
			g.weight[i] = 0
		} else {
			g.degree[i] = d
			kept = append(kept, i)
		}
	}
	g.mergeTwins(kept)
	live := kept[:0]
	left := int32(g.n - len(g.order))
	for _, i := range kept {
		if g.weight[i] > 0 {
			live = append(live, i)
			g.degree[i] = max(0, min(g.degree[i], left-g.weight[i]))
			g.buckets.push(i, g.degree[i])
		}
	}
	g.members[p], g.size[p] = live, total
}

// form gathers the members of the new element p, absorbs the elements it was in, and leaves the members marked.
func (g *quotient) form(p int32) []int32 {
	g.stamp++
	g.mark[p] = g.stamp
	var lp []int32
	add := func(list []int32) {
		for _, i := range list {
			if g.weight[i] > 0 && g.mark[i] != g.stamp {
				g.mark[i] = g.stamp
				lp = append(lp, i)
			}
		}
	}
	add(g.vars[p])
	for _, e := range g.elems[p] {
		add(g.members[e])
		g.members[e], g.size[e] = nil, 0
	}
	g.vars[p], g.elems[p] = nil, nil
	return lp
}

// measure finds for every element that touches lp its weight outside lp.
func (g *quotient) measure(lp []int32) {
	for _, i := range lp {
		for _, e := range g.elems[i] {
			if g.size[e] == 0 {
				continue
			}
			if g.seen[e] != g.stamp {
				g.seen[e], g.outside[e] = g.stamp, g.size[e]
			}
			g.outside[e] -= g.weight[i]
		}
	}
}

// prune drops from unknown i what the element p now covers and returns its approximate degree, and whether it is adjacent to nothing but p.
func (g *quotient) prune(i, p, total int32) (degree int32, alone bool) {
	h := p
	vars := g.vars[i][:0]
	for _, j := range g.vars[i] {
		if g.weight[j] > 0 && g.mark[j] != g.stamp {
			vars = append(vars, j)
			degree += g.weight[j]
			h += j
		}
	}
	elems := g.elems[i][:0]
	for _, e := range g.elems[i] {
		if g.size[e] == 0 {
			continue
		}
		if g.outside[e] == 0 { // all its members are in p: absorbed
			g.members[e], g.size[e] = nil, 0
			continue
		}
		elems = append(elems, e)
		degree += g.outside[e]
		h += e
	}
	alone = len(vars) == 0 && len(elems) == 0
	g.vars[i], g.elems[i], g.hash[i] = vars, append(elems, p), h
	rest := total - g.weight[i]
	return min(degree, g.degree[i]) + rest, alone
}

// emit appends p and all that was merged into it to the order.
func (g *quotient) emit(p int32) {
	for i := p; i >= 0; i = g.merged[i] {
		g.order = append(g.order, i)
	}
}
