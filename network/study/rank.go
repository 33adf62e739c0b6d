package study

import (
	"math"

	"headfall/network"
)

// marginShare is a limit's margin as a share of its bound, or of its worst value where the bound is nothing: limits of different kinds are ranked by
// it, as on the terminal and in the report. NaN without a margin.
func marginShare(l *network.LimitResult) float64 {
	if l.Margin == nil {
		return math.NaN()
	}
	scale := 0.0
	if l.BoundSI != nil {
		scale = math.Abs(*l.BoundSI)
	}
	if scale == 0 && l.Worst != nil {
		scale = math.Abs(*l.Worst)
	}
	if scale == 0 {
		scale = math.Max(math.Abs(*l.Margin), math.SmallestNonzeroFloat64)
	}
	return *l.Margin / scale
}

// tightest returns the limit with the least in hand, or nil: one that fails before one that holds.
func tightest(limits []*network.LimitResult) *network.LimitResult {
	var least *network.LimitResult
	for _, l := range limits {
		if l.Margin == nil || l.BoundSI == nil && l.Verdict != network.Fails { // hours of flow hold or do not: there is nothing between
			continue
		}
		if least == nil || gravity(l) < gravity(least) || gravity(l) == gravity(least) && marginShare(l) < marginShare(least) {
			least = l
		}
	}
	return least
}

// gravity ranks what was found of a limit, the worst first.
func gravity(l *network.LimitResult) int {
	switch l.Verdict {
	case network.Fails:
		return 0
	case network.TooClose:
		return 1
	}
	return 2
}

// broken returns the limit that fails first in time, or nil; where none fails, one that is too close or was not judged.
func broken(r *network.Result) *network.LimitResult {
	if l := firstFailure(r, ""); l != nil {
		return l
	}
	for _, l := range r.Limits {
		if l.Verdict != network.Holds {
			return l
		}
	}
	return nil
}

// whyNotRun says in words why a plan does not run; "" when it does.
func whyNotRun(r *network.Result) string {
	if l := broken(r); l != nil {
		return l.Says
	}
	if u := r.Unreached(); len(u) > 0 {
		return "step " + u[0] + " is never reached"
	}
	return ""
}
