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
	r, err := b.Run(ctx, network.RunOptions{Grid: levels, Brief: true})
	if ctx.Err() != nil {
		return sample{}, context.Cause(ctx)
	}
	if err != nil {
		return sample{failed: err.Error()}, nil
	}
	s := sampleOf(b.Plant, r)
	s.levels = levels
	if !holds {
		return s, nil
	}
	r, err = b.Run(ctx, network.RunOptions{Changes: network.Changes{HoldsUpTo: true}, Brief: true})
	if ctx.Err() != nil {
		return sample{}, context.Cause(ctx)
	}
	if err != nil {
		return sample{failed: err.Error()}, nil
	}
	s.worse(sampleOf(b.Plant, r))
	return s, nil
}

func sampleOf(p *network.Plant, r *network.Result) sample {
	s := sample{whole: fine(r), stalls: len(r.Unreached()) > 0}
	for _, v := range p.Vessels {
		x := r.Vessels[v.Tag]
		s.emptied, s.peak = append(s.emptied, orNaN(x.EmptiedAt)), append(s.peak, x.PeakLevel)
	}
	for _, st := range r.Steps {
		e := math.NaN()
		if st.Expect != nil {
			e = st.Expect.Mid
		}
		s.expect = append(s.expect, e)
	}
	for _, l := range r.Limits {
		s.margin, s.fails = append(s.margin, orNaN(l.Margin)), append(s.fails, l.Verdict == network.Fails)
	}
	for _, m := range r.Milestones {
		s.reported = append(s.reported, orNaN(m.At))
	}
	return s
}

// worse takes over what is worse in another run with the same numbers.
func (s *sample) worse(o sample) {
	for i := range s.margin {
		if !(s.margin[i] <= o.margin[i]) && !math.IsNaN(o.margin[i]) {
			s.margin[i] = o.margin[i]
		}
		s.fails[i] = s.fails[i] || o.fails[i]
	}
	s.whole = s.whole && o.whole
	s.stalls = s.stalls || o.stalls
}

func orNaN(v *float64) float64 {
	if v == nil {
		return math.NaN()
	}
	return *v
}
