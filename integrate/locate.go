package integrate

import "math"

// instant is the share of the time, or of the step if that is more, within which events count as one.
const instant = 1e-12

// Reader is an Events that names the unknowns its functions look at, or tells that they look at all. Inside a step only those are set in y, which saves time
// where they are few.
type Reader interface {
	Reads() (unknowns []int32, all bool)
}

// tolerance returns the time within which events of the present step count as one.
func (s *Solver) tolerance() float64 {
	return instant * max(math.Abs(s.t)+s.poly.H, s.poly.H)
}

// findEvent looks for the first event in the step just tried, which ends at t1, on its dense output.
func (s *Solver) findEvent(ev Events, t1 float64) (t float64, hit bool) {
	if ev == nil || ev.Len() == 0 {
		s.watch.fresh = true
		return 0, false
	}
	w := &s.watch
	w.size(ev.Len(), s.n)
	if w.fresh {
		ev.Values(s.t, s.y0, w.v[0])
	}
	for k := 1; k < samples; k++ {
		s.eventsAt(ev, s.t+s.poly.H*float64(k)/samples, w.v[k])
	}
	ev.Values(t1, s.y1, w.v[samples])
	w.start(s.t)
	k := w.first(ev)
	if k == 0 {
		w.next()
		return 0, false
	}
	a, b := s.t+s.poly.H*float64(k-1)/samples, s.t+s.poly.H*float64(k)/samples
	if k == samples {
		b = t1
	}
	copy(w.at, w.v[k])
	for i, v := range w.v[k] { // w.at is always that at b
		if !crossed(w.walk[i], v, ev.Direction(i)) {
			continue
		}
		if sign(w.at[i]) == w.walk[i] || w.at[i] != w.at[i] {
			continue // after the earliest so far
		}
		b = s.root(ev, i, a, b, w.v[k-1][i], w.at[i])
		s.eventsAt(ev, b, w.at)
	}
	return b, true
}

// eventsAt evaluates the functions on the dense output.
func (s *Solver) eventsAt(ev Events, t float64, v []float64) {
	y := s.watch.y
	if r, some := ev.(Reader); some {
		if reads, all := r.Reads(); !all {
			for _, i := range reads {
				y[i] = s.poly.One(int(i), t)
			}
			ev.Values(t, y, v)
			return
		}
	}
	s.Eval(t, y)
	ev.Values(t, y, v)
}

// root returns the end beyond the crossing of the smallest bracket of a root of function i in (a, b], by the ITP method of Oliveira and
// Takahashi (ACM Trans. Math. Softw. 47:5, 2021).
func (s *Solver) root(ev Events, i int, a, b, va, vb float64) float64 {
	const k1, slack = 0.1, 1
	tol := s.tolerance() / 8
	span := b - a
	limit := math.Ceil(math.Log2(max(span/(2*tol), 1))) + slack
	v := s.watch.before // scratch
	for j := 0.0; b-a > 2*tol && vb != 0; j++ {
		mid := a + (b-a)/2
		x := mid
		if va-vb != 0 && !math.IsInf(va-vb, 0) {
			falsi := (vb*a - va*b) / (vb - va)
			side := math.Copysign(1, mid-falsi)
			if d := k1 * (b - a) * (b - a) / span; d <= math.Abs(mid-falsi) {
				x = falsi + side*d
			}
			if r := tol*math.Exp2(limit-j) - (b-a)/2; math.Abs(x-mid) > r {
				x = mid - side*max(r, 0)
			}
		}
		if !(x > a && x < b) {
			x = mid
		}
		if !(x > a && x < b) {
			break
		}
		s.eventsAt(ev, x, v)
		if sign(v[i]) == sign(va) || v[i] != v[i] {
			a, va = x, v[i]
		} else {
			b, vb = x, v[i]
		}
		if va != va {
			va = math.Copysign(1, -vb)
		}
	}
	return b
}
