package main

import (
	"bytes"
	"encoding/json"
	"errors"
	"io"
	"os"
	"os/exec"
	"path/filepath"
	"runtime"
	"slices"
	"strings"
	"syscall"
	"testing"
	"time"

	"headfall/scenarios"
)

// program is the built program; TestMain makes it.
var program string

func TestMain(m *testing.M) {
	dir, err := os.MkdirTemp("", "headfall")
	if err != nil {
		panic(err)
	}
	program = filepath.Join(dir, "headfall.exe")
	if out, err := exec.Command("go", "build", "-o", program, ".").CombinedOutput(); err != nil {
		panic(string(out))
	}
	code := m.Run()
	os.RemoveAll(dir)
	os.Exit(code)
}

const unix = runtime.GOOS != "windows" // signals can be sent and /dev/full is there

// plant puts a demo into an empty working folder.
func plant(t *testing.T, demo string) {
	t.Helper()
	t.Chdir(t.TempDir())
	data, ok := scenarios.Demo(demo)
	if !ok {
		t.Fatal("no demo", demo)
	}
	if err := os.WriteFile("plant.yaml", data, 0o666); err != nil {
		t.Fatal(err)
	}
}

func codeOf(t *testing.T, err error) int {
	t.Helper()
	var exit *exec.ExitError
	switch {
	case err == nil:
		return 0
	case errors.As(err, &exit):
		return exit.ExitCode()
	}
	t.Fatal(err)
	return -1
}

// ends runs the program to its end.
func ends(t *testing.T, code int, out io.Writer, args ...string) (said string) {
	t.Helper()
	var errs bytes.Buffer
	c := exec.Command(program, args...)
	c.Stdout, c.Stderr = out, &errs
	if got := codeOf(t, c.Run()); got != code {
		t.Errorf("%q ended with %d, want %d: %s", args, got, code, errs.String())
	}
	return errs.String()
}

// The first interrupt ends the program in order, also while it waits for its input, with the exit code for it.
func TestInterruptedWhileReading(t *testing.T) {
	if !unix {
		return
	}
	for wait := 500 * time.Millisecond; ; wait *= 4 {
		code, said := interruptedReading(t, wait)
		if code == notCaught && wait < 20*time.Second {
			continue
		}
		if code != 130 {
			t.Errorf("ended with %d, want 130", code)
		}
		if !strings.Contains(said, "interrupted") {
			t.Errorf("said %q", said)
		}
		return
	}
}

// notCaught is the code of a program that a signal killed: on a busy machine it may come before the program catches any.
const notCaught = -1

// interruptedReading starts the program, which waits for its input, and interrupts it after a time.
func interruptedReading(t *testing.T, after time.Duration) (code int, said string) {
	t.Helper()
	cmd := exec.Command(program, "run", "-", "--no-report")
	hold, err := cmd.StdinPipe() // stays open: the program waits
	if err != nil {
		t.Fatal(err)
	}
	defer hold.Close()
	var words strings.Builder
	cmd.Stderr = &words
	if err := cmd.Start(); err != nil {
		t.Fatal(err)
	}
	defer time.AfterFunc(time.Minute, func() { cmd.Process.Kill() }).Stop()
	time.Sleep(after)
	if err := cmd.Process.Signal(syscall.SIGINT); err != nil {
		t.Fatal(err)
	}
	return codeOf(t, cmd.Wait()), words.String()
}

// kept is what every JSON says of how it came about.
type kept struct {
	Complete bool   `json:"complete"`
	Stopped  string `json:"stopped_because"`
	Code     int    `json:"exit_code"`
	Samples  int    `json:"samples"`
}

// An interrupt in the midst of a long calculation keeps what was computed, whole and marked, and nothing else.
func TestInterruptedWhileCalculating(t *testing.T) {
	if !unix {
		return
	}
	for _, sig := range []os.Signal{syscall.SIGINT, syscall.SIGTERM} {
		t.Run(sig.String(), func(t *testing.T) {
			plant(t, "day_tank")
			for wait := time.Second; ; wait *= 2 { // until something was computed, however slow the machine
				cmd := exec.Command(program, "spread", "plant.yaml", "--workers", "1", "--samples", "200000", "--json", "a.json", "--html", "a.html")
				if err := cmd.Start(); err != nil {
					t.Fatal(err)
				}
				time.Sleep(wait)
				if err := cmd.Process.Signal(sig); err != nil {
					t.Fatal(err)
				}
				switch code := codeOf(t, cmd.Wait()); {
				case code == notCaught && wait < time.Minute:
					continue
				case code != 130:
					t.Fatalf("ended with %d, want 130", code)
				}
				data, err := os.ReadFile("a.json")
				if err != nil && wait < time.Minute {
					if got, _ := filepath.Glob("*"); !slices.Equal(got, []string{"plant.yaml"}) {
						t.Fatalf("left %q", got)
					}
					continue
				}
				var k kept
				err = json.Unmarshal(data, &k)
				if err == nil && k.Samples == 0 && wait < time.Minute {
					os.Remove("a.json")
					os.Remove("a.html")
					continue
				}
				if err != nil || k.Complete || k.Stopped != "interrupted" || k.Code != 130 || k.Samples == 0 {
					t.Errorf("kept %+v, %v", k, err)
				}
				if got, _ := filepath.Glob("*"); !slices.Equal(got, []string{"a.html", "a.json", "plant.yaml"}) {
					t.Errorf("left %q", got)
				}
				return
			}
		})
	}
}

// Out of its time the program keeps what it has, marked, with exit code 3.
func TestTimeout(t *testing.T) {
	plant(t, "day_tank")
	for limit := 2; ; limit *= 2 {
		said := ends(t, 3, io.Discard, "spread", "plant.yaml", "--workers", "1", "--samples", "200000", "--json", "a.json", "--timeout", (time.Duration(limit) * time.Second).String())
		data, err := os.ReadFile("a.json")
		if err != nil && limit < 60 {
			if !strings.Contains(said, "--timeout") {
				t.Fatalf("said %q", said)
			}
			continue
		}
		var k kept
		err = json.Unmarshal(data, &k)
		if err == nil && k.Samples == 0 && limit < 60 {
			continue
		}
		if err != nil || k.Complete || k.Code != 3 || k.Samples == 0 {
			t.Errorf("kept %+v, %v", k, err)
		}
		return
	}
}

// A reader that went away is no fault: the files are there, the exit code is the verdict's, and nothing is said.
func TestBrokenPipe(t *testing.T) {
	if !unix {
		return
	}
	for _, c := range []struct {
		demo string
		code int
		args []string
		left []string
	}{
		{"cellar", 1, []string{"run", "plant.yaml"}, []string{"plant.html", "plant.yaml"}},
		{"day_tank", 0, []string{"run", "plant.yaml", "--no-report", "--json", "-"}, []string{"plant.yaml"}},
		{"day_tank", 0, []string{"licences"}, []string{"plant.yaml"}},
		{"day_tank", 0, []string{"help"}, []string{"plant.yaml"}},
	} {
		plant(t, c.demo)
		r, w, err := os.Pipe()
		if err != nil {
			t.Fatal(err)
		}
		r.Close()
		if said := ends(t, c.code, w, c.args...); said != "" && c.args[len(c.args)-1] != "-" {
			t.Errorf("%q said %q", c.args, said)
		}
		w.Close()
		if got, _ := filepath.Glob("*"); !slices.Equal(got, c.left) {
			t.Errorf("%q left %q", c.args, got)
		}
	}
}

// A full disk is told, by every command, and never taken for a verdict; what stood there stays.
func TestFullDisk(t *testing.T) {
	if runtime.GOOS != "linux" {
		return // no /dev/full there
	}
	plant(t, "day_tank")
	for _, args := range [][]string{
		{"run", "plant.yaml", "--no-report"}, {"run", "plant.yaml", "--no-report", "--json", "-"}, {"check", "plant.yaml"}, {"sheet", "plant.yaml", "--text"},
		{"licences"}, {"version"}, {"version", "--licenses"}, {"schema"}, {"new"}, {"kinds"}, {"help"}, {"help", "run"}, {"help", "units"}, {"flows", "plant.yaml", "--valve", "HV-7"},
	} {
		full, err := os.OpenFile("/dev/full", os.O_WRONLY, 0)
		if err != nil {
			t.Fatal(err)
		}
		if said := ends(t, 3, full, args...); !strings.Contains(said, "headfall: cannot write to standard output: no space left on device") {
			t.Errorf("%q said %q", args, said)
		}
		full.Close()
	}
	if said := ends(t, 2, io.Discard, "run", "plant.yaml", "--no-report", "--json", "/dev/full", "--csv", "a.csv"); !strings.Contains(said, "cannot write /dev/full: no space left on device") {
		t.Errorf("said %q", said)
	}
	if got, _ := filepath.Glob("*"); !slices.Equal(got, []string{"plant.yaml"}) {
		t.Errorf("left %q", got)
	}
}
