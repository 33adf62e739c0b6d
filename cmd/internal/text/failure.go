package text

import (
	"fmt"
	"sort"

	"headfall/network"
)

const failuresShown = 4 // the rest is counted

// failure is one thing that goes wrong, at a moment if it has one.
type failure struct {
	at   *float64
	says string
}

// failures writes what goes wrong, in the order of the clock: the first one first.
func (p *page) failures() {
	list := p.allFailures()
	for i, f := range list {
		if i == failuresShown {
			p.put("", "and %s", counted(len(list)-i, "more failure", "more failures"))
			return
		}
		label := "Then"
		if i == 0 {
			label = "Fails first"
		}
		when := "by the end"
		if f.at != nil {
			when = p.clock.When(*f.at, Down)
		}
		p.put(label, "%s%s", stamp(when), f.says)
	}
}

func (p *page) allFailures() []failure {
	var list []failure
	for _, l := range p.res.Limits {
		if l.Verdict != network.Fails || !p.res.Complete && l.FirstFail != nil && *l.FirstFail > p.res.End {
			continue // it holds, or nobody knows yet
		}
		says := join([]string{p.broken(l), p.worst(l)}, "; ")
		if l.AtUpTo {
			says += ", when every hold lasts its longest"
		}
		if l.Why != "" && !l.Implicit {
			says += " (" + l.Why + ")"
		}
		list = append(list, failure{l.FirstFail, says})
	}
	for _, s := range p.missed() {
		list = append(list, failure{nil, fmt.Sprintf("step %s is never reached: %s", s.ID, s.Says)})
	}
	for _, h := range p.missedHolds() {
		list = append(list, failure{nil, fmt.Sprintf("hold %s is never reached: %s", h.ID, h.Says)})
	}
	sort.SliceStable(list, func(i, j int) bool {
		a, b := list[i].at, list[j].at
		return a != nil && (b == nil || *a < *b)
	})
	return list
}

// missed returns the steps that were never reached and should have been.
func (p *page) missed() []*network.StepResult {
	var list []*network.StepResult
	for _, s := range p.res.Steps {
		planned := p.steps[s.ID]
		if s.Done == nil && p.res.Complete && (planned == nil || !planned.Optional) {
			list = append(list, s)
		}
	}
	return list
}

// missedHolds returns the holds that were never reached and should have been.
func (p *page) missedHolds() []*network.HoldResult {
	var list []*network.HoldResult
	for _, h := range p.res.Holds {
		planned := p.steps[h.ID]
		if h.At == nil && p.res.Complete && (planned == nil || !planned.Optional) {
			list = append(list, h)
		}
	}
	return list
}

// tooClose writes the limits that hold in the middle but not in enough of the samples.
func (p *page) tooClose() {
	for _, l := range p.res.Limits {
		if l.Verdict != network.TooClose {
			continue
		}
		when := ""
		if l.WorstAt != nil {
			when = stamp(p.clock.When(*l.WorstAt, Near))
		}
		p.put("Too close", "%s%s holds as written but fails in %s %% of the samples", when, p.named(l), figures(l.FailsShare*100, 2, 1, Up))
	}
}
