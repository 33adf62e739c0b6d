package study_test

import (
	"context"
	"fmt"
	"math"
	"strings"
	"testing"

	"headfall/network"
	"headfall/network/study"
)

// onTheDay makes readings of a plant that is not quite as planned.
func onTheDay(t *testing.T, load study.Load, until float64, vessels []string, times ...float64) string {
	t.Helper()
	p, err := load()
	if err != nil {
		t.Fatal(err)
	}
	p.RunFor, p.ReportEvery = until, 5
	model, err := network.Compile(p, network.Options{})
	if err != nil {
		t.Fatal(err)
	}
	res, err := model.Run(context.Background(), network.RunOptions{Series: true})
	if err != nil {
		t.Fatal(err)
	}
	var b strings.Builder
	b.WriteString("time [s]")
	for _, v := range vessels {
		fmt.Fprintf(&b, ",%s [m]", v)
	}
	for _, at := range times {
		fmt.Fprintf(&b, "\n%.0f", at)
		for _, v := range vessels {
			for i, s := range res.Series.Time {
				if s >= at {
					fmt.Fprintf(&b, ",%.3f", res.Series.Level[v][i])
					break
				}
			}
		}
	}
	return b.String()
}

// TestTrack: two readings of a tank whose valve passes less than planned give the rate and the finish that the plant then has.
func TestTrack(t *testing.T) {
	plan, real := demo(t, "cellar", "G"), demo(t, "cellar", "G", "HV-1.kv=60")
	csv := onTheDay(t, real, 3000, []string{"TA-1"}, 600, 1800)
	res, err := study.Track(context.Background(), plan, study.TrackOptions{Options: study.Options{Samples: -1}, Readings: reads(t, plan, csv)})
	if err != nil {
		t.Fatal(err)
	}
	want, err := study.Judge(context.Background(), real, study.Options{Samples: -1})
	if err != nil {
		t.Fatal(err)
	}
	t.Logf("%s %.3f of %s, fitted %+v, TA-1 %.0f s (truly %.0f s, planned %.0f s), %v", res.Pace, *res.Ratio, res.By, res.Fitted, *res.Forecast.Emptied["TA-1"], *want.Vessels["TA-1"].EmptiedAt, *res.Forecast.Planned, res.Suspects)
	if res.Pace != "slow" || math.Abs(*res.Forecast.Emptied["TA-1"]-*want.Vessels["TA-1"].EmptiedAt) > 60 {
		t.Errorf("%s, TA-1 empty at %.0f s, truly %.0f s", res.Pace, *res.Forecast.Emptied["TA-1"], *want.Vessels["TA-1"].EmptiedAt)
	}
	if math.Abs(res.Fitted[0].Factor-0.8) > 0.02 || res.ExitCode != 0 || res.Forecast.Verdict != network.Run {
		t.Errorf("factor %.3f, exit %d, %s %s", res.Fitted[0].Factor, res.ExitCode, res.Forecast.Verdict, res.Forecast.Why)
	}
}

// TestTrackSuspects: what the readings look like is said.
func TestTrackSuspects(t *testing.T) {
	plan := demo(t, "cellar", "G")
	for name, c := range map[string]struct{ csv, want, pace string }{
		"as planned": {onTheDay(t, demo(t, "cellar", "G"), 3000, []string{"TA-1"}, 600, 1800), "", "on_plan"},
		"stuck":      {"time,TA-1 [m]\n06:10,5.40\n06:40,5.40", "TA-1 does not move", "not_moving"},
		"plugging":   {"time,TA-1 [m]\n06:10,5.20\n06:30,4.50\n06:50,4.30", "plugging", "slow"},
		"open wide":  {"time,TA-1 [m]\n06:10,5.20\n06:40,3.00", "further open", "fast"},
		"one stray":  {"time,TA-1 [m]\n06:10,5.25\n06:20,4.10\n06:30,4.55\n06:40,4.20", "06:20 (4.10) fits neither", ""},
	} {
		res, err := study.Track(context.Background(), plan, study.TrackOptions{Options: study.Options{Samples: -1}, Readings: reads(t, plan, c.csv)})
		if err != nil {
			t.Fatal(name, err)
		}
		said := strings.Join(res.Suspects, "; ")
		t.Logf("%s: %s %v; %s; %s", name, res.Pace, *res.Ratio, said, res.Forecast.Verdict)
		if c.want == "" && said != "" || !strings.Contains(said, c.want) || c.pace != "" && res.Pace != c.pace {
			t.Errorf("%s: %s, %q, want %q", name, res.Pace, said, c.want)
		}
	}
}
