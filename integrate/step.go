package integrate

import "math"

// attempts is the number of rejections in a row after which a step is given up.
const attempts = 60

// resettle is the number of rejections in a row after which the algebraic unknowns are made consistent again. They are so to the tolerance only, and
// where flows turn round even that can be too far off for a linearisation: the error of a step then does not fall with its length.
const resettle = 3

// Step takes one accepted step. It does not pass tEnd; when it reaches tEnd, T is tEnd to the bit. Sign changes of the functions of ev, which may be
// nil, end the step; see Events and watch for what counts. Called at tEnd it does nothing and returns ReachedEnd.
func (s *Solver) Step(tEnd float64, ev Events) (Outcome, error) {
	out := Outcome{T0: s.t, T: s.t}
	if !(tEnd > s.t) {
		out.Stop = ReachedEnd
		return out, nil
	}
	if s.stats.Steps >= s.opt.MaxSteps {
		return out, s.fail(TooManySteps, s.next, worst(s.err, s.scale), nil)
	}
	s.linearise()
	if s.settler != nil && !s.settler.Settled(s.f, s.step.implicit()) {
		if err := s.resettle(); err != nil {
			return out, err
		}
	}
	h, held, e, err := s.advance(tEnd)
	if err != nil {
		return out, err
	}
	t1 := s.t + h
	if h == tEnd-s.t {
		t1, out.Stop = tEnd, ReachedEnd
	}
	if t, hit := s.findEvent(ev, t1); hit {
		if t1, err = s.redo(t, t1, ev); err != nil {
			return out, err
		}
		held = true
		out.Stop, out.Fired = HitEvent, s.watch.fired
	}
	next := s.limit(s.step.accept(e))
	if held { // the step was cut short: what the method proposed before is still worth trying
		next = max(next, s.free)
	}
	s.commit(t1)
	s.next, s.free = next, next
	if out.Stop == HitEvent {
		s.stats.Events++
	}
	out.T = t1
	return out, nil
}

// advance tries steps until one is good, and returns it, whether tEnd cut it short, and the norm of its error.
func (s *Solver) advance(tEnd float64) (h float64, held bool, e float64, err error) {
	shortest := 4e-16 * math.Abs(s.t)
	h = max(s.next, 4*shortest)
	for singular, k := 0, 0; k < attempts && singular < 8 && h >= shortest; k++ {
		h, held = s.fit(h, tEnd)
		if math.IsInf(s.free, 1) {
			s.free = h
		}
		s.poly.begin(s.t, h, s)
		if s.fixed > 0 {
			e, err = s.step.attempt(h)
			return h, held, min(e, 1), err
		}
		if e, err = s.step.attempt(h); err != nil {
			e = math.Inf(1)
			singular++
		} else if e <= 1 {
			if s.guard == nil || s.guard.Admit(s.t+h, s.y1) {
				return h, held, e, nil
			}
			e = math.Inf(1)
		}
		s.stats.Rejected++
		h = s.step.reject(e)
		s.free = h
		if s.algebraic && k%resettle == resettle-1 {
			if err := s.resettle(); err != nil {
				return h, held, e, err
			}
		}
	}
	if err != nil {
		return h, held, e, s.singular(h, err)
	}
	unknown := -1 // refused by the Guard, which knows why
	if !math.IsInf(e, 1) {
		unknown = worst(s.err, s.scale)
	}
	return h, held, e, s.fail(StepTooSmall, h, unknown, nil)
}

// fit returns the step to try when h is proposed: one that ends at tEnd or leaves enough for another, and that t + h − t gives back to the bit.
func (s *Solver) fit(h, tEnd float64) (step float64, held bool) {
	rest := tEnd - s.t
	if s.fixed > 0 {
		h = s.fixed
	}
	switch {
	case s.fixed > 0 && h < rest*(1-1e-9):
		return (s.t + h) - s.t, false
	case h >= rest, h >= rest*0.99 && s.limit(rest) == rest:
		return rest, h > rest
	case h > rest/2:
		return (s.t + rest/2) - s.t, true
	}
	return (s.t + h) - s.t, false
}

// commit makes the last attempt the step.
func (s *Solver) commit(t1 float64) {
	copy(s.y, s.y1)
	copy(s.z, s.z1)
	s.t = t1
	s.linear = false
	s.lin.DgDy, s.was.DgDy = s.was.DgDy, s.lin.DgDy // the polynomials of the integrals need what the step began with
	s.lin.DgDt, s.was.DgDt = s.was.DgDt, s.lin.DgDt
	s.stats.Steps++
}
