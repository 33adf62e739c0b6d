package text

import (
	"fmt"
	"sort"

	"headfall/network"
)

const failuresShown = 2 // the rest is counted

// failure is one thing that goes wrong, at a moment if it has one; then what else goes wrong of the same thing.
type failure struct {
	at   *float64
	says string
	more []string
	end  string // how bad it gets
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
		says := join(append([]string{f.says}, f.more...), ", then ")
		p.put(label, "%s%s", stamp(when), join([]string{says, f.end}, "; "))
	}
}

func (p *page) allFailures() []failure {
	list := p.brokenLimits()
	for _, s := range p.missed() {
		list = append(list, failure{says: fmt.Sprintf("step %s is never reached: %s", s.ID, s.Says)})
	}
	for _, h := range p.missedHolds() {
		list = append(list, failure{says: fmt.Sprintf("hold %s is never reached: %s", h.ID, h.Says)})
	}
	return list
}

// brokenLimits joins the bounds that one thing breaks one after the other: "PIT level goes over 1.9 m, then its rim, 2.20 m, at 06:55".
func (p *page) brokenLimits() []failure {
	var limits []*network.LimitResult
	for _, l := range p.res.Limits {
		if l.Verdict == network.Fails && (p.res.Complete || l.FirstFail == nil || *l.FirstFail <= p.res.End) { // else it holds, or nobody knows yet
			limits = append(limits, l)
		}
	}
	sort.SliceStable(limits, func(i, j int) bool {
		a, b := limits[i].FirstFail, limits[j].FirstFail
		return a != nil && (b == nil || *a < *b)
	})
	var list []failure
	seen := map[string]int{}
	for _, l := range limits {
		why := ""
		if l.AtUpTo {
			why = " when every hold lasts its longest"
		}
		if l.Why != "" && !l.Implicit {
			why += " (" + l.Why + ")"
		}
		key := p.name(l) + l.Bound + over(l)
		if i, again := seen[key]; again && p.verb(l) != "" && l.FirstFail != nil {
			list[i].more = append(list[i].more, p.bound(l)+", at "+keep(p.clock.At(*l.FirstFail, Down))+why)
			list[i].end = p.worst(l) // of the further bound: it is the same course
			continue
		}
		seen[key] = len(list)
		list = append(list, failure{at: l.FirstFail, says: p.broken(l) + why, end: p.worst(l)})
	}
	return list
}

// wanted tells that a step or hold should have come by the end of the calculation.
func (p *page) wanted(id string) bool {
	planned := p.steps[id]
	return p.res.Complete && (planned == nil || !planned.Optional)
}

// missed returns the steps that were never reached and should have been.
func (p *page) missed() []*network.StepResult {
	var list []*network.StepResult
	for _, s := range p.res.Steps {
		if s.Done == nil && p.wanted(s.ID) {
			list = append(list, s)
		}
	}
	return list
}

// missedHolds returns the holds that were never reached and should have been.
func (p *page) missedHolds() []*network.HoldResult {
	var list []*network.HoldResult
	for _, h := range p.res.Holds {
		if h.At == nil && p.wanted(h.ID) {
			list = append(list, h)
		}
	}
	return list
}

// tooClose writes the limits that hold in the middle but not in enough of the samples.
func (p *page) tooClose() {
	var list []*network.LimitResult
	for _, l := range p.res.Limits {
		if l.Verdict == network.TooClose {
			list = append(list, l)
		}
	}
	sort.SliceStable(list, func(i, j int) bool { return list[i].FailsShare > list[j].FailsShare })
	for i, l := range list {
		if i == failuresShown {
			p.put("", "and %s", counted(len(list)-i, "more", "more"))
			return
		}
		when := ""
		if l.WorstAt != nil {
			when = stamp(p.clock.When(*l.WorstAt, Near))
		}
		p.put("Too close", "%s%s holds as written but fails in %s %% of the samples", when, p.named(l), figures(l.FailsShare*100, 2, 1, Up))
	}
}
