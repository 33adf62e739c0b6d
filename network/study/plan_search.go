package study

import (
	"context"
	"math/rand/v2"
	"sort"

	"gonum.org/v1/gonum/mat"
	"gonum.org/v1/gonum/stat/distmv"
	"gonum.org/v1/gonum/stat/samplemv"

	"headfall/network"
)

const (
	starts    = 3  // plans from which the search goes on
	pairsUpTo = 8  // free numbers up to which two are moved at once
	mostPolls = 60 // of one search
)

// rounds searches and judges in turn.
func (p *planning) rounds(ctx context.Context) error {
	from, err := p.spreadOut(ctx)
	if err != nil {
		return err
	}
	judged := map[string]bool{}
	for round := range planRounds {
		p.opt.Progress(0.1 + 0.9*float64(round)/planRounds)
		t, err := p.search(ctx, from)
		if err != nil {
			return err
		}
		p.last = t
		switch key := keyOf(t.k); {
		case t.bad > 0 && !p.relax():
			return nil
		case t.bad > 0:
		case judged[key] && p.best != nil && keyOf(p.best.k) == key:
			return nil
		case judged[key]: // too close, and still thought the best: ask for more
			for i := range p.backoff {
				p.backoff[i] *= 1.15
			}
		default:
			judged[key] = true
			if err := p.judge(ctx, t); err != nil {
				return err
			}
		}
		from = [][]int{t.k}
		if p.best != nil {
			from = append(from, p.best.k)
		}
	}
	return nil
}

// relax halves the back-offs where no plan meets them: those measured at a bad plan may be too wide. It says whether there were any.
func (p *planning) relax() bool {
	if p.best != nil {
		return false
	}
	any := false
	for i := range p.backoff {
		any = any || p.backoff[i] > 1e-6
		p.backoff[i] /= 2
	}
	return any
}

// judge weighs the doubts of a plan and measures the back-offs anew. A quarter of the samples comes first: it is enough to see that a plan is too
// close, and to measure by.
func (p *planning) judge(ctx context.Context, t *trial) error {
	opt := p.opt
	opt.Progress = nil
	quick := opt
	if quick.Samples >= 4*leastSamples {
		quick.Samples /= 4
	}
	for _, o := range []Options{quick, opt} {
		res, err := Judge(ctx, p.plan(t.k), o)
		if err != nil {
			return err
		}
		p.res.Judged++
		if res.Verdict != network.Run {
			if p.best == nil {
				p.judged = res
			}
			p.measure(res, overshoot)
			return nil
		}
		p.measure(res, 1)
		if o.Samples == opt.Samples && (p.best == nil || t.finish < p.best.finish) {
			p.best, p.judged = t, res
		}
		if quick.Samples == opt.Samples {
			return nil
		}
	}
	return nil
}

// leastSamples is the number of samples that a 5 % point can be read off.
const leastSamples = 40

// plan makes the plant with a trial's times and openings as its own.
func (p *planning) plan(k []int) Load {
	names, values := make([]string, len(k)), make([]float64, len(k))
	for i := range k {
		names[i], values[i] = p.vars[i].number.Name, p.vars[i].value(k[i])
	}
	return with(p.load, names, values)
}

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
