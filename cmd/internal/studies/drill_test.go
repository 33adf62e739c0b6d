package studies

import (
	"math"
	"testing"

	"headfall/network"
	"headfall/network/study"
)

func cellar(t *testing.T) *study.DrillResult {
	return study.DrillOf(must(study.Drill(t.Context(), demo(t, "cellar_passing"), study.DrillOptions{}))(t))
}

// The latest time of the second tank of the cellar is not later than 07:38, and the pump's failure leaves about 20 min from alarm to rim, by a hand estimate
// (coarse quasi-steady, good to a few per cent).
func TestDrillOfCellar(t *testing.T) {
	d := cellar(t)
	if d.Plan.Verdict != network.Run || d.ExitCode != 0 || !d.Complete {
		t.Fatalf("the plan: %+v, exit code %d, complete %v", d.Plan, d.ExitCode, d.Complete)
	}
	start := 6 * 3600.0
	for _, m := range d.Steps {
		if m.ID == "s2" && math.Abs(start+*m.Latest-(7*3600+38*60)) > 150 {
			t.Errorf("s2 not later than %g s", *m.Latest)
		}
	}
	found := false
	for i, r := range d.Cases {
		if r.Case == "P-4 does not run at all" {
			found = true
			if r.Since != "alarm high-high of PIT-4" || r.TimeToAct == nil || math.Abs(*r.TimeToAct-20*60) > 150 || r.Spilled < 1 {
				t.Errorf("%+v", *r)
			}
		}
		if i > 0 && r.Verdict == network.Fails && d.Cases[i-1].Verdict == network.Holds {
			t.Errorf("%s fails but is ranked after one that holds", r.Case)
		}
	}
	if !found {
		t.Error("no rehearsal of the pump")
	}
}

// At its latest time every limit holds with a step, and a little later one does not.
func TestLatestIsTheLatest(t *testing.T) {
	b := bench(t, demo(t, "cellar_passing"))
	for _, m := range cellar(t).Steps {
		if m.Unbounded {
			continue
		}
		for _, c := range []struct {
			later float64
			fails bool
		}{{0, false}, {3, true}} {
			r := must(b.Run(t.Context(), network.RunOptions{Changes: network.Changes{Shift: map[string]float64{m.ID: *m.Latest - m.At + c.later}}}))(t)
			if got := r.Verdict == network.DoNotRun; got != c.fails {
				t.Errorf("%s %g s after its latest time: %s", m.ID, c.later, r.Verdict)
			}
		}
	}
}
