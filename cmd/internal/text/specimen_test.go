package text_test

import (
	"time"

	"headfall/network"
)

func at(s float64) *float64 { return &s }

// cascade is an invented plant; the results made for it are by hand.
func cascade() *network.Plant {
	return &network.Plant{
		Title: "Wash-water cascade", Revision: "C", Start: time.Date(2027, 10, 9, 6, 0, 0, 0, time.UTC),
		Vessels:  []*network.Vessel{{Tag: "T-1"}, {Tag: "T-2"}, {Tag: "PIT"}},
		Lines:    []*network.Line{{Tag: "L-1", From: "T-1", To: "HDR"}, {Tag: "L-2", From: "T-2", To: "HDR"}},
		Steps:    []*network.Step{{ID: "s1"}, {ID: "s2"}, {ID: "s3", Optional: true}},
		Defaults: []string{"V-1.stroke is 0 s", "L-1 leaves from the bottom"},
	}
}

func good() *network.Result {
	start, noCase := "2027-10-09T06:00:00", ""
	return &network.Result{
		Schema: 1, Command: "run", Verdict: network.Run, Complete: true, End: 4 * 3600, Stopped: "at_rest",
		Scenario:  network.Scenario{Title: "Wash-water cascade", Revision: "C", Start: &start, Case: &noCase},
		Allowance: network.Allowance{Doubts: "default", Samples: 200, Seed: 1},
		Vessels: map[string]*network.VesselResult{
			"T-1": {StartLevel: 4.2, PeakLevel: 4.2, HeadroomTo: network.Headroom{Alarm: at(0.4), Rim: at(0.7999)}, StartVolume: 30, EndVolume: 0.3,
				EndLevel: 0.08, EmptiedAt: at(9120.4)},
			"T-2": {StartLevel: 0.6, PeakLevel: 0.723, PeakAt: 430, HeadroomTo: network.Headroom{Sill: at(1.477), Rim: at(1.677)},
				StartVolume: 6, EndVolume: 0.82, EndLevel: 0.121, LeftWhy: "below the outlet"},
			"PIT": {StartLevel: 0.3, PeakLevel: 1.6234, PeakAt: 5400, HeadroomTo: network.Headroom{Rim: at(0.5766)}, StartVolume: 3.6, EndVolume: 5},
		},
		Lines: map[string]*network.LineResult{
			"L-1": {Forward: 29.7},
			"L-2": {Backward: 0.4123, RunsBackward: []network.Reversal{{From: 12, To: 730, Volume: 0.4123, Peak: 0.00091}}},
		},
		Steps: []*network.StepResult{
			{ID: "s1", Says: "OPEN V-1 to 50 %", Done: at(300)}, {ID: "s2", Says: "SHUT V-1", Done: at(9240)}, {ID: "s3", Says: "THROTTLE V-2 to 10 %"},
		},
		Holds: []*network.HoldResult{{ID: "h1", At: at(2400), UpTo: 1800, LongestWait: at(1299)}},
		Limits: []*network.LimitResult{
			{ID: 1, Subject: "level", Of: []string{"PIT"}, Bound: "below", BoundSI: at(1.9), UnitSI: "m", AsWritten: "1.9 m", Verdict: network.Holds,
				Worst: at(1.6234), WorstAt: at(5400), Margin: at(0.2766), MarginLow: at(0.051), MarginHigh: at(0.412)},
			{ID: 2, Subject: "emptied", Of: []string{"T-1"}, Bound: "within", BoundSI: at(14400), UnitSI: "s", AsWritten: "4 h", Verdict: network.Holds,
				Worst: at(9120.4), Margin: at(5279.6)},
			{ID: 3, Subject: "level", Of: []string{"T-1"}, Bound: "below", BoundSI: at(5), UnitSI: "m", AsWritten: "rim 5 m", Implicit: true,
				Verdict: network.Holds, Worst: at(4.2), WorstAt: at(0), Margin: at(0.8)},
		},
		Alarms: []*network.AlarmResult{{Vessel: "PIT", Name: "high", At: at(4000), Have: at(1399), Need: at(131)}},
		Flags: []*network.Flag{
			{Kind: "ran_backwards", Where: "L-2", From: 12, To: 730, Says: "L-2 ran backwards."},
			{Kind: "air_drawn_in", Where: "L-1", From: 8800, To: 9120, Says: "L-1 draws in air at T-1", Do: "expect a slower, surging flow"},
			{Kind: "air_drawn_in", Where: "L-1", From: 9200, To: 9300, Says: "L-1 draws in air at T-1", Do: "expect a slower, surging flow"},
		},
		Bands:       map[string]map[string]network.Band{"emptied_at_s": {"T-1": {Low: at(8900), Mid: at(9120), High: at(9500)}}},
		Assumptions: []network.Assumption{{What: "V-1.kv ± 15 %", Because: "no doubt stated"}, {What: "V-2.kv ± 15 %", Because: "no doubt stated"}},
		Cautions: []string{"Planning estimate from the data in the file. Check against local rules, the site permit and a competent engineer before use. " +
			"It does not replace isolation, gas test, or an independent level reading.",
			"T-1 is emptied but still connected: it is not isolated by this plan.", "T-2 is emptied but still connected: it is not isolated by this plan.",
			"Alarm high of PIT gives little time."},
	}
}

func failing() *network.Result {
	r := good()
	r.Verdict, r.ExitCode = network.DoNotRun, 1
	pit := r.Vessels["PIT"]
	pit.PeakLevel, pit.HeadroomTo.Rim, pit.Spilled = 2.231, at(-0.031), 3.4567
	l := r.Limits[0]
	l.Verdict, l.Worst, l.Margin, l.MarginLow, l.MarginHigh, l.FirstFail = network.Fails, at(2.231), at(-0.331), at(-0.45), at(-0.2), at(2519)
	l.Why = "bund drain gulley"
	r.Limits = append(r.Limits, &network.LimitResult{ID: 4, Subject: "level", Of: []string{"PIT"}, Bound: "below", BoundSI: at(2.2), UnitSI: "m",
		AsWritten: "its rim", Implicit: true, Verdict: network.Fails, Worst: at(2.231), WorstAt: at(5400), Margin: at(-0.031), FirstFail: at(3301), AtUpTo: true})
	r.Steps[1].Done = nil
	r.Alarms[0].Have = at(100)
	return r
}

func close() *network.Result {
	r := good()
	r.Verdict, r.ExitCode = network.TooClose, 1
	l := r.Limits[0]
	l.Verdict, l.Worst, l.Margin, l.MarginLow, l.MarginHigh, l.FailsShare = network.TooClose, at(1.896), at(0.004), at(-0.11), at(0.09), 0.415
	return r
}

func interrupted() *network.Result {
	r := good()
	r.Verdict, r.ExitCode, r.Complete, r.End, r.Stopped = network.NotJudged, 130, false, 4000, "interrupted"
	for _, l := range r.Limits {
		l.Verdict = network.NotJudged
	}
	r.Limits[1].Verdict, r.Limits[1].FirstFail = network.Fails, at(14400) // after what was computed
	r.Holds, r.Steps[1].Done = nil, nil
	r.Vessels["T-1"].EmptiedAt = nil
	return r
}

// overnight goes past midnight and reads in mm and L/s; it names no limit and allows for no doubt.
func overnight() (*network.Plant, *network.Result) {
	p, r := cascade(), good()
	p.Start = time.Date(2027, 10, 9, 22, 30, 0, 0, time.UTC)
	p.Show = network.Show{Level: "mm", Flow: "L/s", Volume: "L"}
	r.Limits, r.Allowance.Doubts, r.Bands, r.Assumptions = r.Limits[2:], "none", nil, nil
	return p, r
}

// elapsed is a plan without a start, over in minutes.
func elapsed() (*network.Plant, *network.Result) {
	p, r := cascade(), failing()
	p.Start = time.Time{}
	r.Scenario.Start = nil
	r.Limits[0].FirstFail, r.Limits[3].FirstFail = at(5.04), at(446.2)
	return p, r
}
