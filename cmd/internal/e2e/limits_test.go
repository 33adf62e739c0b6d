package e2e

import (
	"fmt"
	"math"
	"testing"

	"headfall/network"
)

// limitCase is a limit on a plant whose course is known, with what must come out.
type limitCase struct {
	name          string
	text          string
	verdict       network.Verdict
	first         float64 // s; NaN: none
	worst, margin float64 // NaN: not looked at
	worstAt       float64 // NaN: not looked at
	abs           float64 // tolerance of worst; 0: 1e-6 of it
}

// pulse is a vessel of 1 m² with an inflow by rows; nothing leaves it. Start 2027-01-01 22:00.
func pulse(rows, limit string) string {
	return plant("4 h", thin, `start: "2027-01-01 22:00"`, `
vessels:
  A: {shape: {box: {length: 1 m, width: 1 m, height: 90 m}}, base: 0 m, level: 1 m, inflow: `+rows+`}`, "limits:\n  - "+limit)
}

// through is a steady stream that follows its inflow at once: 1 cm² of surface, a linear outlet of 10 s/m², so that it lags 1 ms. OUT receives the rows.
func through(rows, limits string, more ...string) string {
	return plant("4 h", append([]string{thin, `start: "2027-01-01 22:00"`, `
vessels:
  A: {shape: {box: {length: 1 cm, width: 1 cm, height: 90 m}}, base: 0 m, level: 0 m, inflow: ` + rows + `}
outside:
  OUT: {free_fall: {elevation: 0 m}}
lines:
  L: {from: A, to: OUT, inlet: full, parts: [{resistance: {linear: 10 s/m2}}]}`, limits}, more...)...)
}

func TestLimits(t *testing.T) {
	nan := math.NaN()
	hour := "[[0 h, 0 m3/h], [1 h, 0 m3/h], [1 h, 3.6 m3/h], [2 h, 3.6 m3/h], [2 h, 0 m3/h]]" // 1 L/s from 23:00 to 24:00
	for _, c := range []limitCase{
		{"level below, holds", pulse(hour, "{level: A, below: 5 m}"), network.Holds, nan, 4.6, 0.4, 7200, 0},
		{"level below, fails", pulse(hour, "{level: A, below: 2 m}"), network.Fails, 3600 + 1000, 4.6, -2.6, 7200, 0},
		{"level just met", pulse(hour, "{level: A, below: 4.6 m}"), network.Holds, nan, 4.6, 0, nan, 0},
		{"level above, fails at the start", pulse(hour, "{level: A, above: 1.5 m}"), network.Fails, 0, 1, -0.5, 0, 0},
		{"window by elapsed time", pulse(hour, "{level: A, below: 2 m, until: 70 min}"), network.Holds, nan, 1.6, 0.4, 4200, 0},
		{"window by the clock, past midnight", pulse(hour, `{level: A, above: 4 m, since: "+1d 00:30"}`), network.Holds, nan, 4.6, 0.6, nan, 0},
		{"window by the clock, bare after midnight", pulse(hour, `{level: A, above: 4 m, since: "00:30"}`), network.Holds, nan, 4.6, 0.6, nan, 0},
		{"window opens by condition", pulse(hour, "{level: A, below: 4 m, since: {level: A, above: 3 m}}"), network.Fails, 3600 + 3000, 4.6, -0.6, nan, 0},
		{"window closes by condition", pulse(hour, "{level: A, below: 3.5 m, until: {level: A, above: 3 m}}"), network.Holds, nan, 3, 0.5, 3600 + 2000, 0},
		{"window that never opens", pulse(hour, "{level: A, below: 0.5 m, since: {level: A, above: 30 m}}"), network.Holds, nan, nan, nan, nan, 0},
		{"rising at once", pulse(hour, "{rising: A, below: 0.5 mm/s}"), network.Fails, 3600, 1e-3, -0.5e-3, nan, 0},
		{"rising, averaged", pulse(hour, "{rising: A, below: 0.5 mm/s, averaged_over: 20 min}"), network.Fails, 3600 + 600, 1e-3, -0.5e-3, nan, 0},
		{"rising, averaged, holds", pulse(hour, "{rising: A, below: 0.6 mm/s, averaged_over: 2 h}"), network.Holds, nan, 0.5e-3, 0.1e-3, nan, 0},
		{"an average longer than the run", pulse(hour, "{rising: A, below: 0.1 mm/s, averaged_over: 5 h}"), network.Holds, nan, nan, nan, nan, 0},

		{"flow of a line", through(hour, "limits:\n  - {flow: L, below: 3 m3/h}"), network.Fails, 3600, 1e-3, 3/3600.0 - 1e-3, nan, 1e-8},
		{"flow into an outside point", through(hour, "limits:\n  - {flow: OUT, below: 4 m3/h}"), network.Holds, nan, 1e-3, 4/3600.0 - 1e-3, nan, 1e-8},
		{"flow, averaged over 15 min", through(hour, "limits:\n  - {flow: OUT, below: 1.8 m3/h, averaged_over: 15 min}"), network.Fails, 3600 + 450, 1e-3, -0.5e-3, nan, 1e-8},
		{"flow, averaged over 2 h", through(hour, "limits:\n  - {flow: OUT, below: 2 m3/h, averaged_over: 2 h}"), network.Holds, nan, 0.5e-3, 2/3600.0 - 0.5e-3, nan, 1e-8},
		{"flow above, averaged: the first full window counts", through("3.6 m3/h", "limits:\n  - {flow: OUT, above: 3 m3/h, averaged_over: 30 min}"), network.Holds, nan, 1e-3, 1e-3 - 3/3600.0, nan, 1e-6},
		{"passed", through(hour, "limits:\n  - {passed: OUT, below: 2 m3}"), network.Fails, 3600 + 2000, 3.6, -1.6, nan, 1e-4},
		{"passed by the calendar day", through("3.6 m3/h", "limits:\n  - {passed: OUT, below: 7.3 m3, each: day}"), network.Holds, nan, 7.2, 0.1, nan, 0.02},
		{"passed by the calendar day, fails on the second", through("[[0 h, 3.6 m3/h], [2 h, 3.6 m3/h], [2 h, 7.2 m3/h]]", "limits:\n  - {passed: OUT, below: 7.3 m3, each: day}"), network.Fails, 7200 + 3650, 14.4, -7.1, nan, 0.02},
		{"passed in any hour", through(hour, "limits:\n  - {passed: OUT, below: 1.8 m3, in_any: 1 h}"), network.Fails, 3600 + 1800, 3.6, -1.8, 7200, 1e-4},
		{"passed in any two hours of a steady stream", through("3.6 m3/h", "limits:\n  - {passed: OUT, below: 7.3 m3, in_any: 2 h}"), network.Holds, nan, 7.2, 0.1, nan, 1e-3},
		{"only between, holds over midnight", through(hour, `limits: [{flow: OUT, only_between: ["23:00", "00:10"]}]`), network.Holds, nan, nan, nan, nan, 0},
		{"only between, starts too early", through(hour, `limits: [{flow: OUT, only_between: ["23:30", "02:00"]}]`), network.Fails, 3600, 1e-3, nan, nan, 1e-8},
		{"only between, runs on too long", through(hour, `limits: [{flow: OUT, only_between: ["22:30", "23:30"]}]`), network.Fails, 5400, 1e-3, nan, nan, 1e-8},
		{"level of a stream", through(hour, "limits:\n  - {level: A, below: 15 mm}"), network.Holds, nan, 0.01, 0.005, nan, 1e-6},
	} {
		t.Run(c.name, func(t *testing.T) {
			r := run(t, c.text, how{tolerance: 1e-9})
			l := limit(t, r, 1)
			if l.Verdict != c.verdict {
				t.Errorf("verdict %s, want %s", l.Verdict, c.verdict)
			}
			want := network.Run
			if c.verdict == network.Fails {
				want = network.DoNotRun
			}
			if r.Verdict != want {
				t.Errorf("of the run: %s", r.Verdict)
			}
			switch {
			case math.IsNaN(c.first) && l.FirstFail != nil:
				t.Errorf("fails at %g s", *l.FirstFail)
			case !math.IsNaN(c.first):
				near(t, "first fail", value(t, "first fail", l.FirstFail), c.first, 0.05)
			}
			see := func(what string, got *float64, want, abs float64) {
				if !math.IsNaN(want) {
					near(t, what, value(t, what, got), want, math.Max(abs, 1e-6*math.Abs(want)))
				}
			}
			see("worst", l.Worst, c.worst, c.abs)
			see("margin", l.Margin, c.margin, math.Max(c.abs, 1e-6*math.Abs(c.worst)))
			see("worst at", l.WorstAt, c.worstAt, 0.05)
		})
	}
}

// Windows that wait for a hold: until it is signed the limit counts, then not.
func TestLimitUntilAfter(t *testing.T) {
	for _, c := range []struct {
		up   bool
		want network.Verdict
	}{{false, network.Holds}, {true, network.Fails}} {
		r := run(t, plant("4000 s", thin, filling(), `
steps:
  - {id: h, at: 400 s, hold: sign, up_to: 200 s}
  - {id: a, after: h, inflow: A, to: 2 L/s}
limits:
  - {level: A, below: 2.5 m, until: {after: h}}
  - {level: A, above: 2.3 m, since: {after: h}}`), how{changes: network.Changes{HoldsUpTo: c.up}})
		if l := limit(t, r, 1); l.Verdict != c.want {
			t.Errorf("up_to %v: %s", c.up, l.Verdict)
		} else if c.up {
			near(t, "fails", value(t, "fails", l.FirstFail), 500, 1e-4)
			near(t, "worst", value(t, "worst", l.Worst), 2.6, 1e-6)
			near(t, "window ends", value(t, "end", l.Window[1]), 600, 1e-9)
		}
		if l := limit(t, r, 2); l.Verdict != network.Holds {
			t.Errorf("since: %+v", l)
		}
	}
}

// Emptied limits, within and by, and the default of empty_at: 10 mm over the lowest outlet here, since 1 % of 0.5 m³ on 1 m² is 5 mm.
func TestEmptied(t *testing.T) {
	text := func(limit string) string {
		return plant("4 h", thin, `start: "2027-01-01 22:00"`, `
vessels:
  A: {shape: {box: {length: 1 m, width: 1 m, height: 2 m}}, base: 0 m, level: 0.5 m}
outside:
  OUT: {free_fall: {elevation: 0 m}}
lines:
  L: {from: A, to: OUT, inlet: full, parts: [{resistance: {linear: 1000 s/m2}}]}`, "limits:\n  - "+limit)
	}
	at := 1000 * math.Log(50)
	for _, c := range []struct {
		limit string
		want  network.Verdict
	}{
		{fmt.Sprintf("{emptied: A, within: %.3f s}", at+0.1), network.Holds},
		{fmt.Sprintf("{emptied: A, within: %.3f s}", at-0.1), network.Fails},
		{`{emptied: A, by: "23:06"}`, network.Holds},
		{`{emptied: A, by: "23:05"}`, network.Fails},
	} {
		r := run(t, text(c.limit), how{tolerance: 1e-9})
		near(t, "emptied", value(t, "emptied", r.Vessels["A"].EmptiedAt), at, 1e-4)
		if l := limit(t, r, 1); l.Verdict != c.want {
			t.Errorf("%s: %+v", c.limit, l)
		}
	}
}

// Pumps by levels with hysteresis: a sump of 1 m² that gains 1 L/s and is pumped at 3 L/s between 1.2 and 0.4 m goes through 0.8 m in 800 s up and 400 s
// down. Starts in an hour and running time follow.
func TestPumpHysteresis(t *testing.T) {
	text := func(more string) string {
		return plant("14000 s", thin, `
vessels:
  S: {shape: {box: {length: 1 m, width: 1 m, height: 3 m}}, base: 0 m, level: 0.4 m, inflow: 1 L/s}
outside:
  OUT: {free_fall: {elevation: 0 m}}
lines:
  P: {from: S, to: OUT, inlet: full, entry: 0, exit: 0, parts: [{pump: {tag: P-1, rate: 3 L/s, mode: auto, starts: {level: S, above: 1.3 m}, stops: {level: S, below: 0.4 m}}}]}`, more)
	}
	r := run(t, text("limits:\n  - {starts: P-1, below: 3, each: hour}\n  - {starts: P-1, below: 4, each: hour}\n  - {starts: P-1, below: 10}"), how{tolerance: 1e-9})
	p := r.Pumps["P-1"]
	if p.Starts != 10 || p.MostInHour != 3 { // at 900 s and every 1350 s
		t.Errorf("%+v", p)
	}
	near(t, "ran", p.Ran, 4500, 0.5)
	near(t, "peak", r.Vessels["S"].PeakLevel, 1.3, 1e-7)
	near(t, "low", r.Vessels["S"].LowLevel, 0.4, 1e-7)
	for i, want := range []network.Verdict{network.Fails, network.Holds, network.Fails} {
		if l := limit(t, r, i+1); l.Verdict != want {
			t.Errorf("limit %d: %+v", i+1, l)
		}
	}
	// Off by a step, automatic again above the start level, which starts it at once, and failing.
	r = run(t, text(`
steps:
  - {id: s1, at: 700 s, pump: P-1, to: "off"}
  - {id: s2, at: 1000 s, pump: P-1, to: auto}
upsets:
  - {pump: P-1, fails_at: 1400 s}`), how{tolerance: 1e-9})
	p = r.Pumps["P-1"]
	if p.Starts != 1 {
		t.Errorf("%d starts", p.Starts)
	}
	near(t, "ran", p.Ran, 400, 1e-6)
}

// A standby pump takes over when the one it stands by for fails.
func TestStandby(t *testing.T) {
	r := run(t, plant("1000 s", thin, `
vessels:
  S: {shape: {box: {length: 1 m, width: 1 m, height: 5 m}}, base: 0 m, level: 3 m, inflow: 1 L/s}
outside:
  OUT: {free_fall: {elevation: 0 m}}
lines:
  P: {from: S, to: OUT, inlet: full, parts: [{pump: {tag: P-1, rate: 1 L/s, mode: on}}]}
  Q: {from: S, to: OUT, inlet: full, parts: [{pump: {tag: P-2, rate: 1 L/s, mode: standby, standby_for: P-1}}]}
upsets:
  - {pump: P-1, fails_at: 400 s}`), how{})
	near(t, "P-1 ran", r.Pumps["P-1"].Ran, 400, 1e-9)
	near(t, "P-2 ran", r.Pumps["P-2"].Ran, 600, 1e-9)
	near(t, "level", r.Vessels["S"].EndLevel, 3, 1e-4)
	near(t, "P-1 passed", r.Lines["P"].Forward, 0.4, 1e-4)
}
