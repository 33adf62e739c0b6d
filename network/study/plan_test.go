package study_test

import (
	"context"
	"testing"
	"time"

	"headfall/network"
	"headfall/network/study"
)

// handMade is when the plan made by hand for the cellar ends, s: both valves at 50 %, the second from 07:15.
func handMade(t *testing.T) float64 {
	t.Helper()
	res, err := study.Judge(context.Background(), demo(t, "cellar", "G"), study.Options{Samples: -1})
	if err != nil || res.Verdict != network.Run {
		t.Fatal(res.Verdict, err)
	}
	return max(*res.Vessels["TA-1"].EmptiedAt, *res.Vessels["TA-2"].EmptiedAt)
}

// TestPlan: from a draft that fails, plan finds a plan that runs with its doubts allowed for, and that ends before the one made by hand.
func TestPlan(t *testing.T) {
	began := time.Now()
	res, err := study.Plan(context.Background(), demo(t, "cellar_free", ""), study.Options{Samples: 80})
	if err != nil {
		t.Fatal(err)
	}
	hand := handMade(t)
	t.Logf("%v, %s, finish %.0f s (by hand %.0f s), %d tried, %d judged, %v", res.Set, res.Verdict, *res.Finish, hand, res.Searched, res.Judged, time.Since(began))
	for _, b := range res.Binds {
		t.Logf("%s: %s", b.Move, b.Limit)
	}
	if !res.Found || res.Verdict != network.Run || *res.Finish >= hand {
		t.Errorf("found %v, %s, finish %.0f s; by hand %.0f s", res.Found, res.Verdict, *res.Finish, hand)
	}
	again, err := study.Judge(context.Background(), demo(t, "cellar_free", "", res.Set...), study.Options{Samples: 80})
	if err != nil || again.Verdict != network.Run {
		t.Errorf("the plan as --set would have it: %s, %v", again.Verdict, err)
	}
}

// TestNoPlan: where nothing that is free will do, that is said, with what cannot be kept.
func TestNoPlan(t *testing.T) {
	res, err := study.Plan(context.Background(), demo(t, "cellar_free", "", "PIT-4.level=2.5 m"), study.Options{Samples: -1})
	if err != nil {
		t.Fatal(err)
	}
	if res.Found || res.ExitCode != 1 || len(res.Fails) == 0 || res.Fails[0] != "level of PIT-4 below 2.40 m" {
		t.Errorf("found %v, exit %d, %v", res.Found, res.ExitCode, res.Fails)
	}
}
