package e2e

import (
	"testing"

	"headfall/scenarios"
)

// golden is the work of the demos' plans: steps, rejected steps. Counts move with reversals and events; a band of a fifth and five steps holds them. A change
// beyond it wants a reason in the commit.
var golden = map[string][2]int{
	"balance_tanks":  {137, 39},
	"brine_pans":     {629, 89},
	"cellar":         {258, 68},
	"cellar_passing": {258, 63},
	"cellar_free":    {258, 68},
	"day_tank":       {103, 9},
	"equalisation":   {105, 12},
	"hillside":       {350, 63},
	"ten_vessels":    {883, 175},
}

// TestWork holds the demos to their golden counters.
func TestWork(t *testing.T) {
	for _, name := range scenarios.Demos() {
		data, _ := scenarios.Demo(name)
		r := run(t, string(data), how{})
		w := r.Work
		if w.Factorisations < w.Steps || w.Evaluations < 6*w.Steps {
			t.Errorf("%s: %+v", name, w)
		}
		want, ok := golden[name]
		if !ok {
			t.Errorf("%s has no golden counters: %d steps, %d rejected", name, w.Steps, w.Rejected)
			continue
		}
		for i, got := range []int{w.Steps, w.Rejected} {
			if band := want[i]/5 + 5; got < want[i]-band || got > want[i]+band {
				t.Errorf("%s: %d steps, %d rejected; golden %v", name, w.Steps, w.Rejected, want)
			}
		}
	}
}
