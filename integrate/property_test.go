package integrate_test

import (
	"math"
	"testing"

	"pgregory.net/rapid"

	"headfall/integrate"
	"headfall/integrate/ivptest"
)

// Random networks of tanks and tees: the balance closes to rounding, heads stay between the lowest and the highest of the start, and the same run
// gives the same bits on a Solver that has run before.
func TestPropertyRandomNetworks(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		n := rapid.IntRange(2, 14).Draw(t, "unknowns")
		w := &ivptest.Network{Base: make([]float64, n), Level: make([]float64, n), Tee: make([]bool, n)}
		for i := range n {
			w.Level[i] = rapid.Float64Range(0, 5).Draw(t, "level")
			w.Tee[i] = i > 0 && rapid.IntRange(0, 3).Draw(t, "tee") == 0
		}
		for i := 1; i < n; i++ { // a tree, so that no tee is alone
			w.Pipes = append(w.Pipes, ivptest.Pipe{A: rapid.IntRange(0, i-1).Draw(t, "to"), B: i})
		}
		for range rapid.IntRange(0, n).Draw(t, "more") {
			a, b := rapid.IntRange(0, n-1).Draw(t, "a"), rapid.IntRange(0, n-1).Draw(t, "b")
			if a != b {
				w.Pipes = append(w.Pipes, ivptest.Pipe{A: a, B: b})
			}
		}
		w.Metered = []int{len(w.Pipes)}
		w.Pipes = append(w.Pipes, ivptest.Pipe{A: 0, B: -1})
		w.Law = ivptest.Rough(rapid.Float64Range(1e-3, 1).Draw(t, "k"), 1e-3)
		w.Prepare()
		m := integrate.Methods()[rapid.IntRange(0, len(integrate.Methods())-1).Draw(t, "method")]
		s := integrate.NewSolver(w, integrate.Options{RTol: 1e-5, Method: m})
		go1 := func(end float64) error {
			s.Reset()
			if err := s.Restart(0, w.Start()); err != nil {
				return err
			}
			for {
				if out, err := s.Step(end, nil); err != nil || out.Stop == integrate.ReachedEnd {
					return err
				}
			}
		}
		if err := go1(100); err != nil {
			t.Fatalf("%s: %v", m.Name(), err)
		}
		before := w.Volume(w.Start())
		if e := math.Abs(before - w.Volume(s.Y()) - s.Z()[0]); e > 1e-12*(1+before+math.Abs(s.Z()[0])) {
			t.Fatalf("%s: balance open by %.2g of %.2g", m.Name(), e, before)
		}
		for i, y := range s.Y() {
			if !(y <= 5+1e-3 && y >= ivptest.Outlet-1e-3) {
				t.Fatalf("%s: head %d is %v", m.Name(), i, y)
			}
		}
		first := append([]float64(nil), s.Y()...)
		_ = go1(3)
		_ = go1(100)
		for i, y := range s.Y() {
			if y != first[i] {
				t.Fatalf("%s: head %d is %v, was %v", m.Name(), i, y, first[i])
			}
		}
	})
}

// Step counts of the speed networks, in bands: they are fragile where flows turn round.
func TestStepCounts(t *testing.T) {
	for _, c := range []struct {
		name      string
		w         *ivptest.Network
		low, high int
	}{{"chain", ivptest.Chain(300, pipe), 60, 95}, {"grid", ivptest.Grid(16, pipe, false), 90, 140}} {
		c.w.Cap = 2e-5
		s := integrate.NewSolver(c.w, integrate.Options{RTol: 1e-5})
		run(t, s, c.w.Start(), 14400)
		st := s.Stats()
		t.Logf("%s: %+v", c.name, st)
		if st.Steps < c.low || st.Steps > c.high || st.Rejected > st.Steps/8 || st.Pivoted > 0 {
			t.Errorf("%s: %+v, steps expected in [%d, %d]", c.name, st, c.low, c.high)
		}
		if st.Factorisations != st.Steps+st.Rejected || st.Linearisations != st.Steps {
			t.Errorf("%s: one factorisation a step tried and one linearisation a step made: %+v", c.name, st)
		}
	}
}

func TestStepLimits(t *testing.T) {
	p := ivptest.Oscillator()
	for _, m := range integrate.Methods() {
		s := integrate.NewSolver(p, integrate.Options{RTol: 1e-3, Method: m, MaxStep: 0.01, FirstStep: 1e-3})
		if err := s.Restart(0, p.Y0); err != nil {
			t.Fatal(err)
		}
		for k := 0; ; k++ {
			out, err := s.Step(0.5, nil)
			if err != nil {
				t.Fatal(err)
			}
			h := out.T - out.T0
			if h > 0.01*(1+1e-12) || k == 0 && math.Abs(h-1e-3) > 1e-15 {
				t.Fatalf("%s: step %d of %g", m.Name(), k, h)
			}
			if out.Stop == integrate.ReachedEnd {
				break
			}
		}
	}
}

// After a restart that changes little, the step is not below a hundredth of the last.
func TestRestartKeepsTheStep(t *testing.T) {
	w := ivptest.Chain(20, pipe)
	s := integrate.NewSolver(w, integrate.Options{RTol: 1e-5})
	run(t, s, w.Start(), 5000)
	before := s.Dense().H
	if err := s.Restart(5000, s.Y()); err != nil {
		t.Fatal(err)
	}
	out, err := s.Step(1e5, nil)
	if err != nil {
		t.Fatal(err)
	}
	if h := out.T - out.T0; h < before/100 {
		t.Errorf("step of %g after one of %g", h, before)
	}
}

// Dense output agrees with itself: one unknown, all unknowns, slopes by differences, and the ends of the step.
func TestDense(t *testing.T) {
	w := ivptest.Chain(5, pipe)
	for _, m := range integrate.Methods() {
		s := integrate.NewSolver(w, integrate.Options{RTol: 1e-6, Method: m})
		run(t, s, w.Start(), 500)
		d := s.Dense()
		y := make([]float64, 5)
		for _, x := range []float64{0, 0.2, 0.5, 0.9, 1} {
			at := d.T0 + x*d.H
			s.Eval(at, y)
			for i := range y {
				one := s.EvalOne(i, at)
				if math.Abs(y[i]-one) > 1e-15*math.Abs(one) {
					t.Errorf("%s: %v and %v", m.Name(), y[i], one)
				}
				e := d.H * 1e-4
				slope := (d.One(i, at+e) - d.One(i, at-e)) / (2 * e)
				if rate := d.Rate(i, at); math.Abs(slope-rate) > 1e-6*math.Abs(rate)+1e-9 {
					t.Errorf("%s: slope %v, by differences %v", m.Name(), rate, slope)
				}
			}
		}
		for i := range y {
			if d.One(i, s.T()) != s.Y()[i] {
				t.Errorf("%s: the end of the polynomial is not the state", m.Name())
			}
		}
	}
}

// What is worked out for one unknown, half-way through the step, or after the solver has looked at its end, is what is worked out for all at once.
func TestDenseByParts(t *testing.T) {
	w := ivptest.Grid(4, pipe, false)
	for _, m := range integrate.Methods() {
		solver := func() (*integrate.Solver, *integrate.Dense, float64) {
			s := integrate.NewSolver(w, integrate.Options{RTol: 1e-6, Method: m})
			run(t, s, w.Start(), 500)
			d := s.Dense()
			return s, d, d.T0 + d.H/2
		}
		s, all, mid := solver()
		y, z := make([]float64, len(w.Base)), make([]float64, 1)
		s.Eval(mid, y)
		s.EvalZ(mid, z)
		s, parts, _ := solver()
		s.Rates() // linearises at the end of the step
		near := func(what string, got, want float64) {
			if math.Abs(got-want) > 1e-13*math.Max(1, math.Abs(want)) {
				t.Errorf("%s: %s %v, want %v", m.Name(), what, got, want)
			}
		}
		near("integral", parts.OneZ(0, mid), z[0])
		near("its rate", parts.RateZ(0, mid), all.RateZ(0, mid))
		half, rate, rateZ := make([]float64, len(y)), make([]float64, len(y)), make([]float64, 1)
		parts.Half(half, rate)
		parts.HalfZ(rateZ)
		near("rate half-way", rateZ[0], all.RateZ(0, mid))
		for i := range y {
			near("unknown", parts.One(i, mid), y[i])
			near("unknown half-way", half[i], y[i])
			near("rate half-way", rate[i], all.Rate(i, mid))
		}
	}
}

// A table whose result is not its last stage goes the general way.
func TestGeneralTableau(t *testing.T) {
	general := *integrate.Rodas4P
	general.E = append([]float64(nil), general.E...)
	general.E[5] = 1 + 1e-12
	p := ivptest.Swing()
	a := integrate.NewSolver(p, integrate.Options{RTol: 1e-6, Method: integrate.Rodas4P})
	b := integrate.NewSolver(p, integrate.Options{RTol: 1e-6, Method: &general})
	run(t, a, p.Y0, p.T1)
	run(t, b, p.Y0, p.T1)
	for i := range p.Y0 {
		if math.Abs(a.Y()[i]-b.Y()[i]) > 1e-11 {
			t.Errorf("%v and %v", a.Y(), b.Y())
		}
	}
}
