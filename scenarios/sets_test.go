package scenarios

import (
	"math"
	"strings"
	"testing"

	"headfall/elements"
	"headfall/elements/quantity"
)

// withTwoPipes is the plan with a second pipe in L-1.
var withTwoPipes = strings.Replace(plan, "{valve: {tag: V-1, kv: 60}}", "{pipe: {length: 2 m, bore: 50 mm, roughness: 0.05 mm}}, {valve: {tag: V-1, kv: 60 ± 3, trim: equal_percentage}}", 1)

func TestNumbers(t *testing.T) {
	p := mustLoad(t, "p.yaml", []byte(withTwoPipes), Options{})
	all := numbersByName(p)
	for name, want := range map[string]float64{
		"T-1.level": 2, "T-1.base": 5, "T-1.shape.height": 3, "V-1.kv": 60, "V-1.open": 0, "V-1.trim.rangeability": 50, "L-1.pipe[1].length": 5,
		"L-1.pipe[2].length": 2, "L-2.pipe.roughness": 0.00005, "P-1.starts.above": 1.5, "P-1.rate": 5.0 / 3600, "s1.at": 300, "s1.to": 0.5,
		"h1.up_to": 600, "AIR.elevation": 0, "HDR.elevation": 4, "liquid.temperature": 285.15,
	} {
		switch n := all[name]; {
		case n == nil:
			t.Errorf("no %s", name)
		case *n.At != want || n.Value.SI != want:
			t.Errorf("%s is %v, %v; want %v", name, *n.At, n.Value.SI, want)
		}
	}
	for name := range all {
		if len(all) != len(p.Numbers) {
			t.Errorf("%s is there twice", name)
			break
		}
	}
}

func TestDeclaredDoubts(t *testing.T) {
	for assume, want := range map[string]map[string]quantity.Doubt{
		"default": {
			"V-1.kv":             {Kind: quantity.Normal95, Half: 3},
			"T-1.level":          {Kind: quantity.Normal95, Half: 0.02},
			"L-1.pipe[1].length": {},
			"L-2.pipe.roughness": {Kind: quantity.Factor, Factor: 2},
		},
		"stated": {"V-1.kv": {Kind: quantity.Normal95, Half: 3}, "T-1.level": {}, "L-2.pipe.roughness": {}},
		"none":   {"V-1.kv": {}, "T-1.level": {}},
	} {
		p := mustLoad(t, "p.yaml", []byte(withTwoPipes+"assume: {doubts: "+assume+", together: [kv]}\n"), Options{})
		for name, doubt := range want {
			n := numbersByName(p)[name]
			got := n.Value.Doubt
			got.Half = math.Round(got.Half*1e12) / 1e12
			if got != doubt {
				t.Errorf("%s: %s has %+v", assume, name, got)
			}
			if n.Assumed != (doubt.Stated() && name != "V-1.kv") {
				t.Errorf("%s: %s assumed %v", assume, name, n.Assumed)
			}
		}
	}
}

func TestSet(t *testing.T) {
	p := mustLoad(t, "p.yaml", []byte(withTwoPipes), Options{Set: []string{"V-1.kv=80", "L-1.pipe[2].length = 3 m", "L-2.pipe[1].length=7 m", "T-1.contents=4 m3",
		"V-1.trim=ball", "P-1.mode=off", "s1.at=06:10", "T-2.shape.width=1 m", "T-2.height=2.8 m", "s1.over=20 s", "AIR.elevation=-1 m"}})
	all := numbersByName(p)
	for name, want := range map[string]float64{"V-1.kv": 80, "L-1.pipe[2].length": 3, "L-2.pipe.length": 7, "T-1.contents": 4, "s1.at": 600, "T-2.shape.width": 1,
		"T-2.shape.height": 2.8, "s1.over": 20, "AIR.elevation": -1} {
		if n := all[name]; n == nil || *n.At != want {
			t.Errorf("%s: %+v", name, n)
		}
	}
	if all["T-1.level"] != nil || !math.IsNaN(p.Vessels[0].Level) {
		t.Error("the level stays beside the contents")
	}
	if mode := p.Lines[2].Parts[0].Part.(elements.Pumps).Drive().Mode; mode != elements.Off {
		t.Errorf("mode %v", mode)
	}
}

func TestSetRefused(t *testing.T) {
	for set, says := range map[string]string{
		"V-1.kv":              "this sets nothing | write TAG.x=VALUE, e.g. V-1.kv=80",
		"V-1.kw=3":            `V-1 has no value "kw" | did you mean V-1.kv?`,
		"V-2.kv=3":            `there is nothing tagged "V-2" to set | did you mean `,
		"V-1.kv=3 m":          "kv: kv is a bare number",
		"V-1.kv=0":            "kv must be more than 0",
		"L-1.pipe.length=3 m": "L-1.pipe.length could be L-1.pipe[1].length or L-1.pipe[2].length | write which",
		"L-1.length=3 m":      "L-1.length could be L-1.pipe[1].length or L-1.pipe[2].length | write which",
		"T-1.level=4 m":       "the start level, 4 m, is above the rim, 3 m",
		"V-1=3":               "V-1: which of its values?",
	} {
		got := strings.Join(faultsOf(t, withTwoPipes, Options{Set: []string{set}}), "; ")
		if !strings.HasPrefix(got, says) {
			t.Errorf("%s: %s", set, got)
		}
	}
	_, err := Load("p.yaml", []byte(plan), Options{Set: []string{"V-1.kv=0"}})
	want := "--set \"V-1.kv=0\":1:8: kv must be more than 0\n  1 | V-1.kv=0\n    |        ^\n  hint: e.g. 95"
	if err == nil || err.Error() != want {
		t.Errorf("%v", err)
	}
}

func TestCases(t *testing.T) {
	text := plan + `upsets:
  - {pump: P-1, fails_at: 1 h}
cases:
  A: {set: {V-1.kv: 80, T-1.level: 1 m}, steps: [{id: s1, at: 7 min, valve: V-1, to: 60 %}, {id: s2, after: s1, valve: V-1, to: 0 %}]}
  B: {set: {s2.wait: 3 min}, steps: [{id: s2, after: s1, valve: V-1, to: 0 %}], upsets: [{valve: V-1, stops_at: 20 %}]}
`
	p := mustLoad(t, "p.yaml", []byte(text), Options{})
	if len(p.Steps) != 2 || len(p.CaseNames) != 2 || len(p.Upsets) != 1 {
		t.Errorf("the plan: %d steps, cases %v", len(p.Steps), p.CaseNames)
	}
	a := mustLoad(t, "p.yaml", []byte(text), Options{Case: "A", Set: []string{"V-1.kv=90"}})
	if len(a.Steps) != 3 || a.Steps[0].At.S != 420 || a.Steps[2].ID != "s2" || a.Vessels[0].Level != 1 || *numbersByName(a)["V-1.kv"].At != 90 {
		t.Errorf("case A: %+v", a.Steps)
	}
	b := mustLoad(t, "p.yaml", []byte(text), Options{Case: "B"})
	if len(b.Upsets) != 2 || b.Steps[2].Wait != 180 {
		t.Errorf("case B: %+v", b.Upsets)
	}
	if got := faultsOf(t, text, Options{Case: "C"}); len(got) != 1 || !strings.HasPrefix(got[0], `there is no case "C"`) {
		t.Errorf("case C: %v", got)
	}
	broken := strings.Replace(text, "T-1.level: 1 m", "T-1.levl: 1 m", 1)
	if got := faultsOf(t, broken, Options{}); len(got) != 1 || got[0] != `T-1 has no value "levl" | did you mean T-1.level?` {
		t.Errorf("a fault in a case that is not asked for: %v", got)
	}
}

func TestLike(t *testing.T) {
	text := strings.Replace(plan, "tees:\n", `  A:
    shape: {box: {length: 1 m, width: 1 m, height: 2 m}}
    base: 3 m
    contents: 1 m3
    gauge: {tag: LT-A, zero: 0 m, span: 2 m}
    batches: [{id: D-1, at: 5 min, volume: 0.1 m3, over: 1 min}]
    cover: {vents: {VN-1: {hole: {bore: 50 mm}}}, withstands: {vacuum: 5 mbar}}
  C: {like: B, base: 7 m}
  B: {like: A, level: 40 %, cover: {withstands: {vacuum: 9 mbar}}}
tees:
`, 1)
	p := mustLoad(t, "p.yaml", []byte(text), Options{})
	b, c := p.Vessels[4], p.Vessels[3]
	switch {
	case b.Tag != "B" || b.Level != 0.8 || !math.IsNaN(b.Contents) || b.Base != 3:
		t.Errorf("B: %+v", b)
	case c.Base != 7 || c.Level != 0.8 || c.Cover.Vents[0].Tag != "C/B/VN-1" || c.Gauge.Tag != "C/B/LT-A" || c.Batches[0].ID != "C/B/D-1":
		t.Errorf("C: %+v %+v", c, c.Cover.Vents[0])
	case b.Cover.Vacuum != 900 || b.Cover.Vents[0].Tag != "B/VN-1" || b.Element == c.Element:
		t.Errorf("B: %+v", b.Cover)
	}
}
