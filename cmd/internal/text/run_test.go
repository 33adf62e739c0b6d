package text_test

import (
	"bytes"
	"flag"
	"os"
	"path/filepath"
	"regexp"
	"strings"
	"testing"

	"headfall/cmd/internal/text"
	"headfall/network"
)

var update = flag.Bool("update", false, "write the golden files anew")

// The pages are compared with ones that were read through by eye; the numbers in them are made up (specimen_test.go).
func TestRunPages(t *testing.T) {
	night, nightRes := overnight()
	plain, plainRes := elapsed()
	for _, c := range []struct {
		name  string
		plant *network.Plant
		res   *network.Result
		opt   text.Options
	}{
		{"good", cascade(), good(), text.Options{Report: "cascade.html"}},
		{"failing", cascade(), failing(), text.Options{Report: "cascade.html", Saved: []string{"out.json"}}},
		{"narrow", cascade(), failing(), text.Options{Width: 72}},
		{"close", cascade(), close(), text.Options{Report: "cascade.html"}},
		{"interrupted", cascade(), interrupted(), text.Options{Report: "cascade.html"}},
		{"overnight", night, nightRes, text.Options{}},
		{"elapsed", plain, plainRes, text.Options{}},
		{"quiet", cascade(), failing(), text.Options{Quiet: true}},
		{"painted", cascade(), good(), text.Options{Quiet: true, Colour: true}},
		{"empty", &network.Plant{}, &network.Result{Complete: true, Verdict: network.Run}, text.Options{}},
	} {
		t.Run(c.name, func(t *testing.T) {
			var b bytes.Buffer
			if err := text.Run(&b, c.plant, c.res, c.opt); err != nil {
				t.Fatal(err)
			}
			golden(t, c.name, b.Bytes())
			proper(t, b.String())
		})
	}
}

func golden(t *testing.T, name string, got []byte) {
	t.Helper()
	path := filepath.Join("testdata", name+".golden")
	if *update {
		if err := os.WriteFile(path, got, 0o666); err != nil {
			t.Fatal(err)
		}
	}
	want, err := os.ReadFile(path)
	if err != nil {
		t.Fatal(err)
	}
	if !bytes.Equal(got, want) {
		t.Errorf("%s differs (refresh with -update after reading it through)\ngot:\n%s\nwant:\n%s", path, got, want)
	}
}

var refused = regexp.MustCompile(`(?i)\b(safe|safely|node|edge|solver|iteration|state vector)\b|NaN|Inf\b`)

// proper holds for every page: no word that promises what nobody can know, none from the inside of the program, no stray blanks.
func proper(t *testing.T, page string) {
	t.Helper()
	if word := refused.FindString(page); word != "" {
		t.Errorf("the page says %q", word)
	}
	for _, line := range strings.Split(page, "\n") {
		if strings.TrimRight(line, " ") != line {
			t.Errorf("blanks at the end of %q", line)
		}
	}
}

// The first words are the verdict's, whatever else there is.
func TestFirstWords(t *testing.T) {
	for v, words := range map[network.Verdict]string{
		network.Run: "RUN ", network.DoNotRun: "DO NOT RUN ", network.TooClose: "TOO CLOSE TO CALL ", network.NotJudged: "NOT JUDGED ", "": "NOT JUDGED ",
	} {
		r := good()
		r.Verdict = v
		var b bytes.Buffer
		text.Run(&b, cascade(), r, text.Options{})
		if !strings.HasPrefix(b.String(), words) {
			t.Errorf("%q begins %.20q", v, b.String())
		}
	}
}
