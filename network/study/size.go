package study

import (
	"context"
	"errors"
	"fmt"
	"math"

	"headfall/network"
)

// SizeOptions say what is looked for.
type SizeOptions struct {
	Options
	Vary     string
	From, To float64 // SI
	Smallest bool
	Needs    []Need
}

const sizeScan = 41 // values that are tried first: holding need not be monotone

// Size finds the largest or smallest value of a number between two ends with which every limit holds. It tries values all along first, since
// holding may come and go, refines the ends of each stretch that holds, rounds to a step that people set, on the side that holds, and judges the
// rounded value with the doubts; where that is too close to call it goes on step by step into the stretch.
func Size(ctx context.Context, load Load, opt SizeOptions) (*SizeResult, error) {
	s, err := newSizing(load, opt)
	if err != nil {
		return nil, err
	}
	for _, part := range []func(context.Context) error{s.scan, s.refine, s.settle} {
		if err := part(ctx); err != nil {
			return s.res, err
		}
	}
	s.res.Complete = true
	if !s.res.Found {
		s.res.ExitCode = 1
	}
	return s.res, nil
}

// sizing is one search under way.
type sizing struct {
	opt    SizeOptions
	load   Load
	runner *Runner
	plant  *network.Plant
	number *network.Number
	at     int
	res    *SizeResult
	edges  []stretch
}

// stretch is a range of values that hold, with the reason why the next one outside does not, "" at the ends of the search.
type stretch struct {
	low, high         float64
	lowWhy, highWhy   string
	lowOpen, highOpen float64 // the nearest value outside that was tried; NaN at the ends
}

func newSizing(load Load, opt SizeOptions) (*sizing, error) {
	opt.defaults()
	if opt.Progress == nil {
		opt.Progress = func(float64) {}
	}
	s := &sizing{opt: opt, load: load, runner: &Runner{Load: load, Model: opt.model(), Workers: opt.Workers}}
	var err error
	if s.plant, err = load(); err != nil {
		return nil, err
	}
	if s.number, err = numberNamed(s.plant, opt.Vary); err != nil {
		return nil, Misuse{err}
	}
	s.at = newScaled(s.plant, s.number).at
	if !(opt.From < opt.To) {
		return nil, Misuse{errors.New("--from must be less than --to")}
	}
	for _, end := range []float64{opt.From, opt.To} {
		if says := allowed(s.number, end); says != "" {
			return nil, Misuse{fmt.Errorf("%s cannot be %s: it must be %s", s.number.Name, shown(s.plant, s.number, end), says)}
		}
	}
	s.res = &SizeResult{Schema: 1, Command: "size", Scenario: scenarioOf(s.plant), Ending: Ending{ExitCode: 3}, Name: s.number.Name, Unit: unitSI(s.number),
		Looking: "largest", Holds: [][2]float64{}, HoldsAs: []string{}, Scan: []Tried{}, Verdict: network.NotJudged}
	if opt.Smallest {
		s.res.Looking = "smallest"
	}
	return s, nil
}

// values are those tried first: even steps, or even ratios where the ends are far apart.
func (s *sizing) values() []float64 {
	a, b := s.opt.From, s.opt.To
	out := make([]float64, sizeScan)
	for i := range out {
		x := float64(i) / (sizeScan - 1)
		if a > 0 && b > 20*a && !opens(s.number) {
			out[i] = a * math.Pow(b/a, x)
		} else {
			out[i] = a + (b-a)*x
		}
	}
	out[0], out[sizeScan-1] = a, b
	return out
}

// scan tries values all along.
func (s *sizing) scan(ctx context.Context) error {
	values := s.values()
	s.runner.Progress = func(share float64) { s.opt.Progress(0.3 * share) }
	tried, done, err := s.try(ctx, values)
	for i, d := range done {
		if d {
			s.res.Scan = append(s.res.Scan, tried[i])
		}
	}
	return err
}

// refused says what makes a plant with the numbers put impossible, as a start level above the rim; "" when nothing does.
func refused(b *Bench) string {
	if err := b.Settle(); err != nil {
		return err.Error()
	}
	if faults, _ := b.Plant.Validate(); len(faults) > 0 {
		return faults[0].Says
	}
	return ""
}

// try runs the plan at values, without doubts.
func (s *sizing) try(ctx context.Context, values []float64) ([]Tried, []bool, error) {
	s.res.Work.Runs += len(values)
	return Each(ctx, s.runner, len(values), func(ctx context.Context, b *Bench, i int) (Tried, error) {
		t := Tried{Value: values[i]}
		if allowed(s.number, values[i]) != "" {
			t.Why = "it may not have that value"
			return t, nil
		}
		b.Put([]int{s.at}, []float64{values[i]})
		if t.Why = refused(b); t.Why != "" {
			return t, nil
		}
		res, err := plainRun(ctx, b)
		if err != nil || res == nil {
			t.Why = "it cannot be calculated"
			return t, err
		}
		t.Why = whyNotRun(res)
		if l := res.Tightest(); l != nil {
			t.Share = l.Share()
		}
		if l := unmet(s.opt.Needs, res.Limits); l != nil && t.Why == "" {
			t.Why = l.Says + " holds with less than the margin wanted"
		}
		t.Holds = t.Why == ""
		return t, nil
	})
}
