package study

import (
	"context"

	"headfall/network"
)

// plainRun runs the plan without looking at doubts: with holds at zero wait and, where some may last, at their up_to; the worse of both. A plan that
// cannot be calculated comes back as nil.
func plainRun(ctx context.Context, b *Bench) (*network.Result, error) {
	res, err := b.Run(ctx, network.RunOptions{})
	if ctx.Err() != nil {
		return nil, context.Cause(ctx)
	}
	if err != nil {
		if calculable(err) {
			return nil, nil
		}
		return nil, err
	}
	if !lasts(b.Plant) {
		return res, nil
	}
	other, err := b.Run(ctx, network.RunOptions{Changes: network.Changes{HoldsUpTo: true}})
	switch {
	case ctx.Err() != nil:
		return nil, context.Cause(ctx)
	case err != nil && calculable(err):
		return nil, nil
	case err != nil:
		return nil, err
	}
	res.Worse(other)
	return res, nil
}
