package network

import "math"

// Worse makes r the worse of itself, a run with holds at zero wait, and other, the run with every hold at its up_to: limit by limit, and for steps
// that were never reached. Series and all else stay those of r.
func (r *Result) Worse(other *Result) {
	for i, l := range r.Limits {
		if o := other.Limits[i]; o.WorseThan(l) {
			*l = *o
			l.AtUpTo = true
		}
	}
	for _, id := range other.unreached {
		known := false
		for _, have := range r.unreached {
			known = known || have == id
		}
		if !known {
			r.unreached = append(r.unreached, id)
		}
	}
	r.Decide()
}

// WorseThan ranks what became of the same limit in two runs: a failure before what was not judged before what holds; the earlier failure, else the
// smaller margin.
func (l *LimitResult) WorseThan(o *LimitResult) bool { return l.brief().WorseThan(o.brief()) }

func (l *LimitResult) brief() LimitBrief {
	return LimitBrief{Verdict: l.Verdict, Margin: orNaN(l.Margin), FirstFail: orNaN(l.FirstFail)}
}

// WorseThan is that of LimitResult.
func (l LimitBrief) WorseThan(o LimitBrief) bool {
	if a, b := rank(l.Verdict), rank(o.Verdict); a != b {
		return a < b
	}
	if !math.IsNaN(l.FirstFail) && !math.IsNaN(o.FirstFail) {
		return l.FirstFail < o.FirstFail
	}
	return l.Margin < o.Margin
}

func orNaN(v *float64) float64 {
	if v == nil {
		return math.NaN()
	}
	return *v
}

func rank(v Verdict) int {
	switch v {
	case Fails:
		return 0
	case TooClose:
		return 1
	case NotJudged:
		return 2
	}
	return 3
}

// Unreached returns the steps that are not optional and never came.
func (r *Result) Unreached() []string { return r.unreached }
