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
	starts      = 3  // plans from which the search goes on
	pairsUpTo   = 8  // free numbers up to which two are moved at once
	mostPolls   = 60 // of one search
	shortStride = 2  // from this one on strides are short
)

// spreadOut tries the plan of the file and plans spread evenly over what is free, and returns the best few to go on from.
func (p *planning) spreadOut(ctx context.Context) ([][]int, error) {
	d := len(p.vars)
	n := min(48+24*d, 300)
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

// search goes on from some plans and returns the best that is reached: a pattern search, which needs no slopes and stays on the grid that people
// set by. Around the present plan every number is moved one stride either way, all side by side, and where no such plan is better every two
// numbers at once; the best is taken; where none is better the stride is shortened, down to one step of the grid. From the second plan on only
// the long strides are taken; the best of all then goes on with the short ones.
//
// Source: Hooke and Jeeves, J. ACM 8 (1961); for two numbers at once, Kolda, Lewis and Torczon, SIAM Review 45 (2003), on enough directions.
func (p *planning) search(ctx context.Context, from [][]int, first int) (*trial, error) {
	var best *trial
	for _, k := range from {
		got, err := p.try(ctx, [][]int{k})
		if err != nil {
			return nil, err
		}
		t, err := p.descend(ctx, got[0], first, shortStride)
		if err != nil {
			return nil, err
		}
		if better(t, best) {
			best = t
		}
	}
	return p.descend(ctx, best, max(first, shortStride), len(p.vars[0].coarse))
}

// descend polls around a plan with strides from one to before another.
func (p *planning) descend(ctx context.Context, t *trial, stride, last int) (*trial, error) {
	for polls := 0; stride < last && polls < mostPolls; polls++ {
		next := t
		for _, around := range [][][]int{p.singles(t.k, stride), p.pairs(t.k, stride)} {
			got, err := p.try(ctx, around)
			if err != nil {
				return nil, err
			}
			for _, o := range got {
				if better(o, next) {
					next = o
				}
			}
			if next != t {
				break
			}
		}
		if next == t {
			stride++
			p.opt.Progress(p.share(float64(stride) / float64(len(p.vars[0].coarse))))
		}
		t = next
	}
	return t, nil
}

// moved is a plan with some numbers moved, kept within what is free.
func (p *planning) moved(k []int, by map[int]int) []int {
	q := append([]int(nil), k...)
	for i, d := range by {
		q[i] = p.vars[i].clamp(q[i] + d)
	}
	return q
}

// singles are the plans one stride away in one number.
func (p *planning) singles(k []int, stride int) (points [][]int) {
	for i := range k {
		d := p.vars[i].coarse[stride]
		points = append(points, p.moved(k, map[int]int{i: d}), p.moved(k, map[int]int{i: -d}))
	}
	return points
}

// pairs are the plans one stride away in two numbers at once.
func (p *planning) pairs(k []int, stride int) (points [][]int) {
	for i := range k {
		for j := i + 1; j < len(k) && len(k) <= pairsUpTo; j++ {
			a, b := p.vars[i].coarse[stride], p.vars[j].coarse[stride]
			for _, s := range [][2]int{{a, b}, {a, -b}, {-a, b}, {-a, -b}} {
				points = append(points, p.moved(k, map[int]int{i: s[0], j: s[1]}))
			}
		}
	}
	return points
}
