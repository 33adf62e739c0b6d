package friction

import (
	"math"
	"testing"
)

func TestTableFollowsChurchill(t *testing.T) {
	var worst [30 - firstOctave]float64
	for _, rough := range []float64{0, 1e-6, 1e-5, 1e-4, 3e-4, 1e-3, 3e-3, 0.01, 0.03, 0.05} {
		tab := NewTable(rough)
		for re := 256.0; re < 1<<30; re *= 1.0001 {
			want, _ := Churchill(re, rough)
			got, _ := tab.FRe(re)
			o := max(int(math.Log2(re))-firstOctave, 0)
			worst[o] = max(worst[o], math.Abs(got/want-1))
		}
	}
	for o, w := range worst {
		if w > 1e-8 {
			t.Errorf("octave from Re %g: off by %.2g", math.Ldexp(1, firstOctave+o), w)
		}
	}
	t.Logf("%.1e", worst)
}

func BenchmarkTable(b *testing.B) {
	tab := NewTable(1e-3)
	re, sum := 3e3, 0.0
	for b.Loop() {
		v, _ := tab.FRe(re)
		sum += v
		re *= 1.001
		if re > 1e6 {
			re = 3e3
		}
	}
	_ = sum
}

func BenchmarkNewTable(b *testing.B) {
	for b.Loop() {
		NewTable(1e-3)
	}
}
