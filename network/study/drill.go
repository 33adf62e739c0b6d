package study

import (
	"context"

	"headfall/network"
)

// DrillOptions are of a rehearsal of what can go wrong.
type DrillOptions struct {
	Common
	Late, Early float64 // s by which steps are late and early
	Pairs       bool    // rehearse every two faults together
}

// How late and how early steps are where it is not said, s.
const (
	DefaultLate  = 1800.0
	DefaultEarly = 900.0
)

// DrillHead is what all parts of a drill share: the plan itself, without a fault.
type DrillHead struct {
	Head
	Plan PlanItself `json:"plan"`
}

// PlanItself is what became of the plan itself: the worse of holds at zero wait and at their up_to, without allowance for doubts.
type PlanItself struct {
	Verdict   network.Verdict `json:"verdict"`
	FirstFail *float64        `json:"first_fail_at_s"`
	Limit     string          `json:"limit"`
	Limits    int             `json:"limits"`
}

// DrillUnit is the answer to one case: a fault, or how far a step may be moved.
type DrillUnit struct {
	Row  *DrillRow  `json:"row,omitempty"`
	Move *MovedStep `json:"move,omitempty"`
}

// DrillPart is what one shard of a drill gives back.
type DrillPart = Part[DrillHead, DrillUnit]

// Drill rehearses what can go wrong with a plan: each fault by itself, and on request every two together. With an error the part holds what was done.
func Drill(ctx context.Context, load Load, opt DrillOptions) (*DrillPart, error) {
	if opt.Late == 0 {
		opt.Late = DefaultLate
	}
	if opt.Early == 0 {
		opt.Early = DefaultEarly
	}
	r := opt.runner(load)
	b, err := r.Bench(ctx)
	if err != nil {
		return nil, err
	}
	plan, nominal, err := planItself(ctx, b)
	if err != nil {
		return nil, err
	}
	d := &driller{plan: nominal, faults: faultsOf(b.Plant, nominal, &opt)}
	d.moves = movesOf(b.Plant, nominal, plan)
	if opt.Pairs {
		d.faults = append(d.faults, pairs(d.faults)...)
	}
	asked := opt.asked()
	asked.Pairs, asked.Late, asked.Early = opt.Pairs, opt.Late, opt.Early
	part := &DrillPart{Shard: opt.Shard, Count: len(d.faults) + len(d.moves)}
	part.Head = DrillHead{Head: headOf("drill", b.Plant, nominal, asked), Plan: sayPlan(plan)}
	r.Progress = opt.Progress
	return part, carry(ctx, r, part, d.unit)
}

// planItself runs the plan with holds at zero wait, and with holds at their up_to; it returns the worse of both, and the first.
func planItself(ctx context.Context, b *Bench) (worse, nominal *network.Result, err error) {
	if nominal, err = b.Run(ctx, network.RunOptions{}); err != nil {
		return nil, nil, err
	}
	if worse, err = b.Run(ctx, network.RunOptions{}); err != nil || !lasts(b.Plant) {
		return worse, nominal, err
	}
	other, err := b.Run(ctx, network.RunOptions{Changes: network.Changes{HoldsUpTo: true}})
	if err != nil {
		return nil, nil, err
	}
	worse.Worse(other)
	return worse, nominal, nil
}

// lasts tells that some hold may last.
func lasts(p *network.Plant) bool {
	for _, s := range p.Steps {
		if s.Action == network.HoldPoint && s.UpTo > 0 {
			return true
		}
	}
	return false
}

func sayPlan(r *network.Result) PlanItself {
	p := PlanItself{Verdict: r.Verdict, Limits: len(r.Limits)}
	if l := firstFailure(r); l != nil {
		p.FirstFail, p.Limit = l.FirstFail, l.Says
	}
	return p
}

// driller carries out the units of a drill: first the faults, then the moves of steps.
type driller struct {
	plan   *network.Result // holds at zero wait
	faults []*fault
	moves  []*move
}

func (d *driller) unit(ctx context.Context, b *Bench, i int) (DrillUnit, error) {
	if i < len(d.faults) {
		row, err := rehearse(ctx, b, d.faults[i], d.plan)
		return DrillUnit{Row: row}, err
	}
	m, err := d.moves[i-len(d.faults)].find(ctx, b)
	return DrillUnit{Move: m}, err
}
