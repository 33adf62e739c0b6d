package studies

import (
	"context"
	"testing"

	"headfall/network"
	"headfall/network/study"
	"headfall/scenarios"
)

// samplesAllocate is how often a sample of a demo may allocate, its numbers being put into the plant and the model.
const samplesAllocate = 200

// TestBriefRunsAllocateNothing: once a plant was run for what is judged, it is so again without any allocation; what a sample allocates is in making its
// numbers those of the model.
func TestBriefRunsAllocateNothing(t *testing.T) {
	for _, name := range scenarios.Demos() {
		t.Run(name, func(t *testing.T) {
			b, draws := sampler(t, name)
			brief := func() {
				if _, err := b.Brief(context.Background(), network.RunOptions{}); err != nil {
					t.Fatal(err)
				}
			}
			if n := testing.AllocsPerRun(20, brief); n > 0 {
				t.Errorf("%g allocations a run", n)
			}
			i := 0
			n := testing.AllocsPerRun(10, func() {
				b.Put(draws.Numbers, draws.Values(i))
				i++
				brief()
			})
			if n > samplesAllocate {
				t.Errorf("%g allocations a sample", n)
			}
		})
	}
}

// sampler is a bench of a demo as its samples are run.
func sampler(t *testing.T, name string) (*study.Bench, *study.Draws) {
	r := &study.Runner{Load: demo(t, name), Model: network.Options{Tolerance: study.SampleTolerance}}
	b, err := r.Bench(context.Background())
	if err != nil {
		t.Fatal(err)
	}
	return b, study.NewDraws(b.Plant, 20, 1)
}
