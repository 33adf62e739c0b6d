package cli

import (
	"context"
	"encoding/json"
	"errors"
	"io"
	"os"
	"strings"
	"syscall"
	"testing"
	"time"

	"headfall/network"
)

func put(t *testing.T, name, data string) {
	t.Helper()
	if err := os.WriteFile(name, []byte(data), 0o666); err != nil {
		t.Fatal(err)
	}
}

// only wants exactly these files in the working folder.
func only(t *testing.T, names ...string) {
	t.Helper()
	entries, err := os.ReadDir(".")
	if err != nil {
		t.Fatal(err)
	}
	var got []string
	for _, e := range entries {
		got = append(got, e.Name())
	}
	if strings.Join(got, " ") != strings.Join(names, " ") {
		t.Errorf("the folder holds %q, want %q", got, names)
	}
}

func TestRunWritesTheReport(t *testing.T) {
	f := newFake(t)
	put(t, "plant.yaml", "x")
	f.gives(t, 0, "run", "plant.yaml")
	only(t, "plant.html", "plant.yaml")
	if !strings.HasPrefix(f.out.String(), "RUN ") || !strings.Contains(f.out.String(), "plant.html, exit code 0") {
		t.Errorf("printed %q", f.out.String())
	}
}

func TestRunOutputs(t *testing.T) {
	f := newFake(t)
	put(t, "plant.yaml", "x")
	f.gives(t, 0, "run", "plant.yaml", "--no-report", "--csv", "a.csv", "--xlsx", "a.xlsx", "--json", "-")
	only(t, "a.csv", "a.xlsx", "plant.yaml")
	if !json.Valid(f.out.Bytes()) {
		t.Errorf("not JSON: %q", f.out.String())
	}
	if !strings.HasPrefix(f.err.String(), "RUN ") {
		t.Errorf("the text is not on standard error: %q", f.err.String())
	}
}

func TestRunFromStandardInput(t *testing.T) {
	f := newFake(t)
	f.gives(t, 0, "run", "-")
	only(t, "headfall.html")
}

func TestBadFileWritesNothing(t *testing.T) {
	f := newFake(t)
	put(t, "plant.yaml", "fault")
	f.gives(t, 2, "run", "plant.yaml", "--json", "a.json", "--csv", "a.csv")
	only(t, "plant.yaml")
	if f.out.Len() > 0 {
		t.Errorf("printed %q", f.out.String())
	}
}

func TestRefusedBeforeAnythingIsComputed(t *testing.T) {
	for _, args := range [][]string{
		{"run", "plant.yaml", "--json", "plant.yaml"},       // over the plant itself
		{"run", "plant.yaml", "--json", "none/a.json"},      // no such directory
		{"run", "plant.yaml", "--json", "."},                // a directory
		{"run", "plant.yaml", "--json", "a", "--csv", "a"},  // two into one
		{"run", "plant.yaml", "--json", "-", "--csv", "-"},  // two into standard output
		{"run", "plant.yaml", "--html", "a", "--no-report"}, // does not go together
		{"run", "plant.yaml", "other.yaml"}, {"run"},        // not one FILE
		{"run", "plant.yaml", "--timeout", "soon"},             // not a time
		{"run", "plant.yaml", "--tolerance", "-1"},             //
		{"run", "plant.yaml", "--workers", "-1"},               //
		{"run", "plant.yaml", "--color", "pink"}, {"run", "x"}, // not there
	} {
		f := newFake(t)
		f.judge = func(context.Context, func() (*network.Plant, error), *options, func(float64)) (*network.Result, error) {
			t.Errorf("%q was computed", args)
			return answerOf(network.Run, 0), nil
		}
		put(t, "plant.yaml", "x")
		f.gives(t, 2, args...)
		only(t, "plant.yaml")
		if !strings.HasPrefix(f.err.String(), "headfall: ") {
			t.Errorf("%q said %q", args, f.err.String())
		}
	}
}

// What was computed before an interruption, the end of the time or a failure is kept and marked.
func TestPartialAnswers(t *testing.T) {
	stopped, cancel := context.WithCancel(t.Context())
	partial := func(wait bool, err error) func(context.Context, func() (*network.Plant, error), *options, func(float64)) (*network.Result, error) {
		return func(ctx context.Context, _ func() (*network.Plant, error), _ *options, _ func(float64)) (*network.Result, error) {
			if wait {
				cancel()
				<-ctx.Done()
				err = ctx.Err()
			}
			return answerOf(network.Run, 0), err
		}
	}
	for _, c := range []struct {
		name  string
		ctx   context.Context
		judge func(context.Context, func() (*network.Plant, error), *options, func(float64)) (*network.Result, error)
		args  []string
		code  int
		says  string
	}{
		{"interrupted", stopped, partial(true, nil), nil, 130, "interrupted"},
		{"timeout", t.Context(), partial(true, nil), []string{"--timeout", "10ms"}, 3, "--timeout"},
		{"failed", t.Context(), partial(false, errors.New("T-1 did not settle at 06:41")), nil, 3, "T-1 did not settle"},
	} {
		t.Run(c.name, func(t *testing.T) {
			f := newFake(t)
			f.judge = c.judge
			put(t, "plant.yaml", "x")
			if got := f.main(c.ctx, append([]string{"run", "plant.yaml", "--json", "a.json"}, c.args...)); got != c.code {
				t.Fatalf("ended with %d, want %d: %s", got, c.code, f.err.String())
			}
			only(t, "a.json", "plant.html", "plant.yaml")
			if s := f.out.String(); !strings.HasPrefix(s, "NOT JUDGED ") || !strings.Contains(s, c.says) {
				t.Errorf("printed %q", s)
			}
			var kept struct {
				Complete bool   `json:"complete"`
				Verdict  string `json:"verdict"`
				Code     int    `json:"exit_code"`
			}
			data, _ := os.ReadFile("a.json")
			if err := json.Unmarshal(data, &kept); err != nil || kept.Complete || kept.Verdict != "not_judged" || kept.Code != c.code {
				t.Errorf("kept %+v, %v", kept, err)
			}
		})
	}
}

func TestNothingKnown(t *testing.T) {
	f := newFake(t)
	f.judge = func(ctx context.Context, _ func() (*network.Plant, error), _ *options, _ func(float64)) (*network.Result, error) {
		return nil, errors.New("the start did not settle")
	}
	put(t, "plant.yaml", "x")
	f.gives(t, 3, "run", "plant.yaml")
	only(t, "plant.yaml")
}

// gone is a reader that went away.
type gone struct{}

func (gone) Write([]byte) (int, error) { return 0, syscall.EPIPE }

func TestBrokenPipeIsQuiet(t *testing.T) {
	f := newFake(t)
	f.Out = gone{}
	f.judge = func(context.Context, func() (*network.Plant, error), *options, func(float64)) (*network.Result, error) {
		return answerOf(network.DoNotRun, 1), nil
	}
	put(t, "plant.yaml", "x")
	f.gives(t, 1, "run", "plant.yaml")
	f.gives(t, 1, "run", "plant.yaml", "--no-report", "--json", "-")
	if f.err.Len() > 0 {
		t.Errorf("said %q", f.err.String())
	}
}

func TestColour(t *testing.T) {
	for _, c := range []struct {
		term  bool
		none  string
		color string
		want  bool
	}{{true, "", "auto", true}, {true, "1", "auto", false}, {false, "", "auto", false}, {false, "1", "always", true}, {true, "", "never", false}} {
		f := newFake(t)
		f.OutTerm, f.env["NO_COLOR"] = c.term, c.none
		put(t, "plant.yaml", "x")
		f.gives(t, 0, "run", "plant.yaml", "--color", c.color)
		if got := strings.Contains(f.out.String(), "\x1b["); got != c.want {
			t.Errorf("%+v: painted %v", c, got)
		}
	}
}

func TestQuiet(t *testing.T) {
	f := newFake(t)
	put(t, "plant.yaml", "x")
	f.gives(t, 0, "run", "plant.yaml", "-q")
	if n := strings.Count(f.out.String(), "\n"); n != 1 || f.err.Len() > 0 {
		t.Errorf("printed %q, said %q", f.out.String(), f.err.String())
	}
}

// The bar comes on a terminal only, not before a second has gone by, and goes away.
func TestProgress(t *testing.T) {
	f := newFake(t)
	p := f.progress("calculating")
	p.started = time.Now().Add(-time.Minute)
	p.done(0.2)
	if f.err.Len() > 0 {
		t.Errorf("shown without a terminal: %q", f.err.String())
	}
	f.ErrTerm = true
	young := f.progress("calculating")
	young.done(0.2)
	if f.err.Len() > 0 {
		t.Errorf("shown at once: %q", f.err.String())
	}
	p.done(0.2)
	p.end()
	if !strings.Contains(f.err.String(), "calculating") {
		t.Errorf("said %q", f.err.String())
	}
}

// A file that cannot be finished leaves nothing behind, and what stood there stays.
func TestSaveIsAllOrNothing(t *testing.T) {
	t.Chdir(t.TempDir())
	put(t, "a", "old")
	whole := func(w io.Writer) error { _, err := io.WriteString(w, "new"); return err }
	files := outputs{{"a", whole}, {"b", func(io.Writer) error { return errors.New("no room left") }}}
	if err := files.save(io.Discard); err == nil {
		t.Error("no error")
	}
	only(t, "a")
	if data, _ := os.ReadFile("a"); string(data) != "old" {
		t.Errorf("a now holds %q", data)
	}
	if err := (outputs{{"a", whole}, {"b", whole}}).save(io.Discard); err != nil {
		t.Error(err)
	}
	only(t, "a", "b")
}
