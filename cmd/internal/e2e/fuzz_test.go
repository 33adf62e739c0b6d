package e2e

import (
	"context"
	"io"
	"math"
	"os"
	"path/filepath"
	"testing"
	"time"

	"headfall/network"
	"headfall/scenarios"
	"headfall/viz/export"
)

const (
	fuzzSteps   = 3000  // of the solver in one run
	fuzzThings  = 60    // vessels, lines and parts together
	fuzzSamples = 20000 // of the series
)

// FuzzRun: whatever a file says, if it reads, its plant runs to an end or says why not, within its budget of steps; nothing panics, nothing that is
// no number comes out, and the books close where the run does.
func FuzzRun(f *testing.F) {
	for _, name := range scenarios.Demos() {
		data, _ := scenarios.Demo(name)
		f.Add(data)
	}
	f.Add(scenarios.Starter())
	for _, pattern := range []string{"../../../testdata/bad/plan.yaml", "../../../testdata/scenarios/*.yaml", "../../../testdata/fit/*.yaml"} {
		files, err := filepath.Glob(pattern)
		if err != nil || len(files) == 0 {
			f.Fatal(pattern, err)
		}
		for _, name := range files {
			data, err := os.ReadFile(name)
			if err != nil {
				f.Fatal(err)
			}
			f.Add(data)
		}
	}
	f.Fuzz(func(t *testing.T, data []byte) {
		p, err := scenarios.Load("fuzz.yaml", data, scenarios.Options{})
		if err != nil || things(p) > fuzzThings || p.RunFor/p.ReportEvery > fuzzSamples {
			return
		}
		m, err := network.Compile(p, network.Options{MaxSteps: fuzzSteps})
		if err != nil {
			t.Fatalf("it reads, and does not compile: %v", err)
		}
		ctx, stop := context.WithTimeout(t.Context(), time.Minute)
		defer stop()
		r, err := m.Run(ctx, network.RunOptions{Series: true})
		if ctx.Err() != nil {
			t.Fatal("it does not come to an end")
		}
		if r == nil {
			if err == nil {
				t.Fatal("neither a result nor a reason")
			}
			return
		}
		if err := export.JSON(io.Discard, r); err != nil {
			t.Fatal(err)
		}
		if off := math.Abs(r.Balance.Relative); r.Complete && off > 1e-6 {
			t.Fatalf("the books are off by %g", off)
		}
		finite(t, p, r)
	})
}

func things(p *network.Plant) int {
	n := len(p.Vessels) + len(p.Lines) + len(p.Steps) + len(p.Limits)
	for _, l := range p.Lines {
		n += len(l.Parts)
	}
	return n
}

// finite checks that clocks go on and levels are numbers not below the base: the error allowed in a volume is 1e-9 of the full vessel at least, and
// the engine refuses a hundred times that.
func finite(t *testing.T, p *network.Plant, r *network.Result) {
	t.Helper()
	for i, at := range r.Series.Time {
		if math.IsNaN(at) || i > 0 && at < r.Series.Time[i-1] {
			t.Fatalf("the clock goes from %v to %v", r.Series.Time[i-1], at)
		}
	}
	for _, v := range p.Vessels {
		full, _ := v.Shape.Volume(v.Shape.Height())
		for i, level := range r.Series.Level[v.Tag] {
			if w, _ := v.Shape.Volume(level); math.IsNaN(level) || w < -dip*full {
				t.Fatalf("%s stands at %v m at %v s", v.Tag, level, r.Series.Time[i])
			}
		}
	}
}
