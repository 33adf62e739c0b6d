package viz

import (
	"math"
	"testing"

	"pgregory.net/rapid"
)

// TestThin holds for any series: in order, few enough, first and last, least and greatest, and both sides of the greatest jump at one moment.
func TestThin(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		n := rapid.IntRange(1, 3000).Draw(t, "n")
		most := rapid.IntRange(8, 400).Draw(t, "most")
		x, v := make([]float64, n), make([]float64, n)
		low, high, jump := 0, 0, -1
		size := 0.0
		for i := range n {
			if i > 0 {
				x[i] = x[i-1] + float64(rapid.IntRange(0, 3).Draw(t, "dt"))
			}
			v[i] = float64(rapid.IntRange(-1000, 1000).Draw(t, "v"))
			if v[i] < v[low] {
				low = i
			}
			if v[i] > v[high] {
				high = i
			}
			if i > 0 && x[i] == x[i-1] && math.Abs(v[i]-v[i-1]) > size {
				jump, size = i-1, math.Abs(v[i]-v[i-1])
			}
		}
		kept := thin(x, v, most)
		if len(kept) > most {
			t.Fatalf("%d kept, at most %d wanted", len(kept), most)
		}
		have, values := map[int]bool{}, map[float64]bool{}
		for k, i := range kept {
			if k > 0 && i <= kept[k-1] {
				t.Fatal("not in order")
			}
			have[i], values[v[i]] = true, true
		}
		if !have[0] || !have[n-1] {
			t.Fatal("first or last left out")
		}
		if !values[v[low]] || !values[v[high]] {
			t.Fatal("an extreme left out")
		}
		if jump >= 0 && most >= 16 && (!have[jump] || !have[jump+1]) {
			t.Fatalf("the greatest jump, %g at %g s, lost a side", size, x[jump])
		}
	})
}

func TestThinKeepsGaps(t *testing.T) {
	v := []float64{1, 1, 1, math.NaN(), math.NaN(), math.NaN(), 2, 2, 2, 2}
	x := []float64{0, 1, 2, 3, 4, 5, 6, 7, 8, 9}
	kept := thin(x, v, 100)
	want := []int{0, 2, 3, 5, 6, 9}
	if len(kept) != len(want) {
		t.Fatalf("kept %v, want %v", kept, want)
	}
	for i := range want {
		if kept[i] != want[i] {
			t.Fatalf("kept %v, want %v", kept, want)
		}
	}
}
