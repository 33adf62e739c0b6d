package study

import (
	"math"
	"testing"
)

func TestHistogram(t *testing.T) {
	if histogram("x", []float64{math.NaN()}) != nil {
		t.Error("what never came has no histogram")
	}
	h := histogram("x", []float64{100, math.NaN(), 124, 112, 112, 100})
	if h.From != 100 || h.Width != 1 || h.Never != 1 || h.Counts[0] != 2 || h.Counts[12] != 2 || h.Counts[23] != 1 {
		t.Errorf("%+v", h)
	}
	if h := histogram("x", []float64{7, 7}); len(h.Counts) != 1 || h.Counts[0] != 2 || h.Width != 0 {
		t.Errorf("all at one moment: %+v", h)
	}
}
