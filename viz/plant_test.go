package viz

import (
	"fmt"
	"math"
	"strings"
	"testing"
	"time"

	"headfall/elements"
	"headfall/network"
)

// make builds an element of a room with numbers, words and rows by key.
func make1(t testing.TB, room elements.Room, name string, set map[string]any) elements.Element {
	t.Helper()
	k := elements.Lookup(room, name)
	if k == nil {
		t.Fatalf("no kind %s %q", room, name)
	}
	e := k.New()
	var p elements.Params
	e.Bind(&p)
	for key, v := range set {
		found := false
		for _, q := range p.List {
			if q.Key != key {
				continue
			}
			found = true
			switch x := v.(type) {
			case float64:
				*q.Num = x
			case string:
				*q.Text = x
			case [][]float64:
				*q.Rows = x
			}
			if q.Given != nil {
				*q.Given = true
			}
		}
		if !found {
			t.Fatalf("%s %q has no key %q", room, name, key)
		}
	}
	if err := e.Ready(); err != nil && name != "weir" {
		t.Fatalf("%s %q: %v", room, name, err)
	}
	return e
}

func vessel(t testing.TB, tag, kind string, base, level float64, set map[string]any) *network.Vessel {
	t.Helper()
	e := make1(t, elements.Shapes, kind, set).(elements.Shaped)
	s, err := e.Shape(0)
	if err != nil {
		t.Fatal(err)
	}
	nan := math.NaN()
	return &network.Vessel{Tag: tag, Kind: kind, Element: e, Shape: s, Base: base, Level: level, Contents: nan, Rim: nan, RimLength: nan, EmptyAt: nan}
}

type m = map[string]any

func fitted(t testing.TB, name, kind string, set m) *network.Fitted {
	t.Helper()
	return &network.Fitted{Kind: elements.Lookup(elements.Parts, kind), Part: make1(t, elements.Parts, kind, set).(elements.Part), Name: name}
}

func outside(t testing.TB, tag, kind string, set m) *network.Outside {
	t.Helper()
	return &network.Outside{Tag: tag, Kind: kind, Element: make1(t, elements.Beyond, kind, set).(elements.Outsider)}
}

func pipe(t testing.TB, length, bore float64) *network.Fitted {
	return fitted(t, "pipe", "pipe", m{"length": length, "bore": bore, "roughness": 5e-5})
}

func ptr(x float64) *float64 { return &x }

// cascade is a small plant: two vessels over a header into a sump with a pump, an overflow and a river.
func cascade(t testing.TB) Page {
	t1 := vessel(t, "T-1", "upright_cylinder", 11.4, 4.2, m{"diameter": 3.2, "height": 5.0})
	t1.Alarms = []*network.Alarm{{Name: "high-high", When: network.Condition{Subject: network.Level, Of: []string{"T-1"}, Above: true, Bound: 4.6}}}
	t1.Gauge = &network.Gauge{Tag: "LT-1", Zero: 0.05, Span: 4.8, Percent: true}
	t2 := vessel(t, "T-2", "lying_cylinder", 8.1, 1.9, m{"diameter": 2.4, "length": 6.0})
	t2.Cover = &network.Cover{Pressure: 101325, Temperature: 288, Vacuum: 500, Overpress: 2000,
		Vents: []*network.VesselVent{{Tag: "VN-2", Kind: "hole"}}}
	sump := vessel(t, "SUMP", "box", 4.0, 0.3, m{"length": 4.0, "width": 3.0, "height": 2.2})
	lines := []*network.Line{
		{Tag: "L-1", From: "T-1", To: "HDR", Leaves: network.Port{Form: network.Invert, Height: 0.05}, Parts: []*network.Fitted{pipe(t, 24, 0.0825),
			fitted(t, "V-1", "valve", m{"tag": "V-1", "kv": 95.0, "stroke": 15.0, "turns": 12.0, "location": "cellar N wall"})}},
		{Tag: "L-2", From: "T-2", To: "HDR", Parts: []*network.Fitted{fitted(t, "L-2.orifice", "orifice", m{"diameter": 0.04, "cd": 0.62}),
			fitted(t, "V-2", "valve", m{"tag": "V-2", "kv": 60.0})}},
		{Tag: "L-3", From: "HDR", To: "SUMP", Enters: network.Port{Form: network.Centre, Height: 2.0}, Parts: []*network.Fitted{pipe(t, 18, 0.107),
			fitted(t, "L-3.high_point", "high_point", m{"elevation": 7.9}), pipe(t, 22, 0.107)}},
		{Tag: "OVF", From: "T-2", To: "GY-1", Leaves: network.Port{Form: network.Crest, Height: 2.2}, Parts: []*network.Fitted{
			fitted(t, "OVF.weir", "weir", nil)}},
		{Tag: "P-LINE", From: "SUMP", To: "AIR", Parts: []*network.Fitted{
			fitted(t, "P-1", "pump", m{"tag": "P-1", "rate": 0.004}), fitted(t, "NRV-1", "check_valve", m{"tag": "NRV-1", "kv": 60.0}), pipe(t, 30, 0.08)}},
		{Tag: "SIP", From: "SUMP", To: "RIVER", Leaves: network.Port{Form: network.Dip, Height: 0.2}, Parts: []*network.Fitted{pipe(t, 12, 0.05)}},
	}
	p := &network.Plant{Title: "Rinse-water cascade, autumn shutdown", Revision: "B", File: "cascade.yaml", SHA256: strings.Repeat("7c1e", 16),
		Text: "headfall: 1\ntitle: Rinse-water cascade, autumn shutdown\n", Start: time.Date(2027, 10, 9, 6, 0, 0, 0, time.UTC), RunFor: 21600, ReportEvery: 20,
		Gravity: 9.80665, Atmosphere: 101325, Vessels: []*network.Vessel{t1, t2, sump}, Tees: []*network.Tee{{Tag: "HDR", Elevation: 6.2}},
		Outside: []*network.Outside{outside(t, "AIR", "free_fall", m{"elevation": 5.1}), outside(t, "GY-1", "gully", m{"elevation": 5.0, "capacity": 0.006}),
			outside(t, "RIVER", "water", m{"surface": [][]float64{{0, 2.4}, {21600, 3.9}}})},
		Lines: lines, Defaults: []string{"rim of T-1: the top of the shape, 5 m"}, Assume: network.Assume{Doubts: "default"}}
	r := simulate(p, map[string][2]float64{"V-1": {300, 0.5}, "V-2": {1800, 1}})
	r.Steps = []*network.StepResult{
		{ID: "s1", Who: "cellar", Says: "OPEN V-1 to 50 %", Due: ptr(300), Done: ptr(300), MovedBy: ptr(307.5), Where: "cellar N wall", Turns: ptr(6),
			Expect: &network.Expect{Read: "T-1", At: 900, Low: 3.7, Mid: 3.75, High: 3.81}, StopIf: "SUMP rises over 10 mm/min"},
		{ID: "s2", Who: "cellar", Says: "OPEN V-2 to 100 %", Due: ptr(1800), Done: ptr(1800), MovedBy: ptr(1800), Note: "listen at the header for air"},
		{ID: "s3", Who: "yard", Says: "SHUT V-1", Due: ptr(9000), Done: ptr(9000), MovedBy: ptr(9015)},
	}
	r.Holds = []*network.HoldResult{{ID: "h1", Says: "shift lead signs that P-1 runs", Who: "lead", At: ptr(2400), UpTo: 1800, LongestWait: ptr(1260)}}
	lvl := func(id int, says string, of string, bound float64, worst, at, margin float64, v network.Verdict) *network.LimitResult {
		return &network.LimitResult{ID: id, Subject: "level", Of: []string{of}, Bound: "below", BoundSI: ptr(bound), UnitSI: "m", Says: says, Verdict: v,
			Worst: ptr(worst), WorstAt: ptr(at), Margin: ptr(margin), MarginLow: ptr(margin - 0.11), MarginHigh: ptr(margin + 0.09)}
	}
	r.Limits = []*network.LimitResult{
		lvl(1, "level of SUMP below 1.9 m", "SUMP", 1.9, r.Vessels["SUMP"].PeakLevel, r.Vessels["SUMP"].PeakAt, 1.9-r.Vessels["SUMP"].PeakLevel, network.Fails),
		lvl(2, "level of T-2 below 2.2 m", "T-2", 2.2, 1.9, 0, 0.3, network.Holds),
		{ID: 3, Subject: "flow", Of: []string{"AIR"}, Bound: "below", BoundSI: ptr(0.005), UnitSI: "m3/s", Says: "flow into AIR below 18 m3/h", Verdict: network.TooClose,
			Worst: ptr(0.0049), WorstAt: ptr(2000), Margin: ptr(0.0001), MarginLow: ptr(-0.0003), MarginHigh: ptr(0.0004), Why: "consent"},
		{ID: 4, Subject: "emptied", Of: []string{"T-1"}, Bound: "below", BoundSI: ptr(14400), UnitSI: "s", Says: "T-1 emptied within 4 h", Verdict: network.Holds,
			Worst: ptr(9120), WorstAt: ptr(9120), Margin: ptr(5280)},
		{ID: 5, Subject: "level", Of: []string{"T-1"}, Bound: "below", BoundSI: ptr(5), UnitSI: "m", Says: "T-1 below its rim", Verdict: network.Holds, Worst: ptr(4.2), WorstAt: ptr(0), Margin: ptr(0.8), Implicit: true},
	}
	r.Limits[0].FirstFail = ptr(5400)
	r.Bands = map[string]map[string]network.Band{"peak_level_m": {"SUMP": {Low: ptr(1.75), Mid: ptr(1.86), High: ptr(2.0)}},
		"emptied_at_s": {"T-1": {Low: ptr(8900), Mid: ptr(9120), High: ptr(9500)}}}
	r.Vessels["T-1"].EmptiedAt, r.Vessels["T-1"].EmptyAtLevel = ptr(9120.4), ptr(0.08)
	r.Flags = []*network.Flag{{Kind: "air_drawn_in", Where: "L-1", From: 8800, To: 9100, Says: "the inlet of L-1 runs part air", Do: "flow will surge and be slower than shown"},
		{Kind: "ran_backwards", Where: "L-2", From: 600, To: 720, Says: "liquid runs back into T-2", Do: "a shut valve on the sheet must be proved shut"}}
	r.LineUp = []network.LineUpRow{{Valve: "V-1", Position: "shut", Where: "cellar N wall", Kind: "valve"}, {Valve: "V-2", Position: "shut", Kind: "valve", Opens: "T-2 to SUMP"}, {Valve: "P-1", Position: "auto", Kind: "pump"}}
	r.Handover = []*network.HandoverBlock{{At: 18000, Levels: map[string]float64{"T-1": 0.05, "T-2": 0.2, "SUMP": 0.5}, Rates: map[string]float64{"SUMP": -1e-5},
		Valves: map[string]float64{"V-1": 0, "V-2": 1}, Pumps: map[string]string{"P-1": "auto"}, NextStep: "none", NextLimit: "none"}}
	r.Cautions = []string{"Prove the vent of T-2 open by sight before opening the drain. Vacuum damage can occur within seconds."}
	r.Verdict, r.ExitCode = network.DoNotRun, 1
	r.Allowance = network.Allowance{Doubts: "default", Samples: 200, Seed: 1}
	r.Assumptions = []network.Assumption{{What: "V-1.kv ± 15 %", Because: "no doubt stated"}}
	return Page{Plant: p, Result: r}
}

// simulate makes a result of the right form by drawing levels down with the root of the head; the figures are for show, not for the plant.
func simulate(p *network.Plant, opens map[string][2]float64) *network.Result {
	r := &network.Result{Schema: 1, Command: "run", Program: network.Program{Name: "headfall", Version: "0.0.0-test"}, Verdict: network.Run, Complete: true,
		Stopped: "time", End: p.RunFor, Vessels: map[string]*network.VesselResult{}, Lines: map[string]*network.LineResult{},
		Outside: map[string]*network.OutsideResult{}, Pumps: map[string]*network.PumpResult{}, Scenario: network.Scenario{Title: p.Title, File: p.File, SHA256: p.SHA256},
		Work: network.Work{Method: "rodas5p", Steps: 412, Rejected: 9, Evaluations: 3400, Events: 7, Wall: 0.004}}
	s := &network.Series{Level: map[string][]float64{}, Volume: map[string][]float64{}, Gas: map[string][]float64{}, Flow: map[string][]float64{},
		Opening: map[string][]float64{}, Running: map[string][]float64{}, TeeHead: map[string][]*float64{}, Crest: map[string][]float64{}}
	r.Series = s
	times := []float64{}
	for t := 0.0; t < p.RunFor; t += p.ReportEvery {
		for _, o := range opens {
			if o[0] >= t && o[0] < t+p.ReportEvery && o[0] > 0 {
				if o[0] > t {
					times = append(times, t)
				}
				times = append(times, o[0])
				t = o[0]
			}
		}
		times = append(times, t)
	}
	s.Time = append(times, p.RunFor)
	level := map[string]float64{}
	vol := map[string]float64{}
	for _, v := range p.Vessels {
		level[v.Tag] = v.Level
		vol[v.Tag], _ = v.Shape.Volume(v.Level)
		r.Vessels[v.Tag] = &network.VesselResult{StartLevel: v.Level, StartVolume: vol[v.Tag], PeakLevel: v.Level, LowLevel: v.Level,
			HeadroomTo: network.Headroom{}}
		if v.Cover != nil {
			r.Vessels[v.Tag].Gas = &network.GasResult{Low: -312, LowAt: 61}
		}
	}
	for _, l := range p.Lines {
		r.Lines[l.Tag] = &network.LineResult{}
	}
	for _, o := range p.Outside {
		r.Outside[o.Tag] = &network.OutsideResult{}
	}
	valve := map[string]string{}
	for _, l := range p.Lines {
		for _, f := range l.Parts {
			if a, ok := f.Part.(elements.Actuated); ok {
				valve[l.Tag] = a.Actuator().Tag
			}
		}
	}
	before := map[string]float64{}
	for i, t := range s.Time {
		dt := 0.0
		if i > 0 {
			dt = t - s.Time[i-1]
		}
		for _, l := range p.Lines {
			vol[l.From] -= before[l.Tag] * dt
			vol[l.To] += before[l.Tag] * dt
		}
		for _, v := range p.Vessels {
			vol[v.Tag] = math.Max(vol[v.Tag], 0)
			h, _ := v.Shape.Level(vol[v.Tag])
			level[v.Tag] = h
			q := r.Vessels[v.Tag]
			if h > q.PeakLevel {
				q.PeakLevel, q.PeakAt = h, t
			}
			if h < q.LowLevel {
				q.LowLevel, q.LowAt = h, t
			}
			q.EndLevel, q.EndVolume, q.Left = h, vol[v.Tag], vol[v.Tag]
			s.Level[v.Tag] = append(s.Level[v.Tag], h)
			s.Volume[v.Tag] = append(s.Volume[v.Tag], vol[v.Tag])
			if v.Cover != nil {
				s.Gas[v.Tag] = append(s.Gas[v.Tag], -312*math.Exp(-t/3000))
			}
		}
		into := map[string]float64{}
		for _, l := range p.Lines {
			open := 1.0
			if tag, ok := valve[l.Tag]; ok {
				open = 0
				if o, ok := opens[tag]; ok && (t > o[0] || t == o[0] && i > 0 && s.Time[i-1] == t) {
					open = o[1]
				}
				s.Opening[tag] = append(s.Opening[tag], open)
			}
			h := level[l.From]
			q := 0.004 * open * math.Sqrt(math.Max(h-l.Leaves.Height, 0))
			if _, tee := level[l.From]; !tee {
				q = into[l.From]
			}
			into[l.To] += q
			before[l.Tag] = q
			if l.Tag == "L-2" && t > 600 && t < 720 {
				q = -0.0008
			}
			s.Flow[l.Tag] = append(s.Flow[l.Tag], q)
			x := r.Lines[l.Tag]
			if q > x.PeakFlow {
				x.PeakFlow, x.PeakFlowAt = q, t
			}
			x.Forward += q * dt
			for _, f := range l.Parts {
				if h, ok := f.Part.(elements.Humps); ok {
					_ = h
					s.Crest[l.Tag] = append(s.Crest[l.Tag], -2-400*q)
				}
				if d, ok := f.Part.(elements.Pumps); ok {
					on := 0.0
					if q > 0.002 {
						on = 1
					}
					s.Running[d.Drive().Tag] = append(s.Running[d.Drive().Tag], on)
				}
			}
		}
		for _, tee := range p.Tees {
			s.TeeHead[tee.Tag] = append(s.TeeHead[tee.Tag], ptr(7))
		}
	}
	for _, v := range p.Vessels {
		rim := rimOf(v) - r.Vessels[v.Tag].PeakLevel
		r.Vessels[v.Tag].HeadroomTo.Rim = &rim
	}
	r.Balance = network.Balance{Start: 40, Out: 31, Left: 9, Relative: 1e-15}
	return r
}

// large is 40 vessels in 8 trains of 5, 60 lines, over 24 h.
func large(t testing.TB, every float64) Page {
	p := &network.Plant{Title: "Forty vessels", Revision: "A", File: "forty.yaml", SHA256: strings.Repeat("ab12", 16), RunFor: 86400, ReportEvery: every,
		Gravity: 9.80665, Atmosphere: 101325, Start: time.Date(2027, 10, 9, 6, 0, 0, 0, time.UTC)}
	opens := map[string][2]float64{}
	add := func(tag, from, to string, leaves network.Port) {
		v := "V-" + tag
		p.Lines = append(p.Lines, &network.Line{Tag: tag, From: from, To: to, Leaves: leaves, Parts: []*network.Fitted{pipe(t, 20, 0.08),
			fitted(t, v, "valve", m{"tag": v, "kv": 95.0})}})
		opens[v] = [2]float64{300 + 977*float64(len(p.Lines)), 0.2 + 0.2*float64(len(p.Lines)%5)}
	}
	p.Tees = []*network.Tee{{Tag: "HDR-A", Elevation: 3}, {Tag: "HDR-B", Elevation: 2.5}}
	for a := range 8 {
		for b := range 5 {
			kind, set := "upright_cylinder", m{"diameter": 2 + 0.3*float64(b), "height": 3 + 0.4*float64(a%3)}
			if b == 2 {
				kind, set = "lying_cylinder", m{"diameter": 2.2, "length": 4.0}
			} else if b == 4 {
				kind, set = "box", m{"length": 4.0, "width": 3.0, "height": 2.5}
			}
			p.Vessels = append(p.Vessels, vessel(t, fmt.Sprintf("T-%d%d", a+1, b+1), kind, 26-5*float64(b)+0.3*float64(a), 2.1-0.35*float64(b), set))
		}
	}
	for a := range 8 {
		tag := func(b int) string { return fmt.Sprintf("T-%d%d", a+1, b+1) }
		for b := range 4 {
			add(fmt.Sprintf("L-%d%d", a+1, b+1), tag(b), tag(b+1), network.Port{})
		}
		add(fmt.Sprintf("D-%d", a+1), tag(4), []string{"HDR-A", "HDR-B"}[a%2], network.Port{})
		if a < 7 {
			add(fmt.Sprintf("X-%d", a+1), tag(1), fmt.Sprintf("T-%d3", a+2), network.Port{Form: network.Centre, Height: 1.2})
		}
		if a < 6 {
			add(fmt.Sprintf("Y-%d", a+1), tag(2), fmt.Sprintf("T-%d5", a+3), network.Port{Form: network.Invert, Height: 0.2})
		}
	}
	p.Outside = []*network.Outside{outside(t, "SEWER", "free_fall", m{"elevation": 1.0}), outside(t, "DITCH", "water", m{"surface": [][]float64{{0, 0.4}}})}
	add("M-A", "HDR-A", "SEWER", network.Port{})
	add("M-B", "HDR-B", "DITCH", network.Port{})
	for len(p.Lines) < 60 {
		add(fmt.Sprintf("Z-%d", len(p.Lines)), "T-11", "HDR-A", network.Port{Form: network.Centre, Height: 0.5})
	}
	r := simulate(p, opens)
	return Page{Plant: p, Result: r}
}
