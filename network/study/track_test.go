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

const twoTanks = `headfall: 1
title: Two tanks
start: "2027-03-02 06:00"
run_for: 3 h
liquid: {water: 15 °C}
assume: {doubts: none}
vessels:
  T-1: {shape: {box: {length: 2 m, width: 2 m, height: 3 m}}, base: 4 m, level: 2.5 m}
  T-2: {shape: {box: {length: 2 m, width: 2 m, height: 3 m}}, base: 0 m, level: 0.2 m}
lines:
  L-1:
    from: T-1
    to: T-2
    enters: {centre: 2.9 m}
    parts:
      - pipe: {length: 6 m, bore: 60 mm, roughness: 0.05 mm}
      - orifice: {diameter: 40 mm, cd: 0.62}
limits:
  - {level: T-2, below: 2.8 m}
  - {emptied: T-1, within: 2 h}
`

// TestTrackGauges: where the vessel below gains what the one above does not lose, a gauge is wrong, not the line.
func TestTrackGauges(t *testing.T) {
	load := loads(twoTanks)
	right := onTheDay(t, load, 1800, []string{"T-1", "T-2"}, 300, 900)
	rows := strings.Split(right, "\n")
	for _, c := range []struct{ csv, want, verdict string }{
		{right, "", "run"},
		{rows[0] + "\n" + rows[1] + "\n900," + strings.Split(rows[1], ",")[1] + "," + strings.Split(rows[2], ",")[2], "the gauge of T-1", ""},
		{"time [s],T-1 [m]\n0,2.52", "", "run"},
		{"time [s],T-1 [m]\n300," + strings.Split(rows[1], ",")[1], "", "run"},
		{"time [s],T-2 [m]\n300,2.60", "", "do_not_run"},
	} {
		res, err := study.Track(context.Background(), load, study.TrackOptions{Readings: reads(t, load, c.csv)})
		if err != nil {
			t.Fatal(c.csv, err)
		}
		said := strings.Join(res.Suspects, "; ")
		if c.want == "" && said != "" || !strings.Contains(said, c.want) || c.verdict != "" && string(res.Forecast.Verdict) != c.verdict {
			t.Errorf("%s: %q, want %q; %s, want %s", c.csv, said, c.want, res.Forecast.Verdict, c.verdict)
		}
	}
}

// TestTrackSteps: a step done late and one not done yet are taken as they are.
func TestTrackSteps(t *testing.T) {
	plan := demo(t, "cellar", "G")
	late := demo(t, "cellar", "G", "s1.at=06:10")
	csv := onTheDay(t, late, 3000, []string{"TA-1"}, 900, 1800)
	res, err := study.Track(context.Background(), plan, study.TrackOptions{Options: study.Options{Samples: -1}, Readings: reads(t, plan, csv), Done: map[string]float64{"s1": 600}})
	if err != nil {
		t.Fatal(err)
	}
	if res.Pace != "on_plan" || len(res.Suspects) > 0 {
		t.Errorf("%s %v", res.Pace, res.Suspects)
	}
	_, err = study.Track(context.Background(), plan, study.TrackOptions{Readings: reads(t, plan, csv), Pending: map[string]bool{"s7": true}})
	if err == nil || !strings.Contains(err.Error(), `no step "s7"`) {
		t.Error(err)
	}
}
