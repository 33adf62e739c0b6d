package cli

import (
	"bytes"
	"errors"
	"os"
	"os/exec"
	"path/filepath"
	"regexp"
	"strings"
	"testing"

	"headfall/scenarios"
)

// Every line of an example in the help runs as it stands, one after the other in a folder that holds what they read: the file that new writes,
// the demos, and readings of that file's plant.
func TestExamplesRun(t *testing.T) {
	root := newFakeApp().root()
	for _, c := range append(root.Commands(), root) {
		if c.Name() == "help" {
			continue
		}
		t.Run(c.Name(), func(t *testing.T) {
			t.Parallel()
			dir := workFolder(t, c.Example)
			for _, line := range commandLines(c.Example) {
				runs(t, dir, line)
			}
		})
	}
}

// commandLines are the lines of an example that call the program; the others are words.
func commandLines(example string) []string {
	var lines []string
	for line := range strings.Lines(example) {
		if line = strings.TrimSpace(line); strings.Contains(line, "headfall ") && !strings.HasPrefix(line, "#") {
			lines = append(lines, line)
		}
	}
	return lines
}

var ranBadly = regexp.MustCompile(`(?m)^headfall: |:\d+:\d+: `)

// runs runs a line in a shell. It may find that a plan fails, but it must not be refused.
func runs(t *testing.T, dir, line string) {
	t.Helper()
	cmd := exec.Command("sh", "-c", line)
	cmd.Dir = dir
	cmd.Env = append(os.Environ(), "JOB_COMPLETION_INDEX=3")
	var errs bytes.Buffer
	cmd.Stderr = &errs
	var exit *exec.ExitError
	if err := cmd.Run(); errors.As(err, &exit) && exit.ExitCode() == ExitFails {
		err = nil
	} else if err != nil || ranBadly.MatchString(errs.String()) {
		t.Errorf("%s\n%v\n%s", line, err, errs.String())
	}
}

// workFolder makes a folder with a plant, the demos, and levels that were read on the day.
// What the example itself makes is not there yet.
func workFolder(t *testing.T, example string) string {
	t.Helper()
	dir := t.TempDir()
	put := func(name string, data []byte) {
		if regexp.MustCompile(`headfall new .*\b` + regexp.QuoteMeta(name)).MatchString(example) {
			return
		}
		if err := os.WriteFile(filepath.Join(dir, name), data, 0o666); err != nil {
			t.Fatal(err)
		}
	}
	for _, name := range []string{"plant.yaml", "draft.yaml", "second.yaml"} {
		put(name, scenarios.Starter())
	}
	for _, name := range scenarios.Demos() {
		data, _ := scenarios.Demo(name)
		put(name+".yaml", data)
	}
	put("test.csv", []byte(levelsRead))
	put("day.csv", []byte(levelsRead))
	return dir
}

// levelsRead are levels of the plant that new writes, some millimetres off.
const levelsRead = `time,T-1 [m],SUMP [m]
06:10,2.96,0.39
06:20,2.47,0.57
06:30,2.02,0.75
06:40,1.57,0.91
06:50,1.16,1.07
`
