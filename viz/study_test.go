package viz

import (
	"strings"
	"testing"

	"headfall/network"
	"headfall/network/study"
)

// studied is the cascade with a drill and a spread.
func studied(t testing.TB) Page {
	p := cascade(t)
	p.Drill = &study.DrillResult{Outcome: study.Outcome{Complete: true}, Done: 4, Of: 4, Fails: 2, Cases: []*study.DrillRow{
		{Case: "V-1 sticks at 50 % when it should shut", Verdict: network.Fails, FirstFail: ptr(9900), Limit: "level of SUMP below 1.9 m", TimeToAct: ptr(171), Since: "high-high",
			Need: ptr(135), Answered: "holds", WorstVessel: "SUMP", Headroom: ptr(-0.02), Spilled: 0.4},
		{Case: "P-1 fails at 06:00", Verdict: network.Fails, FirstFail: ptr(6000), Limit: "level of SUMP below 1.9 m", TimeToAct: ptr(3600), WorstVessel: "SUMP", Headroom: ptr(0.1)},
		{Case: "s2 missed", Verdict: network.Fails, AsPlanned: true},
		{Case: "s1 30 min late", Verdict: network.Holds, WorstVessel: "T-1", Headroom: ptr(0.8)},
	}, Steps: []*study.MovedStep{{ID: "s1", Says: "OPEN V-1 to 50 %", At: 300, Earliest: ptr(0), Latest: ptr(4030)}, {ID: "s3", Says: "SHUT V-1", At: 9000, Unbounded: true, Fixed: true}}}
	in := []study.Influence{{What: "V-1.kv", Doubt: "± 15 %", Rank: 0.9, Share: 0.71}, {What: "T-1.level", Doubt: "± 20 mm", Rank: -0.4, Share: 0.16}}
	p.Spread = &study.SpreadResult{Samples: 500, AnyFails: study.Chance{Share: 0.12, Low: 0.094, High: 0.15}, Bands: p.Result.Bands,
		Limits: []*study.SpreadLimit{{ID: 1, Says: "level of SUMP below 1.9 m", Subject: "level", UnitSI: "m", Verdict: network.TooClose,
			Margin: network.Band{Low: ptr(-0.03), Mid: ptr(0.05), High: ptr(0.11)}, Fails: study.Chance{Share: 0.12, Low: 0.094, High: 0.15}, Influences: in}},
		Influences: map[string][]study.Influence{"emptied_at_s T-1": in}, Measure: &study.Measure{What: "V-1.kv", Doubt: "± 15 %", For: "level of SUMP below 1.9 m", Share: 0.71}}
	return p
}

func TestStudies(t *testing.T) {
	html := string(render(t, studied(t)))
	for _, want := range []string{"2 of 4 rehearsals", "2\u00a0min 51\u00a0s from high-high", "fails as planned", "to the end", "as early as can be", "Measure first: V-1.kv",
		"12\u00a0% (9\u00a0% to 15\u00a0%)", "more of it: less", "left:42%;width:8%"} {
		if !strings.Contains(html, want) {
			t.Errorf("the page lacks %q", want)
		}
	}
}

func TestCautionsAreMerged(t *testing.T) {
	p := cascade(t)
	p.Result.Cautions = []string{standing, "T-1 is emptied but still connected.", "T-2 is emptied but still connected.", "A word of its own."}
	got := cautions(p.Plant, p.Result)
	if len(got) != 3 || got[1] != "T-1 (also T-2) is emptied but still connected." {
		t.Errorf("%q", got)
	}
}
