package study

import (
	"context"
	"errors"

	"headfall/network"
)

// SpreadOptions are of many samples of the doubts.
type SpreadOptions struct {
	Common
	Samples int // 0 takes 1000
	Seed    int64
}

// SpreadSamples are taken where it is not said how many.
const SpreadSamples = 1000

// ErrNoDoubts tells that nothing in the file is doubtful.
var ErrNoDoubts = errors.New("nothing in this file carries a doubt, so there is nothing to spread")

// Doubt is what is drawn: a number, or all numbers of a key together.
type Doubt struct {
	Name string `json:"what"`
	Says string `json:"doubt"`
}

// SpreadHead is what all parts of a spread share.
type SpreadHead struct {
	Head
	Verdict    network.Verdict        `json:"verdict"` // of the plan itself, without allowance for doubts
	Limits     []*network.LimitResult `json:"limits"`  // as the plan itself has them
	Vessels    []string               `json:"vessels"`
	Milestones []string               `json:"milestones"`
	Doubts     []Doubt                `json:"doubts"`
}

// SpreadPart is what one shard of a spread gives back.
type SpreadPart = Part[SpreadHead, SpreadUnit]

// Spread samples the doubts of a plan. With an error the part holds the samples that were done.
func Spread(ctx context.Context, load Load, opt SpreadOptions) (*SpreadPart, error) {
	if opt.Samples == 0 {
		opt.Samples = SpreadSamples
	}
	if opt.Seed == 0 {
		opt.Seed = DefaultSeed
	}
	r := opt.runner(load)
	b, err := r.Bench(ctx)
	if err != nil {
		return nil, err
	}
	draws := NewDraws(b.Plant, opt.Samples, opt.Seed)
	if len(draws.Numbers) == 0 {
		return nil, ErrNoDoubts
	}
	plan, _, err := planItself(ctx, b)
	if err != nil {
		return nil, err
	}
	asked := opt.asked()
	asked.Samples, asked.Seed = opt.Samples, opt.Seed
	part := &SpreadPart{Shard: opt.Shard, Count: opt.Samples}
	part.Head = spreadHead(b.Plant, plan, draws, headOf("spread", b.Plant, plan, asked))
	holds := lasts(b.Plant)
	many := &Runner{Load: load, Model: sampled(r.Model), Workers: r.Workers, Progress: opt.Progress}
	return part, carry(ctx, many, part, func(ctx context.Context, b *Bench, i int) (SpreadUnit, error) {
		s, err := takeSample(ctx, b, draws, i, holds, nil)
		return spreadUnit(s, draws, i), err
	})
}

func spreadHead(p *network.Plant, plan *network.Result, d *Draws, h Head) SpreadHead {
	s := SpreadHead{Head: h, Verdict: plan.Verdict, Limits: plan.Limits, Vessels: []string{}, Milestones: []string{}, Doubts: []Doubt{}}
	for _, v := range p.Vessels {
		s.Vessels = append(s.Vessels, v.Tag)
	}
	for _, m := range p.Milestones {
		s.Milestones = append(s.Milestones, m.Name)
	}
	for k, name := range d.Names {
		says := ""
		for i, of := range d.Of {
			if of == k {
				says = SaysDoubt(p.Numbers[d.Numbers[i]])
				break
			}
		}
		s.Doubts = append(s.Doubts, Doubt{name, says})
	}
	return s
}

// SpreadUnit is one sample, as it is written into a part. null is what never came.
type SpreadUnit struct {
	Failed     string `json:"failed,omitempty"` // why it could not be calculated
	Drawn      gaps   `json:"drawn,omitempty"`  // of every doubt, its place in its own distribution, 0 to 1
	Emptied    gaps   `json:"emptied_at_s,omitempty"`
	Peak       gaps   `json:"peak_level_m,omitempty"`
	Milestones gaps   `json:"milestones_at_s,omitempty"`
	Margin     gaps   `json:"margin_si,omitempty"`
	Fails      []bool `json:"fails,omitempty"`
	Whole      bool   `json:"every_limit_holds"`
	Stalls     bool   `json:"some_step_never_reached"`
}

// whole tells that a sample has everything that its head speaks of.
func (u *SpreadUnit) whole(h *SpreadHead) bool {
	return u.Failed != "" || len(u.Drawn) == len(h.Doubts) && len(u.Emptied) == len(h.Vessels) && len(u.Peak) == len(h.Vessels) &&
		len(u.Milestones) == len(h.Milestones) && len(u.Margin) == len(h.Limits) && len(u.Fails) == len(h.Limits)
}

func spreadUnit(s sample, d *Draws, i int) SpreadUnit {
	u := SpreadUnit{Failed: s.failed, Emptied: s.emptied, Peak: s.peak, Milestones: s.reported, Margin: s.margin, Fails: s.fails, Whole: s.whole, Stalls: s.stalls}
	for k := range d.Names {
		u.Drawn = append(u.Drawn, d.Unit(i, k))
	}
	return u
}
