package network

import (
	"math"

	"headfall/integrate/sparse"
)

// manifold is tees that lines join, with all lines that meet them: the balances of its tees depend on each other and on no other tee. As its lines stand it falls into
// lots, which depend on each other no more than weepage does. Tees are counted within the manifold.
type manifold struct {
	tees    []int32 // of the plant
	lines   []int32
	ends    [][2]int32 // of each line: tees; -1 where an end is none
	slots   [][4]int32 // of each line: (from,from), (from,to), (to,from), (to,to); -1 where an end is no tee
	pat     sparse.Pattern
	factor  *sparse.Factor
	values  []float64
	diag    []int32
	lot     []int32 // of each tee, the first tee that open lines join it to; noLot where it is in none
	f, d, x []float64
	through []float64 // flows of the lines of each tee, without their signs, m³/s
	sound   bool      // factor holds the slopes of the present state
}

// noLot is the lot of a tee whose pressure follows from inertia, not from a balance of flows; every that of all lots at once.
const (
	noLot = -1
	every = -2
)

// manifolds returns those of the plant, and of each tee its manifold and its place there.
func (s *system) manifolds() (all []manifold, of [][2]int32) {
	root := make([]int32, len(s.tees))
	for i := range root {
		root[i] = int32(i)
	}
	for i := range s.lines {
		if a, b := &s.lines[i].from, &s.lines[i].to; a.kind == toTee && b.kind == toTee {
			unite(root, int32(a.at), int32(b.at))
		}
	}
	of = make([][2]int32, len(s.tees))
	for i := range root {
		r := find(root, int32(i))
		if int(r) == i {
			of[i][0] = int32(len(all))
			all = append(all, manifold{})
		}
		of[i][0] = of[r][0]
		c := &all[of[i][0]]
		of[i][1] = int32(len(c.tees))
		c.tees = append(c.tees, int32(i))
	}
	for i := range s.lines {
		e, at := [2]int32{-1, -1}, int32(-1)
		for k, m := range [2]*mouth{&s.lines[i].from, &s.lines[i].to} {
			if m.kind == toTee {
				at, e[k] = of[m.at][0], of[m.at][1]
			}
		}
		if at >= 0 {
			all[at].lines, all[at].ends = append(all[at].lines, int32(i)), append(all[at].ends, e)
		}
	}
	for i := range all {
		all[i].layout()
	}
	return all, of
}

// find returns the first tee of those joined to i; unite joins those of a and b.
func find(root []int32, i int32) int32 {
	for root[i] != i {
		root[i] = root[root[i]]
		i = root[i]
	}
	return i
}

func unite(root []int32, a, b int32) {
	a, b = find(root, a), find(root, b)
	root[max(a, b)] = min(a, b)
}

// layout fixes the pattern of the balances.
func (c *manifold) layout() {
	n := len(c.tees)
	b := &patternBuilder{n: n}
	for i := range n {
		b.add(int32(i), int32(i))
	}
	for _, e := range c.ends {
		b.add(e[0], e[1])
		b.add(e[1], e[0])
	}
	c.pat.N = n
	c.pat.Ptr, c.pat.Row = b.columns()
	for _, e := range c.ends {
		c.slots = append(c.slots, [4]int32{c.pat.Find(e[0], e[0]), c.pat.Find(e[0], e[1]), c.pat.Find(e[1], e[0]), c.pat.Find(e[1], e[1])})
	}
	for i := range int32(n) {
		c.diag = append(c.diag, c.pat.Find(i, i))
	}
	c.factor, c.values, c.lot = sparse.Analyse(&c.pat), make([]float64, len(c.pat.Row)), make([]int32, n)
	c.f, c.d, c.x, c.through = make([]float64, n), make([]float64, n), make([]float64, n), make([]float64, n)
}

// divide finds the lots as the lines stand.
func (c *manifold) divide(s *system) {
	for i := range c.lot {
		c.lot[i] = int32(i)
	}
	for k, e := range c.ends {
		if e[0] >= 0 && e[1] >= 0 && !s.lines[c.lines[k]].shut && !s.tees[c.tees[e[0]]].slow && !s.tees[c.tees[e[1]]].slow {
			unite(c.lot, e[0], e[1])
		}
	}
	for i := range c.lot {
		c.lot[i] = find(c.lot, int32(i))
	}
	for i, t := range c.tees {
		if s.tees[t].slow {
			c.lot[i] = noLot
		}
	}
}

// in tells whether tee i of the manifold is balanced with a lot.
func (c *manifold) in(i, lot int32) bool {
	return i >= 0 && (c.lot[i] == lot || lot == every && c.lot[i] != noLot)
}

// settleFloor is added to the slopes of the balances, m³/(s·Pa): nothing against any open path. Where nothing is open the direction is then still
// downhill, and a pressure that means nothing is left alone.
const settleFloor = 1e-15

// balances fills f with what flows into each tee of a lot, m³/s, and the matrix with minus its slopes; other tees stay where they are.
func (c *manifold) balances(s *system, lot int32, matrix bool) {
	clear(c.f)
	clear(c.through)
	if matrix {
		clear(c.values)
	}
	var a, b end
	for k, i := range c.lines {
		e, sl := c.ends[k], &c.slots[k]
		from, to := c.in(e[0], lot), c.in(e[1], lot)
		if !from && !to {
			continue
		}
		l := &s.lines[i]
		s.meet(&l.from, &a)
		s.meet(&l.to, &b)
		l.evaluate(&a, &b, s.gamma)
		if from {
			c.f[e[0]] -= l.q
			c.through[e[0]] += math.Abs(l.q)
		}
		if to {
			c.f[e[1]] += l.q
			c.through[e[1]] += math.Abs(l.q)
		}
		if !matrix {
			continue
		}
		if from {
			c.values[sl[0]] += l.byA
		}
		if to {
			c.values[sl[3]] -= l.byB
		}
		if from && to {
			c.values[sl[1]] += l.byB
			c.values[sl[2]] -= l.byA
		}
	}
	if matrix {
		for i, k := range c.diag {
			c.values[k] += settleFloor
			if !c.in(int32(i), lot) {
				c.values[k] = 1
			}
		}
	}
}

// factorise factorises the slopes of the balances.
func (c *manifold) factorise() bool {
	c.sound = c.factor.Refactor(c.values) == nil
	return c.sound
}
