package study

import (
	"context"
	"errors"
	"fmt"
	"math"

	"headfall/network"
)

// TrackOptions say what was read, and which steps were done at another time than planned.
type TrackOptions struct {
	Options
	Readings *Readings
	Done     map[string]float64 // s from the start, by step
	Pending  map[string]bool    // steps that were due and are not done yet
}

// Track sets readings against what the plan expects and forecasts the rest from the last of them. From each vessel's first reading the plan is
// run on to its last: what was lost over what should have been lost is the rate ratio. The coefficient that governs the vessel's main outlet
// (Kv of its valve, else Cd of its orifice) is then changed until the run meets the last reading, and the plan is judged from there on, with
// the levels of the last readings. Two readings are enough.
func Track(ctx context.Context, load Load, opt TrackOptions) (*TrackResult, error) {
	t, err := newTracking(load, opt)
	if err != nil {
		return nil, err
	}
	for _, part := range []func(context.Context) error{t.expect, t.rates, t.fit, t.forecast} {
		if err := part(ctx); err != nil {
			return t.res, err
		}
	}
	t.suspect()
	t.headline()
	t.res.Complete = true
	return t.res, nil
}

// tracking is one answer in the making.
type tracking struct {
	opt    TrackOptions
	load   Load // the plan with the steps as they were done
	plant  *network.Plant
	now    float64
	plan   *network.Result // the plan as written
	scales []scaledOutlet
	res    *TrackResult
}

// jump sets a vessel to a level that was read.
type jump struct {
	vessel string
	at     float64 // s
	level  float64 // m
	volume float64 // m³ to be added, once it is known
}

// scaledOutlet is a coefficient that is changed so that a vessel drains as it was read to.
type scaledOutlet struct {
	number int
	name   string
	factor float64
	doubt  float64 // half-width as a share
}

func newTracking(load Load, opt TrackOptions) (*tracking, error) {
	opt.defaults()
	if opt.Progress == nil {
		opt.Progress = func(float64) {}
	}
	t := &tracking{opt: opt}
	t.load = t.asDone(load)
	var err error
	if t.plant, err = load(); err != nil {
		return nil, err
	}
	if err := t.knowsSteps(); err != nil {
		return nil, Misuse{err}
	}
	if err := opt.Readings.plainFaults(t.plant); err != nil {
		return nil, Misuse{err}
	}
	t.now = opt.Readings.Last()
	if t.now >= t.plant.RunFor {
		return nil, Misuse{fmt.Errorf("the last reading, %s, is after the end of the plan; make run_for longer", momentText(t.plant, t.now, true))}
	}
	if t.plant, err = t.load(); err != nil {
		return nil, err
	}
	t.res = newTrackResult(t)
	return t, nil
}

// knowsSteps sees that the steps named are in the plan.
func (t *tracking) knowsSteps() error {
	ids := map[string]bool{}
	for _, s := range t.plant.Steps {
		ids[s.ID] = true
	}
	for _, id := range append(sortedKeys(t.opt.Done), sortedKeys(t.opt.Pending)...) {
		if !ids[id] {
			return fmt.Errorf("there is no step %q in the plan", id)
		}
		if _, done := t.opt.Done[id]; done && t.opt.Pending[id] {
			return fmt.Errorf("step %s cannot be both done and not done", id)
		}
	}
	return nil
}

// asDone puts steps to the times at which they were done; those not done yet go to just after the last reading at the earliest.
func (t *tracking) asDone(load Load) Load {
	return func() (*network.Plant, error) {
		p, err := load()
		if err != nil {
			return nil, err
		}
		for _, s := range p.Steps {
			at, done := t.opt.Done[s.ID]
			if t.opt.Pending[s.ID] {
				at, done = math.Max(s.At.S, t.opt.Readings.Last()+1), true
			}
			if done {
				s.At = network.Moment{S: at, Text: momentText(p, at, true), Clock: !p.Start.IsZero(), Given: true}
				s.When, s.After, s.Wait = nil, "", 0
			}
		}
		return p, nil
	}
}

// expect runs the plan as it is and lays the readings beside it.
func (t *tracking) expect(ctx context.Context) (err error) {
	if t.plan, err = t.run(ctx, t.load, t.plant.RunFor); err != nil {
		return err
	}
	for _, x := range t.opt.Readings.List {
		level := levelAt(t.plan.Series, x.Vessel, x.Time)
		t.res.Rows = append(t.res.Rows, TrackedReading{x.Time, clockOf(t.plant, x.Time), x.Vessel, x.Level, level, x.Level - level, x.Text})
	}
	t.opt.Progress(0.1)
	return nil
}

// run runs a plant once, with a series fine enough to read levels off.
func (t *tracking) run(ctx context.Context, load Load, until float64) (*network.Result, error) {
	p, err := load()
	if err != nil {
		return nil, err
	}
	p.RunFor = until
	if t.now > 0 {
		p.ReportEvery = math.Min(p.ReportEvery, math.Max(t.now/200, until/20000))
	}
	model, err := network.Compile(p, t.opt.model())
	if err != nil {
		return nil, err
	}
	res, err := model.Run(ctx, network.RunOptions{Series: true})
	if ctx.Err() != nil {
		return nil, context.Cause(ctx)
	}
	return res, err
}

// errNothing tells that a vessel's readings hold nothing to go by.
var errNothing = errors.New("nothing to go by")
