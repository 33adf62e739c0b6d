// Package e2e holds whole plants, from the text of a file through scenarios.Load, network.Compile and Model.Run, to closed forms, published numbers,
// measurements, and integrators and books of its own.
package e2e

import (
	"context"
	"math"
	"sort"
	"strings"
	"testing"

	"headfall/elements/elementtest"
	"headfall/network"
	"headfall/scenarios"
)

// checks are the published values of testdata/checks/checks.json.
func checks(t *testing.T) elementtest.Book {
	t.Helper()
	return elementtest.Load(t, "../checks/checks")
}

// how is how a plant is run.
type how struct {
	method    string
	tolerance float64 // 0: the usual one
	kase      string
	set       []string
	changes   network.Changes
}

// compile reads a plant and compiles it; what is wrong with it fails the test.
func compile(t testing.TB, text string, h how) *network.Model {
	t.Helper()
	p, err := scenarios.Load("plant.yaml", []byte(text), scenarios.Options{Case: h.kase, Set: h.set})
	if err != nil {
		t.Fatalf("%v\n%s", err, text)
	}
	if err := p.Refresh(); err != nil {
		t.Fatalf("%v\n%s", err, text)
	}
	if faults, _ := p.Validate(); len(faults) > 0 {
		t.Fatalf("%v\n%s", faults, text)
	}
	m, err := network.Compile(p, network.Options{Method: h.method, Tolerance: h.tolerance})
	if err != nil {
		t.Fatalf("%v\n%s", err, text)
	}
	return m
}

// run runs a plant to its end and closes its books.
func run(t testing.TB, text string, h how) *network.Result {
	t.Helper()
	r, err := compile(t, text, h).Run(context.Background(), network.RunOptions{Series: true, Changes: h.changes})
	if err != nil {
		t.Fatalf("%v\n%s", err, text)
	}
	if !r.Complete {
		t.Fatalf("stopped because %s at %g s\n%s", r.Stopped, r.End, text)
	}
	if r.Balance.Relative > 1e-12 {
		t.Errorf("the balance is off by %.3g: %+v", r.Balance.Relative, r.Balance)
	}
	return r
}

// plant joins the parts of a file: run_for, then blocks of YAML that begin at the left margin.
func plant(runFor string, blocks ...string) string {
	return "headfall: 1\ntitle: test\nrun_for: " + runFor + "\nassume: {doubts: none}\n" + strings.Join(blocks, "\n") + "\n"
}

// thin is a liquid so thin that no orifice feels a Reynolds number and no valve a thick liquid; it has no vapour pressure.
const thin = "liquid: {stated: {name: thin, density: 1000 kg/m3, viscosity: 0.0001 mPa.s}}"

// within fails when got is further than a share rel from want.
func within(t testing.TB, what string, got, want, rel float64) {
	t.Helper()
	if !(math.Abs(got-want) <= rel*math.Abs(want)) {
		t.Errorf("%s: %.12g, want %.12g, off by %.2g of it, allowed %.2g", what, got, want, got/want-1, rel)
	}
}

// near fails when got is further than abs from want.
func near(t testing.TB, what string, got, want, abs float64) {
	t.Helper()
	if !(math.Abs(got-want) <= abs) {
		t.Errorf("%s: %.12g, want %.12g, off by %.2g, allowed %.2g", what, got, want, got-want, abs)
	}
}

// value reads a moment that must have come.
func value(t testing.TB, what string, v *float64) float64 {
	t.Helper()
	if v == nil {
		t.Errorf("%s never came", what)
		return math.NaN()
	}
	return *v
}

// milestone is when the named milestone came.
func milestone(t testing.TB, r *network.Result, name string) float64 {
	t.Helper()
	for _, m := range r.Milestones {
		if m.Name == name {
			return value(t, name, m.At)
		}
	}
	t.Fatalf("no milestone %s", name)
	return 0
}

// step is what became of a step.
func step(t testing.TB, r *network.Result, id string) *network.StepResult {
	t.Helper()
	for _, s := range r.Steps {
		if s.ID == id {
			return s
		}
	}
	t.Fatalf("no step %s", id)
	return nil
}

// done is when a step acted.
func done(t testing.TB, r *network.Result, id string) float64 {
	t.Helper()
	return value(t, "step "+id, step(t, r, id).Done)
}

// at reads a series at a time that has a sample, just after it.
func at(t testing.TB, r *network.Result, column []float64, when float64) float64 {
	t.Helper()
	i := sort.SearchFloat64s(r.Series.Time, when+1e-9)
	if i == 0 || math.Abs(r.Series.Time[i-1]-when) > 1e-6 {
		t.Fatalf("no sample at %g s", when)
	}
	return column[i-1]
}

// limit is the result of the i-th limit of the file, from 1.
func limit(t testing.TB, r *network.Result, i int) *network.LimitResult {
	t.Helper()
	for _, l := range r.Limits {
		if l.ID == i {
			return l
		}
	}
	t.Fatalf("no limit %d", i)
	return nil
}

// flagged counts the flags of a kind at a place.
func flagged(r *network.Result, kind, where string) (n int) {
	for _, f := range r.Flags {
		if f.Kind == kind && f.Where == where {
			n++
		}
	}
	return n
}
