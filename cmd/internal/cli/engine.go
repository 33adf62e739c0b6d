package cli

import (
	"context"
	"errors"
	"slices"

	"headfall/network"
	"headfall/network/study"
	"headfall/scenarios"
)

// engine is what the commands call; tests put something quick in its place.
type engine struct {
	// load reads a plant; err holds every fault of the file.
	load func(src *source, o *options) (*network.Plant, error)
	// judge answers whether the sequence can run as written. With an error the result holds what was computed so far, or is nil.
	judge func(ctx context.Context, load func() (*network.Plant, error), o *options, progress func(float64)) (*network.Result, error)
}

func standard() *engine { return &engine{load: load, judge: judge} }

func load(src *source, o *options) (*network.Plant, error) {
	plant, err := scenarios.Load(src.name, src.data, scenarios.Options{Set: o.set, Case: o.caseName})
	if err != nil {
		return nil, &Exit{Code: ExitBad, Err: err}
	}
	faults, warnings := plant.Validate()
	if len(faults) > 0 {
		return nil, &Exit{Code: ExitBad, Err: scenarios.Locate(plant, faults)}
	}
	for _, w := range warnings {
		if !slices.Contains(plant.Warnings, w) {
			plant.Warnings = append(plant.Warnings, w)
		}
	}
	return plant, nil
}

func judge(ctx context.Context, load func() (*network.Plant, error), o *options, progress func(float64)) (*network.Result, error) {
	opt := o.study()
	opt.Progress = progress
	return study.Judge(ctx, load, opt)
}

// study makes the options of a study, without samples of its own.
func (o *options) study() study.Options {
	c := o.calculation()
	return study.Options{Workers: o.workers, Method: c.Method, Tolerance: c.Tolerance, MaxSteps: c.MaxSteps}
}

// calculation hands the method and the accuracy on; the usual method goes unnamed.
func (o *options) calculation() network.Options {
	opt := network.Options{Method: o.method, Tolerance: o.tolerance, MaxSteps: o.maxSteps}
	if opt.Method == methods[0] {
		opt.Method = ""
	}
	return opt
}

// faults tells whether an error is a list of faults of a file, each with its place.
func faults(err error) bool {
	var p *scenarios.Problems
	return errors.As(err, &p)
}
