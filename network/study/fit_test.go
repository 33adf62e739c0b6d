package study_test

import (
	"context"
	"fmt"
	"math"
	"math/rand/v2"
	"os"
	"path/filepath"
	"strings"
	"testing"

	"headfall/network"
	"headfall/network/study"
	"headfall/scenarios"
)

// loads reads a plant from text.
func loads(text string) study.Load {
	return func() (*network.Plant, error) {
		return scenarios.Load("plant.yaml", []byte(text), scenarios.Options{})
	}
}

// measured reads a plant and its readings from testdata/fit.
func measured(t *testing.T, name string) (study.Load, *study.Readings) {
	t.Helper()
	dir := filepath.Join("..", "..", "testdata", "fit")
	text, err := os.ReadFile(filepath.Join(dir, name+".yaml"))
	if err != nil {
		t.Fatal(err)
	}
	csv, err := os.ReadFile(filepath.Join(dir, name+".csv"))
	if err != nil {
		t.Fatal(err)
	}
	load := loads(string(text))
	return load, reads(t, load, string(csv))
}

func reads(t *testing.T, load study.Load, csv string) *study.Readings {
	t.Helper()
	plant, err := load()
	if err != nil {
		t.Fatal(err)
	}
	r, err := study.ReadReadings(strings.NewReader(csv), plant)
	if err != nil {
		t.Fatal(err)
	}
	return r
}

// TestMeasured holds fits to measured data: the source of each is in the CSV.
func TestMeasured(t *testing.T) {
	for _, c := range []struct {
		name, vary string
		low, high  float64
		says       string
	}{
		{"tapered_tank", "HOLE.orifice.cd", 0.655, 0.695, "a least-squares fit elsewhere gave 0.677; two runs differ by 3 %"},
		{"tube_20", "TUBE.fittings.k", 0.9, 1.9, "1.5 with a sharp entrance gave 205 s where 199 were measured"},
		{"tube_40", "TUBE.fittings.k", 1.5, 3.2, "1.5 with a sharp entrance gave 241 s where 266 were measured"},
	} {
		t.Run(c.name, func(t *testing.T) {
			load, readings := measured(t, c.name)
			res, err := study.Fit(context.Background(), load, study.FitOptions{Vary: []string{c.vary}, Readings: readings})
			if err != nil {
				t.Fatal(err)
			}
			v := res.Values[0]
			t.Logf("%s %s (%s), scatter %.1f mm, %d runs, persistence %.2f, %v", v.Name, v.Says, res.Verdict, 1000*res.Scatter, res.Work.Runs, res.Together, res.Warnings)
			if v.Value < c.low || v.Value > c.high {
				t.Errorf("%s = %.4g, want %.4g to %.4g: %s", v.Name, v.Value, c.low, c.high, c.says)
			}
		})
	}
}

const bench = `headfall: 1
title: Drain test
start: "2027-03-02 06:00"
run_for: 2 h
liquid: {water: 15 °C}
vessels:
  T-1:
    shape: {upright_cylinder: {diameter: 2 m, height: 3 m}}
    base: 2 m
    level: 2.5 m ± 5 mm
    gauge: {tag: LT-1, zero: 0.1 m, span: 2.8 m, shows: percent}
outside:
  AIR: {free_fall: {elevation: 1 m}}
lines:
  L-1:
    from: T-1
    to: AIR
    parts:
      - pipe: {length: 4 m, bore: 60 mm, roughness: 0.05 mm}
      - orifice: {diameter: 40 mm, cd: 0.62}
      - valve: {tag: V-1, kv: 70, open: 100 %}
`

// noisy makes n readings of a plant over a time, with normal noise.
func noisy(t *testing.T, text string, n int, over, noise float64, seed uint64) string {
	t.Helper()
	plant, err := loads(text)()
	if err != nil {
		t.Fatal(err)
	}
	plant.RunFor, plant.ReportEvery = over, over/1000
	model, err := network.Compile(plant, network.Options{})
	if err != nil {
		t.Fatal(err)
	}
	res, err := model.Run(context.Background(), network.RunOptions{Series: true})
	if err != nil {
		t.Fatal(err)
	}
	rnd := rand.New(rand.NewPCG(seed, 1))
	var b strings.Builder
	b.WriteString("time [s],T-1 [m]\n")
	for i := range n {
		k := (i + 1) * (len(res.Series.Time) - 1) / n
		fmt.Fprintf(&b, "%.3f,%.4f\n", res.Series.Time[k], res.Series.Level["T-1"][k]+noise*rnd.NormFloat64())
	}
	return b.String()
}

// TestRecovers is the acceptance check of a drain test: 0.62 within 2 % from twenty readings with 5 mm of noise; and in nineteen of twenty
// such tests, more or less, the band holds it.
func TestRecovers(t *testing.T) {
	inside := 0
	const tests = 20
	start := strings.Replace(bench, "cd: 0.62", "cd: 0.70", 1)
	for seed := range tests {
		csv := noisy(t, bench, 20, 1200, 0.005, uint64(seed))
		res, err := study.Fit(context.Background(), loads(start), study.FitOptions{Vary: []string{"L-1.orifice.cd"}, Readings: reads(t, loads(start), csv)})
		if err != nil {
			t.Fatal(err)
		}
		v := res.Values[0]
		if math.Abs(v.Value/0.62-1) > 0.02 {
			t.Errorf("seed %d: cd = %.4f, want 0.62 within 2 %%", seed, v.Value)
		}
		if *v.Low <= 0.62 && 0.62 <= *v.High {
			inside++
		}
		if seed == 0 {
			t.Logf("%s, from readings alone %.4f to %.4f, %d runs", v.Says, *v.Low, *v.High, res.Work.Runs)
		}
	}
	t.Logf("the band holds 0.62 in %d of %d tests", inside, tests)
	if inside < 16 {
		t.Errorf("the band holds the truth in %d of %d tests only", inside, tests)
	}
}

// TestOutliers: a quarter of wild readings does not matter.
func TestOutliers(t *testing.T) {
	csv := noisy(t, bench, 20, 1200, 0.003, 7)
	rows := strings.Split(strings.TrimSpace(csv), "\n")
	for i, wrong := range map[int]string{3: "2.9", 9: "0.4", 10: "0.4", 15: "1.9"} {
		rows[i] = strings.Split(rows[i], ",")[0] + "," + wrong
	}
	res, err := study.Fit(context.Background(), loads(bench), study.FitOptions{Vary: []string{"L-1.orifice.cd"}, Readings: reads(t, loads(bench), strings.Join(rows, "\n"))})
	if err != nil {
		t.Fatal(err)
	}
	if v := res.Values[0]; math.Abs(v.Value/0.62-1) > 0.02 || res.Used != 16 {
		t.Errorf("cd = %.4f with %d of 20 readings, want 0.62 with 16", v.Value, res.Used)
	}
}

// TestNotApart: an orifice and a valve in one line cannot be told apart by a level.
func TestNotApart(t *testing.T) {
	csv := noisy(t, bench, 20, 1200, 0.003, 7)
	res, err := study.Fit(context.Background(), loads(bench), study.FitOptions{Vary: []string{"L-1.orifice.cd", "V-1.kv"}, Readings: reads(t, loads(bench), csv)})
	if err != nil {
		t.Fatal(err)
	}
	if res.Verdict != study.NotApart || res.ExitCode != 1 || !strings.Contains(strings.Join(res.Warnings, "\n"), "cannot be told apart") {
		t.Errorf("verdict %s, exit %d, %v", res.Verdict, res.ExitCode, res.Warnings)
	}
	res, err = study.Fit(context.Background(), loads(bench), study.FitOptions{Vary: []string{"V-1.leaks"}, Readings: reads(t, loads(bench), csv)})
	if err != nil {
		t.Fatal(err)
	}
	if res.Verdict != study.NotApart {
		t.Errorf("a leak of an open valve: verdict %s, %v", res.Verdict, res.Warnings)
	}
}

// TestStartLevel: a coefficient and the start level are fitted together.
func TestStartLevel(t *testing.T) {
	csv := noisy(t, bench, 20, 1200, 0.003, 3)
	start := strings.Replace(strings.Replace(bench, "cd: 0.62", "cd: 0.66", 1), "level: 2.5 m", "level: 2.56 m", 1)
	res, err := study.Fit(context.Background(), loads(start), study.FitOptions{Vary: []string{"L-1.cd", "T-1.level"}, Readings: reads(t, loads(start), csv)})
	if err != nil {
		t.Fatal(err)
	}
	if cd, level := res.Values[0].Value, res.Values[1].Value; math.Abs(cd/0.62-1) > 0.02 || math.Abs(level-2.5) > 0.01 {
		t.Errorf("cd %.4f, level %.4f (%s), want 0.62 and 2.5", cd, level, res.Verdict)
	}
}
