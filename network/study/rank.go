package study

import "headfall/network"

// broken returns the limit that fails first in time, or nil; where none fails, one that is too close or was not judged.
func broken(r *network.Result) *network.LimitResult {
	if l := firstFailure(r); l != nil {
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
