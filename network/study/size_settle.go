package study

import (
	"context"
	"math"

	"headfall/elements/quantity"
	"headfall/network"
)

const mostSteps = 60 // rounded values that are judged at most

// settle takes the stretch that is looked for, rounds into it, and judges the rounded values with the doubts, the furthest first, until one runs.
func (s *sizing) settle(ctx context.Context) error {
	order := make([]stretch, len(s.edges))
	for i, e := range s.edges {
		order[i] = e
		if !s.opt.Smallest {
			order[len(order)-1-i] = e
		}
	}
	for i, e := range order {
		if i == 0 {
			s.note(e)
		}
		found, err := s.within(ctx, e)
		if err != nil || found {
			return err
		}
	}
	if len(order) == 0 {
		s.res.Next = s.leastBad()
	}
	return nil
}

// note keeps the edge that was looked for.
func (s *sizing) note(e stretch) {
	edge, why := e.high, e.highWhy
	if s.opt.Smallest {
		edge, why = e.low, e.lowWhy
	}
	s.res.Edge, s.res.EdgeAs, s.res.Beyond = &edge, shownTo(s.plant, s.number, edge, s.opt.Smallest), why
}

// leastBad says why the best of the values that were tried does not hold.
func (s *sizing) leastBad() string {
	why, best := "", math.Inf(-1)
	for _, t := range s.res.Scan {
		if t.Share > best || why == "" {
			why, best = t.Why, t.Share
		}
	}
	return why
}

// within judges rounded values of a stretch from the side that is looked for: one, then ever longer jumps, then back to the furthest that runs.
func (s *sizing) within(ctx context.Context, e stretch) (bool, error) {
	values := s.rounded(e)
	fails := -1
	for jump, i := 1, 0; i < len(values); i, jump = i+jump, 2*jump {
		ok, err := s.judge(ctx, values[i], i, len(values))
		if err != nil {
			return false, err
		}
		if !ok {
			fails = i
			continue
		}
		good := i
		for good-fails > 1 {
			m := (good + fails) / 2
			ok, err := s.judge(ctx, values[m], m, len(values))
			if err != nil {
				return true, err
			}
			if ok {
				good = m
			} else {
				fails = m
			}
		}
		return true, nil
	}
	return false, nil
}

// rounded lists the steps within a stretch, the one looked for first. The end of the search itself counts where it is reached.
func (s *sizing) rounded(e stretch) (values []float64) {
	edge, other := e.high, e.low
	if s.opt.Smallest {
		edge, other = e.low, e.high
	}
	step := stepOf(s.number, edge, s.opt.From, s.opt.To)
	s.res.step = step
	round, sign := math.Floor, -1.0
	if s.opt.Smallest {
		round, sign = math.Ceil, 1.0
	}
	offset := s.offset()
	n := round((edge-offset)/step - sign*1e-9)
	for k := range mostSteps {
		v := math.Round(((n+sign*float64(k))*step+offset)*1e12) / 1e12
		if sign*(v-other) > 1e-9*step {
			break
		}
		values = append(values, v)
	}
	return values
}

// offset makes clock times whole minutes of the clock, not of the time since the start.
func (s *sizing) offset() float64 {
	if s.number.Dim != quantity.Time || s.plant.Start.IsZero() {
		return 0
	}
	return -float64(s.plant.Start.Second())
}

// judge runs the plan at a rounded value with the doubts and keeps it when it runs, or why it does not.
func (s *sizing) judge(ctx context.Context, v float64, i, of int) (bool, error) {
	opt := s.opt.Options
	opt.Progress = func(share float64) { s.opt.Progress(0.5 + 0.5*(float64(i)+share)/float64(of)) }
	res, err := Judge(ctx, with(s.load, []string{s.number.Name}, []float64{v}), opt)
	s.res.Work.Judged++
	if err != nil && ctx.Err() != nil {
		return false, err
	}
	if err != nil {
		s.res.Next, s.res.NextAs = "it cannot be calculated with all doubts", shown(s.plant, s.number, v)
		return false, nil
	}
	why := whyNotRun(res)
	if l := broken(res); l != nil && l.Verdict == network.TooClose {
		why = l.Says + " is too close to call with the doubts allowed for"
	}
	if l := unmet(s.opt.Needs, res.Limits); l != nil && why == "" {
		why = l.Says + " holds with less than the margin wanted"
	}
	if why != "" || res.Verdict != network.Run {
		s.res.Next, s.res.NextAs = why, shown(s.plant, s.number, v)
		return false, nil
	}
	s.res.Found, s.res.ExitCode = true, 0
	s.res.Value, s.res.As, s.res.Verdict, s.res.Result = &v, shown(s.plant, s.number, v), res.Verdict, res
	s.res.Tightest = marginOf(res.Tightest())
	return true, nil
}

func marginOf(l *network.LimitResult) *Margin {
	if l == nil {
		return nil
	}
	return &Margin{Limit: l.Says, SI: l.Margin, Low: l.MarginLow, Unit: l.UnitSI, Of: l}
}

func unitSI(n *network.Number) string {
	if n.Dim.Bare() {
		return "1"
	}
	return quantity.SIUnit(n.Dim)
}

// model hands the method and the accuracy on.
func (o *Options) model() network.Options {
	return network.Options{Method: o.Method, Tolerance: o.Tolerance, MaxSteps: o.MaxSteps}
}
