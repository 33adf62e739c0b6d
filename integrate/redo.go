package integrate

import "math"

// corrections is the number of times that a step to an event is made again to get its time right.
const corrections = 4

// redo makes the step again so that it ends at the event found at t on the dense output of a step to t1: the state there then has the full order of
// the method. Since the dense output has a lower order, the time is corrected until the function is zero at the end of the step itself.
// It returns the time reached, and leaves what fired in watch.
func (s *Solver) redo(t, t1 float64, ev Events) (float64, error) {
	w := &s.watch
	lead := s.lead(ev)
	shortest := max(1e-14*s.poly.H, 8e-16*math.Abs(s.t))
	for k := 0; ; k++ {
		if t1-t <= s.tolerance() {
			t = t1
		}
		h := max(t-s.t, shortest)
		t = s.t + h
		s.poly.begin(s.t, t-s.t, s)
		e, err := s.step.attempt(t - s.t)
		if err != nil {
			return t, s.singular(h, err)
		}
		if e != e {
			return t, s.fail(StepTooSmall, h, worst(s.err, s.scale), nil)
		}
		ev.Values(t, s.y1, w.at)
		near := s.poly.H / 1024
		s.eventsAt(ev, t-near, w.before)
		slope := (w.at[lead] - w.before[lead]) / near
		d := -w.at[lead] / slope
		if k == corrections || !(math.Abs(d) > s.tolerance()/4) || !(math.Abs(d) < s.poly.H/4) {
			break
		}
		t = min(t+d, t1)
	}
	s.fire(ev, lead, t)
	return t, nil
}

// lead returns the function that crossed first: of those that have at the event found, the one that is least far beyond.
func (s *Solver) lead(ev Events) int {
	w := &s.watch
	for i, v := range w.at {
		if crossed(w.walk[i], v, ev.Direction(i)) {
			return i
		}
	}
	return 0
}

// fire notes what fired at t, the end of the step: lead, and all that crossed with it or will within the tolerance.
func (s *Solver) fire(ev Events, lead int, t float64) {
	w := &s.watch
	w.fired, w.firedAt = w.fired[:0], t
	near, tol := s.poly.H/1024, s.tolerance()
	for i, v := range w.at {
		side := w.walk[i] // shortly before the crossing
		w.side[i] = sign(v)
		wait := -v * near / (v - w.before[i]) // until the crossing
		hit := i == lead || crossed(side, v, ev.Direction(i)) ||
			crossed(side, -v, ev.Direction(i)) && wait >= 0 && wait <= tol
		if hit {
			w.fired = append(w.fired, i)
			w.side[i] = 0
		}
	}
	copy(w.v[0], w.at)
}
