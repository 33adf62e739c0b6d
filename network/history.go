package network

import (
	"math"
	"sort"
)

// history keeps a running number over a run — a volume passed, a level, a count — so that averages and volumes over spans of time can be judged
// after it: knots with values and slopes, cubic between, two knots where something acted.
type history struct {
	sim     *simulation
	probe   *probe
	kind    historyKind
	t, v, d []float64
	corners []float64 // room
}

type historyKind int8

const (
	hVolume historyKind = iota // forward volume of a line, or what entered an outside point, m³; slope is the flow
	hNet                       // net volume, for averages of a flow
	hLevel                     // level, m, for rates of rise and fall
	hValue                     // integral of the subject itself, for averages of what has no running number
	hStarts                    // starts of a pump: times only
)

func newHistory(sim *simulation, p *probe) *history {
	h := &history{sim: sim, probe: p}
	switch p.subject {
	case Passed, Backflow, Spilled:
		h.kind = hVolume
	case Flow:
		h.kind = hNet
	case Rising, Falling:
		h.kind = hLevel
	case Starts:
		h.kind = hStarts
	default:
		h.kind = hValue
	}
	return h
}

func (h *history) begin() { h.t, h.v, h.d = h.t[:0], h.v[:0], h.d[:0] }

// knot appends a snapshot up to which the ledger has booked.
func (h *history) knot(w *snapshot) {
	if h.kind == hStarts {
		return
	}
	v, d := h.at(w)
	if n := len(h.t); n > 0 && h.t[n-1] == w.t && h.d[n-1] == d {
		return
	}
	h.t, h.v, h.d = append(h.t, w.t), append(h.v, v), append(h.d, d)
}

// at returns the running number and its rate at a snapshot.
func (h *history) at(w *snapshot) (v, d float64) {
	p, s := h.probe, h.sim.sys
	switch {
	case h.kind == hLevel:
		i := p.at[0]
		_, slope := s.stations[i].shape.Level(h.volume(i, w))
		return w.level[i], w.dv[i] * slope
	case p.subject == Spilled:
		return w.z[len(s.lines)+p.at[0]], w.spill[p.at[0]]
	case h.kind == hValue:
		x := p.raw(h.sim, w)
		n := len(h.t)
		if n == 0 {
			return 0, x
		}
		return h.v[n-1] + (w.t-h.t[n-1])*(x+h.d[n-1])/2, x
	}
	lines, signs := p.outside, p.sign
	if lines == nil {
		lines, signs = p.at, []float64{1}
	}
	for k, i := range lines {
		q, z := signs[k]*w.q[i], signs[k]*w.z[i]
		if h.kind == hVolume {
			z, _ = h.sim.led.passed(i, w.z[i])
			if (signs[k] < 0) != (p.subject == Backflow) {
				_, z = h.sim.led.passed(i, w.z[i])
			}
			if p.subject == Backflow {
				q = -q
			}
			q = math.Max(q, 0)
		}
		v += z
		d += q
	}
	return v, d
}

// volume of vessel i at a snapshot of the last step.
func (h *history) volume(i int, w *snapshot) float64 {
	return h.sim.solver.EvalOne(i, w.t)
}

// value returns the running number at time t, cubic between knots.
func (h *history) value(t float64) float64 {
	n := len(h.t)
	if n == 0 {
		return 0
	}
	k := sort.SearchFloat64s(h.t, t)
	if k >= n {
		return h.v[n-1]
	}
	if k == 0 || h.t[k] == t {
		return h.v[k]
	}
	a, b := k-1, k
	w := h.t[b] - h.t[a]
	if w <= 0 {
		return h.v[b]
	}
	u := (t - h.t[a]) / w
	e := h.v[b] - h.v[a]
	return h.v[a] + u*w*h.d[a] + u*u*(3*e-w*(2*h.d[a]+h.d[b])) + u*u*u*(w*(h.d[a]+h.d[b])-2*e)
}

// most returns the greatest over [from, to] of f, which looks at the history at t and at t − w, and when; and when f first passes bound (NaN if never).
func (h *history) most(f func(float64) float64, w, from, to, bound float64) (top, at, first float64) {
	top, at, first = math.Inf(-1), math.NaN(), math.NaN()
	if to < from {
		return top, at, first
	}
	knots := append(h.corners[:0], from)
	for _, by := range [2]float64{0, w} {
		for _, t := range h.t {
			if t+by > from && t+by < to {
				knots = append(knots, t+by)
			}
		}
	}
	knots = append(knots, to)
	sort.Float64s(knots)
	h.corners = knots
	last := f(from)
	see := func(v, t float64) {
		if v > top {
			top, at = v, t
		}
	}
	see(last, from)
	if last > bound {
		first = from
	}
	for i := 1; i < len(knots); i++ {
		a, b := knots[i-1], knots[i]
		if b <= a {
			continue
		}
		m := a + (b-a)/2
		vm, vb := f(m), f(b)
		tm := m
		if vm > last && vm > vb {
			tm, vm = summit(a, b, last, vm, vb, f)
		}
		if math.IsNaN(first) && math.Max(vm, vb) > bound {
			lo, hi := a, b
			if vm > bound {
				hi = tm
			} else {
				lo = tm
			}
			first = bisect(lo, hi, true, func(t float64) float64 { return f(t) - bound })
		}
		see(vm, tm)
		see(vb, b)
		last = vb
	}
	return top, at, first
}
