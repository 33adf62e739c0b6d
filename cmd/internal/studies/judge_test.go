package studies

import (
	"math"
	"strings"
	"testing"

	"headfall/network"
	"headfall/network/study"
)

// The bits of a judgement do not depend on the number of workers.
func TestJudgeSameBits(t *testing.T) {
	var first string
	for _, workers := range []int{1, 2, 5} {
		r := must(study.Judge(t.Context(), demo(t, "day_tank"), study.Options{Samples: 30, Workers: workers}))(t)
		if first == "" {
			first = bits(t, r)
		}
		same(t, "day_tank", bits(t, r), first)
	}
}

// A step that is reached in the middle but not in enough of the samples makes the plan too close to call; a limit likewise.
func TestTooClose(t *testing.T) {
	for _, c := range []struct {
		name, more, level string
		want              network.Verdict
		fails             float64
	}{
		{"holds", "limits: [{level: T-1, below: 2 m}]", "0.9 m ± 0.02 m", network.Run, 0},
		{"too close", "limits: [{level: T-1, below: 2 m}]", "0.9 m ± 0.2 m", network.TooClose, 0.164}, // 1 − Φ(0.1·1.959964/0.2) = 0.1636
		{"fails", "limits: [{level: T-1, below: 2 m}]", "1.1 m ± 0.2 m", network.DoNotRun, 0.836},
		{"reached", "steps: [{id: s1, when: {level: T-1, above: 1.8 m}, valve: V-1, to: 0 %}]", "0.9 m ± 0.02 m", network.Run, 0},
		{"stalls", "steps: [{id: s1, when: {level: T-1, above: 1.8 m}, valve: V-1, to: 0 %}]", "0.9 m ± 0.2 m", network.TooClose, 0},
	} {
		file := strings.Replace(filling, "%LEVEL%", c.level, 1)
		file = strings.Replace(file, "limits:\n  - {level: T-1, below: 2 m}\n", c.more+"\n", 1)
		r := must(study.Judge(t.Context(), text(file), study.Options{}))(t)
		if r.Verdict != c.want || r.Limits[0].Says == "level of T-1 below 2 m" && math.Abs(r.Limits[0].FailsShare-c.fails) > 0.006 {
			t.Errorf("%s: %s, fails in %g, want %s, %g", c.name, r.Verdict, r.Limits[0].FailsShare, c.want, c.fails)
		}
	}
}

// A hold may last until a limit goes: the box fills at 1 m³/h over 1 m², and the limit is passed at a time that is known.
func TestLongestWait(t *testing.T) {
	file := strings.Replace(strings.Replace(filling, "%LEVEL%", "0.5 m", 1), "inflow: 1 m3/h", "inflow: 6 m3/h", 1)
	file += `steps:
  - {id: h1, at: 2 min, hold: read it, up_to: 20 min}
  - {id: s1, after: h1, inflow: T-1, to: 0 m3/h}
`
	r := must(study.Judge(t.Context(), text(file), study.Options{Samples: -1}))(t)
	h := r.Holds[0]
	// 1.5 m at 6 m/h: 15 min from the start, 13 min from the hold
	if h.LongestWait == nil || math.Abs(*h.LongestWait-13*60) > 2 || *h.LongestWait > 13*60 {
		t.Errorf("the hold may last %v", h.LongestWait)
	}
	if l := r.Limits[0]; r.Verdict != network.DoNotRun || !l.AtUpTo || l.FirstFail == nil || math.Abs(*l.FirstFail-15*60) > 0.01 {
		t.Errorf("%s, %+v", r.Verdict, l)
	}
}

// An alarm is answered after the time to notice and to walk, and the inflow while the valve moves counts.
func TestAnswers(t *testing.T) {
	const file = `headfall: 1
title: answered
run_for: 1 h
liquid: {water: 12 °C}
assume: {doubts: none}
vessels:
  T-1: {shape: {box: {length: 3 m, width: 3 m, height: 4 m}}, base: 5 m, level: 3.5 m}
  PIT:
    shape: {box: {length: 2 m, width: 2 m, height: 2 m}}
    base: 0 m
    level: 0.5 m
    alarms: [{name: high, above: 1.2 m, response: {detect: 30 s, walk: %WALK%, valve: V-1, to: 0 %}}]
lines:
  L-1: {from: T-1, to: PIT, enters: {centre: 2.2 m}, parts: [{pipe: {length: 10 m, bore: 82.5 mm, roughness: 0.05 mm}}, {valve: {tag: V-1, kv: 60, stroke: 20 s, open: 100 %}}]}
limits: [{level: PIT, below: 1.6 m}]
`
	for walk, want := range map[string]string{"10 s": "need 1:00; answered, every limit holds", "10 min": "need 10:50: SHORT; answered, level of PIT below 1.6 m still fails"} {
		r := must(study.Judge(t.Context(), text(strings.Replace(file, "%WALK%", walk, 1)), study.Options{}))(t)
		a := r.Alarms[0]
		if a.Have == nil || !strings.HasSuffix(a.Says, want) || !strings.HasPrefix(a.Says, "have ") {
			t.Errorf("walk %s: %q, want … %q", walk, a.Says, want)
		}
	}
}

// The band of the levels: at the start that of the doubt stated, and the same on its way up at 1 m/h; every step has a moment of its own.
func TestSeriesBand(t *testing.T) {
	file := strings.Replace(filling, "%LEVEL%", "0.5 m ± 0.1 m", 1)
	r := must(study.Judge(t.Context(), text(file), study.Options{}))(t)
	b := r.SeriesBand
	if b == nil || b.Time[0] != 0 || len(b.Time) < 60 || len(b.Time) > 121 {
		t.Fatalf("the band is %+v", b)
	}
	half := 0.1 * 1.644854 / 1.959964 // the 95 % point of a normal doubt of ± 0.1 m at 95 %
	l := b.Level["T-1"]
	for k, at := range b.Time {
		if mid := 0.5 + at/3600; at <= 1800 && (math.Abs(l.Low[k]-mid+half) > 0.003 || math.Abs(l.Mid[k]-mid) > 0.003 || math.Abs(l.High[k]-mid-half) > 0.003) {
			t.Errorf("at %g s the band is %g to %g to %g, want %g ± %g", at, l.Low[k], l.Mid[k], l.High[k], mid, half)
		}
	}
	if r = must(study.Judge(t.Context(), text(file), study.Options{Samples: -1}))(t); r.SeriesBand != nil {
		t.Error("a band without samples")
	}
}
