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

// settle solves the algebraic equations for the algebraic unknowns by Newton's method, damped so that each correction shortens the one that would
// follow it with the same Jacobian (Deuflhard, Newton Methods for Nonlinear Problems, Springer 2004, algorithm NLEQ-ERR).
func (s *Solver) settle() error {
	d, trial := s.err, s.y1
	if s.settler != nil {
		s.settler.Settle(s.t, s.y)
		s.linear = false
		s.linearise()
	}
	before, size := math.Inf(1), math.Inf(1)
	for range iterations {
		if err := s.factoriseAlgebraic(); err != nil {
			return s.singular(0, err)
		}
		s.algebraicResidual(d, s.f)
		s.factor.Solve(d)
		size = norm(d, s.scale)
		if size <= settled || size <= rounding && size > before/4 {
			return nil // the latter where rounding keeps the correction from shrinking
		}
		if before <= rounding && size > before { // at a corner of the law the next correction may lead away again
			copy(s.y, s.best)
			s.linear = false
			s.linearise()
			return nil
		}
		before = size
		copy(s.best, s.y)
		if size <= rounding {
			for i := range trial {
				trial[i] = s.y[i] + d[i]
			}
		} else if !s.damped(d, trial, size) {
			s.linear = false // the rates are those of the last trial
			s.linearise()
			break
		}
		copy(s.y, trial)
		s.linear = false
		s.linearise()
	}
	if size <= 1 { // within its tolerance, if no better
		return nil
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
