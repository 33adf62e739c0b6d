package viz

import (
	"math"
	"sort"
)

// reach is the range of a chart's upright axis in display units: all of its curves, and what matters beside them.
func (h *charter) reach(unitKey string, u unit, curves []curve) (low, high float64) {
	low, high = math.Inf(1), math.Inf(-1)
	take := func(x float64) {
		if finite(x) {
			low, high = math.Min(low, x*u.K), math.Max(high, x*u.K)
		}
	}
	for _, c := range curves {
		for _, v := range h.values(c.key) {
			take(v)
		}
		for _, m := range c.marks {
			take(m.At)
		}
		for _, b := range c.bands {
			if b[0][0] == b[1][0] {
				take(b[0][1])
				take(b[1][1])
			}
		}
	}
	switch unitKey {
	case "level", "flow", "gas":
		take(0)
	case "opening":
		return 0, 100
	}
	if !finite(low) || !finite(high) {
		return 0, 1
	}
	if high-low <= 1e-12*math.Max(math.Abs(low), math.Abs(high)) {
		pad := math.Max(math.Abs(high)*0.5, 1e-12)
		low, high = low-pad, high+pad
	}
	step := niceStep((high - low) / 6)
	snap := func(x float64) float64 { return round6(x * step) }
	a, b := math.Floor(low/step+0.02), math.Ceil(high/step-0.02)
	if high > step*(b-0.1) && unitKey != "opening" {
		b++ // room for the label of a peak
	}
	return snap(a), snap(b)
}

// spreadLabels puts the labels of heights that lie close together at different places along their lines.
func spreadLabels(curves []curve, span float64) {
	var all []*mark
	for i := range curves {
		for j := range curves[i].marks {
			all = append(all, &curves[i].marks[j])
		}
	}
	sort.SliceStable(all, func(a, b int) bool { return all[a].At < all[b].At })
	places := []string{"insideStartTop", "insideMiddleTop", "insideEndTop", "insideMiddleBottom", "insideEndBottom", "insideStartBottom"}
	n := 0
	for i, m := range all {
		if i > 0 && m.At-all[i-1].At < 0.08*span {
			n++
		} else {
			n = 0
		}
		m.place = places[n%len(places)]
	}
}
