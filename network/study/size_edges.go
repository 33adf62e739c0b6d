package study

import (
	"context"
	"math"
)

// refine finds the stretches of values that hold, and their ends to a hundredth of a step.
func (s *sizing) refine(ctx context.Context) error {
	s.stretches()
	s.runner.Progress = nil
	for i := range s.edges {
		e := &s.edges[i]
		if !math.IsNaN(e.lowOpen) {
			if err := s.edge(ctx, &e.low, e.lowOpen, &e.lowWhy); err != nil {
				return err
			}
		}
		if !math.IsNaN(e.highOpen) {
			if err := s.edge(ctx, &e.high, e.highOpen, &e.highWhy); err != nil {
				return err
			}
		}
		s.res.Holds = append(s.res.Holds, [2]float64{e.low, e.high})
		s.res.HoldsAs = append(s.res.HoldsAs, shownTo(s.plant, s.number, e.low, true)+" to "+shownTo(s.plant, s.number, e.high, false))
		s.opt.Progress(0.3 + 0.2*float64(i+1)/float64(len(s.edges)))
	}
	return nil
}

// stretches joins neighbours that hold.
func (s *sizing) stretches() {
	t := s.res.Scan
	for i := range t {
		if !t[i].Holds {
			continue
		}
		if i == 0 || !t[i-1].Holds {
			e := stretch{low: t[i].Value, lowOpen: math.NaN(), highOpen: math.NaN()}
			if i > 0 {
				e.lowOpen, e.lowWhy = t[i-1].Value, t[i-1].Why
			}
			s.edges = append(s.edges, e)
		}
		e := &s.edges[len(s.edges)-1]
		e.high = t[i].Value
		if i+1 < len(t) && !t[i+1].Holds {
			e.highOpen, e.highWhy = t[i+1].Value, t[i+1].Why
		}
	}
}

// edge closes in on the end of a stretch: `in` holds, `out` does not. Three values between them are tried side by side each time.
func (s *sizing) edge(ctx context.Context, in *float64, out float64, why *string) error {
	const between = 3
	fine := 1e-4 * math.Max(math.Abs(*in), math.Abs(out))
	for range 20 {
		if math.Abs(out-*in) <= fine {
			break
		}
		values := make([]float64, between)
		for k := range values {
			values[k] = *in + (out-*in)*float64(k+1)/(between+1)
		}
		tried, _, err := s.try(ctx, values)
		if err != nil {
			return err
		}
		for _, t := range tried {
			if !t.Holds {
				out, *why = t.Value, t.Why
				break
			}
			*in = t.Value
		}
	}
	return nil
}
