package network

import (
	"math"
	"reflect"
)

// manyAlike is the number of lines from which a table pays for itself.
const manyAlike = 8

// shareTables gives lines that are alike and stand still one flow table, where there are enough of them.
func (s *system) shareTables() {
	var groups [][]int32
	byTrace := map[trace][]int{} // groups of a trace: one, as a rule
	for i := range s.lines {
		l := &s.lines[i]
		if len(l.acts) > 0 || l.weir != nil || l.inertia > 0 || l.checks || len(l.chain.parts) == 0 {
			continue
		}
		t := l.chain.trace()
		k := -1
		for _, g := range byTrace[t] {
			if reflect.DeepEqual(s.lines[groups[g][0]].chain.parts, l.chain.parts) {
				k = g
			}
		}
		if k < 0 {
			k = len(groups)
			groups = append(groups, nil)
			byTrace[t] = append(byTrace[t], k)
		}
		groups[k] = append(groups[k], int32(i))
	}
	tol, most := tableError(s.rtol), s.headOver()*s.gamma
	for _, g := range groups {
		if len(g) < manyAlike {
			continue
		}
		first := &s.lines[g[0]]
		t := newFlowTable(&first.chain, most, tol, s.gamma)
		t.within = first.withinRange(t)
		for _, i := range g {
			s.lines[i].table = t
		}
	}
}

// tableError is the relative error allowed in a tabled flow.
func tableError(rtol float64) float64 { return math.Max(1e-10, math.Min(1e-7, rtol/10)) }

// trace is what a chain loses at a few flows: chains of different parts differ in it, as good as always.
type trace [8]float64

func (c *chain) trace() (t trace) {
	t[0], t[1], t[2], t[3] = c.fwd, c.rev, c.band, float64(len(c.parts))
	for i, q := range [4]float64{1e-5, 3e-3, 0.2, -3e-3} {
		t[4+i], _ = c.drop(q)
	}
	return t
}

// headOver returns the difference of level, m, that the open vessels of the plant span, and a half more.
func (s *system) headOver() float64 {
	low, high := math.Inf(1), math.Inf(-1)
	for i := range s.stations {
		st := &s.stations[i]
		low, high = math.Min(low, st.base), math.Max(high, st.base+st.rim)
	}
	return 1.5 * (high - low)
}
