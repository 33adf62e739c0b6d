package study

import (
	"fmt"
	"math"

	"headfall/elements/quantity"
	"headfall/network"
)

// answers runs the plan once more with every alarm answered, where one comes that has a response, and says whether that is in time.
func (j *judgement) answers() error {
	asked := false
	for _, a := range j.res.Alarms {
		asked = asked || a.At != nil && a.Need != nil
	}
	if !asked {
		return nil
	}
	other, err := j.single(network.Changes{Respond: true})
	if err != nil {
		return err
	}
	for i, a := range j.res.Alarms {
		if a.At == nil || a.Need == nil {
			continue
		}
		a.Need = other.Alarms[i].Need
		a.Says = saysAnswer(a, other)
	}
	return nil
}

// saysAnswer says what time there is and what is needed, and what the calculation with the answer gives.
func saysAnswer(a *network.AlarmResult, answered *network.Result) string {
	need := "need " + watch(math.Ceil(*a.Need))
	if a.Have == nil {
		return "comes; no limit of it fails; " + need
	}
	says := "have " + watch(math.Floor(*a.Have)) + ", " + need
	if *a.Have < *a.Need {
		says += ": SHORT"
	}
	after := *a.At + finest // what fails with the alarm itself cannot be helped
	if l := failsAfter(answered, a.Vessel, after); l != nil {
		return says + "; answered, " + l.Says + " still fails"
	}
	if l := failsAfter(answered, "", after); l != nil {
		return says + "; answered, " + a.Vessel + " is held, but " + l.Says + " fails"
	}
	if firstFailure(answered) != nil {
		return says + "; answered, nothing further fails"
	}
	return says + "; answered, every limit holds"
}

// firstFailure returns the limit that fails first; nil when all hold.
func firstFailure(r *network.Result) *network.LimitResult {
	return failsAfter(r, "", math.Inf(-1))
}

// failsAfter is firstFailure among the limits about a vessel, or about anything, that fail after a time.
func failsAfter(r *network.Result, vessel string, after float64) *network.LimitResult {
	var first *network.LimitResult
	for _, l := range r.Limits {
		if l.FirstFail == nil || *l.FirstFail <= after || vessel != "" && l.Of[0] != vessel {
			continue
		}
		if first == nil || *l.FirstFail < *first.FirstFail {
			first = l
		}
	}
	return first
}

// watch writes a time as a stop watch shows it: 3:17, and hours in words.
func watch(s float64) string {
	if s >= 3600 || s < 0 {
		return quantity.FormatDuration(s)
	}
	return fmt.Sprintf("%d:%02d", int(s)/60, int(s)%60)
}
