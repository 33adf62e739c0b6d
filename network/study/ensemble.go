package study

import (
	"context"
	"runtime"
	"sync"
	"sync/atomic"

	"headfall/network"
)

// Load reads the plant; it is called once for each worker and gives each its own. It makes the same plant every time.
type Load func() (*network.Plant, error)

// Runner calculates many cases of one plant side by side. Every worker has a plant and a compiled model of its own, kept from one ensemble to the
// next. What comes out does not depend on how many workers there are. A Runner serves one caller at a time.
type Runner struct {
	Load     Load
	Model    network.Options
	Workers  int                 // 0 takes one a processor
	Progress func(share float64) // of the ensemble that runs, 0 to 1; called from one goroutine at a time; may be nil

	benches []*Bench
}

// Each carries out cases 0 to n-1. The case finds its bench with the plant's own numbers and puts what differs; its answer depends on the number of the
// case alone. done tells which cases were carried out: all of them, unless ctx ended (err is then its cause) or a case returned an error (err is
// that of the lowest case; those under way are finished first).
func Each[T any](ctx context.Context, r *Runner, n int, do func(ctx context.Context, b *Bench, i int) (T, error)) (out []T, done []bool, err error) {
	out, done = make([]T, n), make([]bool, n)
	workers := min(r.workers(), n)
	if err := r.prepare(ctx, workers); err != nil {
		return out, done, err
	}
	var next, finished atomic.Int64
	var failed failure
	var told sync.Mutex
	var all sync.WaitGroup
	for _, b := range r.benches[:workers] {
		all.Go(func() {
			for ctx.Err() == nil && !failed.any() {
				i := int(next.Add(1)) - 1
				if i >= n {
					return
				}
				b.Put(nil, nil)
				v, err := do(ctx, b, i)
				if err != nil {
					if ctx.Err() == nil {
						failed.note(i, err)
					}
					return
				}
				out[i], done[i] = v, true
				share := float64(finished.Add(1)) / float64(n)
				if r.Progress != nil {
					told.Lock()
					r.Progress(share)
					told.Unlock()
				}
			}
		})
	}
	all.Wait()
	if err := failed.err; err != nil {
		return out, done, err
	}
	if int(finished.Load()) < n {
		return out, done, context.Cause(ctx)
	}
	return out, done, nil
}

// Bench returns the first worker's bench, for single runs between ensembles.
func (r *Runner) Bench(ctx context.Context) (*Bench, error) {
	if err := r.prepare(ctx, 1); err != nil {
		return nil, err
	}
	b := r.benches[0]
	b.Put(nil, nil)
	return b, nil
}

func (r *Runner) workers() int {
	if r.Workers > 0 {
		return r.Workers
	}
	return runtime.GOMAXPROCS(0)
}

// prepare makes benches up to n, side by side.
func (r *Runner) prepare(ctx context.Context, n int) error {
	have := len(r.benches)
	if have >= n {
		return nil
	}
	if err := context.Cause(ctx); err != nil {
		return err
	}
	more := make([]*Bench, n-have)
	errs := make([]error, n-have)
	var all sync.WaitGroup
	for i := range more {
		all.Go(func() { more[i], errs[i] = newBench(r) })
	}
	all.Wait()
	for i, err := range errs {
		if err != nil {
			return err
		}
		r.benches = append(r.benches, more[i])
	}
	return nil
}

// failure keeps the error of the lowest case.
type failure struct {
	mu  sync.Mutex
	at  int
	err error
}

func (f *failure) note(i int, err error) {
	f.mu.Lock()
	defer f.mu.Unlock()
	if f.err == nil || i < f.at {
		f.at, f.err = i, err
	}
}

func (f *failure) any() bool {
	f.mu.Lock()
	defer f.mu.Unlock()
	return f.err != nil
}
