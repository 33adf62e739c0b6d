package network

import (
	"context"
	"time"
)

// Options are what a compiled plant keeps for its life.
type Options struct {
	Method    string  // auto (default), rodas4p2, rodas5p, rodas4p, bdf
	Tolerance float64 // relative; 0 takes the default
	MaxSteps  int     // of one run; 0 takes a million
}

// RunOptions are of one run.
type RunOptions struct {
	Changes  Changes
	Series   bool               // keep the series
	Grid     *Grid              // where the levels of a few moments go; nil when they are not wanted
	Progress func(done float64) // called now and then with the share of run_for done; may be nil
	Now      func() time.Time   // for the wall time; nil takes time.Now
}

// The engine's entry points, in the order of use:
//
//	err   := plant.Refresh()                    // elements ready, shapes built; again whenever a Number changed
//	probs := plant.Validate()                   // every problem of the whole plant; fatal ones and warnings
//	model, err := Compile(plant, Options{})     // once
//	res, err   := model.Run(ctx, RunOptions{})  // often; err is a *Failure when the calculation could not finish (res then holds what was computed)
//	b, err     := model.Brief(ctx, RunOptions{}) // as often, for the numbers that are judged alone
//
// Judge (in package study) runs a model at zero wait and at up_to, samples the doubts and gives the verdict.
var _ = context.Background
