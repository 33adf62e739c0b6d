package integrate

import "math"

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
