package study_test

import (
	"context"
	"testing"

	"headfall/network/study"
)

// TestFlows: the equalisation tank's outlet, whose flows a practitioner's sheet gives at 1.1 m: 22.8 m3/h wide open, 15.7 at 50 %, 11.6 at 35 % (within
// 3 %).
func TestFlows(t *testing.T) {
	res, err := study.Flows(context.Background(), demo(t, "equalisation", ""), study.Options{}, "HV-5")
	if err != nil {
		t.Fatal(err)
	}
	for i := range res.Rows {
		t.Logf("%.0f %%: %.2f %.2f %.2f m3/h", 100*res.Rows[i].Opening, 3600*res.Rows[i].Flows[0], 3600*res.Rows[i].Flows[1], 3600*res.Rows[i].Flows[2])
	}
	for i, want := range map[int]float64{10: 22.8, 6: 18.9, 5: 15.7} {
		if got := 3600 * res.Rows[i].Flows[0]; got < 0.97*want || got > 1.03*want {
			t.Errorf("at %d0 %%: %.2f m3/h, want %.1f within 3 %%", i, got, want)
		}
	}
	for i := 1; i < len(res.Rows); i++ {
		for k := range res.Heads {
			if res.Rows[i].Flows[k] < res.Rows[i-1].Flows[k] {
				t.Errorf("%s head: the flow falls at %.0f %%", res.Heads[k].Name, 100*res.Rows[i].Opening)
			}
		}
	}
	if res.Rows[0].Flows[0] != 0 || len(res.Notes) != 0 {
		t.Errorf("shut: %g m3/s; %v", res.Rows[0].Flows[0], res.Notes)
	}
}

// TestCompare: the cellar's cases under one set of limits; only G runs.
func TestCompare(t *testing.T) {
	var all []study.Contender
	for _, c := range []string{"", "A", "C", "G"} {
		all = append(all, study.Contender{Name: c, File: "cellar.yaml", Load: demo(t, "cellar", c)})
	}
	res, err := study.Compare(context.Background(), all, study.Options{Samples: -1})
	if err != nil {
		t.Fatal(err)
	}
	for _, r := range res.Rows {
		t.Logf("%q %s %s, worst %s %.2f m to %s, %v", r.Name, r.Verdict, r.Why, r.Vessel, *r.Headroom, r.To, r.Peaks)
	}
	if res.Best != "G" || res.ExitCode != 0 || len(res.Rows) != 4 {
		t.Errorf("best %q, exit %d, %d rows", res.Best, res.ExitCode, len(res.Rows))
	}
}

// TestCompareFiles: several files are judged by the limits of the first.
func TestCompareFiles(t *testing.T) {
	all := []study.Contender{
		{Name: "a", File: "cellar.yaml", Load: demo(t, "cellar", "G")},
		{Name: "b", File: "cellar_free.yaml", Load: demo(t, "cellar_free", "")},
	}
	res, err := study.Compare(context.Background(), all, study.Options{Samples: -1})
	if err != nil {
		t.Fatal(err)
	}
	if res.Best != "a" || res.Rows[1].Verdict != "do_not_run" || len(res.Limits) != 5 {
		t.Errorf("best %q, %s, %d limits", res.Best, res.Rows[1].Verdict, len(res.Limits))
	}
	all[1] = study.Contender{Name: "c", File: "equalisation.yaml", Load: demo(t, "equalisation", "")}
	if _, err := study.Compare(context.Background(), all, study.Options{Samples: -1}); err == nil {
		t.Error("a plant without those tags was compared")
	}
}
