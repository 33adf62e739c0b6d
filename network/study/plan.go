package study

import (
	"context"
	"errors"
	"fmt"
	"slices"

	"headfall/network"
)

const (
	planRounds = 8    // of searching and judging
	overshoot  = 1.05 // back-off over the spread that was measured, where a plan was too close
)

// Plan searches the times and openings that are marked free for the plan that ends first with every limit holding, doubts allowed for. Openings
// are searched in steps of 5 %, times in whole minutes. Searching is done on runs without doubts, each limit being asked to hold with a margin:
// its back-off, which is what the doubts take from it (the middle less the 5 % point) at the plan judged last. The best plan is judged with all
// doubts, back-offs are measured again, and so on until the plan found stays the same.
//
// Source: back-off in place of chance constraints, as in E. Bradford et al., Computers & Chemical Engineering 139 (2020), 106844, and earlier
// work cited there; the search itself is described at search.
func Plan(ctx context.Context, load Load, opt Options) (*FoundPlan, error) {
	p, err := newPlanning(load, opt)
	if err != nil {
		return nil, err
	}
	if err := p.written(ctx); err != nil {
		return p.res, err
	}
	err = p.rounds(ctx)
	if p.best != nil {
		p.report()
	} else if err != nil {
		p.promising()
	}
	if err != nil {
		return p.res, err
	}
	p.res.Complete, p.res.ExitCode = true, 0
	if p.best == nil {
		p.res.ExitCode = 1
		p.giveUp()
		return p.res, nil
	}
	return p.res, p.binds(ctx)
}

// planning is one search under way.
type planning struct {
	opt     Options
	load    Load
	runner  *Runner
	plant   *network.Plant
	vars    []freedom
	must    []string               // vessels to be emptied
	empties []int                  // their places
	limits  []*network.LimitResult // as the plan of the file has them
	backoff []float64
	seen    map[string]*trial
	res     *FoundPlan
	last    *trial          // judged last
	best    *trial          // the best that runs
	judged  *network.Result // its judgement
	round   int
	told    float64 // progress told last
}

func newPlanning(load Load, opt Options) (*planning, error) {
	opt.defaults()
	if opt.Progress == nil {
		opt.Progress = func(float64) {}
	}
	p := &planning{opt: opt, load: load, seen: map[string]*trial{}, runner: &Runner{Load: load, Model: opt.model(), Workers: opt.Workers}}
	var err error
	if p.plant, err = load(); err != nil {
		return nil, err
	}
	if p.vars, err = freedoms(p.plant); err != nil {
		return nil, Misuse{err}
	}
	if len(p.vars) == 0 {
		return nil, Misuse{errors.New(`nothing is free: mark a step with free: {at: ["07:00", "09:00"], to: [10 %, 100 %]}`)}
	}
	if p.must = mustEmpty(p.plant); len(p.must) == 0 {
		return nil, Misuse{errors.New("it is not known what the plan is to empty: state a limit, as {emptied: T-1, within: 4 h}")}
	}
	for _, tag := range p.must {
		p.empties = append(p.empties, slices.IndexFunc(p.plant.Vessels, func(v *network.Vessel) bool { return v.Tag == tag }))
	}
	p.res = &FoundPlan{Schema: 1, Command: "plan", Scenario: scenarioOf(p.plant), Ending: Ending{ExitCode: 3}, Verdict: network.NotJudged, Empties: p.must,
		Steps: []PlannedStep{}, Binds: []Bind{}, Fails: []string{}, Set: []string{}, Promising: []string{}}
	return p, nil
}

// written judges the plan as it stands in the file, which also measures the first back-offs.
func (p *planning) written(ctx context.Context) error {
	opt := p.opt
	opt.Progress = func(share float64) { p.opt.Progress(0.05 * share) }
	res, err := Judge(ctx, p.load, opt)
	if err != nil && (res == nil || ctx.Err() != nil) {
		return err
	}
	p.res.Judged++
	p.res.Written = Written{Verdict: res.Verdict, Why: whyNotRun(res)}
	if err != nil { // the plan of the file need not be one that can be calculated
		p.res.Written = Written{Verdict: network.NotJudged, Why: "it cannot be calculated"}
	}
	if f, ok := finishOf(res, p.must); ok {
		p.res.Written.Finish = &f
	}
	p.limits, p.backoff = res.Limits, make([]float64, len(res.Limits))
	p.measure(res, 1)
	return nil
}

// measure takes the back-offs from a judgement.
func (p *planning) measure(res *network.Result, times float64) {
	for i, l := range res.Limits {
		if l.Margin == nil || l.MarginLow == nil {
			continue
		}
		if d := *l.Margin - *l.MarginLow; d >= 0 {
			p.backoff[i] = d * times
		}
	}
}

// giveUp says what could not be met.
func (p *planning) giveUp() {
	if p.last == nil {
		return
	}
	for _, f := range p.last.fails {
		p.res.Fails = append(p.res.Fails, f.says)
	}
	if len(p.res.Fails) == 0 && p.judged != nil {
		p.res.Fails = append(p.res.Fails, fmt.Sprintf("%s (too close to call)", whyNotRun(p.judged)))
	}
}
