package network

// Tightest returns the limit with the least in hand as a share of its bound; nil without any margin. Two sorts come last, because they are no news: the rim
// of a vessel that never rises above its start, and the hours of a flow that keeps to them.
func (r *Result) Tightest() *LimitResult {
	var least *LimitResult
	for _, l := range r.Limits {
		if l.Margin != nil && (least == nil || r.tighter(l, least)) {
			least = l
		}
	}
	return least
}

func (r *Result) tighter(a, b *LimitResult) bool {
	if x, y := r.news(a), r.news(b); x != y {
		return x
	}
	return a.Share() < b.Share()
}

// standing is the rise, m, below which a level is as it was.
const standing = 1e-6

// news tells that the margin of a limit says something about the plan.
func (r *Result) news(l *LimitResult) bool {
	if l.Bound == "only_between" {
		return l.Verdict != Holds
	}
	if !l.Implicit || l.Subject != "level" || l.Worst == nil || len(l.Of) != 1 {
		return true
	}
	v := r.Vessels[l.Of[0]]
	return v == nil || *l.Worst > v.StartLevel+standing
}

// stand puts the worst moment of a level that never rises to the start, when it stood as high: what rounding adds later is no peak.
func (r *Result) stand() {
	for _, l := range r.Limits {
		if l.Subject != "level" || l.Bound != "below" || len(l.Of) != 1 || l.Worst == nil || l.Window[0] != nil && *l.Window[0] > 0 {
			continue
		}
		if v := r.Vessels[l.Of[0]]; v != nil && v.PeakAt == 0 && *l.Worst >= v.StartLevel && *l.Worst < v.StartLevel+standing {
			l.WorstAt = opt(0)
		}
	}
}
