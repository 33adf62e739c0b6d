package study

import (
	"context"
	"math/rand/v2"
	"sort"

	"gonum.org/v1/gonum/mat"
	"gonum.org/v1/gonum/stat/distmv"
	"gonum.org/v1/gonum/stat/samplemv"
)

const (
	starts    = 3  // plans from which the search goes on
	pairsUpTo = 8  // free numbers up to which two are moved at once
	mostPolls = 60 // of one search
)

// spreadOut tries the plan of the file and plans spread evenly over what is free, and returns the best few to go on from.
func (p *planning) spreadOut(ctx context.Context) ([][]int, error) {
	d := len(p.vars)
	n := min(64+32*d, 400)
	unit := mat.NewDense(n, d, nil)
	samplemv.LatinHypercube{Q: distmv.NewUnitUniform(d, nil), Src: rand.NewPCG(uint64(p.opt.Seed), 7)}.Sample(unit)
	first := make([]int, d)
	for i := range p.vars {
		first[i] = p.vars[i].first
	}
	points := [][]int{first}
	for i := range n {
		k := make([]int, d)
		for j := range k {
			f := &p.vars[j]
			k[j] = f.clamp(f.low + int(unit.At(i, j)*float64(f.high-f.low+1)))
		}
		points = append(points, k)
	}
	p.runner.Progress = func(share float64) { p.opt.Progress(0.05 + 0.05*share) }
	all, err := p.try(ctx, points)
	p.runner.Progress = nil
	if err != nil {
		return nil, err
	}
	sort.SliceStable(all, func(i, j int) bool { return better(all[i], all[j]) })
	var from [][]int
	for _, t := range all[:min(starts, len(all))] {
		from = append(from, t.k)
	}
	return from, nil
}

// search goes on from some plans and returns the best that is reached from any: a pattern search, which needs no slopes and stays on the grid that
// people set by. Around the present plan every number is moved one stride either way, and every two of them at once, all side by side; the best is
// taken; where none is better the stride is shortened, down to one step of the grid.
//
// Source: Hooke and Jeeves, J. ACM 8 (1961); for two numbers at once, Kolda, Lewis and Torczon, SIAM Review 45 (2003), on enough directions.
func (p *planning) search(ctx context.Context, from [][]int) (*trial, error) {
	var best *trial
	for _, k := range from {
		got, err := p.try(ctx, [][]int{k})
		if err != nil {
			return nil, err
		}
		t := got[0]
		stride := 0
		for polls := 0; stride < len(p.vars[0].coarse) && polls < mostPolls; polls++ {
			around, err := p.try(ctx, p.neighbours(t.k, stride))
			if err != nil {
				return nil, err
			}
			next := t
			for _, o := range around {
				if better(o, next) {
					next = o
				}
			}
			if next == t {
				stride++
			}
			t = next
		}
		if better(t, best) {
			best = t
		}
	}
	return best, nil
}

// neighbours are the plans one stride away, in one number or in two.
func (p *planning) neighbours(k []int, stride int) (points [][]int) {
	move := func(i, by, j, also int) {
		q := append([]int(nil), k...)
		q[i] = p.vars[i].clamp(q[i] + by*p.vars[i].coarse[stride])
		if j >= 0 {
			q[j] = p.vars[j].clamp(q[j] + also*p.vars[j].coarse[stride])
		}
		if keyOf(q) != keyOf(k) {
			points = append(points, q)
		}
	}
	for i := range k {
		move(i, 1, -1, 0)
		move(i, -1, -1, 0)
		for j := i + 1; j < len(k) && len(k) <= pairsUpTo; j++ {
			for _, s := range [][2]int{{1, 1}, {1, -1}, {-1, 1}, {-1, -1}} {
				move(i, s[0], j, s[1])
			}
		}
	}
	return points
}
