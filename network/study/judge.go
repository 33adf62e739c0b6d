package study

import (
	"context"
	"errors"

	"headfall/network"
)

// Options are of a judgement.
type Options struct {
	Samples   int // of the doubts; 0 takes 200, less than 0 none
	Seed      int64
	Workers   int
	Method    string
	Tolerance float64
	MaxSteps  int // of one run; 0 takes the default
	Progress  func(share float64)
}

// Samples of a judgement where none are asked for, and the share of them that may fail before a limit that holds in the middle is too close to call.
const (
	DefaultSamples = 200
	DefaultSeed    = 1
	FailsAllowed   = 0.05
)

func (o *Options) defaults() {
	if o.Samples == 0 {
		o.Samples = DefaultSamples
	}
	if o.Seed == 0 {
		o.Seed = DefaultSeed
	}
}

// judgement is one answer in the making.
type judgement struct {
	ctx   context.Context
	run   *Runner
	opt   Options
	plant *network.Plant
	res   *network.Result
	holds bool // some hold may last
	say   func(share float64)
}

// Judge answers whether the sequence can run as written: the plan with holds at zero wait, the same with holds at their up_to, how long each hold may
// last, whether answered alarms help, and samples of the doubts. With an error the result holds what was computed so far, or is nil.
func Judge(ctx context.Context, load Load, opt Options) (*network.Result, error) {
	opt.defaults()
	j := &judgement{ctx: ctx, opt: opt, say: opt.Progress}
	if j.say == nil {
		j.say = func(float64) {}
	}
	j.run = &Runner{Load: load, Model: network.Options{Method: opt.Method, Tolerance: opt.Tolerance, MaxSteps: opt.MaxSteps}, Workers: opt.Workers}
	bench, err := j.run.Bench(ctx)
	if err != nil {
		return nil, err
	}
	j.plant = bench.Plant
	alone := opt.Samples < 0 || len(NewDraws(j.plant, 0, 0).Numbers) == 0
	first := 0.1
	if alone {
		first = 0.9
	}
	if j.res, err = bench.Run(ctx, network.RunOptions{Series: true, Progress: j.part(0, first)}); err != nil {
		return j.res, err
	}
	for _, step := range []func() error{j.broken, j.atUpTo, j.longestWaits, j.answers, j.doubts} {
		if err := step(); err != nil {
			return j.res, j.unfinished(err)
		}
	}
	j.say(1)
	return j.res, nil
}

// part hands on the progress of a part of the work.
func (j *judgement) part(from, to float64) func(float64) {
	return func(share float64) { j.say(from + share*(to-from)) }
}

// unfinished marks the result of a judgement that stopped after its first run.
func (j *judgement) unfinished(err error) error {
	j.res.Complete, j.res.Verdict, j.res.ExitCode, j.res.Stopped = false, network.NotJudged, 3, "failed"
	j.res.Trouble = err.Error()
	if j.ctx.Err() != nil {
		j.res.Stopped, j.res.Trouble, j.res.ExitCode = "interrupted", "interrupted before the doubts were weighed", 130
	}
	return err
}

// single runs the plan once with changes.
func (j *judgement) single(ch network.Changes) (*network.Result, error) {
	b, err := j.run.Bench(j.ctx)
	if err != nil {
		return nil, err
	}
	return b.Run(j.ctx, network.RunOptions{Changes: ch})
}

// atUpTo runs the plan with every hold at its up_to; limits and verdict are the worse of both.
func (j *judgement) atUpTo() error {
	if j.holds = lasts(j.plant); !j.holds {
		return nil
	}
	other, err := j.single(network.Changes{HoldsUpTo: true})
	if err != nil {
		return err
	}
	j.res.Worse(other)
	return nil
}

// calculable tells that an error is of one case, so that the others still count.
func calculable(err error) bool {
	var f *network.Failure
	return err == nil || errors.As(err, &f)
}
