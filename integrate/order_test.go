package integrate_test

import (
	"math"
	"testing"

	"headfall/integrate"
	"headfall/integrate/ivptest"
)

// errorAt runs a problem with fixed steps and returns its largest error at the ends of steps, and between them on the dense output.
func errorAt(t *testing.T, p *ivptest.Problem, m integrate.Method, steps int) (end, between float64) {
	t.Helper()
	s := integrate.NewSolver(p, integrate.Options{RTol: 1e-6, Method: m})
	s.FixStep((p.T1 - p.T0) / float64(steps))
	if err := s.Restart(p.T0, p.Y0); err != nil {
		t.Fatal(err)
	}
	want, got := make([]float64, len(p.Y0)), make([]float64, len(p.Y0))
	for {
		out, err := s.Step(p.T1, nil)
		if err != nil {
			t.Fatal(err)
		}
		p.Exact(out.T, want)
		for i, y := range s.Y() {
			end = math.Max(end, math.Abs(y-want[i]))
		}
		for _, part := range []float64{0.15, 0.37, 0.5, 0.71, 0.9} {
			at := out.T0 + part*(out.T-out.T0)
			s.Eval(at, got)
			p.Exact(at, want)
			for i := range got {
				between = math.Max(between, math.Abs(got[i]-want[i]))
			}
		}
		if out.Stop == integrate.ReachedEnd {
			break
		}
	}
	return end, between
}

func TestOrder(t *testing.T) {
	for _, c := range []struct {
		problem    *ivptest.Problem
		method     integrate.Method
		steps      int
		low, high  float64 // of the end
		denseLow   float64
		worstAtEnd float64
	}{
		{ivptest.ProtheroRobinson(-1), integrate.Rodas5P, 16, 4.8, 5.2, 3.8, 1e-8},
		{ivptest.ProtheroRobinson(-1e6), integrate.Rodas5P, 16, 2.8, 3.2, 2.8, 1e-11},
		{ivptest.Oscillator(), integrate.Rodas5P, 32, 4.8, 5.3, 3.8, 1e-8},
		{ivptest.Swing(), integrate.Rodas5P, 64, 4.8, 5.3, 3.8, 1e-8},
		{ivptest.ProtheroRobinson(-1), integrate.Rodas4P, 16, 3.8, 4.2, 2.8, 1e-6},
		{ivptest.Oscillator(), integrate.Rodas4P, 64, 3.8, 4.3, 2.8, 1e-7},
		{ivptest.Swing(), integrate.Rodas4P, 64, 3.8, 4.3, 2.8, 1e-7},
		{ivptest.ProtheroRobinson(-1), integrate.Rodas4P2, 16, 3.8, 4.2, 2.8, 1e-6},
		{ivptest.Oscillator(), integrate.Rodas4P2, 64, 3.8, 4.3, 2.8, 1e-7},
		{ivptest.Swing(), integrate.Rodas4P2, 64, 3.8, 4.3, 2.8, 1e-7},
	} {
		end1, dense1 := errorAt(t, c.problem, c.method, c.steps)
		end2, dense2 := errorAt(t, c.problem, c.method, 2*c.steps)
		order, dense := math.Log2(end1/end2), math.Log2(dense1/dense2)
		t.Logf("%s %s: order %.2f (error %.2g), dense %.2f", c.problem.Name, c.method.Name(), order, end2, dense)
		if order < c.low || order > c.high || dense < c.denseLow || end2 > c.worstAtEnd {
			t.Errorf("%s %s: order %.2f not in [%g, %g], dense %.2f below %g, or error %g above %g",
				c.problem.Name, c.method.Name(), order, c.low, c.high, dense, c.denseLow, end2, c.worstAtEnd)
		}
	}
}

func TestVanDerPol(t *testing.T) {
	for _, m := range integrate.Methods() {
		p := ivptest.VanDerPol()
		s := integrate.NewSolver(p, integrate.Options{RTol: 1e-9, Method: m})
		if err := s.Restart(p.T0, p.Y0); err != nil {
			t.Fatal(err)
		}
		for {
			out, err := s.Step(p.T1, nil)
			if err != nil {
				t.Fatal(err)
			}
			if out.Stop == integrate.ReachedEnd {
				break
			}
		}
		if s.T() != p.T1 {
			t.Errorf("ended at %v", s.T())
		}
		t.Logf("%s: %v, %+v", m.Name(), s.Y(), s.Stats())
		for i, y := range s.Y() {
			if e := math.Abs(y/p.End[i] - 1); e > 2e-7 {
				t.Errorf("%s: unknown %d is %v, not %v: %.2g", m.Name(), i, y, p.End[i], e)
			}
		}
	}
}

// The error follows the tolerance for every method and problem.
func TestErrorFollowsTolerance(t *testing.T) {
	for _, m := range integrate.Methods() {
		for _, p := range []*ivptest.Problem{
			ivptest.ProtheroRobinson(-1), ivptest.ProtheroRobinson(-1e6), ivptest.Oscillator(), ivptest.Swing(),
		} {
			for _, rtol := range []float64{1e-4, 1e-6, 1e-8} {
				s := integrate.NewSolver(p, integrate.Options{RTol: rtol, Method: m})
				run(t, s, p.Y0, p.T1)
				want := make([]float64, len(p.Y0))
				p.Exact(p.T1, want)
				for i, y := range s.Y() {
					if e := math.Abs(y-want[i]) / (1 + math.Abs(want[i])); e > 100*rtol {
						t.Errorf("%s %s at %g: error %.2g", m.Name(), p.Name, rtol, e)
					}
				}
			}
		}
	}
}

// Two families that share nothing but the linear algebra agree.
func TestFamiliesAgree(t *testing.T) {
	w := ivptest.Grid(9, pipe, true)
	a := integrate.NewSolver(w, integrate.Options{RTol: 1e-8})
	b := integrate.NewSolver(w, integrate.Options{RTol: 1e-8, Method: integrate.BDF})
	run(t, a, w.Start(), 2000)
	run(t, b, w.Start(), 2000)
	for i, y := range a.Y() {
		if e := math.Abs(y - b.Y()[i]); e > 1e-6 {
			t.Fatalf("head %d: %v and %v, apart %.2g", i, y, b.Y()[i], e)
		}
	}
	t.Logf("Rodas5P %+v\nBDF %+v", a.Stats(), b.Stats())
}
