package cli_test

import (
	"bytes"
	"context"
	"flag"
	"fmt"
	"os"
	"path/filepath"
	"regexp"
	"slices"
	"strconv"
	"strings"
	"testing"
	"time"

	"headfall/cmd/internal/cli"
)

// The files of testdata/bad are a plant with something wrong. Those in text are no YAML, or none that is read; an editor that knows the JSON Schema
// marks those in form; those in plant are found only when the whole is understood. What is told stands beside each. In a line that ends in
//
//	#! one | other
//
// the carets go under these pieces of the line, and under nothing in the other lines.
func badFiles(t *testing.T) []string {
	t.Helper()
	all, err := filepath.Glob("../../../testdata/bad/*/*.yaml")
	if err != nil || len(all) < 150 {
		t.Fatal(len(all), err)
	}
	return all
}

const allowed = time.Minute // for what should take a second: it tells what does not end, on the busiest machine

func TestBadFiles(t *testing.T) {
	home, err := os.Getwd()
	if err != nil {
		t.Fatal(err)
	}
	for _, path := range badFiles(t) {
		name := filepath.Base(path)
		t.Run(strings.TrimSuffix(name, ".yaml"), func(t *testing.T) {
			data, err := os.ReadFile(path)
			if err != nil {
				t.Fatal(err)
			}
			golden := filepath.Join(home, strings.TrimSuffix(path, ".yaml")+".txt")
			t.Chdir(t.TempDir())
			if err := os.WriteFile(name, data, 0o666); err != nil {
				t.Fatal(err)
			}
			said := refused(t, "run", name, "--json", "a.json", "--csv", "a.csv", "--xlsx", "a.xlsx")
			rules(t, name, string(data), said)
			compare(t, golden, said)
		})
	}
}

// refused runs a command that must end with exit code 2, print nothing and write nothing, and returns what it said.
func refused(t *testing.T, args ...string) string {
	t.Helper()
	var out, errs bytes.Buffer
	s := &cli.Streams{In: strings.NewReader(""), Out: &out, Err: &errs, Env: func(string) string { return "" }}
	before, _ := filepath.Glob("*")
	from := time.Now()
	if code := cli.Main(context.Background(), s, args); code != cli.ExitBad {
		t.Fatalf("%q ended with %d", args, code)
	}
	if took := time.Since(from); took > allowed {
		t.Errorf("%q took %v", args, took)
	}
	if out.Len() > 0 {
		t.Errorf("%q printed %q", args, out.String())
	}
	if now, _ := filepath.Glob("*"); !slices.Equal(before, now) {
		t.Errorf("%q left %q", args, now)
	}
	return errs.String()
}

func compare(t *testing.T, golden, said string) {
	t.Helper()
	if flag.Lookup("update").Value.String() == "true" {
		if err := os.WriteFile(golden, []byte(said), 0o666); err != nil {
			t.Fatal(err)
		}
	}
	want, err := os.ReadFile(golden)
	if err != nil {
		t.Fatal(err)
	}
	if said != string(want) {
		t.Errorf("(-update writes it anew) got\n%s\nwant\n%s", said, want)
	}
}

// told is one fault as it is printed.
type told struct {
	line, column, width int
	says, hint          string
}

var (
	toldPlace = regexp.MustCompile(`^(.*):(\d+):(\d+): (.+)$`)
	toldCaret = regexp.MustCompile(`^ +\| ( *)(\^+)$`)
	toldHint  = regexp.MustCompile(`^  hint: (.+)$`)
)

// toldIn takes what was printed apart; every line must have its place in it.
func toldIn(t *testing.T, name, said string) (all []*told) {
	t.Helper()
	for _, line := range strings.Split(strings.TrimSuffix(said, "\n"), "\n") {
		if m := toldPlace.FindStringSubmatch(line); m != nil && m[1] == name {
			f := &told{says: m[4]}
			f.line, _ = strconv.Atoi(m[2])
			f.column, _ = strconv.Atoi(m[3])
			all = append(all, f)
			continue
		}
		if len(all) == 0 {
			t.Fatalf("begins with %q", line)
		}
		last := all[len(all)-1]
		if m := toldCaret.FindStringSubmatch(line); m != nil {
			last.width = len(m[2])
		} else if m := toldHint.FindStringSubmatch(line); m != nil {
			last.hint = m[1]
		} else if !strings.HasPrefix(line, fmt.Sprintf("  %d | ", last.line)) {
			t.Errorf("a line that belongs to nothing: %q", line)
		}
	}
	return all
}

// rules checks what holds for every fault: a place in the file, a caret under the piece that is wrong, a hint, plain words, and nothing told twice.
func rules(t *testing.T, name, text, said string) {
	t.Helper()
	text = strings.TrimPrefix(text, "\ufeff")
	lines := regexp.MustCompile("\r\n|[\n\r]").Split(text, -1)
	under := map[int][]string{}
	seen := map[told]bool{}
	for _, f := range toldIn(t, name, said) {
		if seen[*f] {
			t.Errorf("told twice: %+v", f)
		}
		seen[*f] = true
		if f.line < 1 || f.line > len(lines) {
			t.Errorf("there is no line %d", f.line)
			continue
		}
		line := []rune(strings.ToValidUTF8(lines[f.line-1], "?"))
		if f.column < 1 || f.column > len(line)+1 {
			t.Errorf("line %d has no column %d", f.line, f.column)
			continue
		}
		if f.width == 0 && len(line) > 0 {
			t.Errorf("no caret in line %d", f.line)
		}
		if f.hint == "" {
			t.Errorf("no hint: %s", f.says)
		}
		for _, words := range []string{f.says, f.hint} {
			if strings.Contains(words, "%!") || strings.Contains(words, "<nil>") || strings.Contains(words, "  ") || strings.HasSuffix(words, " ") || strings.Contains(words, "yaml:") {
				t.Errorf("these are no words: %q", words)
			}
		}
		if end := f.column - 1 + f.width; end <= len(line) {
			under[f.line] = append(under[f.line], string(line[f.column-1:end]))
		}
	}
	marked := map[int][]string{}
	for i, line := range lines {
		if _, mark, ok := strings.Cut(line, "   #! "); ok {
			marked[i+1] = strings.Split(mark, " | ")
		}
	}
	if len(marked) > 0 && fmt.Sprint(under) != fmt.Sprint(marked) {
		t.Errorf("the carets stand under %v, want %v", under, marked)
	}
}

// Every argument of --set and --case that is refused shows itself, in the same way as a file.
func TestBadArguments(t *testing.T) {
	plan, err := os.ReadFile("../../../testdata/bad/plan.yaml")
	if err != nil {
		t.Fatal(err)
	}
	home, err := filepath.Abs("../../../testdata/bad/arguments.txt")
	if err != nil {
		t.Fatal(err)
	}
	t.Chdir(t.TempDir())
	if err := os.WriteFile("plan.yaml", plan, 0o666); err != nil {
		t.Fatal(err)
	}
	var all strings.Builder
	for _, args := range [][]string{
		{"--set", "V-9.kv=80"}, {"--set", "V-1.kw=80"}, {"--set", "V-1=80"}, {"--set", "V-1.kv"}, {"--set", "V-1.kv="}, {"--set", "=80"},
		{"--set", "V-1.kv=80 m3/h"}, {"--set", "V-1.kv=0"}, {"--set", "V-1.kv=NaN"}, {"--set", "V-1.kv=1e400"}, {"--set", "V-1.kv=8,5"},
		{"--set", "L-1.pipe.bore=82.5"}, {"--set", "L-1.pipe.bore=82.5 kg"}, {"--set", "T-1.level=32 m"}, {"--set", "SUMP.level=-1 m"},
		{"--set", "s1.at=-5 min"}, {"--set", "s1.to=140 %"}, {"--set", "s9.to=10 %"}, {"--set", "T-1.tag=T-2"}, {"--set", "<script>=1"},
		{"--set", "V-1.kv=80", "--set", "V-2.kv=80", "--set", "L-1.pipe.bore=3"}, {"--case", "wide"}, {"--set", "V-1.kv=\x1b[31m"},
	} {
		said := refused(t, append([]string{"run", "plan.yaml"}, args...)...)
		if !strings.Contains(said, "hint: ") || strings.ContainsRune(said, '\x1b') || !strings.Contains(said, "^") && args[0] == "--set" {
			t.Errorf("%q said %q", args, said)
		}
		fmt.Fprintf(&all, "%q\n%s\n", args, said)
	}
	compare(t, home, all.String())
}

// Files that are too large to be stored here are refused as well, whatever they are full of, and soon.
func TestLargeBadFiles(t *testing.T) {
	t.Chdir(t.TempDir())
	for _, size := range []int{1 << 20, 10 << 20} {
		for name, unit := range map[string]string{
			"keys": "key_%d: {a: [1, 2]}\n", "vessels": "vessels:\n", "braces": "{", "brackets": "[", "blanks": " ", "noughts": "\x00", "dashes": "- ", "quotes": "\"", "letters": "a", "comments": "# nothing\n",
			"ends": "\n", "colons": "a: ", "stars": "*a ", "tabs": "\t", "bytes": "\xff", "pairs": "[],", "asks": "? ", "anchors": "&a ", "pipes": "|\n", "lists": "[a,",
		} {
			if name == "vessels" && size > 1<<20 {
				continue // a plant of that size, faults or none, takes its time to be read
			}
			var b strings.Builder
			b.Grow(size + 100)
			for i := 0; b.Len() < size; i++ {
				switch {
				case name == "vessels" && i > 0:
					fmt.Fprintf(&b, "  T%d: {shape: {box: {length: 1 m, width: 1 m, hight: 9 m}}, base: 3 kg, level: 5 m}\n", i)
				case name == "keys":
					fmt.Fprintf(&b, unit, i)
				default:
					b.WriteString(unit)
				}
			}
			if err := os.WriteFile("large.yaml", []byte(b.String()), 0o666); err != nil {
				t.Fatal(err)
			}
			var out, errs bytes.Buffer
			s := &cli.Streams{In: strings.NewReader(""), Out: &out, Err: &errs, Env: func(string) string { return "" }}
			from := time.Now()
			code := cli.Main(context.Background(), s, []string{"check", "large.yaml"})
			took := time.Since(from)
			if code != cli.ExitBad || errs.Len() == 0 || errs.Len() > 1<<20 {
				t.Errorf("%d MB of %s: ended with %d, %d bytes said", size>>20, name, code, errs.Len())
			}
			if took > allowed {
				t.Errorf("%d MB of %s took %v", size>>20, name, took)
			}
		}
	}
}
