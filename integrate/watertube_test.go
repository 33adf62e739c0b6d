package integrate_test

import (
	"math"
	"strings"
	"testing"

	"headfall/integrate"
	"headfall/integrate/ivptest"
)

// tube runs the water tube and returns the solver and the switches met.
func tube(t *testing.T, m integrate.Method, rtol float64) (*ivptest.WaterTube, *integrate.Solver, []ivptest.Switch) {
	t.Helper()
	w, err := ivptest.NewWaterTube("../testdata/integrate/water_tube.json")
	if err != nil {
		t.Fatal(err)
	}
	s := integrate.NewSolver(w, integrate.Options{RTol: rtol, Method: m})
	if err := s.Restart(0, w.Y0); err != nil {
		t.Fatal(err)
	}
	var met []ivptest.Switch
	for {
		out, err := s.Step(w.T1, w)
		if err != nil {
			t.Fatalf("%v after %+v", err, s.Stats())
		}
		if out.Stop == integrate.ReachedEnd {
			return w, s, met
		}
		if out.Stop == integrate.HitEvent {
			for _, k := range out.Fired {
				w.Turbulent[k] = !w.Turbulent[k]
				met = append(met, ivptest.Switch{T: out.T, Pipe: w.Pipe(k)})
			}
			if err := s.Restart(out.T, s.Y()); err != nil {
				t.Fatal(err)
			}
		}
	}
}

func TestWaterTube(t *testing.T) {
	w, s, met := tube(t, nil, 1e-10)
	worst := map[string]float64{}
	for name, want := range w.Reference {
		kind := strings.TrimRight(name, "0123456789-")
		worst[kind] = math.Max(worst[kind], math.Abs(w.Named(name, s.Y())/want-1))
	}
	t.Logf("relative differences from the reference: %v; %+v", worst, s.Stats())
	if worst["phi"] > 1e-9 || worst["p"] > 1e-12 || worst["lambda"] > 1e-9 || len(worst) != 3 {
		t.Errorf("differs from the reference by %v", worst)
	}
	checkSwitches(t, w, met, 1e-5)
}

func checkSwitches(t *testing.T, w *ivptest.WaterTube, met []ivptest.Switch, within float64) {
	t.Helper()
	if len(met) != len(w.Switches) {
		t.Fatalf("%d switches, not %d: %v", len(met), len(w.Switches), met)
	}
	for _, want := range w.Switches {
		found := false
		for _, m := range met {
			found = found || m.Pipe == want.Pipe && math.Abs(m.T-want.T) < within
		}
		if !found {
			t.Errorf("no switch of %v at %v in %v", want.Pipe, want.T, met)
		}
	}
}

func TestWaterTubeOtherMethods(t *testing.T) {
	for _, m := range integrate.Methods()[1:] {
		rtol, within, apart := 1e-7, 0.1, 1e-5
		if m == integrate.BDF { // which errs by more of its tolerance
			rtol, apart = 1e-8, 1e-4
		}
		w, s, met := tube(t, m, rtol)
		worst := 0.0
		for name, want := range w.Reference {
			if strings.HasPrefix(name, "phi") {
				worst = math.Max(worst, math.Abs(w.Named(name, s.Y())/want-1))
			}
		}
		t.Logf("%s: flows differ by %v; %+v", m.Name(), worst, s.Stats())
		if worst > apart {
			t.Errorf("%s: flows differ by %.2g", m.Name(), worst)
		}
		checkSwitches(t, w, met, within)
	}
}
