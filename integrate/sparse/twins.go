package sparse

import "slices"

// mergeTwins merges unknowns of one element that have the same neighbours: they will be eliminated one after the other anyway.
func (g *quotient) mergeTwins(lp []int32) {
	if len(lp) < 2 {
		return
	}
	by := slices.Clone(lp)
	slices.SortStableFunc(by, func(a, b int32) int { return int(g.hash[a]) - int(g.hash[b]) })
	for a, i := range by {
		if g.weight[i] == 0 {
			continue
		}
		marked := false
		for _, j := range by[a+1:] {
			if g.hash[j] != g.hash[i] {
				break
			}
			if g.weight[j] == 0 || len(g.vars[j]) != len(g.vars[i]) || len(g.elems[j]) != len(g.elems[i]) {
				continue
			}
			if !marked {
				g.stamp++
				g.markAll(g.vars[i])
				g.markAll(g.elems[i])
				marked = true
			}
			if g.allMarked(g.vars[j]) && g.allMarked(g.elems[j]) {
				g.merged[g.last[i]] = j
				g.last[i] = g.last[j]
				g.degree[i] -= g.weight[j]
				g.weight[i] += g.weight[j]
				g.weight[j] = 0
			}
		}
	}
}

func (g *quotient) markAll(list []int32) {
	for _, i := range list {
		g.mark[i] = g.stamp
	}
}

func (g *quotient) allMarked(list []int32) bool {
	for _, i := range list {
		if g.mark[i] != g.stamp {
			return false
		}
	}
	return true
}

// sortedSet sorts a list in place and drops repeats.
func sortedSet(list []int32) []int32 {
	slices.Sort(list)
	return slices.Compact(list)
}
