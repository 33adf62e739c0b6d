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
		if c.spread != nil {
			for _, v := range c.spread.High {
				take(v)
			}
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

// labelHigh is the height of a label of a mark as a share of a chart's upright axis.
const labelHigh = 0.085

// spreadLabels puts the labels of heights where they cover no other: at the start, the end or the middle of their line, over it or under it. One that has
// no room there is left out; the vessel's other labels and the tables tell it. Marks of one curve at one height share a line and a label.
func spreadLabels(curves []curve, span float64) {
	var all []*mark
	for i := range curves {
		curves[i].marks = joined(curves[i].marks, 1e-3*span)
		for j := range curves[i].marks {
			all = append(all, &curves[i].marks[j])
		}
	}
	sort.SliceStable(all, func(a, b int) bool { return all[a].At < all[b].At })
	high := labelHigh * span
	taken := map[string][]float64{} // lower edges of the labels there
	for _, m := range all {
		for _, place := range []struct {
			side, edge string
			low        float64
		}{{"Start", "Top", m.At}, {"End", "Top", m.At}, {"Middle", "Top", m.At}, {"Start", "Bottom", m.At - high}, {"End", "Bottom", m.At - high}, {"Middle", "Bottom", m.At - high}} {
			if free(taken[place.side], place.low, high) {
				taken[place.side] = append(taken[place.side], place.low)
				m.place = "inside" + place.side + place.edge
				break
			}
		}
	}
}

func free(taken []float64, low, high float64) bool {
	for _, x := range taken {
		if math.Abs(x-low) < high {
			return false
		}
	}
	return true
}

// joined puts a mark that stands where another of the same curve does, over the same time, into its words; a limit is the one that is drawn.
func joined(marks []mark, near float64) []mark {
	var out []mark
	for _, m := range marks {
		k := -1
		for i := range out {
			if math.Abs(out[i].At-m.At) <= near && out[i].within() == m.within() {
				k = i
			}
		}
		switch {
		case k < 0:
			out = append(out, m)
		case m.Kind == "limit" && out[k].Kind != "limit":
			m.Words += ", " + out[k].Words
			out[k] = m
		default:
			out[k].Words += ", " + m.Words
		}
	}
	return out
}

// within is the time over which a mark holds, s.
func (m mark) within() [2]float64 {
	w := [2]float64{0, math.Inf(1)}
	if m.From != nil {
		w[0] = math.Max(*m.From, 0)
	}
	if m.To != nil {
		w[1] = *m.To
	}
	return w
}
