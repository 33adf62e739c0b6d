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
	warning  int // place of the alarm of since among the alarms; -1
}

// rehearse runs the plan with a fault; where a limit fails and an alarm with a response comes, once more with alarms answered.
func rehearse(ctx context.Context, b *Bench, f *fault, plan *network.Result) (*DrillRow, error) {
	row := &DrillRow{Case: f.says, Kind: f.kind, Target: f.target, NotReached: []string{}, protects: -1, warning: -1}
	r, err := b.Brief(ctx, network.RunOptions{Changes: f.ch})
	switch {
	case ctx.Err() != nil:
		return nil, context.Cause(ctx)
	case !calculable(err):
		return nil, err
	case err != nil:
		row.Verdict, row.Trouble = network.NotJudged, err.Error()
		return row, nil
	}
	row.tell(b.Plant, r, plan, f)
	if row.Verdict != network.Fails || !answerable(r) {
		return row, nil
	}
	ch := f.ch
	ch.Respond = true
	answered, err := b.Brief(ctx, network.RunOptions{Changes: ch})
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
	if k := row.warning; k >= 0 {
		if need := known(answered.Alarms[k].Need); need != nil {
			row.Need = need // what the answer took
		}
	}
	return row, nil
}

// tell fills the row from a run.
func (row *DrillRow) tell(p *network.Plant, r *network.Brief, plan *network.Result, f *fault) {
	row.Verdict = network.Holds
	row.NotReached = append(row.NotReached, r.Unreached...)
	for _, l := range r.Limits {
		if l.Verdict == network.Fails {
			row.Fails++
		}
	}
	if row.Fails > 0 || len(r.Unreached) > 0 {
		row.Verdict = network.Fails
	}
	row.vessels(p, r)
	l := firstNew(r, plan)
	row.AsPlanned = l < 0 && len(r.Unreached) <= len(plan.Unreached())
	if l < 0 {
		l = firstFailing(r)
	}
	if l < 0 {
		return
	}
	at := r.Limits[l].FirstFail
	row.FirstFail, row.Limit = &at, plan.Limits[l].Says
	row.act(r, plan, f, l)
}

// act works out how long there is to act, from the first alarm that comes before some limit fails, else from the fault; one that stands unseen from the
// start counts from the last step before the failure. An alarm at the very level of a limit warns of what fails next.
func (row *DrillRow) act(r *network.Brief, plan *network.Result, f *fault, first int) {
	since, until := f.at, first
	row.Since = "the fault"
	if f.latent() {
		since, row.Since = shows(r, plan, since, *row.FirstFail, row.Since)
	}
	if k := warned(r, f.at, *row.FirstFail); k >= 0 {
		a, says := r.Alarms[k], plan.Alarms[k]
		if next := firstAfter(r, plan, a.At+finest); next >= 0 {
			since, until = a.At, next
			row.Since, row.Need, row.warning = "alarm "+says.Name+" of "+says.Vessel, known(a.Need), k
		}
	}
	if t := r.Limits[until].FirstFail - since; t >= 0 {
		row.TimeToAct, row.ActBefore, row.protects = &t, plan.Limits[until].Says, until
	} else {
		row.Since, row.warning = "", -1
	}
}

// known is nil for what never came.
func known(v float64) *float64 {
	if math.IsNaN(v) {
		return nil
	}
	return &v
}

// shows returns the last step done before a time: what stood unseen until then shows when something is moved.
func shows(r *network.Brief, plan *network.Result, from, before float64, fault string) (since float64, what string) {
	since, what = from, fault
	for i, s := range r.Steps {
		if s.Done > since && s.Done < before {
			since, what = s.Done, "step "+plan.Steps[i].ID
		}
	}
	return since, what
}

// vessels sums what is spilled, and finds the vessel with the least room to its rim.
func (row *DrillRow) vessels(p *network.Plant, r *network.Brief) {
	least := math.Inf(1)
	for i, v := range r.Vessels {
		row.Spilled += v.Spilled
		if tag := p.Vessels[i].Tag; v.ToRim < least || v.ToRim == least && tag < row.WorstVessel {
			least = v.ToRim
			row.WorstVessel, row.Headroom = tag, known(v.ToRim)
		}
	}
}
