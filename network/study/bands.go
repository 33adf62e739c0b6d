package study

import (
	"math"
	"sort"

	"gonum.org/v1/gonum/stat"

	"headfall/network"
)

// bandOf returns the 5, 50 and 95 % points of what came; a point that falls among what never came (NaN, later than everything) is nil. None at all
// without samples.
func bandOf(values []float64) network.Band {
	all := append([]float64(nil), values...)
	for i, v := range all {
		if math.IsNaN(v) {
			all[i] = math.Inf(1)
		}
	}
	if len(all) == 0 {
		return network.Band{}
	}
	sort.Float64s(all)
	point := func(p float64) *float64 {
		q := stat.Quantile(p, stat.Empirical, all, nil)
		if math.IsInf(q, 0) {
			return nil
		}
		return &q
	}
	return network.Band{Low: point(0.05), Mid: point(0.5), High: point(0.95)}
}

// pluck picks one number of every sample that was calculated.
func pluck(samples []sample, pick func(*sample) float64) []float64 {
	var all []float64
	for i := range samples {
		if s := &samples[i]; s.failed == "" {
			all = append(all, pick(s))
		}
	}
	return all
}

// never tells that nothing came in any sample.
func never(values []float64) bool {
	for _, v := range values {
		if !math.IsNaN(v) {
			return false
		}
	}
	return true
}

// present leaves out what is NaN.
func present(values []float64) []float64 {
	var all []float64
	for _, v := range values {
		if !math.IsNaN(v) {
			all = append(all, v)
		}
	}
	return all
}
