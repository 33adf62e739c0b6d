package cli_test

import (
	"bytes"
	"context"
	"encoding/json"
	"fmt"
	"os"
	"slices"
	"strings"
	"testing"

	"headfall/cmd/internal/cli"
	"headfall/scenarios"
)

// command runs one command line in the working folder and wants an exit code; it returns what went to standard output.
func command(t *testing.T, code int, args ...string) []byte {
	t.Helper()
	var out, errs bytes.Buffer
	s := &cli.Streams{In: strings.NewReader(""), Out: &out, Err: &errs, Env: func(string) string { return "" }}
	if got := cli.Main(context.Background(), s, args); got != code {
		t.Fatalf("%q ended with %d, want %d: %s", args, got, code, errs.String())
	}
	return out.Bytes()
}

// demo puts a demo plant into the working folder.
func demo(t *testing.T, name string) string {
	t.Helper()
	data, ok := scenarios.Demo(name)
	if !ok {
		t.Fatalf("no demo %s", name)
	}
	if err := os.WriteFile(name, data, 0o666); err != nil {
		t.Fatal(err)
	}
	return name
}

// wholeFile puts the format's own example into the working folder; without doubts, which take seconds.
func wholeFile(t *testing.T) string {
	t.Helper()
	data, err := os.ReadFile("../../../testdata/scenarios/whole_file.yaml")
	if err != nil {
		t.Fatal(err)
	}
	t.Chdir(t.TempDir())
	if err := os.WriteFile("whole_file.yaml", bytes.Replace(data, []byte("doubts: default"), []byte("doubts: none"), 1), 0o666); err != nil {
		t.Fatal(err)
	}
	return "whole_file.yaml"
}

func readJSON(t *testing.T, data []byte) (v map[string]any) {
	t.Helper()
	if err := json.Unmarshal(data, &v); err != nil {
		t.Fatal(err)
	}
	return v
}

// The JSON of run has every key of the documented example (testdata/contract/run.json), with the documented kind of value. Keys that it has
// besides are listed here, so that none comes by accident.
func TestJSONHasTheDocumentedKeys(t *testing.T) {
	data, err := os.ReadFile("testdata/contract/run.json")
	if err != nil {
		t.Fatal(err)
	}
	page := readJSON(t, data)
	whole := wholeFile(t)
	runs := []any{
		readJSON(t, command(t, 1, "run", whole, "--no-report", "--json", "-")),
		readJSON(t, command(t, 1, "run", demo(t, "cellar.yaml"), "--no-report", "--json", "-")),
		readJSON(t, command(t, 0, "run", demo(t, "hillside.yaml"), "--no-report", "--json", "-")),
	}
	w := &walk{t: t, beyond: map[string]bool{}}
	w.object("", page, runs)
	for key := range w.beyond {
		if !slices.Contains(beyondThePage, key) {
			t.Errorf("%s is not on the page", key)
		}
	}
}

var beyondThePage = []string{"allowance", "series_band", "vessels.*.empty_at_m", "vessels.*.left_why", "vessels.*.peak_spill_m3_s", "lines.*.holds_m3",
	"outside.*.peak_flow_at_s", "steps.note", "steps.stop_if", "steps.turns", "steps.where", "steps.who", "holds.who", "limits.at_up_to", "limits.implicit",
	"limits.margin_high_si", "limits.margin_low_si", "limits.says", "alarms.says", "flags.do", "flags.size", "line_up.kind", "line_up.opens",
	"line_up.where", "series.crest_m"}

// walk compares a documented value with what real runs have in its place.
type walk struct {
	t      *testing.T
	beyond map[string]bool
}

// tagged are the objects whose keys are tags of the plant.
func tagged(path string) bool {
	switch path {
	case "vessels", "lines", "outside", "pumps", "bands.emptied_at_s", "bands.peak_level_m", "steps.levels_m", "steps.flows_m3_s":
		return true
	}
	return strings.HasPrefix(path, "series.")
}

func (w *walk) value(path string, page any, real []any) {
	real = slices.DeleteFunc(slices.Clone(real), func(v any) bool { return v == nil })
	switch page := page.(type) {
	case map[string]any:
		w.object(path, page, real)
	case []any:
		var all []any
		for _, v := range real {
			list, ok := v.([]any)
			if !ok {
				w.t.Fatalf("%s is %T", path, v)
			}
			all = append(all, list...)
		}
		if len(page) > 0 {
			w.value(path, page[0], all)
		}
	case nil:
	default:
		for _, v := range real {
			if want, got := fmt.Sprintf("%T", page), fmt.Sprintf("%T", v); got != want {
				w.t.Fatalf("%s is %s, the page has %s", path, got, want)
			}
		}
	}
}

func (w *walk) object(path string, page map[string]any, real []any) {
	dot := path + "."
	if path == "" {
		dot = ""
	}
	if tagged(path) {
		var all []any
		for _, v := range real {
			for _, x := range v.(map[string]any) {
				all = append(all, x)
			}
		}
		for _, v := range page {
			w.value(dot+"*", v, all)
			return
		}
		return
	}
	for key, v := range page {
		var all []any
		for _, r := range real {
			x, ok := r.(map[string]any)[key]
			if !ok && path != "bands" { // bands are of samples, where there are any
				w.t.Errorf("%s%s is missing", dot, key)
			}
			all = append(all, x)
		}
		w.value(dot+key, v, all)
	}
	for _, r := range real {
		for key := range r.(map[string]any) {
			if _, ok := page[key]; !ok {
				w.beyond[dot+key] = true
			}
		}
	}
}

// The series hold a sample at every multiple of report_every from 0 to run_for, also after an end at rest.
func TestSeriesReachesTheEnd(t *testing.T) {
	for _, c := range []struct {
		file                string
		code                int
		reportEvery, runFor float64
	}{{wholeFile(t), 1, 10, 18 * 3600}, {demo(t, "hillside.yaml"), 0, 20, 6 * 3600}} {
		series := readJSON(t, command(t, c.code, "run", c.file, "--no-report", "--json", "-"))["series"].(map[string]any)
		at := map[float64]bool{}
		last := 0.0
		for _, v := range series["time_s"].([]any) {
			if v.(float64) < last {
				t.Fatalf("%s: %v comes after %v", c.file, v, last)
			}
			last = v.(float64)
			at[last] = true
		}
		for k := 0.0; k*c.reportEvery <= c.runFor; k++ {
			if !at[k*c.reportEvery] {
				t.Fatalf("%s: no sample at %g s", c.file, k*c.reportEvery)
			}
		}
	}
}

// The same file gives the same bytes, whatever the workers; wall time apart.
func TestSameFileSameBytes(t *testing.T) {
	t.Chdir(t.TempDir())
	file := demo(t, "hillside.yaml")
	written := func(workers string) (all [4][]byte) {
		command(t, 0, "run", file, "--workers", workers, "--html", "r.html", "--json", "r.json", "--csv", "r.csv", "--xlsx", "r.xlsx")
		for i, name := range []string{"r.html", "r.json", "r.csv", "r.xlsx"} {
			data, err := os.ReadFile(name)
			if err != nil {
				t.Fatal(err)
			}
			all[i] = without(data, `"wall_s"`)
		}
		return all
	}
	one, two := written("1"), written("2")
	for i, name := range []string{"HTML", "JSON", "CSV", "spreadsheet"} {
		if !bytes.Equal(one[i], two[i]) {
			t.Errorf("the %s differs", name)
		}
	}
}

// A file in plain form runs to the same answer, but for its name and its sum.
func TestPlainFormRunsAlike(t *testing.T) {
	whole := wholeFile(t)
	for file, code := range map[string]int{whole: 1, demo(t, "cellar.yaml"): 1, demo(t, "day_tank.yaml"): 0} {
		if err := os.WriteFile("plain.yaml", command(t, 0, "check", file, "--normalise"), 0o666); err != nil {
			t.Fatal(err)
		}
		answer := func(file string) []byte {
			return without(command(t, code, "run", file, "--no-report", "--json", "-"), `"wall_s"`, `"file"`, `"sha256"`)
		}
		if !bytes.Equal(answer(file), answer("plain.yaml")) {
			t.Errorf("%s in plain form gives another answer", file)
		}
	}
}

// without leaves out the lines that hold one of the words.
func without(data []byte, words ...string) []byte {
	var kept []byte
	for line := range bytes.Lines(data) {
		if !slices.ContainsFunc(words, func(w string) bool { return bytes.Contains(line, []byte(w)) }) {
			kept = append(kept, line...)
		}
	}
	return kept
}
