package e2e

import (
	"bytes"
	"math"
	"os"
	"path/filepath"
	"strings"
	"testing"

	"headfall/elements"
	"headfall/elements/elementtest"
	"headfall/elements/quantity"
	"headfall/scenarios"
)

// What follows is all that a new part needs: one file with its law, its parameters and its registration.

func init() {
	elements.Register(elements.Kind{
		Name: "test_screen", Room: elements.Parts,
		Doc: "A screen of bars, of the tests.", Law: "Δp = ½·ρ·K·(Q/A)²", Valid: "any flow", Source: "definition",
		Symbol: "M0 12H24M12 6V18",
		New:    func() elements.Element { return &screen{} }, Sample: "{area: 0.01 m2, k: 2}",
	})
}

type screen struct{ area, k float64 } // m²; 1

func (e *screen) Bind(p *elements.Params) {
	p.Number(&e.area, "area", quantity.Area, elements.Required, "free area", elements.Positive)
	p.Ratio(&e.k, "k", elements.Required, "loss coefficient", elements.Positive)
}

func (e *screen) Ready() error { return nil }

func (e *screen) Drop(q float64, at *elements.Local) (dp, slope float64) {
	return elements.Quadratic(0.5*at.Fluid.Density*e.k/(e.area*e.area), q, at.Band)
}

// A part of a file of its own is read, refused with its place, listed, in the schema, conforming, and runs.
func TestAPartKindIsOneFile(t *testing.T) {
	text := plant("10 min", thin, `vessels:
  T: {shape: {box: {length: 4 m, width: 4 m, height: 3 m}}, base: 5 m, level: 2 m}
outside: {AIR: {free_fall: {elevation: 5 m}}}
lines:
  L: {from: T, to: AIR, inlet: full, entry: 0, exit: 0, parts: [{test_screen: {area: 0.01 m2, k: 2}}]}`)
	r := run(t, text, how{})
	// √h falls straight: A·√(2·g/K)/(2·S) a second.
	want := math.Pow(math.Sqrt(2)-0.01*math.Sqrt(2*9.80665/2)/(2*16)*600, 2)
	within(t, "level after ten minutes", r.Vessels["T"].EndLevel, want, 1e-5)

	_, err := scenarios.Load("p.yaml", []byte(strings.Replace(text, "area: 0.01 m2", "area: 0.01", 1)), scenarios.Options{})
	if err == nil || !strings.Contains(err.Error(), `p.yaml:10:`) || !strings.Contains(err.Error(), `area: "0.01" needs a unit`) {
		t.Errorf("a fault in it: %v", err)
	}
	if !bytes.Contains(scenarios.Schema(), []byte(`"test_screen"`)) {
		t.Error("it is not in the schema")
	}
	elementtest.Check(t, elements.Parts, "test_screen")
}

// A kind that is built in is named in one file, but for tests, demos and words about it.
func TestResistanceIsOneFile(t *testing.T) {
	var named []string
	for _, dir := range []string{"elements", "network", "scenarios", "viz", "cmd/internal/cli", "cmd/internal/text"} {
		files, err := filepath.Glob(filepath.Join("../../..", dir, "*.go"))
		if err != nil {
			t.Fatal(err)
		}
		for _, f := range files {
			data, err := os.ReadFile(f)
			if err != nil {
				t.Fatal(err)
			}
			if !strings.HasSuffix(f, "_test.go") && bytes.Contains(data, []byte(`"resistance"`)) {
				named = append(named, dir+"/"+filepath.Base(f))
			}
		}
	}
	if len(named) != 1 || named[0] != "elements/resistance.go" {
		t.Errorf("resistance is named in %q", named)
	}
}
