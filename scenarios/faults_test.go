package scenarios

import (
	"errors"
	"fmt"
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
		{"length: 5 m, bore: 80 mm, roughness: 0.05 mm}}, {valve", "length: 0 m, bore: -80 mm, roughness: 0.05 mm}}, {valve", "length must be more than 0 | e.g. 24 m; bore must be more than 0 | e.g. 82.5 mm"},
		{"rate: 5 m3/h, starts: {level: T-2, above: 1.5 m}", "rate: 5 m3/h, starts: {level: T-2, above: 0.4 m}", "the start level must be above the stop level"},
		{"V-1, kv: 60", "T-2, kv: 60", "T-2 is the tag of a vessel already | it stands in line 7; tags are unique over the whole file; valve: there is no valve \"V-1\""},
		{"  HDR: {elevation: 4 m}", "  on: {elevation: 4 m}", "on cannot be a tag: readers of YAML make something else of it | add a number or a letter, e.g. on-1"},
		{"  T-1: {", "  1T: {", `"1T" cannot be a tag: it begins with no letter | e.g. T-1T`},
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
		{"  T-2: {shape: {box: {length: 2 m, width: 2 m, height: 3 m}}", "  T-2: {like: T-2", "like goes round in a circle at T-2 | one of them must be written out"},
		{"at: 5 min, valve", "when: {opening: V-1, above: 20 %}, valve", "step s1 waits for what cannot change: opening of V-1 | no other step moves it"},
		{"at: 5 min, valve", "when: {level: T-2, above: 7 m}, valve", "step s1 waits for a level that T-2 never comes to: 7 m, its rim is at 3 m"},
		{"at: 5 min, valve", "when: {level: T-2, below: -1 m}, valve", "step s1 waits for a level under the base of T-2"},
		{"at: 5 min, valve", "when: {pressure: T-1, above: 1 mbar(g)}, valve", "step s1: T-1 is open, its pressure is that of the air"},
		{"at: 5 min, valve", "when: {crest: L-1, above: 1 m}, valve", "step s1: L-1 has no high point"},
		{"at: 5 min, valve", "when: {level: AIR, above: 1 m}, valve", "level: AIR is an outside point, not a vessel"},
		{"at: 5 min, valve", "at: 5 min, when: {level: T-1, below: 1 m}, valve", "step s1 has two triggers: at and when"},
		{"at: 5 min, valve: V-1", "at: 5 min, valve: P-1", "valve: P-1 is a pump, not a valve"},
		{"at: 5 min", "at: -5 min", "at lies before the start"},
		{"valve: V-1, to: 50 %", "pump: P-1, to: 50 %", "to: \"50 %\" is not understood | one of off, on, auto, standby"},
		{"HDR: {elevation: 4 m}", "HDR: {elevation: 4 m}\n  H2: {elevation: 1 m}", "no line meets at H2 | take it out"},
		{"below: 2.5 m}", "below: 2.5 m, since: 1 h, until: 30 min}", "until is not after since: the limit would never be judged"},
		{"below: 2.5 m}", "below: 2.5 m, since: 9 h}", "since is not before the end of the run"},
		{"rate: 5 m3/h,", "rate: 5 m3/h, standby_for: P-1,", "a pump cannot stand by for itself"},
		{"rate: 5 m3/h,", "curve: [[0 m3/h, 9 m], [10 m3/h, 4 m]],", "P-1 has a curve and no check valve in its line"},
		{"rate: 5 m3/h,", "curve: [[0 m3/h, 5 m], [10 m3/h, 9 m]], when_stopped: shut,", "the head must fall from row to row"},
		{"from: T-2, to: AIR, parts: [", "from: T-2, to: AIR, leaves: {crest: 2 m}, parts: [{orifice: {diameter: 3 cm, cd: 0.6}}, {weir: {v_notch: {angle: 90 deg}}}, ", "the weir in L-3 must be the first part of its line"},
		{"from: T-2, to: AIR, parts: [", "from: T-2, to: AIR, parts: [{weir: {v_notch: {angle: 90 deg}}}, ", "the weir in L-3 needs the height of its crest in the vessel that it leaves"},
		{"from: T-1, to: HDR", "from: T-1, leaves: {centre: 9 m}, to: HDR", "L-1 leaves T-1 at 9 m, above the top of its shape at 3 m"},
		{"level: 1 m}", "level: 62 %, gauge: {zero: 0 m, span: 40 m}}", "the start level, 24.8 m, is above the rim, 3 m"},
		{"level: 1 m}", "level: 3 m, cover: {gas: {pressure: 0 mbar(g), temperature: 15 °C}}}", "T-2 starts full and sealed"},
		{"level: 1 m}", "level: 1 m, spills_to: T-2}", "T-2 cannot spill into itself"},
		{"level: 1 m}", "level: \"1,5 m\"}", "level: decimals are parted by a point | write 1.5 m"},
		{"level: 1 m}", "level: 1 m, inside: [{from: 0 m, to: 1 m, displaces: 44 m3}]}", "it leaves no room for liquid at level 0 m"},
		{"{box: {length: 2 m, width: 2 m, height: 3 m}}", "{upright_cylinder: {diameter: 2 m, height: 0.3 m, bottom: {cone: {depth: 0.9 m}}}}", "height 300 mm is over all and less than its bottom and top take, 900 mm"},
		{"roughness: 0.05 mm", "roughness: 90 mm", "the roughness is more than a tenth of the bore"},
		{"kv: 60", "kv: 1e999", "kv: \"1e999\" is beyond what can be reckoned with"},
		{"kv: 60", "kv: 70 to 60", "kv: the lower end comes first | write 60 to 70"},
		{"run_for: 2 h", "run_for: 2 h\nreport_every: 1e-6 s", "report_every is too short for this run_for"},
		{"headfall: 1\n", "headfall: 1\ntitle: \"x\\e[31m\"\n", "title has a character in it that does not print, U+001B"},
		{"headfall: 1\n", "headfall: 1\ntitle: " + strings.Repeat("x", 10_001) + "\n", "title is too long: 10001 characters, 10000 are taken"},
		{"headfall: 1\n", "headfall: 1\ntitle: a\x00b\n", "there is a character here that does not print | take it out"},
		{"headfall: 1\n", "headfall: 1\ntitle: *nope\n", "*nope stands for nothing: there is no &nope before it"},
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

// A vessel that no line meets and into which nothing comes stands still.
func TestWaitingForWhatStandsStill(t *testing.T) {
	with := strings.NewReplacer("tees:", "  T-3: {shape: {box: {length: 1 m, width: 1 m, height: 3 m}}, base: 1 m, level: 0.5 m}\ntees:",
		"at: 5 min, valve", "when: {level: T-3, above: 1 m}, valve").Replace(plan)
	want := "step s1 waits for what cannot change: level of T-3 | no line meets it and nothing comes in"
	if got := strings.Join(faultsOf(t, with, Options{}), "; "); got != want {
		t.Errorf("got %s, want %s", got, want)
	}
	for _, comes := range []string{"level: 0.5 m, inflow: 2 m3/h}", "level: 0.5 m, batches: [{id: b, at: 1 h, volume: 1 m3, over: 1 min}]}"} {
		if got := faultsOf(t, strings.Replace(with, "level: 0.5 m}", comes, 1), Options{}); got != nil {
			t.Errorf("%s: %v", comes, got)
		}
	}
	if got := faultsOf(t, strings.Replace(with, "base: 5 m, level: 2 m}", "base: 5 m, level: 2 m, spills_to: T-3}", 1), Options{}); got != nil {
		t.Errorf("spilled into: %v", got)
	}
}

// Very many faults are counted, not printed.
func TestManyFaults(t *testing.T) {
	_, err := Load("p.yaml", []byte(plan+manyKeys(1000)), Options{})
	if err == nil || !strings.HasSuffix(err.Error(), "p.yaml: 900 more faults are not shown") {
		t.Errorf("%.200v", err)
	}
}

func manyKeys(n int) string {
	var b strings.Builder
	for i := range n {
		fmt.Fprintf(&b, "k%d: 1\n", i)
	}
	return b.String()
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
  hint: write 4 mm
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
		"headfall: 1\n\tx: 3\n": "this line is indented with a tab | indent with blanks",
		"headfall: [1\n":        "this [ is never closed | write ] where it ends",
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
