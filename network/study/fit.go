package study

import (
	"context"
	"errors"
	"fmt"
	"math"

	"headfall/network"
)

// FitOptions say what is fitted to what.
type FitOptions struct {
	Model    network.Options
	Workers  int
	Vary     []string // names of the numbers that are fitted
	Readings *Readings
	Progress func(share float64) // may be nil
}

// Fit finds the numbers with which the plant's levels run through the readings: robust least squares, so that a few wrong readings do not matter.
// With them come bands, the readings with what was expected of them, and whether the readings can tell the numbers apart.
// An error that is ctx's cause comes with what was found so far, marked as not complete.
func Fit(ctx context.Context, load Load, opt FitOptions) (*FitResult, error) {
	f, err := newFitting(load, opt)
	if err != nil {
		return nil, err
	}
	s, err := leastSquares(ctx, f.residuals, f.start, f.progress)
	if err != nil && (s == nil || s.r == nil) {
		return nil, err
	}
	if s.w == nil {
		s.w = make([]float64, len(s.r))
		for i := range s.w {
			s.w[i] = 1
		}
		s.scatter = scatter(s.r, len(s.x))
	}
	res := f.result(s)
	if err != nil {
		res.Complete, res.Verdict = false, NotFitted
		return res, err
	}
	if err := f.others(ctx, s, res); err != nil {
		res.Complete = false
		return res, err
	}
	res.warn()
	return res, nil
}

// fitter is one fit under way.
type fitter struct {
	opt     FitOptions
	runner  *Runner
	plant   *network.Plant
	numbers []scaled
	start   []float64
	runs    int
}

func newFitting(load Load, opt FitOptions) (*fitter, error) {
	if opt.Progress == nil {
		opt.Progress = func(float64) {}
	}
	if len(opt.Readings.List) == 0 {
		return nil, errors.New("there are no readings")
	}
	last := opt.Readings.Last()
	f := &fitter{opt: opt, runner: &Runner{Load: until(load, last), Model: opt.Model, Workers: opt.Workers}}
	var err error
	if f.plant, err = load(); err != nil {
		return nil, err
	}
	if err := opt.Readings.plainFaults(f.plant); err != nil {
		return nil, Misuse{err}
	}
	if last <= 0 {
		return nil, Misuse{errors.New("all readings are of the start: a test needs some time")}
	}
	for _, name := range opt.Vary {
		n, err := numberNamed(f.plant, name)
		if err != nil {
			return nil, Misuse{err}
		}
		for _, s := range f.numbers {
			if s.n == n {
				return nil, Misuse{fmt.Errorf("%s is to be fitted twice", n.Name)}
			}
		}
		s := newScaled(f.plant, n)
		f.numbers = append(f.numbers, s)
		f.start = append(f.start, s.to(*n.At))
	}
	if n, k := len(opt.Readings.List), len(f.numbers); k == 0 || n <= k {
		return nil, Misuse{fmt.Errorf("%d readings do not settle %d numbers: there must be more readings than numbers", n, k)}
	}
	return f, nil
}

// Misuse is an error of what was asked for, not of the calculation.
type Misuse struct{ Err error }

func (m Misuse) Error() string { return m.Err.Error() }

// Unwrap returns what is wrong.
func (m Misuse) Unwrap() error { return m.Err }

func (f *fitter) progress(share float64) { f.opt.Progress(0.9 * share) }

// residuals runs the plant at each point; a residual is the level expected less the level read, m.
func (f *fitter) residuals(ctx context.Context, points [][]float64) ([][]float64, error) {
	f.runs += len(points)
	rows, _, err := Each(ctx, f.runner, len(points), func(ctx context.Context, b *Bench, i int) ([]float64, error) {
		idx, values := make([]int, len(f.numbers)), make([]float64, len(f.numbers))
		for k := range f.numbers {
			idx[k], values[k] = f.numbers[k].at, f.numbers[k].from(points[i][k])
			if allowed(f.numbers[k].n, values[k]) != "" {
				return nil, nil
			}
		}
		return f.row(ctx, b, idx, values)
	})
	return rows, err
}

// row is the residuals with the numbers put, or nil where the plant cannot be calculated.
func (f *fitter) row(ctx context.Context, b *Bench, idx []int, values []float64) ([]float64, error) {
	b.Put(idx, values)
	res, err := b.Run(ctx, network.RunOptions{Series: true})
	if ctx.Err() != nil {
		return nil, context.Cause(ctx)
	}
	var cannot *network.Failure
	if err != nil && !errors.As(err, &cannot) && res != nil {
		return nil, err
	}
	if err != nil {
		return nil, nil
	}
	out := make([]float64, len(f.opt.Readings.List))
	for i, x := range f.opt.Readings.List {
		out[i] = levelAt(res.Series, x.Vessel, x.Time) - x.Level
		if math.IsNaN(out[i]) {
			return nil, nil
		}
	}
	return out, nil
}
