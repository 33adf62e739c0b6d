package study

import (
	"cmp"
	"math"
	"slices"

	"headfall/network"
)

// DrillResult is what a drill gives back: every rehearsal, the one that leaves the least time to act first, and how far each step may be moved.
type DrillResult struct {
	DrillHead
	Outcome
	Done  int          `json:"done"`
	Of    int          `json:"of"`
	Fails int          `json:"fails"` // rehearsals that fail a limit which the plan holds, or earlier
	Cases []*DrillRow  `json:"cases"`
	Steps []*MovedStep `json:"steps"`
}

// DrillOf puts the units of a whole drill together and ranks them.
func DrillOf(p *DrillPart) *DrillResult {
	d := &DrillResult{DrillHead: p.Head, Outcome: outcomeOf(p.complete()), Done: len(p.Units), Of: p.Shard.size(p.Count), Cases: []*DrillRow{}, Steps: []*MovedStep{}}
	for i := range p.Count {
		u, ok := p.Units[i]
		switch {
		case !ok:
		case u.Row != nil:
			d.Cases = append(d.Cases, u.Row)
			if u.Row.Verdict == network.Fails && !u.Row.AsPlanned {
				d.Fails++
			}
		case u.Move != nil:
			d.Steps = append(d.Steps, u.Move)
		}
	}
	d.ExitCode = exitOf(d.Plan.Verdict)
	slices.SortStableFunc(d.Cases, worseRow)
	return d
}

// exitOf is the exit code of a plan's verdict.
func exitOf(v network.Verdict) int {
	if v == network.Run {
		return 0
	}
	return 1
}

// worseRow ranks rehearsals: those that fail more than the plan does before those that could not be calculated, before those that fail as the plan
// does, before those that hold; then the less time to act; then what is spilled; then the less headroom. Else they stay in the order of the plan.
func worseRow(a, b *DrillRow) int {
	return cmp.Or(
		cmp.Compare(grade(a), grade(b)),
		cmp.Compare(orInf(a.TimeToAct), orInf(b.TimeToAct)),
		cmp.Compare(b.Spilled, a.Spilled),
		cmp.Compare(orInf(a.Headroom), orInf(b.Headroom)),
	)
}

func grade(r *DrillRow) int {
	switch {
	case r.Verdict == network.Fails && !r.AsPlanned:
		return 0
	case r.Verdict == network.NotJudged:
		return 1
	case r.Verdict == network.Fails:
		return 2
	}
	return 3
}

func orInf(v *float64) float64 {
	if v == nil {
		return math.Inf(1)
	}
	return *v
}
