package scenarios

import (
	"errors"
	"strings"
	"testing"
)

// plan is a small plant that loads; tests replace pieces of it.
const plan = `headfall: 1
start: "2027-10-09 06:00"
run_for: 2 h
liquid: {water: 12 °C}
vessels:
  T-1: {shape: {box: {length: 2 m, width: 2 m, height: 3 m}}, base: 5 m, level: 2 m}
  T-2: {shape: {box: {length: 2 m, width: 2 m, height: 3 m}}, base: 1 m, level: 1 m}
tees:
  HDR: {elevation: 4 m}
outside:
  AIR: {free_fall: {elevation: 0 m}}
lines:
  L-1: {from: T-1, to: HDR, parts: [{pipe: {length: 5 m, bore: 80 mm, roughness: 0.05 mm}}, {valve: {tag: V-1, kv: 60}}]}
  L-2: {from: HDR, to: T-2, parts: [{pipe: {length: 5 m, bore: 80 mm, roughness: 0.05 mm}}]}
  L-3: {from: T-2, to: AIR, parts: [{pump: {tag: P-1, rate: 5 m3/h, starts: {level: T-2, above: 1.5 m}, stops: {level: T-2, below: 0.5 m}}}]}
steps:
  - {id: s1, at: 5 min, valve: V-1, to: 50 %}
  - {id: h1, at: "06:30", hold: lead signs, up_to: 10 min}
limits:
  - {level: T-2, below: 2.5 m}
`

// faultsOf returns the problems of the plan with pieces replaced: "line:column: what. hint".
func faultsOf(t *testing.T, text string, opt Options) []string {
	t.Helper()
	_, err := Load("p.yaml", []byte(text), opt)
	if err == nil {
		return nil
	}
	var all *Problems
	if !errors.As(err, &all) {
		t.Fatalf("%T: %v", err, err)
	}
	var says []string
	for _, p := range all.List {
		s := p.Says
		if p.Hint != "" {
			s += " | " + p.Hint
		}
		says = append(says, s)
	}
	return says
}

func TestFaults(t *testing.T) {
	if says := faultsOf(t, plan, Options{}); says != nil {
		t.Fatalf("the plan itself: %v", says)
	}
	for _, c := range []struct{ old, with, says string }{
		{"bore: 80 mm", "boer: 80 mm", `pipe has no key "boer" | did you mean bore?`},
		{"level: 2 m}", "level: 2}", `level: "2" needs a unit | e.g. 2 m`},
		{"level: 2 m}", "level: 3.2 m}", "the start level, 3.2 m, is above the rim, 3 m | levels are above the vessel's base"},
		{"level: 2 m}", "level: -0.1 m}", "level must be 0 or more: it is the height above the vessel's base"},
		{"level: 2 m}", "level: 60 %}", "level: per cent needs a gauge | write the level in m, or give the vessel gauge: {zero: …, span: …}"},
		{"level: 2 m}", "level: 2 m, contents: 3 m3}", "vessel T-1 has level and contents: only one of them can hold"},
		{", level: 2 m}", "}", "vessel T-1 needs level or contents"},
		{"from: T-1, to: HDR", "from: T-3, to: HDR", `from: there is no vessel, tee or outside point "T-3" | did you mean T-1?`},
		{"from: HDR, to: T-2", "from: T-2, to: T-2", "line L-2 runs from T-2 to itself"},
		{"from: HDR, to: T-2", "from: V-1, to: T-2", "from: V-1 is a valve, not a vessel, tee or outside point | one of AIR, HDR, T-1, T-2"},
		{"kv: 60", "kv: 0", "kv must be more than 0"},
		{"kv: 60", "kv: 60 m3/h", "kv: kv is a bare number: by definition m3/h of water at 1 bar | write 60"},
		{"length: 5 m, bore: 80 mm, roughness: 0.05 mm}}, {valve", "length: 0 m, bore: -80 mm, roughness: 0.05 mm}}, {valve", "length must be more than 0; bore must be more than 0"},
		{"rate: 5 m3/h, starts: {level: T-2, above: 1.5 m}", "rate: 5 m3/h, starts: {level: T-2, above: 0.4 m}", "the start level must be above the stop level"},
		{"V-1, kv: 60", "T-2, kv: 60", "T-2 is the tag of a vessel already | it stands in line 7; tags are unique over the whole file; valve: there is no valve \"V-1\""},
		{"  HDR: {elevation: 4 m}", "  on: {elevation: 4 m}", "on cannot be a tag: readers of YAML make something else of it | add a number or a letter, e.g. on-1"},
		{"  T-1: {", "  1T: {", `"1T" cannot be a tag: it begins with no letter | e.g. V-1T`},
		{"id: s1, at: 5 min", "id: s1, after: s2", `after: there is no step or hold "s2" | did you mean s1?`},
		{"id: s1, at: 5 min", "id: s1, after: s1", "after goes round in a circle: s1 waits for s1 | give one of them another trigger"},
		{"id: s1, at: 5 min, ", "id: s1, ", `step s1 has no trigger | it needs at: "06:20" or 20 min, when: a condition, or after: another step`},
		{"valve: V-1, to: 50 %", "valve: V-1, to: 150 %", "to must be from 0 % to 100 %"},
		{"valve: V-1, to: 50 %", "valve: V-1", "step s1 needs to | e.g. to: 40 %"},
		{"valve: V-1, to: 50 %", "valve: V-1, pump: P-1, to: 50 %", "step s1 has valve and pump: only one of them can hold"},
		{"valve: V-1, to: 50 %", "valve: V-1, to: 50 %, note: shut it, then wait", `step has no key "then wait" | a comma ends a text inside braces: put the whole text in quotes, or write one key a line`},
		{"valve: V-1, to: 50 %", "valve: V-1 ± 2, to: 50 %", `valve: a tag carries no doubt`},
		{`at: "06:30"`, `at: "06:30 ± 5 min"`, "at: a time of day carries no doubt"},
		{"start: \"2027-10-09 06:00\"\n", "", `at: a clock time needs the clock time of the start | add start: "2027-10-09 06:00" to the file, or write the time from the start, e.g. 20 min`},
		{"- {level: T-2, below: 2.5 m}", "- {level: T-2, below: 2.5 m, above: 1 m}", "limit has two bounds | write one with above and one with below"},
		{"- {level: T-2, below: 2.5 m}", "- {level: T-2}", "limit needs a bound: above or below | e.g. below: 1.2 m"},
		{"- {level: T-2, below: 2.5 m}", "- {below: 2.5 m}", "limit looks at nothing | e.g. {level: T-1, above: 1.2 m}"},
		{"- {level: T-2, below: 2.5 m}", "- {levle: T-2, below: 2.5 m}", `limit has no key "levle" | did you mean level?`},
		{"- {level: T-2, below: 2.5 m}", "- {pressure: T-2, above: -5 mbar}", "above: a pressure here is over atmosphere, (g), or over vacuum, (a) | write -5 mbar(g) or -5 mbar(a)"},
		{"- {level: T-2, below: 2.5 m}", "- {emptied: T-2}", `emptied needs within or by | e.g. within: 4 h, or by: "10:00"`},
		{"- {level: T-2, below: 2.5 m}", "- {flow: L-3, below: 5 m}", `below: `},
		{"- {level: T-2, below: 2.5 m}", "- {level: T-2, below: 2.5 m, each: day}", "each goes with volumes and starts only"},
		{"run_for: 2 h\n", "", "the file needs run_for"},
		{"run_for: 2 h\n", "run_for: 2 h\nrun_for: 3 h\n", "run_for is given twice | it stands in line 3 already"},
		{"headfall: 1", "headfall: 2", `version "2" of the format is not known | write headfall: 1`},
		{"limits:\n", "---\nlimits:\n", "a second document begins here; a file has one"},
		{"{box: {length: 2 m, width: 2 m, height: 3 m}}, base: 5 m", "{bx: {length: 2 m, width: 2 m, height: 3 m}}, base: 5 m", `there is no shape "bx" | did you mean box?`},
		{"{elevation: 4 m}", "{elevation: !!str 4 m}", "YAML tags are not used here: !!str | leave !!str out"},
		{"{elevation: 4 m}", "&a {elevation: 4 m, x: *a}", "*a stands inside what it stands for"},
		{"{elevation: 4 m}", "{<<: {elevation: 4 m}}", "merge keys (<<) are not understood | vessels can be copied with like: TAG"},
		{"{elevation: 4 m}", "{elevation: null}", "elevation has no value"},
		{"to: HDR, parts", "to: HDR, enters: {centre: 1 m}, parts", "enters: HDR is a tee; only a vessel is met at a height | leave enters out"},
		{"{water: 12 °C}", "{water: 12 °C, syrup: 3 m}", "liquid names one kind, not 2"},
		{"{water: 12 °C}", "{water: 120 °C}", ""},
		{"  T-2: {shape", "  T-2: {like: T-9, shape", `like: there is no vessel "T-9" | did you mean T-1?`},
		{"  T-2: {shape: {box: {length: 2 m, width: 2 m, height: 3 m}}", "  T-2: {like: T-2", "vessel T-2 needs shape; like goes round in a circle at T-2"},
	} {
		if !strings.Contains(plan, c.old) {
			t.Fatalf("no %q in the plan", c.old)
		}
		says := faultsOf(t, strings.Replace(plan, c.old, c.with, 1), Options{})
		got := strings.Join(says, "; ")
		if got == "" || !strings.Contains(got, c.says) {
			t.Errorf("%q for %q:\n got %s\nwant %s", c.with, c.old, got, c.says)
		}
	}
}

func TestAllFaultsInOnePass(t *testing.T) {
	bad := plan
	for _, r := range [][2]string{{"base: 5 m", "base: 5"}, {"from: HDR", "from: HDX"}, {"kv: 60", "kw: 60"}, {"id: s1, at: 5 min", "id: s1, at: 5"},
		{"below: 2.5 m", "belov: 2.5 m"}, {"elevation: 0 m", "elevation: 0 kg"}, {"run_for: 2 h", "run_for: 2"}} {
		bad = strings.Replace(bad, r[0], r[1], 1)
	}
	says := faultsOf(t, bad, Options{})
	if len(says) < 7 {
		t.Errorf("only %d: %s", len(says), strings.Join(says, "\n"))
	}
	t.Log(strings.Join(says, "\n"))
}

func TestProblemShowsItsPlace(t *testing.T) {
	_, err := Load("dir/p.yaml", []byte(strings.NewReplacer("elevation: 4 m", "elevation: 4 mm of x", "bore: 80 mm", "boer: 80 mm").Replace(plan)), Options{})
	want := `dir/p.yaml:9:25: elevation: "of x" is not understood here
  9 |   HDR: {elevation: 4 mm of x}
    |                         ^^^^
  hint: e.g. 4.2 m
dir/p.yaml:13:58: pipe has no key "boer"
  13 |   L-1: {from: T-1, to: HDR, parts: [{pipe: {length: 5 m, boer: 80 mm, roughness: 0.05 mm}}, {valve: {tag: V-1, kv: 60}}]}
     |                                                          ^^^^
  hint: did you mean bore?
dir/p.yaml:14:58: pipe has no key "boer"
  14 |   L-2: {from: HDR, to: T-2, parts: [{pipe: {length: 5 m, boer: 80 mm, roughness: 0.05 mm}}]}
     |                                                          ^^^^
  hint: did you mean bore?`
	if err == nil || err.Error() != want {
		t.Errorf("got\n%v\nwant\n%s", err, want)
	}
}

func TestFilesThatAreNoPlants(t *testing.T) {
	for text, says := range map[string]string{
		"":                      "this file is empty | headfall new writes one to begin with",
		"# nothing\n":           "this file is empty | headfall new writes one to begin with",
		"- a\n- b\n":            "a plant file is written as keys with values | it begins with headfall: 1",
		"headfall: 1\n\tx: 3\n": "this cannot be read as YAML: found a tab character that violates indentation | indent with blanks, not with tabs",
		"headfall: [1\n":        "this cannot be read as YAML",
		"a: \xff\n":             "this is not UTF-8 text | save the file as UTF-8",
		"headfall: 1\nrun_for: 1 h\nx: " + strings.Repeat("[", 100) + strings.Repeat("]", 100): "this is nested too deeply",
		"headfall: 1\na: &a [1,1,1,1,1,1,1,1,1,1]\nb: &b [*a,*a,*a,*a,*a,*a,*a,*a,*a,*a]\nc: &c [*b,*b,*b,*b,*b,*b,*b,*b,*b,*b]\n" +
			"d: &d [*c,*c,*c,*c,*c,*c,*c,*c,*c,*c]\ne: &e [*d,*d,*d,*d,*d,*d,*d,*d,*d,*d]\nf: &f [*e,*e,*e,*e,*e,*e,*e,*e,*e,*e]\n": "aliases make this file too large",
	} {
		if got := strings.Join(faultsOf(t, text, Options{}), "; "); !strings.HasPrefix(got, says) {
			t.Errorf("%.30q: %s", text, got)
		}
	}
}
