package integrate

import (
	"headfall/integrate/sparse"
)

// Options say how a Solver works. The zero value is good but for RTol.
type Options struct {
	RTol      float64 // relative tolerance, handed to Scale
	Method    Method  // nil = Rodas5P
	MaxStep   float64 // longest step, 0 = no limit
	FirstStep float64 // first step after Reset, 0 = chosen from the rates
	MaxSteps  int     // accepted steps between two Resets, 0 = a million
}

// Solver carries the state of a System through time. All its memory is allocated by NewSolver; it can be used for any number of runs, one
// after the other, and the same calls give the same bits.
type Solver struct {
	sys     System
	guard   Guard // nil if the System is none
	settler Settler
	idler   Idler
	opt     Options
	n, m    int
	mass    []bool
	pat     *sparse.Pattern
	diag    []int32 // places of the differential unknowns' diagonal entries in the pattern
	iptr    []int32 // pattern of the integrals' partial derivatives
	icol    []int32

	algebraic bool // there are algebraic unknowns
	step      stepper
	factor    *sparse.Factor
	matrix    []float64 // values of the matrix factorised

	t     float64
	y, z  []float64 // at t
	f, g  []float64 // rates at t, once linear
	lin   Linear
	was   Linear    // the integrals' part of the linearisation of the last step
	scale []float64 // at t, once linear

	linear bool // f, g, lin and scale belong to (t, y)
	moving bool // ∂f/∂t is not all zero

	y0, z0 []float64 // start of the step in hand
	y1, z1 []float64 // its end
	err    []float64 // estimate of its error
	best   []float64 // state before the last correction of settle
	slope  []float64 // y' at the last restart
	poly   Dense     // the last step

	next     float64 // step to try next
	free     float64 // last step proposed by the method itself, not cut short by an end or an event
	fixed    float64 // step without error control, for tests of the order; 0 = off
	restarts int     // since Reset
	watch    watch
	stats    Stats
	base     sparse.Counts // of the factor at Reset
}

// NewSolver allocates a Solver for a System.
func NewSolver(sys System, opt Options) *Solver {
	n, m := sys.Dim()
	s := &Solver{sys: sys, opt: opt, n: n, m: m, mass: sys.Mass(), pat: sys.Pattern()}
	s.guard, _ = sys.(Guard)
	s.settler, _ = sys.(Settler)
	s.idler, _ = sys.(Idler)
	if opt.Method == nil {
		s.opt.Method = Rodas5P
	}
	if opt.MaxSteps == 0 {
		s.opt.MaxSteps = 1_000_000
	}
	s.iptr, s.icol = sys.IntegralPattern()
	s.findDiagonal()
	s.factor = sparse.Analyse(s.pat)
	s.matrix = make([]float64, len(s.pat.Row))
	s.lin = Linear{DfDy: make([]float64, len(s.pat.Row)), DgDy: make([]float64, len(s.icol)), DfDt: make([]float64, n), DgDt: make([]float64, m)}
	s.was = Linear{DgDy: make([]float64, len(s.icol)), DgDt: make([]float64, m)}
	for _, v := range []*[]float64{&s.y, &s.f, &s.scale, &s.y0, &s.y1, &s.err, &s.best, &s.slope} {
		*v = make([]float64, n)
	}
	for _, v := range []*[]float64{&s.z, &s.g, &s.z0, &s.z1} {
		*v = make([]float64, m)
	}
	s.watch.forget()
	s.step = s.opt.Method.stepper(s)
	s.poly = newDense(s, s.step)
	return s
}

func (s *Solver) findDiagonal() {
	for j := range s.n {
		if !s.mass[j] {
			s.algebraic = true
			continue
		}
		for k := s.pat.Ptr[j]; k < s.pat.Ptr[j+1]; k++ {
			if s.pat.Row[k] == int32(j) {
				s.diag = append(s.diag, k)
			}
		}
	}
	if differential := len(s.diag); differential > s.n {
		panic("integrate: pattern with repeated entries")
	}
}

// Reset makes the Solver as new: integrals and counters are zero, the last step is forgotten. Restart must follow.
func (s *Solver) Reset() {
	clear(s.z)
	clear(s.z0)
	clear(s.z1)
	s.stats, s.base = Stats{}, s.factor.Counts()
	s.free, s.next, s.restarts = 0, 0, 0
	s.watch.forget()
}

// T returns the time reached.
func (s *Solver) T() float64 { return s.t }

// Y returns the unknowns at T. The slice stays the same and its content changes with the next Step or Restart; it must not be changed.
func (s *Solver) Y() []float64 { return s.y }

// Z returns the integrals at T, counted from the last Reset, on the terms of Y.
func (s *Solver) Z() []float64 { return s.z }

// Rates returns f and g at T. They are those that the next step starts from, so that asking for them costs nothing, and the System has been
// evaluated there last unless something else was asked of it since. The slices belong to the Solver.
func (s *Solver) Rates() (f, g []float64) {
	s.linearise()
	return s.f, s.g
}

// Stats returns what was done since Reset.
func (s *Solver) Stats() Stats {
	st, c := s.stats, s.factor.Counts()
	st.Factorisations = c.Factorisations - s.base.Factorisations
	st.Pivoted = c.Pivoted - s.base.Pivoted
	return st
}

// Fill returns the number of stored entries of the factors.
func (s *Solver) Fill() int { return s.factor.Size() }

// Order returns the order in which the unknowns are eliminated. Unknowns numbered like that are met in the order of memory.
func (s *Solver) Order() []int32 { return s.factor.Order() }

// linearise makes sure that f, g, lin and scale belong to (t, y).
func (s *Solver) linearise() {
	if s.linear {
		return
	}
	s.sys.Linearise(s.t, s.y, s.f, s.g, &s.lin)
	s.sys.Scale(s.y, s.opt.RTol, s.scale)
	s.stats.Evaluations++
	s.stats.Linearisations++
	s.linear = true
	s.moving = false
	for _, d := range s.lin.DfDt {
		if d != 0 {
			s.moving = true
			break
		}
	}
}

// rates evaluates the rates.
func (s *Solver) rates(t float64, y, f, g []float64) {
	s.sys.Rates(t, y, f, g)
	s.stats.Evaluations++
}

// factorise factorises shift·M − J.
func (s *Solver) factorise(shift float64) error {
	for k, v := range s.lin.DfDy {
		s.matrix[k] = -v
	}
	for _, k := range s.diag {
		s.matrix[k] += shift
	}
	return s.factor.Refactor(s.matrix)
}

// fail makes an Error at the present time.
func (s *Solver) fail(r Reason, h float64, unknown int, err error) error {
	return &Error{Reason: r, T: s.t, H: h, Unknown: unknown, Steps: s.stats.Steps, Err: err}
}
