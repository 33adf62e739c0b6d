package study

import (
	"math"

	"headfall/network"
)

// Histogram counts samples in bins of equal width.
type Histogram struct {
	Of     string  `json:"of"` // what was counted, in words: "last of T-1, T-2 empty"
	From   float64 `json:"from_s"`
	Width  float64 `json:"bin_s"`
	Counts []int   `json:"counts"`
	Never  int     `json:"never"` // samples in which it never came
}

const bins = 24

// histogram counts moments, s; NaN never came. nil where nothing came at all.
func histogram(of string, moments []float64) *Histogram {
	low, high, never := math.Inf(1), math.Inf(-1), 0
	for _, t := range moments {
		if math.IsNaN(t) {
			never++
			continue
		}
		low, high = min(low, t), max(high, t)
	}
	if never == len(moments) {
		return nil
	}
	h := &Histogram{Of: of, From: low, Width: (high - low) / bins, Counts: make([]int, bins), Never: never}
	if h.Width <= 0 {
		h.Width, h.Counts = 0, h.Counts[:1]
	}
	for _, t := range moments {
		if math.IsNaN(t) {
			continue
		}
		k := 0
		if h.Width > 0 {
			k = min(int((t-low)/h.Width), bins-1)
		}
		h.Counts[k]++
	}
	return h
}

// finishes counts when the last of the vessels that empty in some sample is empty.
func (c *columns) finishes(vessels []string, band map[string]network.Band) *Histogram {
	var which []int
	words := ""
	for i, tag := range vessels {
		if _, ok := band[tag]; ok {
			if which = append(which, i); words != "" {
				words += ", "
			}
			words += tag
		}
	}
	if len(which) == 0 {
		return nil
	}
	if len(which) > 1 {
		words = "the last of " + words
	}
	return histogram(words+" is empty", c.of(func(u *SpreadUnit) float64 {
		last := math.Inf(-1)
		for _, i := range which {
			if t := u.Emptied[i]; math.IsNaN(t) || t > last {
				last = t
			}
			if math.IsNaN(last) {
				break
			}
		}
		return last
	}))
}
