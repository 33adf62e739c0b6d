package study

import (
	"context"
	"fmt"
	"math"
	"slices"
	"strings"

	"headfall/network"
)

// trial is one plan that was tried without doubts. What is kept does not depend on the back-offs.
type trial struct {
	k      []int
	known  bool // it could be calculated
	finish float64
	left   float64 // of the vessels to be emptied, the share that is left
	missed []string
	limits []network.LimitBrief

	bad   float64 // by how much limits and back-offs are missed; 0: the plan will do
	room  float64 // the smallest margin over its back-off, as a share
	fails []failing
}

// failing is a limit that a trial misses, and by how much.
type failing struct {
	says string
	by   float64
}

func keyOf(k []int) string { return strings.Trim(fmt.Sprint(k), "[]") }

// try runs plans that were not tried before and returns all, weighed with the present back-offs.
func (p *planning) try(ctx context.Context, points [][]int) ([]*trial, error) {
	var fresh [][]int
	asked := map[string]bool{}
	for _, k := range points {
		if key := keyOf(k); p.seen[key] == nil && !asked[key] {
			asked[key] = true
			fresh = append(fresh, k)
		}
	}
	done, _, err := Each(ctx, p.runner, len(fresh), func(ctx context.Context, b *Bench, i int) (*trial, error) { return p.run(ctx, b, fresh[i]) })
	for _, t := range done {
		if t != nil {
			p.seen[keyOf(t.k)] = t
		}
	}
	p.res.Searched = len(p.seen)
	if err != nil {
		return nil, err
	}
	out := make([]*trial, len(points))
	for i, k := range points {
		out[i] = p.seen[keyOf(k)]
		p.weigh(out[i])
	}
	return out, nil
}

func (p *planning) run(ctx context.Context, b *Bench, k []int) (*trial, error) {
	idx, values := make([]int, len(k)), make([]float64, len(k))
	for i := range k {
		idx[i], values[i] = p.vars[i].at, p.vars[i].value(k[i])
	}
	b.Put(idx, values)
	t := &trial{k: append([]int(nil), k...), finish: 2 * p.plant.RunFor}
	changes := []network.Changes{{}}
	if lasts(b.Plant) {
		changes = append(changes, network.Changes{HoldsUpTo: true})
	}
	for i, ch := range changes {
		r, err := b.Brief(ctx, network.RunOptions{Changes: ch})
		switch {
		case ctx.Err() != nil:
			return nil, context.Cause(ctx)
		case err != nil && calculable(err):
			return &trial{k: t.k, finish: t.finish}, nil
		case err != nil:
			return nil, err
		case i == 0:
			t.take(p, r)
		default:
			t.worse(r)
		}
	}
	t.known = true
	return t, nil
}

// take keeps what counts of a run with holds at zero wait.
func (t *trial) take(p *planning, r *network.Brief) {
	t.limits, t.missed = slices.Clone(r.Limits), slices.Clone(r.Unreached)
	end := 0.0
	for _, i := range p.empties {
		v := &r.Vessels[i]
		if math.IsNaN(v.Emptied) {
			t.left += v.End / math.Max(p.plant.Vessels[i].StartVolume(), 1e-9)
		}
		end = math.Max(end, v.Emptied) // NaN when one is not emptied
	}
	if !math.IsNaN(end) {
		t.finish = end
	}
}

// worse takes over what is worse with holds at their up_to.
func (t *trial) worse(r *network.Brief) {
	for i, l := range r.Limits {
		if l.WorseThan(t.limits[i]) {
			t.limits[i] = l
		}
	}
	for _, id := range r.Unreached {
		if !slices.Contains(t.missed, id) {
			t.missed = append(t.missed, id)
		}
	}
}

// weigh works out by how much a trial misses the limits with the back-offs of now.
func (p *planning) weigh(t *trial) {
	t.bad, t.room, t.fails = 0, math.Inf(1), nil
	miss := func(by float64, says string) {
		t.bad += by
		t.fails = append(t.fails, failing{says, by})
	}
	if !t.known {
		miss(100, "the plan can be calculated")
		return
	}
	for i := range t.limits {
		l, m, fails := p.limits[i], t.limits[i].Margin, t.limits[i].Verdict == network.Fails
		scale := 1.0
		if l.BoundSI != nil && *l.BoundSI != 0 {
			scale = math.Abs(*l.BoundSI)
		}
		switch need := p.backoff[i]; {
		case math.IsNaN(m) && fails:
			miss(1, l.Says)
		case math.IsNaN(m):
		case m < need || fails:
			miss(math.Max(1e-6, (need-m)/scale), l.Says)
		default:
			t.room = math.Min(t.room, (m-need)/scale)
		}
	}
	for _, id := range t.missed {
		miss(1, "step "+id+" is reached")
	}
	if t.left > 0 {
		miss(1+t.left, strings.Join(p.must, ", ")+" emptied")
	}
}

// better tells whether a is to be preferred to b: first what will do, then what ends sooner, then what leaves more room.
//
// Source: K. Deb, Comput. Methods Appl. Mech. Engrg. 186 (2000), 311–338, for feasibility before the objective.
func better(a, b *trial) bool {
	const alike = 0.5 // s
	switch {
	case b == nil:
		return true
	case a.bad > 0 || b.bad > 0:
		return a.bad < b.bad*(1-1e-9)
	case math.Abs(a.finish-b.finish) > alike:
		return a.finish < b.finish
	}
	return a.room > b.room*(1+1e-9)
}
