package study

import (
	"context"
	"math"

	"headfall/network"
)

// DrillRow is what one fault comes to.
type DrillRow struct {
	Case        string          `json:"case"`
	Kind        string          `json:"kind"`
	Target      string          `json:"target"`
	Verdict     network.Verdict `json:"verdict"`    // holds | fails | not_judged
	AsPlanned   bool            `json:"as_planned"` // it fails no limit that the plan itself holds, and none earlier
	FirstFail   *float64        `json:"first_fail_at_s"`
	Limit       string          `json:"limit"`
	TimeToAct   *float64        `json:"time_to_act_s"` // from since to act_before
	ActBefore   string          `json:"act_before"`    // the first limit that fails after since
	Since       string          `json:"since"`         // what time_to_act_s counts from: an alarm, or the fault
	Need        *float64        `json:"need_s"`
	Answered    string          `json:"answered"` // with every alarm answered, act_before then: holds | fails; "" where none is
	Fails       int             `json:"fails"`    // limits that fail
	NotReached  []string        `json:"not_reached"`
	Spilled     float64         `json:"spilled_m3"`
	WorstVessel string          `json:"worst_headroom_of"`
	Headroom    *float64        `json:"worst_headroom_m"` // to the rim; negative when passed
	Trouble     string          `json:"trouble,omitempty"`

	protects int // place of act_before among the limits; -1
}

// rehearse runs the plan with a fault; where a limit fails and an alarm with a response comes, once more with alarms answered.
func rehearse(ctx context.Context, b *Bench, f *fault, plan *network.Result) (*DrillRow, error) {
	row := &DrillRow{Case: f.says, Kind: f.kind, Target: f.target, NotReached: []string{}, protects: -1}
	r, err := b.Run(ctx, network.RunOptions{Changes: f.ch})
	switch {
	case ctx.Err() != nil:
		return nil, context.Cause(ctx)
	case !calculable(err):
		return nil, err
	case err != nil:
		row.Verdict, row.Trouble = network.NotJudged, err.Error()
		return row, nil
	}
	row.tell(r, plan, f)
	if row.Verdict != network.Fails || !answerable(r) {
		return row, nil
	}
	ch := f.ch
	ch.Respond = true
	answered, err := b.Run(ctx, network.RunOptions{Changes: ch})
	switch {
	case ctx.Err() != nil:
		return nil, context.Cause(ctx)
	case err != nil:
		return row, nil
	}
	row.Answered = "holds"
	if row.protects >= 0 && answered.Limits[row.protects].Verdict == network.Fails {
		row.Answered = "fails"
	}
	row.needs(answered)
	return row, nil
}

// tell fills the row from a run.
func (row *DrillRow) tell(r, plan *network.Result, f *fault) {
	row.Verdict = network.Holds
	row.NotReached = append(row.NotReached, r.Unreached()...)
	for _, l := range r.Limits {
		if l.Verdict == network.Fails {
			row.Fails++
		}
	}
	if row.Fails > 0 || len(r.Unreached()) > 0 {
		row.Verdict = network.Fails
	}
	for _, v := range r.Vessels {
		row.Spilled += v.Spilled
	}
	row.headroom(r)
	l := firstNew(r, plan)
	row.AsPlanned = l == nil && len(r.Unreached()) <= len(plan.Unreached())
	if l == nil {
		l = firstFailure(r)
	}
	if l == nil {
		return
	}
	row.FirstFail, row.Limit = l.FirstFail, l.Says
	row.act(r, plan, f, l)
}

// act works out how long there is to act, from the first alarm that comes before some limit fails, else from the fault; one that stands unseen from the
// start counts from the last step before the failure. An alarm at the very level of a limit warns of what fails next.
func (row *DrillRow) act(r, plan *network.Result, f *fault, first *network.LimitResult) {
	since, until := f.at, first
	row.Since = "the fault"
	if f.latent() {
		since, row.Since = shows(r, since, *first.FirstFail, row.Since)
	}
	if a := warned(r, f.at, *first.FirstFail); a != nil {
		if next := firstAfter(r, plan, *a.At+finest); next != nil {
			since, until = *a.At, next
			row.Since, row.Need = "alarm "+a.Name+" of "+a.Vessel, a.Need
		}
	}
	if t := *until.FirstFail - since; t >= 0 {
		row.TimeToAct, row.ActBefore, row.protects = &t, until.Says, until.ID-1
	} else {
		row.Since = ""
	}
}

// shows returns the last step done before a time: what stood unseen until then shows when something is moved.
func shows(r *network.Result, from, before float64, fault string) (since float64, what string) {
	since, what = from, fault
	for _, s := range r.Steps {
		if s.Done != nil && *s.Done > since && *s.Done < before {
			since, what = *s.Done, "step "+s.ID
		}
	}
	return since, what
}

// headroom finds the vessel with the least room to its rim.
func (row *DrillRow) headroom(r *network.Result) {
	least := math.Inf(1)
	for tag, v := range r.Vessels {
		h := v.HeadroomTo.Rim
		if h != nil && (*h < least || *h == least && tag < row.WorstVessel) {
			least = *h
			row.WorstVessel, row.Headroom = tag, h
		}
	}
}

// needs takes what the answer to the first alarm took.
func (row *DrillRow) needs(answered *network.Result) {
	for _, a := range answered.Alarms {
		if row.Since == "alarm "+a.Name+" of "+a.Vessel && a.Need != nil {
			row.Need = a.Need
		}
	}
}
