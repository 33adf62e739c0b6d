package integrate_test

import (
	"math"
	"testing"

	"headfall/integrate"
	"headfall/integrate/ivptest"
)

// functions are events given by plain functions.
type functions struct {
	f   []func(t float64, y []float64) float64
	dir []int
}

func (e *functions) Len() int { return len(e.f) }
func (e *functions) Values(t float64, y, v []float64) {
	for i, f := range e.f {
		v[i] = f(t, y)
	}
}
func (e *functions) Direction(i int) int {
	if e.dir == nil {
		return 0
	}
	return e.dir[i]
}

// ball is y' = v, v' = −9.8, which the methods of order two and more solve exactly.
func ball(y, v float64) *ivptest.Problem {
	return &ivptest.Problem{
		Name: "ball", T1: 100, Y0: []float64{y, v},
		F: func(_ float64, y, f, _ []float64) { f[0], f[1] = y[1], -9.8 },
		D: func(_ float64, _ []float64, fy, _ [][]float64, _, _ []float64) { fy[0][1] = 1 },
	}
}

type hit struct {
	t     float64
	fired []int
}

// hits runs to end without restarts and returns what fired.
func hits(t *testing.T, p *ivptest.Problem, m integrate.Method, rtol, end float64, ev integrate.Events) []hit {
	t.Helper()
	s := integrate.NewSolver(p, integrate.Options{RTol: rtol, Method: m, MaxSteps: 100000})
	if err := s.Restart(p.T0, p.Y0); err != nil {
		t.Fatal(err)
	}
	var list []hit
	for {
		out, err := s.Step(end, ev)
		if err != nil {
			t.Fatal(err)
		}
		switch out.Stop {
		case integrate.HitEvent:
			list = append(list, hit{out.T, append([]int(nil), out.Fired...)})
		case integrate.ReachedEnd:
			return list
		}
	}
}

func position(y float64) func(float64, []float64) float64 {
	return func(_ float64, x []float64) float64 { return x[0] - y }
}

func TestEventTimes(t *testing.T) {
	root := func(y float64, last bool) float64 { // of 1 + 5t − 4.9t² = y
		d := math.Sqrt(25 + 19.6*(1-y))
		if last {
			return (5 + d) / 9.8
		}
		return (5 - d) / 9.8
	}
	for _, m := range integrate.Methods() {
		p := ball(1, 5)
		ev := &functions{f: []func(float64, []float64) float64{
			position(2), position(2), position(2), position(0.25),
			func(_ float64, y []float64) float64 { return 3 * (y[0] - 2) * (1 + y[0]*y[0]) }, // with 0 and 1
		}, dir: []int{0, 1, -1, 0, 0}}
		got := hits(t, p, m, 1e-6, 3, ev)
		want := []hit{{root(2, false), []int{0, 1, 4}}, {root(2, true), []int{0, 2, 4}}, {root(0.25, true), []int{3}}}
		if len(got) != len(want) {
			t.Fatalf("%s: fired %v", m.Name(), got)
		}
		for i, g := range got {
			within := 2e-12 // the ball's path is exact
			if m == integrate.BDF {
				within = 1e-4 // it is not for BDF at its start
			}
			if e := math.Abs(g.t - want[i].t); e > within*g.t {
				t.Errorf("%s: event %d off by %.2g", m.Name(), i, e)
			}
			if len(g.fired) != len(want[i].fired) {
				t.Errorf("%s: event %d fired %v", m.Name(), i, g.fired)
			}
		}
	}
}

// The state at an event has the full order of the method although the dense output, on which it is found, has not.
func TestEventStateHasFullOrder(t *testing.T) {
	p := ivptest.Oscillator()
	ev := &functions{f: []func(float64, []float64) float64{position(0.3)}}
	got := hits(t, p, integrate.Rodas5P, 1e-10, 3, ev)
	if len(got) != 1 || math.Abs(got[0].t-math.Acos(0.3)) > 1e-10 {
		t.Errorf("fired at %v, not %v", got, math.Acos(0.3))
	}
}

// A value of zero at the start does not fire; the next crossing does, with rounding on either side as well.
func TestZeroAtTheStart(t *testing.T) {
	for _, start := range []float64{0, 1e-17, -1e-17, 4e-16, -4e-16} {
		p := ball(1, 5)
		ev := &functions{f: []func(float64, []float64) float64{
			func(_ float64, y []float64) float64 { return y[0] - 1 + start },
			func(_ float64, y []float64) float64 { return 0 },
		}}
		got := hits(t, p, integrate.Rodas5P, 1e-6, 3, ev)
		if len(got) != 1 || math.Abs(got[0].t-10/9.8) > 1e-12 {
			t.Errorf("start at %g: fired %v", start, got)
		}
	}
}

func TestOffIsOff(t *testing.T) {
	p := ball(1, 5)
	ev := &functions{f: []func(float64, []float64) float64{
		func(_ float64, y []float64) float64 {
			if y[1] > 0 {
				return math.NaN() // on the way down only
			}
			return y[0] - 2
		},
		func(float64, []float64) float64 { return math.NaN() },
	}}
	got := hits(t, p, integrate.Rodas5P, 1e-6, 3, ev)
	if len(got) != 1 || got[0].t < 0.6 {
		t.Errorf("fired %v", got)
	}
}

// Two crossings inside one long step are both found by the tests inside it.
func TestCrossingThereAndBack(t *testing.T) {
	p := ball(1, 5)
	top := 1 + 25/19.6
	ev := &functions{f: []func(float64, []float64) float64{position(top - 0.1)}}
	got := hits(t, p, integrate.Rodas5P, 1e-3, 1, ev)
	if len(got) != 2 {
		t.Errorf("fired %v", got)
	}
}

// An event at the end time, to rounding, is one stop with it.
func TestEventAtTheEnd(t *testing.T) {
	p := ball(1, 5)
	ev := &functions{f: []func(float64, []float64) float64{position(1)}}
	s := integrate.NewSolver(p, integrate.Options{RTol: 1e-6})
	for _, end := range []float64{10 / 9.8, math.Nextafter(10/9.8, 2)} {
		if err := s.Restart(0, p.Y0); err != nil {
			t.Fatal(err)
		}
		for {
			out, err := s.Step(end, ev)
			if err != nil {
				t.Fatal(err)
			}
			if out.Stop != integrate.Stepped {
				if out.T != end {
					t.Errorf("stopped at %v by %v, not at %v", out.T, out.Stop, end)
				}
				break
			}
		}
	}
}

// A bouncing ball: each bounce is a Restart at the event with a speed the other way.
func TestRestartAtAnEventDoesNotFireAgain(t *testing.T) {
	for _, m := range integrate.Methods() {
		p := ball(1, 0)
		s := integrate.NewSolver(p, integrate.Options{RTol: 1e-8, Method: m})
		ev := &functions{f: []func(float64, []float64) float64{position(0)}}
		if err := s.Restart(0, p.Y0); err != nil {
			t.Fatal(err)
		}
		half := math.Sqrt(2 / 9.8)
		within := 1e-10
		if m == integrate.BDF {
			within = 1e-5
		}
		bounces := 0
		for {
			out, err := s.Step(10, ev)
			if err != nil {
				t.Fatal(err)
			}
			if out.Stop == integrate.ReachedEnd {
				break
			}
			if out.Stop == integrate.HitEvent {
				if want := float64(2*bounces+1) * half; math.Abs(out.T-want) > within {
					t.Fatalf("%s: bounce %d at %v, not %v", m.Name(), bounces, out.T, want)
				}
				bounces++
				if err := s.Restart(out.T, []float64{s.Y()[0], -s.Y()[1]}); err != nil {
					t.Fatal(err)
				}
			}
		}
		if want := int((10/half + 1) / 2); bounces != want {
			t.Errorf("%s: %d bounces, not %d", m.Name(), bounces, want)
		}
	}
}

// reading names the unknown that functions look at.
type reading struct{ *functions }

func (reading) Reads() ([]int32, bool) { return []int32{0}, false }

func TestReaderFindsTheSame(t *testing.T) {
	p := ball(1, 5)
	ev := &functions{f: []func(float64, []float64) float64{position(2)}}
	a, b := hits(t, p, integrate.Rodas5P, 1e-6, 3, ev), hits(t, p, integrate.Rodas5P, 1e-6, 3, reading{ev})
	if len(a) != 2 || len(b) != 2 || math.Abs(a[0].t-b[0].t) > 1e-12 || math.Abs(a[1].t-b[1].t) > 1e-12 {
		t.Errorf("%v and %v", a, b)
	}
}
