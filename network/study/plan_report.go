package study

import (
	"context"
	"fmt"
	"time"

	"headfall/network"
)

// report puts the best plan into the result.
func (p *planning) report() {
	r, t := p.res, p.best
	r.Found, r.Verdict, r.Result = true, p.judged.Verdict, p.judged
	finish := t.finish
	r.Finish = &finish
	r.Tightest = marginOf(p.judged.Tightest())
	r.Low, r.High = finishBand(p.judged, p.must)
	r.Steps, r.Set = []PlannedStep{}, []string{}
	for i := range p.vars {
		f := &p.vars[i]
		s := p.step(f.step)
		v, was := f.value(t.k[i]), f.number.Value.SI
		if f.time {
			s.At, s.WasAt, s.Clock = &v, &was, clockOf(p.plant, v)
			r.Set = append(r.Set, fmt.Sprintf("%s=%s", f.number.Name, momentText(p.plant, v, f.step.At.Clock)))
			continue
		}
		s.To, s.WasTo = &v, &was
		text := network.Percent(v)
		if f.step.Action != network.MoveValve {
			text = shown(p.plant, f.number, v)
		}
		r.Set = append(r.Set, fmt.Sprintf("%s=%s", f.number.Name, text))
	}
}

// promising keeps the best plan that was tried, where none was judged yet.
func (p *planning) promising() {
	var best *trial
	for _, key := range sortedKeys(p.seen) {
		if t := p.seen[key]; t.bad == 0 && better(t, best) {
			best = t
		}
	}
	if best == nil {
		return
	}
	for i := range p.vars {
		p.res.Promising = append(p.res.Promising, p.vars[i].says(p.plant, best.k[i]))
	}
}

// step finds or makes the row of a step.
func (p *planning) step(st *network.Step) *PlannedStep {
	for i := range p.res.Steps {
		if p.res.Steps[i].ID == st.ID {
			return &p.res.Steps[i]
		}
	}
	row := PlannedStep{ID: st.ID, Target: st.Target}
	for _, s := range p.judged.Steps {
		if s.ID == st.ID {
			row.Says = s.Says
			if s.Done != nil {
				at := *s.Done
				row.At, row.Clock = &at, s.Clock
			}
		}
	}
	p.res.Steps = append(p.res.Steps, row)
	return &p.res.Steps[len(p.res.Steps)-1]
}

// binds finds what forbids an earlier end: each free number alone is moved by one step either way; moves that would end sooner are named with
// the limit that they break, doubts allowed for.
func (p *planning) binds(ctx context.Context) error {
	var points [][]int
	var which []int
	for i := range p.vars {
		for _, by := range []int{1, -1} {
			k := append([]int(nil), p.best.k...)
			if k[i] += by; k[i] == p.vars[i].clamp(k[i]) {
				points, which = append(points, k), append(which, i)
			}
		}
	}
	p.measure(p.judged, 1)
	got, err := p.try(ctx, points)
	if err != nil {
		return err
	}
	for n, t := range got {
		if t.finish >= p.best.finish-0.5 || t.bad == 0 {
			continue
		}
		worst := t.fails[0]
		for _, f := range t.fails {
			if f.by > worst.by {
				worst = f
			}
		}
		finish := t.finish
		i := which[n]
		p.res.Binds = append(p.res.Binds, Bind{Move: p.vars[i].says(p.plant, t.k[i]), Limit: worst.says, Finish: &finish})
	}
	for i := range p.vars {
		f := &p.vars[i]
		if k := p.best.k[i]; f.time && k == f.low && f.low != f.high || !f.time && k == f.high && f.low != f.high {
			p.res.Binds = append(p.res.Binds, Bind{Move: f.says(p.plant, k), Limit: "the end of what is marked free"})
		}
	}
	return nil
}

// clockOf is the wall clock, t seconds after the start; nil where the plan has no start.
func clockOf(p *network.Plant, t float64) *string {
	if p.Start.IsZero() {
		return nil
	}
	s := p.Start.Add(time.Duration(t * 1e9)).Format("2006-01-02T15:04:05")
	return &s
}
