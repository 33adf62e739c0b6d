package cli

import (
	"context"
	"errors"
	"sync/atomic"

	"headfall/network"
)

// answer computes the verdict of a plan that was read; its first calculation, which leaves the plant as it is, is made on that. What an interruption, the end of the time allowed or a calculation that could not go on left is given back as
// an incomplete result.
func (a *app) answer(ctx context.Context, src *source, plant *network.Plant) (*network.Result, error) {
	ctx, cancel := a.within(ctx)
	defer cancel()
	bar := a.progress("calculating")
	res, err := a.judge(ctx, first(plant, func() (*network.Plant, error) { return a.load(src, &a.opt) }), &a.opt, bar.done)
	bar.end()
	if err == nil {
		res.ExitCode = exitOf(res.Verdict)
		return res, nil
	}
	if res == nil {
		return nil, a.unfinished(ctx, err)
	}
	res.Complete, res.Verdict, res.ExitCode = false, network.NotJudged, ExitUnfinished
	switch cause := context.Cause(ctx); {
	case errors.Is(cause, errTimeout):
		res.Stopped, res.Trouble = "interrupted", "the time allowed by --timeout was over"
	case ctx.Err() != nil:
		res.Stopped, res.ExitCode = "interrupted", ExitInterrupted
	default:
		res.Stopped, res.Trouble = "failed", err.Error()
	}
	return res, nil
}

// first hands out what there is, and from then on what is made.
func first[T any](there T, made func() (T, error)) func() (T, error) {
	var gone atomic.Bool
	return func() (T, error) {
		if gone.Swap(true) {
			return made()
		}
		return there, nil
	}
}

// exitOf is the exit code of a calculation that was finished.
func exitOf(v network.Verdict) int {
	switch v {
	case network.Run:
		return ExitHolds
	case network.DoNotRun, network.TooClose:
		return ExitFails
	}
	return ExitUnfinished
}

// within bounds the time of a calculation.
func (a *app) within(ctx context.Context) (context.Context, context.CancelFunc) {
	if a.opt.limit == 0 {
		return context.WithCancel(ctx)
	}
	return context.WithTimeoutCause(ctx, a.opt.limit, errTimeout)
}

// unfinished says why there is no answer at all.
func (a *app) unfinished(ctx context.Context, err error) error {
	var e *Exit
	switch {
	case errors.As(err, &e):
		return err
	case errors.Is(context.Cause(ctx), errTimeout):
		return &Exit{Code: ExitUnfinished, Err: errors.New("the time allowed by --timeout was over before anything was known")}
	case ctx.Err() != nil:
		return &Exit{Code: ExitInterrupted, Err: errInterrupted}
	}
	return &Exit{Code: ExitUnfinished, Err: err}
}
