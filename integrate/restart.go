package integrate

import (
	"errors"
	"math"

	"headfall/integrate/sparse"
)

const (
	settled    = 1e-6 // size of a Newton correction, in tolerances, that is not worth making
	rounding   = 1e-2 // size below which a correction that does not shrink is taken for rounding
	iterations = 40   // of Newton at a restart
	halvings   = 12   // of a Newton correction
)

// Restart starts at (t, y), where rates may have jumped. It copies y, makes the algebraic unknowns consistent with the differential ones, and
// chooses the first step. Integrals go on from where they are. After a Restart at the time of an event, what fired does not fire
// again before it has been strictly on one side of zero.
func (s *Solver) Restart(t float64, y []float64) error {
	s.t = t
	copy(s.y, y)
	s.linear = false
	s.stats.Restarts++
	s.watch.fresh = true
	s.poly.begin(t, 0, s)
	s.poly.end(s.y, s.z)
	s.linearise()
	if i := firstBad(s.y, s.f); i >= 0 {
		return s.fail(NotFinite, 0, i, nil)
	}
	if s.algebraic {
		if err := s.settle(); err != nil {
			return err
		}
		copy(s.poly.Y0, s.y)
		copy(s.poly.Y1, s.y)
	}
	s.slopes()
	s.chooseStep()
	s.step.restart()
	return nil
}

// firstBad returns the first place where a or b is not finite, or −1.
func firstBad(a, b []float64) int {
	for i := range a {
		if d := (a[i] - a[i]) + (b[i] - b[i]); d != 0 {
			return i
		}
	}
	return -1
}

// settle solves the algebraic equations for the algebraic unknowns by Newton's method, damped so that each correction shortens the one that would
// follow it with the same Jacobian (Deuflhard, Newton Methods for Nonlinear Problems, Springer 2004, algorithm NLEQ-ERR).
func (s *Solver) settle() error {
	d, trial := s.err, s.y1
	before := math.Inf(1)
	for range iterations {
		if err := s.factoriseAlgebraic(); err != nil {
			return s.singular(0, err)
		}
		s.algebraicResidual(d, s.f)
		s.factor.Solve(d)
		size := norm(d, s.scale)
		if size <= settled || size <= rounding && size > before/4 {
			return nil // the latter where rounding keeps the correction from shrinking
		}
		before = size
		if size <= rounding {
			for i := range trial {
				trial[i] = s.y[i] + d[i]
			}
		} else if !s.damped(d, trial, size) {
			break
		}
		copy(s.y, trial)
		s.linear = false
		s.linearise()
	}
	return s.fail(NotSettled, 0, worst(d, s.scale), nil)
}

// resettle makes the algebraic unknowns at the present time consistent.
func (s *Solver) resettle() error {
	if err := s.settle(); err != nil {
		return err
	}
	s.slopes()
	s.step.restart()
	return nil
}

// damped puts into trial the state after as much of the correction d as helps; false if none does.
func (s *Solver) damped(d, trial []float64, size float64) bool {
	if size != size {
		return false
	}
	for k, part := 0, 1.0; k < halvings; k, part = k+1, part/2 {
		for i := range trial {
			trial[i] = s.y[i] + part*d[i]
		}
		s.rates(s.t, trial, s.y0, s.g)
		s.algebraicResidual(s.y0, s.y0)
		s.factor.Solve(s.y0)
		if after := norm(s.y0, s.scale); after <= (1-part/4)*size || after <= settled {
			return true
		}
	}
	return false
}

// algebraicResidual copies the algebraic rows of f and zeros the others.
func (s *Solver) algebraicResidual(r, f []float64) {
	for i, differential := range s.mass {
		if differential {
			r[i] = 0
		} else {
			r[i] = f[i]
		}
	}
}

// factoriseAlgebraic factorises the matrix with unit rows for the differential unknowns and −J for the algebraic ones.
func (s *Solver) factoriseAlgebraic() error {
	for j := range s.n {
		for k := s.pat.Ptr[j]; k < s.pat.Ptr[j+1]; k++ {
			switch i := s.pat.Row[k]; {
			case !s.mass[i]:
				s.matrix[k] = -s.lin.DfDy[k]
			case int(i) == j:
				s.matrix[k] = 1
			default:
				s.matrix[k] = 0
			}
		}
	}
	return s.factor.Refactor(s.matrix)
}

// singular makes an Error of one of the factorisation.
func (s *Solver) singular(h float64, err error) error {
	unknown := -1
	var e *sparse.SingularError
	if errors.As(err, &e) {
		unknown = e.Column
	}
	return s.fail(Singular, h, unknown, err)
}

// slopes puts y' into slope, for the algebraic unknowns as well: −J_aa y'_a = J_ad y'_d + ∂f_a/∂t with the factors that settle left.
func (s *Solver) slopes() {
	copy(s.slope, s.f)
	if !s.algebraic {
		return
	}
	for i, differential := range s.mass {
		if !differential {
			s.slope[i] = s.lin.DfDt[i]
		}
	}
	s.factor.Solve(s.slope)
}

// chooseStep sets the first step from the size of y' and of y” = J y' + ∂f/∂t, both in tolerances: their ratio is the time scale T of the
// system, and a method of order q errs by about (h/T)^(q+1) of the change |y'|T. It is not below a hundredth of the last free step.
func (s *Solver) chooseStep() {
	var h float64
	if s.restarts == 0 && s.opt.FirstStep > 0 {
		h = s.opt.FirstStep
	} else {
		first, second := norm(s.slope, s.scale), norm(s.curvature(s.slope), s.scale)
		h = max(firstStep(first, second, s.step.order()), s.free/100)
	}
	s.restarts++
	s.next = s.limit(h)
	s.free = s.next
}

// curvature returns y” of the differential unknowns for y' = d.
func (s *Solver) curvature(d []float64) []float64 {
	c := s.err
	copy(c, s.lin.DfDt)
	for j, dj := range d {
		for k := s.pat.Ptr[j]; k < s.pat.Ptr[j+1]; k++ {
			c[s.pat.Row[k]] += s.lin.DfDy[k] * dj
		}
	}
	if s.algebraic {
		for i, differential := range s.mass {
			if !differential {
				c[i] = 0
			}
		}
	}
	return c
}

// firstStep returns a step for |y'| = first and |y”| = second, infinite when both are zero.
func firstStep(first, second float64, order int) float64 {
	const share, constant = 0.1, 1e-2 // of a tolerance; of the error of a typical method
	switch {
	case second == 0:
		return math.Inf(1) // a straight line, as far as can be seen: the error test decides
	case first == 0:
		return math.Sqrt(share / second)
	}
	scale := first / second
	h := scale * min(1, math.Pow(share/(constant*first*scale), 1/float64(order+1)))
	return max(h, math.Sqrt(share/second)) // that short, even a straight line would do
}

// limit cuts a step to the longest allowed.
func (s *Solver) limit(h float64) float64 {
	if s.opt.MaxStep > 0 {
		return min(h, s.opt.MaxStep)
	}
	return h
}
