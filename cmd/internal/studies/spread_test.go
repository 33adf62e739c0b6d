package studies

import (
	"context"
	"math"
	"strings"
	"testing"

	"headfall/network/study"
)

// filling is a box that fills at a steady rate from a doubtful level: its peak is the level and 1 m, and it passes 2 m when the level passes 1 m.
const filling = `headfall: 1
title: filling
run_for: 1 h
vessels:
  T-1: {shape: {box: {length: 1 m, width: 1 m, height: 3 m}}, base: 1 m, level: %LEVEL%, inflow: 1 m3/h}
  T-2: {shape: {box: {length: 1 m, width: 1 m, height: 3 m}}, base: 0 m, level: 0.5 m}
lines:
  L-1: {from: T-1, to: T-2, parts: [{valve: {tag: V-1, kv: 10}}]}
limits:
  - {level: T-1, below: 2 m}
assume: {doubts: stated}
`

func TestSpreadOfKnownPeak(t *testing.T) {
	for _, c := range []struct {
		level           string
		low, mid, high  float64 // of the peak
		fails, accurate float64
	}{
		// uniform: level plus 1 m; P(level > 1) = 0.1/0.4
		{"0.7 m to 1.1 m", 1.72, 1.9, 2.08, 0.25, 2e-3},
		// normal, ± 0.2 m at 95 %: σ = 0.2/1.959964; points 1.8 ∓ 1.644854 σ; P(level > 1) = 1 − Φ(0.2/σ) = 0.025
		{"0.8 m ± 0.2 m", 1.8 - 1.644854*0.2/1.959964, 1.8, 1.8 + 1.644854*0.2/1.959964, 0.025, 4e-3},
	} {
		load := text(strings.Replace(filling, "%LEVEL%", c.level, 1))
		r := study.SpreadOf(must(study.Spread(context.Background(), load, study.SpreadOptions{Samples: 400}))(t))
		b := r.Bands["peak_level_m"]["T-1"]
		for i, p := range []struct{ got, want float64 }{{*b.Low, c.low}, {*b.Mid, c.mid}, {*b.High, c.high}} {
			if math.Abs(p.got-p.want) > c.accurate {
				t.Errorf("%s: point %d of the peak is %g m, want %g", c.level, i, p.got, p.want)
			}
		}
		if f := r.Limits[0].Fails; math.Abs(f.Share-c.fails) > 0.005 || f.Low > c.fails || f.High < c.fails {
			t.Errorf("%s: fails in %+v, want %g", c.level, f, c.fails)
		}
		in := r.Limits[0].Influences
		if len(in) != 1 || in[0].What != "T-1.level" || math.Abs(in[0].Rank+1) > 1e-12 || in[0].Share < 0.99 {
			t.Errorf("%s: influences %+v", c.level, in)
		}
		if r.Measure == nil || r.Measure.What != "T-1.level" {
			t.Errorf("%s: measure first %+v", c.level, r.Measure)
		}
	}
}
