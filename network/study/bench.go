package study

import (
	"context"
	"slices"

	"headfall/network"
)

// Bench is one worker's plant with its compiled model. Numbers are put by their place in the plant's list, which is the same for every worker.
type Bench struct {
	Plant *network.Plant
	Model *network.Model

	base   []float64         // the plant's own numbers
	idx    []int             // numbers wanted for the next runs, all others being the plant's own
	values []float64         // their values
	moved  []int             // numbers that are not the plant's own now
	stale  bool              // the last change failed half-way: all is to be done again
	touch  []*network.Number // room
}

func newBench(r *Runner) (*Bench, error) {
	plant, err := r.Load()
	if err != nil {
		return nil, err
	}
	model, err := network.Compile(plant, r.Model)
	if err != nil {
		return nil, err
	}
	b := &Bench{Plant: plant, Model: model, base: make([]float64, len(plant.Numbers))}
	for i, n := range plant.Numbers {
		b.base[i] = *n.At
	}
	return b, nil
}

// Put says which numbers the next runs take instead of the plant's own: number idx[k] is values[k], SI. What was put before no longer holds. The
// slices are kept until the next Put.
func (b *Bench) Put(idx []int, values []float64) { b.idx, b.values = idx, values }

// Run calculates the plant with the numbers put. An error that is a *network.Failure comes with the result up to there.
func (b *Bench) Run(ctx context.Context, opt network.RunOptions) (*network.Result, error) {
	if err := b.Settle(); err != nil {
		return nil, err
	}
	return b.Model.Run(ctx, opt)
}

// Brief is Run for the numbers that are judged alone; they are good until the next run.
func (b *Bench) Brief(ctx context.Context, opt network.RunOptions) (*network.Brief, error) {
	if err := b.Settle(); err != nil {
		return nil, err
	}
	return b.Model.Brief(ctx, opt)
}

// Settle makes plant and model ready for the numbers put; Run and Brief do it by themselves.
func (b *Bench) Settle() error {
	changed := b.write()
	if len(changed) == 0 && !b.stale {
		return nil
	}
	wasStale := b.stale
	b.stale = true
	if wasStale {
		if err := b.Plant.Refresh(); err != nil {
			return err
		}
	} else if err := b.Plant.Touch(changed); err != nil {
		return err
	}
	if err := b.Model.Reload(); err != nil {
		return err
	}
	b.stale = false
	return nil
}

// write puts the numbers into the plant and returns those that changed.
func (b *Bench) write() []*network.Number {
	b.touch = b.touch[:0]
	set := func(i int, v float64) {
		if n := b.Plant.Numbers[i]; *n.At != v {
			*n.At = v
			b.touch = append(b.touch, n)
		}
	}
	if !slices.Equal(b.moved, b.idx) {
		for _, i := range b.moved {
			if !slices.Contains(b.idx, i) {
				set(i, b.base[i])
			}
		}
		b.moved = append(b.moved[:0], b.idx...)
	}
	for k, i := range b.idx {
		set(i, b.values[k])
	}
	return b.touch
}
