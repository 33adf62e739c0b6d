package studies

import (
	"context"
	"testing"

	"headfall/network/study"
	"headfall/scenarios"
)

// BenchmarkJudge is what `run` calculates: the plan, its holds and alarms, and two hundred samples of the doubts, on all processors.
func BenchmarkJudge(b *testing.B) {
	for _, name := range scenarios.Demos() {
		b.Run(name, func(b *testing.B) {
			load := demo(b, name)
			b.ReportAllocs()
			for b.Loop() {
				if _, err := study.Judge(context.Background(), load, study.Options{}); err != nil {
					b.Fatal(err)
				}
			}
		})
	}
}
