package network

import "math"

// piece returns the value just after time t and the slope of the straight piece that begins there.
func (r Rows) piece(t float64) (value, slope float64) {
	if len(r) == 0 {
		return 0, 0
	}
	k := -1 // last row at or before t
	for i, row := range r {
		if row[0] <= t {
			k = i
		}
	}
	switch {
	case k < 0:
		return r[0][1], 0
	case k == len(r)-1:
		return r[k][1], 0
	}
	a, b := r[k], r[k+1]
	m := (b[1] - a[1]) / (b[0] - a[0])
	return a[1] + m*(t-a[0]), m
}

// next returns the first row time after t, or +Inf.
func (r Rows) next(t float64) float64 {
	for _, row := range r {
		if row[0] > t && len(r) > 1 {
			return row[0]
		}
	}
	return math.Inf(1)
}
