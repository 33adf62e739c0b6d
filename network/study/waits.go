package study

import (
	"context"
	"math"

	"headfall/network"
)

// waitTrials is the number of even parts of a hold's up_to that are tried before the last one that works is bisected, so that a gap is not jumped over.
const waitTrials = 8

// finest is the time, s, to which waits and shifts are bisected.
const finest = 1.0

// longestWaits finds, for each hold alone with all others at zero wait, the longest wait up to its up_to with which every limit holds.
func (j *judgement) longestWaits() error {
	for _, h := range j.res.Holds {
		if h.At == nil {
			continue
		}
		ok := func(ctx context.Context, b *Bench, wait float64) (bool, error) {
			r, err := b.Brief(ctx, network.RunOptions{Changes: network.Changes{Waits: map[string]float64{h.ID: wait}}})
			if err != nil && !calculable(err) || ctx.Err() != nil {
				return false, err
			}
			return err == nil && r.Holds(), nil
		}
		longest, found, err := furthest(j.ctx, j.run, h.UpTo, waitTrials, ok)
		if err != nil {
			return err
		}
		if found {
			h.LongestWait = &longest
		}
	}
	return nil
}

// furthest returns the largest x from 0 to most, reached from 0 without a gap, at which ok is true; found is false when it is not at 0. Even parts are
// tried side by side, then the last interval is bisected.
func furthest(ctx context.Context, r *Runner, most float64, trials int, ok func(context.Context, *Bench, float64) (bool, error)) (x float64, found bool, err error) {
	if most <= 0 {
		trials = 0
	}
	at := func(i int) float64 {
		if i == trials {
			return math.Max(most, 0)
		}
		return most * float64(i) / float64(trials)
	}
	held, _, err := Each(ctx, r, trials+1, func(ctx context.Context, b *Bench, i int) (bool, error) { return ok(ctx, b, at(i)) })
	if err != nil || !held[0] {
		return 0, false, err
	}
	n := 0
	for n < trials && held[n+1] {
		n++
	}
	if n == trials {
		return at(n), true, nil
	}
	b, err := r.Bench(ctx)
	if err != nil {
		return 0, false, err
	}
	lo, hi := at(n), at(n+1)
	x, err = bisect(lo, hi, math.Max(finest, 1e-4*most), func(x float64) (bool, error) { return ok(ctx, b, x) })
	return x, err == nil, err
}

// bisect closes in on where ok ends, to a width: it is true at lo and not at hi. It returns the last x at which it was true.
func bisect(lo, hi, width float64, ok func(float64) (bool, error)) (float64, error) {
	for hi-lo > width {
		x := lo + (hi-lo)/2
		holds, err := ok(x)
		if err != nil {
			return 0, err
		}
		if holds {
			lo = x
		} else {
			hi = x
		}
	}
	return lo, nil
}
