package study

import (
	"context"
	"math"

	"headfall/network"
)

// forecast judges the plan from the last readings on, with the outlets as they were found to be.
func (t *tracking) forecast(ctx context.Context) error {
	jumps, err := t.settle(ctx, append(t.firsts(), t.lasts()...), t.scales)
	if err != nil {
		return err
	}
	now := t.fromNow(t.corrected(jumps, t.scales))
	opt := t.opt.Options
	opt.Progress = func(share float64) { t.opt.Progress(0.4 + 0.6*share) }
	res, err := Judge(ctx, now, opt)
	if err != nil {
		return err
	}
	f := &t.res.Forecast
	t.res.Result = res
	f.Verdict, f.Why, f.Tightest = res.Verdict, whyNotRun(res), marginOf(res.Tightest())
	if l := firstFailure(res); l != nil {
		f.FailsAt = l.FirstFail
	}
	for _, l := range res.Limits {
		f.Limits = append(f.Limits, *l)
	}
	for _, v := range t.plant.Vessels {
		f.Emptied[v.Tag] = res.Vessels[v.Tag].EmptiedAt
	}
	must := mustEmpty(t.plant)
	if at, ok := finishOf(t.plan, must); ok && len(must) > 0 {
		f.Planned = &at
	}
	if at, ok := finishOf(res, must); ok && len(must) > 0 {
		f.Finish = &at
		f.Low, f.High = finishBand(res, must)
	}
	for i, done := range stepsDone(t.plant, t.plan) {
		if done != nil && *done <= t.now {
			t.res.Done = append(t.res.Done, t.plant.Steps[i].ID)
		}
	}
	t.res.ExitCode = 0
	if res.Verdict != network.Run {
		t.res.ExitCode = 1
	}
	return nil
}

// fromNow makes limits about an instant count from the last reading on: what went before was read, not forecast. Volumes of a day, times to be
// empty and starts in an hour go on counting from the beginning.
func (t *tracking) fromNow(load Load) Load {
	return func() (*network.Plant, error) {
		p, err := load()
		if err != nil {
			return nil, err
		}
		for i, l := range p.Limits {
			if l.Must.Subject == network.Emptied || l.EachDay || l.EachHour || l.InAny > 0 || l.Permitted || l.Since.After != "" || l.Since.When != nil {
				continue
			}
			own := *l
			at := math.Max(own.Since.At.S, t.now+2*jumpTime)
			if own.AveragedOver > 0 {
				at = math.Max(own.Since.At.S, t.now-own.AveragedOver)
			}
			own.Since = network.Edge{At: network.Moment{S: at, Text: momentText(p, at, true), Clock: !p.Start.IsZero(), Given: true}, Given: true}
			p.Limits[i] = &own
		}
		return p, nil
	}
}
