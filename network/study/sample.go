package study

import (
	"context"
	"math"

	"headfall/network"
)

// sample is what is kept of one sample of the doubts. NaN stands for what never came. Order is that of the plant's lists and of the result's limits.
type sample struct {
	failed   string // why it could not be calculated; "" when it was
	emptied  []float64
	peak     []float64
	expect   []float64 // of every step
	margin   []float64 // of every limit: the worse of the runs with holds at zero wait and at up_to
	fails    []bool
	whole    bool // every limit holds and every step is reached
	stalls   bool // some step is never reached
	reported []float64
	levels   *network.Grid // nil where they are not wanted
}

// SampleTolerance is the relative accuracy of samples where none is asked for: a tenth of a millimetre in a metre, far within any doubt, at half the
// work of the usual one.
const SampleTolerance = 1e-4

// sampled are the options of a model that samples are run on.
func sampled(opt network.Options) network.Options {
	if opt.Tolerance == 0 {
		opt.Tolerance = SampleTolerance
	}
	return opt
}

// takeSample runs the plan with one draw of the numbers, with holds at zero wait and, where there are some, at up_to. The levels at the moments of at, if
// any, are of the former.
func takeSample(ctx context.Context, b *Bench, d *Draws, i int, holds bool, at []float64) (sample, error) {
	b.Put(d.Numbers, d.Values(i))
	var levels *network.Grid
	if len(at) > 0 {
		levels = network.NewGrid(at, len(b.Plant.Vessels))
	}
	r, err := b.Brief(ctx, network.RunOptions{Grid: levels})
	if ctx.Err() != nil {
		return sample{}, context.Cause(ctx)
	}
	if err != nil {
		return sample{failed: err.Error()}, nil
	}
	s := sampleOf(r)
	s.levels = levels
	if !holds {
		return s, nil
	}
	r, err = b.Brief(ctx, network.RunOptions{Changes: network.Changes{HoldsUpTo: true}})
	if ctx.Err() != nil {
		return sample{}, context.Cause(ctx)
	}
	if err != nil {
		return sample{failed: err.Error()}, nil
	}
	s.worse(r)
	return s, nil
}

// sampleOf keeps the numbers of a run, all in one block.
func sampleOf(r *network.Brief) sample {
	block := make([]float64, 2*len(r.Vessels)+len(r.Steps)+len(r.Limits)+len(r.Milestones))
	cut := func(n int) []float64 {
		piece := block[:n:n]
		block = block[n:]
		return piece
	}
	s := sample{whole: r.Holds(), stalls: len(r.Unreached) > 0, emptied: cut(len(r.Vessels)), peak: cut(len(r.Vessels)), expect: cut(len(r.Steps)),
		margin: cut(len(r.Limits)), reported: cut(len(r.Milestones)), fails: make([]bool, len(r.Limits))}
	for i, v := range r.Vessels {
		s.emptied[i], s.peak[i] = v.Emptied, v.Peak
	}
	for i, st := range r.Steps {
		s.expect[i] = st.Read
	}
	for i, l := range r.Limits {
		s.margin[i], s.fails[i] = l.Margin, l.Verdict == network.Fails
	}
	copy(s.reported, r.Milestones)
	return s
}

// worse takes over what is worse in another run with the same numbers.
func (s *sample) worse(o *network.Brief) {
	for i, l := range o.Limits {
		if !(s.margin[i] <= l.Margin) && !math.IsNaN(l.Margin) {
			s.margin[i] = l.Margin
		}
		s.fails[i] = s.fails[i] || l.Verdict == network.Fails
	}
	s.whole = s.whole && o.Holds()
	s.stalls = s.stalls || len(o.Unreached) > 0
}
