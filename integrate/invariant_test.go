package integrate_test

import (
	"errors"
	"math"
	"testing"

	"headfall/integrate"
	"headfall/integrate/ivptest"
)

// What has left the tanks is what has passed the drain, to rounding, whatever the tolerance: unknowns and integrals go through the same weights.
func TestInvariantToRounding(t *testing.T) {
	for name, w := range map[string]*ivptest.Network{
		"chain": ivptest.Chain(50, pipe), "grid": ivptest.Grid(8, pipe, false), "tees": ivptest.Grid(9, pipe, true),
	} {
		for _, m := range integrate.Methods() {
			s := integrate.NewSolver(w, integrate.Options{RTol: 1e-4, Method: m})
			run(t, s, w.Start(), 3600)
			before, after := w.Volume(w.Start()), w.Volume(s.Y())
			if e := math.Abs(before-after-s.Z()[0]) / before; e > 1e-13 {
				t.Errorf("%s %s: balance open by %.2g", name, m.Name(), e)
			}
			z := make([]float64, 1)
			y := make([]float64, len(w.Base))
			d := s.Dense()
			for _, x := range []float64{0, 0.3, 0.8, 1} {
				s.Eval(d.T0+x*d.H, y)
				s.EvalZ(d.T0+x*d.H, z)
				if e := math.Abs(before-w.Volume(y)-z[0]) / before; e > 1e-13 {
					t.Errorf("%s %s: balance open by %.2g at %g of the last step", name, m.Name(), e, x)
				}
			}
		}
	}
}

// Linear conduction in a closed chain and a closed grid: cos modes decay at known rates.
func TestConduction(t *testing.T) {
	const k, end = 0.02, 3000.0
	for _, c := range []struct {
		name string
		w    *ivptest.Network
		cols int // unknown i is at column i mod cols
	}{{"chain", ivptest.Chain(400, ivptest.Conduct(k)), 400}, {"grid", ivptest.Grid(20, ivptest.Conduct(k), false), 20}} {
		w := c.w
		w.Close()
		mode := func(i, j int) float64 {
			return math.Cos(math.Pi * float64(j) * (float64(i%c.cols) + 0.5) / float64(c.cols))
		}
		rate := func(j int) float64 { return 2 * k * (1 - math.Cos(math.Pi*float64(j)/float64(c.cols))) }
		head := func(i int, t float64) float64 {
			return 1 + 0.3*mode(i, 1)*math.Exp(-rate(1)*t) + 0.2*mode(i, 7)*math.Exp(-rate(7)*t)
		}
		y0 := make([]float64, len(w.Base))
		for i := range y0 {
			y0[i] = head(i, 0)
		}
		s := integrate.NewSolver(w, integrate.Options{RTol: 1e-9})
		run(t, s, y0, end)
		for i, y := range s.Y() {
			if e := math.Abs(y - head(i, end)); e > 1e-8 {
				t.Fatalf("%s: head %d is off by %.2g", c.name, i, e)
			}
		}
	}
}

func TestEndTimesAreExact(t *testing.T) {
	p := ivptest.Oscillator()
	for _, m := range integrate.Methods() {
		s := integrate.NewSolver(p, integrate.Options{RTol: 1e-5, Method: m})
		if err := s.Restart(0, p.Y0); err != nil {
			t.Fatal(err)
		}
		for k := 1; k <= 30; k++ {
			end := float64(k) * 0.1
			for {
				out, err := s.Step(end, nil)
				if err != nil {
					t.Fatal(err)
				}
				if out.T > end || out.T != s.T() {
					t.Fatalf("passed the end: %v beyond %v", out.T, end)
				}
				if out.Stop == integrate.ReachedEnd {
					break
				}
			}
			if s.T() != end {
				t.Errorf("stopped at %v, not %v", s.T(), end)
			}
		}
		if out, err := s.Step(3, nil); err != nil || out.Stop != integrate.ReachedEnd {
			t.Errorf("at the end: %+v, %v", out, err)
		}
	}
}

// The same calls give the same bits, whether on a new Solver or on one that has run before.
func TestSameBits(t *testing.T) {
	w := ivptest.Grid(6, pipe, true)
	for _, m := range integrate.Methods() {
		a := integrate.NewSolver(w, integrate.Options{RTol: 1e-5, Method: m})
		run(t, a, w.Start(), 1000)
		first := append([]float64(nil), a.Y()...)
		run(t, a, w.Start(), 100)
		run(t, a, w.Start(), 1000)
		for i, y := range a.Y() {
			if y != first[i] {
				t.Fatalf("%s: unknown %d is %v, was %v", m.Name(), i, y, first[i])
			}
		}
	}
}

func TestNoAllocationInStep(t *testing.T) {
	w := ivptest.Grid(9, pipe, true)
	for _, m := range integrate.Methods() {
		s := integrate.NewSolver(w, integrate.Options{RTol: 1e-5, Method: m})
		y0 := w.Start()
		ev := &level{w: w, at: 0.7}
		one := func() {
			s.Reset()
			if err := s.Restart(0, y0); err != nil {
				t.Fatal(err)
			}
			for {
				out, err := s.Step(3000, ev)
				if err != nil {
					t.Fatal(err)
				}
				if out.Stop == integrate.ReachedEnd {
					return
				}
			}
		}
		one()
		if s.Stats().Events == 0 {
			t.Errorf("%s: no event", m.Name())
		}
		if n := testing.AllocsPerRun(3, one); n != 0 {
			t.Errorf("%s: %g allocations a run", m.Name(), n)
		}
	}
}

// level watches every tank for a level.
type level struct {
	w  *ivptest.Network
	at float64
}

func (l *level) Len() int          { return len(l.w.Base) }
func (l *level) Direction(int) int { return 0 }
func (l *level) Values(_ float64, y, v []float64) {
	for i := range v {
		v[i] = y[i] - l.w.Base[i] - l.at
	}
}

func TestErrorsAreTyped(t *testing.T) {
	decay := func() *ivptest.Problem { return ivptest.ProtheroRobinson(-1) }
	reason := func(err error) integrate.Reason {
		var e *integrate.Error
		if !errors.As(err, &e) {
			t.Fatalf("not an integrate.Error: %v", err)
		}
		return e.Reason
	}
	t.Run("too many steps", func(t *testing.T) {
		p := decay()
		s := integrate.NewSolver(p, integrate.Options{RTol: 1e-12, MaxSteps: 5})
		if err := s.Restart(0, p.Y0); err != nil {
			t.Fatal(err)
		}
		var err error
		for range 6 {
			_, err = s.Step(100, nil)
		}
		if reason(err) != integrate.TooManySteps {
			t.Error(err)
		}
	})
	t.Run("step too small", func(t *testing.T) {
		p := decay() // y' = 1/(1−t): the solution ends at t = 1
		p.F = func(_ float64, y, f, _ []float64) { f[0] = y[0] * y[0] }
		p.D = func(_ float64, y []float64, fy, _ [][]float64, _, _ []float64) { fy[0][0] = 2 * y[0] }
		s := integrate.NewSolver(p, integrate.Options{RTol: 1e-6})
		if err := s.Restart(0, []float64{1}); err != nil {
			t.Fatal(err)
		}
		for {
			out, err := s.Step(2, nil)
			if err != nil {
				if reason(err) != integrate.StepTooSmall || math.Abs(s.T()-1) > 1e-3 {
					t.Errorf("%v at %v", err, s.T())
				}
				return
			}
			if out.Stop == integrate.ReachedEnd {
				t.Fatal("went past a pole")
			}
		}
	})
	t.Run("not settled", func(t *testing.T) {
		p := ivptest.Swing()
		p.F = func(_ float64, y, f, _ []float64) { f[0], f[1] = 0, y[1]*y[1]+1 }
		p.D = func(_ float64, y []float64, fy, _ [][]float64, _, _ []float64) { fy[1][1] = 2 * y[1] }
		s := integrate.NewSolver(p, integrate.Options{RTol: 1e-6})
		if err := s.Restart(0, []float64{0, 0.7}); reason(err) != integrate.NotSettled {
			t.Error(err)
		}
	})
	t.Run("singular", func(t *testing.T) {
		p := ivptest.Swing()
		p.F = func(_ float64, y, f, _ []float64) { f[0], f[1] = 0, y[0] }
		p.D = func(_ float64, y []float64, fy, _ [][]float64, _, _ []float64) { fy[1][0] = 1 }
		s := integrate.NewSolver(p, integrate.Options{RTol: 1e-6})
		err := s.Restart(0, []float64{0, 1})
		if reason(err) != integrate.Singular {
			t.Fatal(err)
		}
		var e *integrate.Error
		if errors.As(err, &e); e.Unknown != 1 {
			t.Errorf("names unknown %d", e.Unknown)
		}
	})
	t.Run("not finite", func(t *testing.T) {
		p := decay()
		s := integrate.NewSolver(p, integrate.Options{RTol: 1e-6})
		if err := s.Restart(0, []float64{math.NaN()}); reason(err) != integrate.NotFinite {
			t.Error(err)
		}
	})
}

// fence refuses states beyond a limit.
type fence struct {
	*ivptest.Problem
	most float64
}

func (f *fence) Admit(_ float64, y []float64) bool { return y[0] <= f.most }

func TestGuardShortensTheStep(t *testing.T) {
	p := ivptest.ProtheroRobinson(-1)
	s := integrate.NewSolver(&fence{p, 0.5}, integrate.Options{RTol: 1e-3})
	if err := s.Restart(0, p.Y0); err != nil {
		t.Fatal(err)
	}
	var err error
	for err == nil {
		_, err = s.Step(2, nil)
	}
	var e *integrate.Error
	if !errors.As(err, &e) || e.Reason != integrate.StepTooSmall || e.Unknown != -1 {
		t.Fatal(err)
	}
	if y := s.Y()[0]; y > 0.5 || y < 0.5-1e-6 {
		t.Errorf("stopped at %v", y)
	}
}

// Rates that are not numbers beyond a point reject the step instead of spoiling the state.
func TestNotFiniteRejects(t *testing.T) {
	p := ivptest.ProtheroRobinson(-1)
	f := p.F
	p.F = func(t float64, y, r, g []float64) {
		f(t, y, r, g)
		if t > 1 {
			r[0] = math.NaN()
		}
	}
	s := integrate.NewSolver(p, integrate.Options{RTol: 1e-4})
	run(t, s, p.Y0, 1)
	if math.Abs(s.Y()[0]-math.Sin(1)-1) > 1e-3 {
		t.Errorf("got %v", s.Y())
	}
	if _, err := s.Step(2, nil); err == nil || math.IsNaN(s.Y()[0]) {
		t.Errorf("%v, %v", err, s.Y())
	}
}

// A restart finds the algebraic unknowns, from far away as well.
func TestRestartSettles(t *testing.T) {
	p := ivptest.Oscillator()
	s := integrate.NewSolver(p, integrate.Options{RTol: 1e-8})
	if err := s.Restart(0, []float64{1, 0, 1e-3}); err != nil {
		t.Fatal(err)
	}
	if e := math.Abs(s.Y()[2] - math.E); e > 1e-12 {
		t.Errorf("z off by %g", e)
	}
	q := ivptest.Swing()
	s = integrate.NewSolver(q, integrate.Options{RTol: 1e-8})
	if err := s.Restart(0, []float64{1, 50}); err != nil {
		t.Fatal(err)
	}
	if e := math.Abs(s.Y()[1] - 1); e > 1e-12 {
		t.Errorf("z off by %g", e)
	}
}
