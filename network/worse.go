package network

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
func (l *LimitResult) WorseThan(o *LimitResult) bool {
	if a, b := rank(l.Verdict), rank(o.Verdict); a != b {
		return a < b
	}
	switch {
	case l.FirstFail != nil && o.FirstFail != nil:
		return *l.FirstFail < *o.FirstFail
	case l.Margin != nil && o.Margin != nil:
		return *l.Margin < *o.Margin
	}
	return false
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
