package integrate_test

import (
	"testing"

	"headfall/integrate"
	"headfall/integrate/ivptest"
)

// run goes from 0 to end and returns the solver.
func run(t testing.TB, s *integrate.Solver, y0 []float64, end float64) {
	t.Helper()
	s.Reset()
	if err := s.Restart(0, y0); err != nil {
		t.Fatal(err)
	}
	for {
		out, err := s.Step(end, nil)
		if err != nil {
			t.Fatal(err)
		}
		if out.Stop == integrate.ReachedEnd {
			return
		}
	}
}

func benchmarkRun(b *testing.B, w *ivptest.Network) {
	w.Cap = 2e-5
	s := integrate.NewSolver(w, integrate.Options{RTol: 1e-5})
	y0 := w.Start()
	b.ReportAllocs()
	for b.Loop() {
		run(b, s, y0, 14400)
	}
	b.ReportMetric(float64(s.Stats().Steps), "steps")
	b.ReportMetric(float64(s.Stats().Rejected), "rejected")
	b.ReportMetric(float64(b.Elapsed().Microseconds())/float64(b.N)/float64(s.Stats().Steps), "µs/step")
}

// A pipe of 100 mm and 10 m has about q = 0.0175·√head.
var pipe = ivptest.Rough(0.0175, 1e-4)

func BenchmarkRunChain1000(b *testing.B) { benchmarkRun(b, ivptest.Chain(1000, pipe)) }
func BenchmarkRunGrid1024(b *testing.B)  { benchmarkRun(b, ivptest.Grid(32, pipe, false)) }

func benchmarkStep(b *testing.B, w *ivptest.Network) {
	w.Cap = 2e-5
	s := integrate.NewSolver(w, integrate.Options{RTol: 1e-5, MaxSteps: 1 << 60})
	y0 := w.Start()
	if err := s.Restart(0, y0); err != nil {
		b.Fatal(err)
	}
	b.ReportAllocs()
	for b.Loop() {
		if _, err := s.Step(1e9, nil); err != nil {
			b.Fatal(err)
		}
		if s.T() > 7200 {
			if err := s.Restart(0, y0); err != nil {
				b.Fatal(err)
			}
		}
	}
}

func BenchmarkStepChain1000(b *testing.B) { benchmarkStep(b, ivptest.Chain(1000, pipe)) }
func BenchmarkStepGrid1024(b *testing.B)  { benchmarkStep(b, ivptest.Grid(32, pipe, false)) }
