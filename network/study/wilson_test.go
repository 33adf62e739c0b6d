package study

import (
	"math"
	"testing"
)

// Published values: R. G. Newcombe, Stat. Med. 17 (1998) 857, table I, method 3 (score interval without continuity correction), 95 %.
func TestWilson(t *testing.T) {
	for _, c := range []struct {
		k, n      int
		low, high float64
	}{
		{81, 263, 0.2553, 0.3662},
		{15, 148, 0.0624, 0.1605},
		{0, 20, 0, 0.1611},
		{1, 29, 0.0061, 0.1718},
	} {
		low, high := Wilson(c.k, c.n, 0.95)
		if math.Abs(low-c.low) > 5e-5 || math.Abs(high-c.high) > 5e-5 {
			t.Errorf("%d of %d: %.4f to %.4f, published %.4f to %.4f", c.k, c.n, low, high, c.low, c.high)
		}
	}
	if low, high := Wilson(0, 0, 0.95); low != 0 || high != 1 {
		t.Errorf("of nothing: %g to %g", low, high)
	}
}
