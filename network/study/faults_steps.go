package study

import (
	"headfall/elements/quantity"
	"headfall/network"
)

// stepFaults: every step late, early, never done, and every move of a valve stopped half-way for good.
func stepFaults(p *network.Plant, plan *network.Result, opt *DrillOptions) (all []*fault) {
	steps := results(plan)
	for _, s := range p.Steps {
		r := steps[s.ID]
		if r == nil || r.Done == nil {
			continue
		}
		at := *r.Done
		all = append(all, &fault{"step_late", s.ID, ordered(r) + ", " + quantity.FormatDuration(opt.Late) + " late", at,
			network.Changes{Shift: one(s.ID, opt.Late)}})
		if by := min(opt.Early, at, room(s)); by > 0 {
			all = append(all, &fault{"step_early", s.ID, ordered(r) + ", " + quantity.FormatDuration(by) + " early", at - by,
				network.Changes{Shift: one(s.ID, -by)}})
		}
		all = append(all, &fault{"step_missed", s.ID, ordered(r) + ", not done", at, network.Changes{Missed: one(s.ID, true)}})
		if s.Action == network.MoveValve {
			all = append(all, &fault{"step_part_way", s.ID, ordered(r) + ", stops half-way and stays", at, network.Changes{PartWay: one(s.ID, 0.5)}})
		}
	}
	return all
}

// room is how much earlier than planned, s, a step can be done: one that waits for a condition or for another step can only be early by its wait.
func room(s *network.Step) float64 {
	if s.When != nil || s.After != "" {
		return s.Wait
	}
	return s.At.S + s.Wait
}

// holdFaults: every hold that lasts its up_to, and one that is not signed.
func holdFaults(plan *network.Result) (all []*fault) {
	for _, h := range plan.Holds {
		if h.At == nil {
			continue
		}
		if h.UpTo > 0 {
			all = append(all, &fault{"hold_lasts", h.ID, h.ID + " lasts " + quantity.FormatDuration(h.UpTo), *h.At,
				network.Changes{Waits: one(h.ID, h.UpTo)}})
		}
		all = append(all, &fault{"hold_not_signed", h.ID, h.ID + " is not signed", *h.At,
			network.Changes{Missed: one(h.ID, true)}})
	}
	return all
}

func results(r *network.Result) map[string]*network.StepResult {
	m := make(map[string]*network.StepResult, len(r.Steps))
	for _, s := range r.Steps {
		m[s.ID] = s
	}
	return m
}
