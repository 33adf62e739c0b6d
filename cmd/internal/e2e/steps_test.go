package e2e

import (
	"fmt"
	"math"
	"strings"
	"testing"

	"headfall/network"
)

// tub is a vessel of 1 m² that falls by 1 mm/s through a steady sink: levels are straight lines in time, so that every moment is known.
// It is drained by a pump of a steady rate into OUT, so that flow does not depend on the level but for a part in 10⁴.
const tub = `
vessels:
  A: {shape: {box: {length: 1 m, width: 1 m, height: 4 m}}, base: 0 m, level: 2 m, inflow: 0 L/s}
  B: {shape: {box: {length: 1 m, width: 1 m, height: 4 m}}, base: 0 m, level: 1 m}
outside:
  OUT: {free_fall: {elevation: 0 m}}
lines:
  LA: {from: A, to: OUT, inlet: full, parts: [{resistance: {linear: 2000 s/m2}}, {valve: {tag: VA, kv: 1000, stroke: 20 s}}]}
  LB: {from: B, to: OUT, inlet: full, parts: [{resistance: {linear: 2000 s/m2}}, {valve: {tag: VB, kv: 1000, stroke: 0 s}}]}
`

// rising makes A rise by 1 mm/s from t = 0: level 2 m + t/1000 while VA is shut.
const rising = "inflow: 1 L/s"

func filling() string { return strings.Replace(tub, "inflow: 0 L/s", rising, 1) }

// TestTriggers: each clause of "Steps: what they mean", with times that are exact.
func TestTriggers(t *testing.T) {
	for _, c := range []struct {
		name  string
		text  string
		extra []string
		want  map[string]float64 // step → s at which it acted
		moved map[string]float64
		never []string
		how   how
	}{
		{name: "at", extra: []string{"steps:", "  - {id: a, at: 100 s, valve: VB, to: 10 %}"}, want: map[string]float64{"a": 100}},
		{name: "at 0", extra: []string{"steps:", "  - {id: a, at: 0 s, valve: VB, to: 10 %}"}, want: map[string]float64{"a": 0}},
		{name: "at with wait", extra: []string{"steps:", "  - {id: a, at: 100 s, wait: 50 s, valve: VB, to: 10 %}"}, want: map[string]float64{"a": 150}},
		{name: "clock", extra: []string{`start: "2027-01-01 23:50"`, "steps:", `  - {id: a, at: "23:55", valve: VB, to: 10 %}`, `  - {id: b, at: "00:05", valve: VB, to: 20 %}`, `  - {id: c, at: "+1d 00:10", valve: VB, to: 30 %}`},
			want: map[string]float64{"a": 300, "b": 900, "c": 1200}},
		{name: "when", text: filling(), extra: []string{"steps:", "  - {id: a, when: {level: A, above: 2.25 m}, valve: VB, to: 10 %}"}, want: map[string]float64{"a": 250}},
		{name: "when and wait", text: filling(), extra: []string{"steps:", "  - {id: a, when: {level: A, above: 2.25 m}, wait: 30 s, valve: VB, to: 10 %}"}, want: map[string]float64{"a": 280}},
		{name: "when already true at the start", text: filling(), extra: []string{"steps:", "  - {id: a, when: {level: A, above: 1.5 m}, valve: VB, to: 10 %}"}, want: map[string]float64{"a": 0}},
		{name: "when exactly met at the start", extra: []string{"steps:", "  - {id: a, when: {level: A, above: 2 m}, valve: VB, to: 10 %}"}, want: map[string]float64{"a": 0}},
		{name: "when true as it is armed by after", text: filling(), extra: []string{"steps:", "  - {id: a, at: 400 s, valve: VB, to: 10 %}", "  - {id: b, after: a, when: {level: A, above: 2.25 m}, valve: VB, to: 20 %}"},
			want: map[string]float64{"a": 400, "b": 400}},
		{name: "after and later", text: filling(), extra: []string{"steps:", "  - {id: b, after: a, when: {level: A, above: 2.25 m}, wait: 7 s, valve: VB, to: 20 %}", "  - {id: a, at: 100 s, valve: VB, to: 10 %}"},
			want: map[string]float64{"a": 100, "b": 257}},
		{name: "own place in the list does not matter", extra: []string{"steps:", "  - {id: c, after: b, wait: 10 s, valve: VB, to: 3 %}", "  - {id: b, after: a, wait: 10 s, valve: VB, to: 2 %}", "  - {id: a, at: 10 s, valve: VB, to: 1 %}"},
			want: map[string]float64{"a": 10, "b": 20, "c": 30}},
		{name: "optional, never reached", extra: []string{"steps:", "  - {id: a, when: {level: B, above: 3 m}, valve: VB, to: 10 %, optional: yes}"}, never: []string{"a"}},
		{name: "hold at no wait", extra: []string{"steps:", "  - {id: h, at: 100 s, hold: sign, up_to: 60 s}", "  - {id: a, after: h, wait: 5 s, valve: VB, to: 10 %}", "  - {id: b, at: 110 s, valve: VA, to: 10 %}"},
			want: map[string]float64{"a": 105, "b": 110}},
		{name: "hold at its longest: only what names it waits", extra: []string{"steps:", "  - {id: h, at: 100 s, hold: sign, up_to: 60 s}", "  - {id: a, after: h, wait: 5 s, valve: VB, to: 10 %}", "  - {id: b, at: 110 s, valve: VA, to: 10 %}"},
			want: map[string]float64{"a": 165, "b": 110}, how: how{changes: network.Changes{HoldsUpTo: true}}},
		{name: "stroke", extra: []string{"steps:", "  - {id: a, at: 100 s, valve: VA, to: 50 %}", "  - {id: b, at: 200 s, valve: VA, to: 25 %}", "  - {id: c, at: 300 s, valve: VA, to: 75 %, over: 3 s}"},
			want: map[string]float64{"a": 100}, moved: map[string]float64{"a": 110, "b": 205, "c": 303}},
		{name: "turned back on its way", extra: []string{"steps:", "  - {id: a, at: 100 s, valve: VA, to: 100 %}", "  - {id: b, at: 105 s, valve: VA, to: 0 %}"},
			moved: map[string]float64{"b": 110}},
		{name: "late", extra: []string{"steps:", "  - {id: a, at: 100 s, valve: VB, to: 10 %}"}, want: map[string]float64{"a": 130}, how: how{changes: network.Changes{Shift: map[string]float64{"a": 30}}}},
		{name: "early", extra: []string{"steps:", "  - {id: a, at: 100 s, valve: VB, to: 10 %}"}, want: map[string]float64{"a": 70}, how: how{changes: network.Changes{Shift: map[string]float64{"a": -30}}}},
		{name: "falling", text: filling(), extra: []string{"steps:", "  - {id: a, at: 100 s, valve: VA, to: 100 %, over: 0 s}", "  - {id: b, when: {rising: A, below: 0.5 mm/s}, valve: VB, to: 1 %}"}, want: map[string]float64{"b": 100}},
		{name: "passed", text: strings.Replace(tub, "kv: 1000, stroke: 0 s", "kv: 100000, open: 100 %", 1), extra: []string{"steps:", "  - {id: a, when: {passed: LB, above: 0.5 m3}, valve: VA, to: 1 %}"}, want: map[string]float64{"a": 2000 * math.Ln2}},
		{name: "difference", text: filling(), extra: []string{"steps:", "  - {id: a, when: {difference: [A, B], above: 1.4 m}, valve: VB, to: 10 %}"}, want: map[string]float64{"a": 400}},
		{name: "opening", extra: []string{"steps:", "  - {id: a, at: 100 s, valve: VA, to: 100 %}", "  - {id: b, when: {opening: VA, above: 25 %}, valve: VB, to: 10 %}"}, want: map[string]float64{"b": 105}},
		{name: "flow", extra: []string{"steps:", "  - {id: a, at: 100 s, valve: VA, to: 100 %, over: 0 s}", "  - {id: b, when: {flow: LA, above: 0.1 L/s}, valve: VB, to: 10 %}"}, want: map[string]float64{"b": 100}},
		{name: "inflow set", extra: []string{"steps:", "  - {id: a, at: 100 s, inflow: A, to: 1 L/s}", "  - {id: b, when: {level: A, above: 2.1 m}, inflow: A, to: 0 L/s}"}, want: map[string]float64{"b": 200}},
		{name: "emptied", text: strings.Replace(tub, "kv: 1000, stroke: 0 s", "kv: 100000, open: 100 %", 1), extra: []string{"steps:", "  - {id: a, when: {emptied: B}, valve: VA, to: 1 %}"}, want: map[string]float64{"a": 2000 * math.Log(100)}},
		{name: "ties go by the list", extra: []string{"steps:", "  - {id: a, at: 100 s, valve: VB, to: 10 %}", "  - {id: b, at: 100 s, valve: VB, to: 20 %}", "  - {id: c, at: 100 s, valve: VB, to: 30 %}"},
			want: map[string]float64{"a": 100, "b": 100, "c": 100}},
	} {
		t.Run(c.name, func(t *testing.T) {
			text := c.text
			if text == "" {
				text = tub
			}
			runFor := "600 s"
			if c.name == "passed" || c.name == "emptied" {
				runFor = "12000 s"
			}
			if c.name == "clock" {
				runFor = "1300 s"
			}
			h := c.how
			h.tolerance = 1e-9
			r := run(t, plant(runFor, thin, text, strings.Join(c.extra, "\n")), h)
			for id, want := range c.want {
				abs := 1e-6
				if c.name == "passed" || c.name == "emptied" {
					abs = 0.02 // the valve's own loss is not in the closed form
				}
				near(t, id, done(t, r, id), want, abs)
			}
			for id, want := range c.moved {
				near(t, id+" moved by", value(t, id, step(t, r, id).MovedBy), want, 1e-9)
			}
			for _, id := range c.never {
				if s := step(t, r, id); s.Done != nil {
					t.Errorf("%s acted at %g s", id, *s.Done)
				}
			}
			if r.Verdict != network.Run {
				t.Errorf("verdict %s", r.Verdict)
			}
		})
	}
}

// A step that is never reached is a failure unless it is optional; a hold likewise.
func TestNeverReached(t *testing.T) {
	for _, c := range []struct {
		line string
		want network.Verdict
	}{
		{"{id: a, when: {level: B, above: 3 m}, valve: VB, to: 10 %}", network.DoNotRun},
		{"{id: a, when: {level: B, above: 3 m}, valve: VB, to: 10 %, optional: yes}", network.Run},
		{"{id: a, at: 700 s, valve: VB, to: 10 %}", network.DoNotRun},
		{"{id: a, when: {level: B, above: 3 m}, hold: sign, up_to: 10 s}", network.DoNotRun},
	} {
		r := run(t, plant("600 s", thin, tub, "steps:\n  - "+c.line), how{})
		if r.Verdict != c.want {
			t.Errorf("%s: verdict %s, want %s", c.line, r.Verdict, c.want)
		}
		if n := flagged(r, "step_never_reached", "a"); (n > 0) != (c.want == network.DoNotRun) {
			t.Errorf("%s: %d flags", c.line, n)
		}
	}
	// One reached exactly at the end is reached.
	r := run(t, plant("600 s", thin, tub, "steps:\n  - {id: a, at: 600 s, valve: VB, to: 10 %}"), how{})
	near(t, "at the end", done(t, r, "a"), 600, 0)
}

// The last of several steps at one time has the last word.
func TestTiesByTheList(t *testing.T) {
	r := run(t, plant("600 s", thin, tub, `
steps:
  - {id: c, after: a, valve: VB, to: 30 %}
  - {id: a, at: 100 s, valve: VB, to: 10 %}
  - {id: b, at: 100 s, valve: VB, to: 20 %}`), how{})
	near(t, "opening", at(t, r, r.Series.Opening["VB"], 600), 0.30, 1e-12) // c follows a, and so comes after b, that is due with a
}

// Batches, inflow tables with steps, steps that set an inflow, cancelled dumps: the volume is exact.
func TestInflows(t *testing.T) {
	vessel := func(more string) string {
		return "vessels:\n  A: {shape: {box: {length: 2 m, width: 1 m, height: 9 m}}, base: 0 m, level: 1 m, " + more + "}\n"
	}
	batches := "batches: [{id: d1, at: 100 s, volume: 0.3 m3, over: 60 s}, {id: d2, at: 130 s, volume: 0.5 m3, over: 10 s}]"
	for _, c := range []struct {
		name, vessel, steps string
		want                float64             // m³ in the end
		marks               map[float64]float64 // s → m³ that came in by then
	}{
		{"table with a step", vessel("inflow: [[0 s, 1 L/s], [100 s, 1 L/s], [100 s, 3 L/s], [200 s, 0 L/s]]"), "", 0.1 + 0.15, map[float64]float64{100: 0.1, 150: 0.1 + 0.05*2.25, 200: 0.25, 300: 0.25}},
		{"begins late", vessel("inflow: [[100 s, 1 L/s], [200 s, 3 L/s]]"), "", 0.1 + 0.2 + 1.2, map[float64]float64{100: 0.1, 200: 0.3}},
		{"before the start", vessel("inflow: [[0 s, 0 L/s], [50 s, 2 L/s], [50 s, 0 L/s]]"), "", 0.05, map[float64]float64{50: 0.05}},
		{"batches that overlap", vessel(batches), "", 0.8, map[float64]float64{100: 0, 130: 0.15, 140: 0.7, 160: 0.8}},
		{"cancelled before", vessel(batches), "steps: [{id: s, at: 90 s, cancel: d1}]", 0.5, map[float64]float64{130: 0, 140: 0.5}},
		{"cancelled as it begins", vessel(batches), "steps: [{id: s, at: 130 s, cancel: d2}]", 0.3, map[float64]float64{140: 0.2}},
		{"inflow set", vessel("inflow: 1 L/s, " + batches), "steps: [{id: s, at: 200 s, inflow: A, to: 0 L/s}, {id: u, at: 300 s, inflow: A, to: 2 L/s}]", 0.2 + 0.8 + 0.6, map[float64]float64{200: 1, 300: 1}},
		{"inflow set over a table", vessel("inflow: [[0 s, 1 L/s], [100 s, 1 L/s], [400 s, 4 L/s]]"), "steps: [{id: s, at: 50 s, inflow: A, to: 2 L/s}]", 0.05 + 1.1, nil},
	} {
		t.Run(c.name, func(t *testing.T) {
			var ends []string
			for k := range c.marks {
				ends = append(ends, fmt.Sprint(k))
			}
			r := run(t, plant("600 s", thin, "report_every: 10 s", c.vessel, c.steps), how{})
			within(t, "in", r.Vessels["A"].In, c.want, 1e-12)
			near(t, "end", r.Vessels["A"].EndVolume, 2+c.want, 1e-9)
			for s, want := range c.marks {
				near(t, fmt.Sprintf("at %g s", s), at(t, r, r.Series.Volume["A"], s), 2+want, 1e-9)
			}
		})
	}
}

// A batch cancelled while it runs stops there or runs out, but the books and the level agree.
func TestBatchCancelledWhileItRuns(t *testing.T) {
	r := run(t, plant("600 s", thin, `
vessels:
  A: {shape: {box: {length: 2 m, width: 1 m, height: 9 m}}, base: 0 m, level: 1 m, batches: [{id: d1, at: 100 s, volume: 0.6 m3, over: 60 s}]}
steps: [{id: s, at: 130 s, cancel: d1}]`), how{})
	v := r.Vessels["A"]
	within(t, "books and level", v.In, v.EndVolume-2, 1e-12)
	near(t, "stopped at once", v.In, 0.3, 1e-12)
}

// Series: a sample at every multiple of report_every from 0 to run_for, both sides of every step, and volume and level that belong together.
func TestSeries(t *testing.T) {
	for _, name := range []struct{ name, text string }{
		{"at rest early", plant("600 s", thin, "report_every: 7 s", tub)},
		{"steps", plant("600 s", thin, "report_every: 7 s", filling(), "steps: [{id: a, at: 70 s, valve: VA, to: 50 %}, {id: b, at: 71.5 s, valve: VB, to: 50 %}, {id: c, when: {level: A, above: 2.08 m}, valve: VB, to: 100 %}]")},
		{"run_for no multiple", plant("601 s", thin, "report_every: 7 s", filling())},
	} {
		t.Run(name.name, func(t *testing.T) {
			r := run(t, name.text, how{})
			time := r.Series.Time
			for i := 1; i < len(time); i++ {
				if time[i] < time[i-1] {
					t.Fatalf("time runs back at %g s", time[i])
				}
			}
			for k := 0; float64(k)*7 <= 600; k++ {
				at(t, r, time, float64(k)*7)
			}
			for tag, c := range r.Series.Level {
				if len(c) != len(time) || len(r.Series.Volume[tag]) != len(time) {
					t.Fatalf("%s has %d samples of %d", tag, len(c), len(time))
				}
				for i := range c {
					if math.Abs(c[i]-r.Series.Volume[tag][i]) > 1e-12 { // 1 m²
						t.Fatalf("%s at %g s: level %.15g, volume %.15g", tag, time[i], c[i], r.Series.Volume[tag][i])
					}
				}
			}
			if name.name != "steps" {
				return
			}
			for _, s := range []float64{71.5, 80} {
				n := 0
				for _, x := range time {
					if math.Abs(x-s) < 1e-6 {
						n++
					}
				}
				if n != 2 {
					t.Errorf("%d samples at %g s, want both sides", n, s)
				}
			}
		})
	}
}
