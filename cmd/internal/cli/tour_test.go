package cli_test

import (
	"errors"
	"flag"
	"os"
	"os/exec"
	"regexp"
	"strings"
	"testing"
)

// A block of commands, and the block of what they print when one follows.
var tourStep = regexp.MustCompile("(?s)```sh\n(.*?)```\n(?:\n```text\n(.*?)```\n)?")

// The README's tour of one shutdown plan runs as it stands, in one folder from the first command to the last, and prints what it shows: a line "…" stands
// for lines left out.
func TestReadmeTour(t *testing.T) {
	readme, err := os.ReadFile("../../../README.md")
	if err != nil {
		t.Fatal(err)
	}
	_, tour, found := strings.Cut(string(readme), "\n## One shutdown plan, from draft to signed sheet\n")
	tour, _, _ = strings.Cut(tour, "\n## ")
	steps := tourStep.FindAllStringSubmatch(tour, -1)
	if !found || len(steps) < 6 {
		t.Fatalf("the tour has %d steps", len(steps))
	}
	dir := t.TempDir()
	for _, step := range steps {
		cmd := exec.Command("sh", "-c", step[1])
		cmd.Dir = dir
		var errs strings.Builder
		cmd.Stderr = &errs
		out, err := cmd.Output()
		var exit *exec.ExitError
		if err != nil && !(errors.As(err, &exit) && exit.ExitCode() == 1) || errs.Len() > 0 {
			t.Fatalf("%s%v\n%s", step[1], err, errs.String())
		}
		line := astray(string(out), step[2])
		switch {
		case step[2] == "" || line == "":
		case flag.Lookup("update").Value.String() == "true":
			readme = []byte(strings.Replace(string(readme), step[2], shownAnew(string(out), step[2]), 1))
			if err := os.WriteFile("../../../README.md", readme, 0o666); err != nil {
				t.Fatal(err)
			}
		default:
			t.Errorf("%sprints\n%s\nwhere the README shows %q (go test ./cmd/internal/cli -run Tour -update)", step[1], out, line)
		}
	}
}

// shownAnew puts what is printed now in the place of each line that is shown; after lines left out, the next one that begins with the same word.
func shownAnew(printed, shown string) string {
	lines := strings.Split(strings.TrimRight(printed, "\n"), "\n")
	var out strings.Builder
	for want := range strings.Lines(shown) {
		if want == "…\n" {
			out.WriteString(want)
			continue
		}
		word, _, _ := strings.Cut(strings.TrimSpace(want), " ")
		for strings.HasSuffix(out.String(), "…\n") && len(lines) > 0 && !strings.HasPrefix(lines[0], word) {
			lines = lines[1:]
		}
		if len(lines) > 0 {
			out.WriteString(lines[0] + "\n")
			lines = lines[1:]
		}
	}
	return out.String()
}

// astray returns the first line that is shown and not printed in its place; "" when all are.
func astray(printed, shown string) string {
	lines := strings.Split(strings.TrimRight(printed, "\n"), "\n")
	skip := false
	for want := range strings.Lines(shown) {
		want = strings.TrimRight(want, "\n")
		if want == "…" {
			skip = true
			continue
		}
		for skip && len(lines) > 0 && lines[0] != want {
			lines = lines[1:]
		}
		if len(lines) == 0 || lines[0] != want {
			return want
		}
		lines, skip = lines[1:], false
	}
	if len(lines) > 0 && !skip {
		return "nothing more"
	}
	return ""
}

// Writing it anew keeps the lines left out.
func TestShownAnew(t *testing.T) {
	if got := shownAnew("RUN 9\nx\nLeast 3\ny\n", "RUN 8\n…\nLeast 2\n…\n"); got != "RUN 9\n…\nLeast 3\n…\n" {
		t.Errorf("%q", got)
	}
}

// The comparison itself: lines left out are left out, others are not.
func TestAstray(t *testing.T) {
	for _, c := range []struct{ printed, shown, want string }{
		{"a\nb\n", "a\nb\n", ""}, {"a\nb\nc\n", "a\n…\nc\n", ""}, {"a\nb\n", "a\n…\n", ""}, {"a\nb\n", "a\n", "nothing more"}, {"a\n", "b\n", "b"}, {"a\n", "a\n…\nb\n", "b"},
	} {
		if got := astray(c.printed, c.shown); got != c.want {
			t.Errorf("%q shown as %q: %q, want %q", c.printed, c.shown, got, c.want)
		}
	}
}
