package study

import (
	"math"

	"headfall/network"
)

// firstNew returns the limit that fails first among those that fail in r but not in the plan, or fail earlier there by more than a second.
func firstNew(r, plan *network.Result) *network.LimitResult { return firstAfter(r, plan, math.Inf(-1)) }

// firstAfter is firstNew among those that fail after a time.
func firstAfter(r, plan *network.Result, after float64) *network.LimitResult {
	var first *network.LimitResult
	for i, l := range r.Limits {
		if l.FirstFail == nil || *l.FirstFail <= after {
			continue
		}
		if was := plan.Limits[i].FirstFail; was != nil && *l.FirstFail > *was-finest {
			continue
		}
		if first == nil || *l.FirstFail < *first.FirstFail {
			first = l
		}
	}
	return first
}

// warned returns the first alarm that comes from the fault on and before the limit goes; nil when there is none.
func warned(r *network.Result, from, to float64) *network.AlarmResult {
	var first *network.AlarmResult
	for _, a := range r.Alarms {
		if a.At != nil && *a.At >= from && *a.At <= to && (first == nil || *a.At < *first.At) {
			first = a
		}
	}
	return first
}

// answerable tells that an alarm came that has a response.
func answerable(r *network.Result) bool {
	for _, a := range r.Alarms {
		if a.At != nil && a.Need != nil {
			return true
		}
	}
	return false
}
