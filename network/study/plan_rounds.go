package study

import (
	"context"
	"math"

	"headfall/network"
)

// rounds searches and judges in turn.
func (p *planning) rounds(ctx context.Context) error {
	from, err := p.spreadOut(ctx)
	if err != nil {
		return err
	}
	judged := map[string]bool{}
	for round := range planRounds {
		p.round = round
		p.opt.Progress(p.share(0))
		first := shortStride
		if round == 0 {
			first = 0
		}
		t, err := p.search(ctx, from, first)
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

// share is the progress of the whole with a part of the present round done: every round is taken to be half of what is left, since most plans need
// few.
func (p *planning) share(part float64) float64 {
	p.told = math.Max(p.told, 1-0.9*math.Pow(0.5, float64(p.round)+part))
	return p.told
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
		if err != nil && ctx.Err() != nil {
			return err
		}
		if err != nil { // not with the doubts: another plan is looked for
			t.known = false
			return nil
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
