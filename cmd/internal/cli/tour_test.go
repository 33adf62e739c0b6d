package cli_test

import (
	"errors"
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
		if step[2] != "" {
			if line := astray(string(out), step[2]); line != "" {
				t.Errorf("%sprints\n%s\nwhere the README shows %q", step[1], out, line)
			}
		}
	}
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
