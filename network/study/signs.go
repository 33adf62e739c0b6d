package study

import (
	"math"

	"headfall/network"
)

// firstFailing returns the place of the limit that fails first in a run; -1 when all hold.
func firstFailing(r *network.Brief) int {
	return earliest(r, func(*network.LimitBrief, int) bool { return true })
}

// firstNew returns the place of the limit that fails first among those that fail in r but not in the plan, or fail earlier there by more than a second; -1
// for none.
func firstNew(r *network.Brief, plan *network.Result) int { return firstAfter(r, plan, math.Inf(-1)) }

// firstAfter is firstNew among those that fail after a time.
func firstAfter(r *network.Brief, plan *network.Result, after float64) int {
	return earliest(r, func(l *network.LimitBrief, i int) bool {
		was := plan.Limits[i].FirstFail
		return l.FirstFail > after && (was == nil || l.FirstFail <= *was-finest)
	})
}

// earliest is the limit that fails first among some of those that fail.
func earliest(r *network.Brief, among func(l *network.LimitBrief, i int) bool) int {
	first := -1
	for i := range r.Limits {
		l := &r.Limits[i]
		if !math.IsNaN(l.FirstFail) && among(l, i) && (first < 0 || l.FirstFail < r.Limits[first].FirstFail) {
			first = i
		}
	}
	return first
}

// warned returns the place of the first alarm that comes from the fault on and before the limit goes; -1 when there is none.
func warned(r *network.Brief, from, to float64) int {
	first := -1
	for i, a := range r.Alarms {
		if a.At >= from && a.At <= to && (first < 0 || a.At < r.Alarms[first].At) {
			first = i
		}
	}
	return first
}

// answerable tells that an alarm came that has a response.
func answerable(r *network.Brief) bool {
	for _, a := range r.Alarms {
		if !math.IsNaN(a.At) && !math.IsNaN(a.Need) {
			return true
		}
	}
	return false
}
