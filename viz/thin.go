package viz

import "sort"

// thin returns which samples of a series to keep, ascending, at most most of them (and never fewer than 8): the first and the last, both sides of
// breaks, and the least and greatest of every column of time. Runs of one value keep only their ends, which loses nothing.
func thin(t, v []float64, most int) []int {
	n := min(len(t), len(v))
	all := flatten(v, upTo(n))
	most = max(most, 8)
	if len(all) <= most {
		return all
	}
	keep := map[int]bool{all[0]: true, all[len(all)-1]: true}
	for _, i := range breaks(t, v, all, (most-2)/4) {
		keep[i], keep[i+1] = true, true
	}
	columns := max((most-len(keep))/2, 1)
	t0, width := t[all[0]], (t[all[len(all)-1]]-t[all[0]])/float64(columns)
	for from := 0; from < len(all); {
		col := column(t[all[from]], t0, width, columns)
		to := from
		for to < len(all) && column(t[all[to]], t0, width, columns) == col {
			to++
		}
		low, high := extremes(v, all[from:to])
		if low >= 0 {
			keep[low], keep[high] = true, true
		}
		from = to
	}
	out := make([]int, 0, len(keep))
	for i := range keep {
		out = append(out, i)
	}
	sort.Ints(out)
	return out
}

func upTo(n int) []int {
	all := make([]int, n)
	for i := range all {
		all[i] = i
	}
	return all
}

// flatten leaves out samples that stand between two of the same printed value.
func flatten(v []float64, all []int) []int {
	out := make([]int, 0, len(all))
	same := func(a, b int) bool {
		return round6(v[a]) == round6(v[b]) || !finite(v[a]) && !finite(v[b])
	}
	for k, i := range all {
		if k > 0 && k < len(all)-1 && same(all[k-1], i) && same(i, all[k+1]) {
			continue
		}
		out = append(out, i)
	}
	return out
}

// breaks returns the samples whose successor stands at the same moment with another value, or where numbers begin or end; of too many the
// greatest jumps.
func breaks(t, v []float64, all []int, most int) []int {
	type jump struct {
		i    int
		size float64
	}
	var found []jump
	for _, i := range all {
		if i+1 >= len(v) || i+1 >= len(t) {
			continue
		}
		switch a, b := v[i], v[i+1]; {
		case finite(a) != finite(b):
			found = append(found, jump{i, 1e300})
		case t[i] == t[i+1] && a != b && finite(a):
			found = append(found, jump{i, max(a-b, b-a)})
		}
	}
	if len(found) > most {
		sort.SliceStable(found, func(a, b int) bool { return found[a].size > found[b].size })
		found = found[:most]
	}
	out := make([]int, len(found))
	for k, j := range found {
		out[k] = j.i
	}
	return out
}

func column(t, t0, width float64, columns int) int {
	if width <= 0 {
		return 0
	}
	return min(int((t-t0)/width), columns-1)
}

func extremes(v []float64, of []int) (low, high int) {
	low, high = -1, -1
	for _, i := range of {
		if !finite(v[i]) {
			continue
		}
		if low < 0 || v[i] < v[low] {
			low = i
		}
		if high < 0 || v[i] > v[high] {
			high = i
		}
	}
	return low, high
}
