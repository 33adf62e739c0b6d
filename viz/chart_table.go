package viz

import (
	"math"
	"sort"
	"strings"
)

// table returns what a chart shows at about a dozen moments.
func (h *charter) table(u unit, curves []curve) (head []string, rows [][]string) {
	s := h.r.Series
	if s == nil || len(s.Time) == 0 {
		return nil, nil
	}
	head = append(head, "Time")
	for _, c := range curves {
		head = append(head, c.name)
	}
	const moments = 13
	last := s.Time[len(s.Time)-1]
	for k := range moments {
		t := s.Time[0] + (last-s.Time[0])*float64(k)/(moments-1)
		row := []string{h.c.At(t, earlier)}
		for _, c := range curves {
			row = append(row, u.Text(valueAt(s.Time, h.values(c.key), t)))
		}
		rows = append(rows, row)
		if last == s.Time[0] {
			break
		}
	}
	return head, rows
}

// values finds the series behind a key of the page's data.
func (h *charter) values(key string) []float64 {
	what, tag, _ := strings.Cut(key, "/")
	s := h.r.Series
	switch what {
	case "level":
		return s.Level[tag]
	case "flow":
		return s.Flow[tag]
	case "opening":
		return s.Opening[tag]
	case "running":
		return s.Running[tag]
	case "gas":
		return s.Gas[tag]
	case "crest":
		return s.Crest[tag]
	case "into":
		for _, d := range derived(h.plant, h.r) {
			if d.Tag == tag {
				return d.Values
			}
		}
	}
	return nil
}

// valueAt reads a series between its samples; at a step, what holds after it.
func valueAt(t, v []float64, at float64) float64 {
	n := min(len(t), len(v))
	if n == 0 {
		return math.NaN()
	}
	i := sort.Search(n, func(i int) bool { return t[i] > at })
	switch {
	case i == 0:
		return v[0]
	case i == n || t[i] == t[i-1]:
		return v[i-1]
	}
	return v[i-1] + (v[i]-v[i-1])*(at-t[i-1])/(t[i]-t[i-1])
}
