package network

import "math"

// tracker follows one condition through a run: when it first comes true, and where it is nearest to that, or deepest in it. Limits are followed
// by what breaks them.
type tracker struct {
	probe  *probe
	sign   float64 // sign·(value − bound) > 0 is the condition being true
	slack  float64 // by how much it must be true: rounding is not a failure
	window *window // nil: the whole run
	v      [3]float64
	first  float64 // s; NaN
	most   float64 // greatest sign·(value − bound)
	mostAt float64
	on     bool
}

func newTracker(p *probe, above bool) *tracker {
	m := &tracker{probe: p, sign: -1}
	if above {
		m.sign = 1
	}
	return m
}

func (m *tracker) begin() {
	m.first, m.most, m.mostAt, m.on = math.NaN(), math.Inf(-1), math.NaN(), false
}

// resume looks at the values just after something acted.
func (m *tracker) resume(o *observer) {
	m.on = m.window == nil || m.window.holds(o.sim)
	if m.on {
		m.see(m.sign*m.v[2], o.now.t)
	}
}

func (m *tracker) see(g, t float64) {
	if g > m.most {
		m.most, m.mostAt = g, t
	}
	if g > m.slack && math.IsNaN(m.first) {
		m.first = t
	}
}

// step follows the condition over a step.
func (m *tracker) step(o *observer) {
	if !m.on {
		return
	}
	a, b := &o.prev, &o.now
	g := func(t float64) float64 { return m.sign * m.valueAt(o, t) }
	g0, g1, g2 := m.sign*m.v[0], m.sign*m.v[1], m.sign*m.v[2]
	top, topAt := math.Inf(-1), o.mid.t
	switch i := m.level(); {
	case i >= 0:
		if turn := o.turned[i]; !math.IsNaN(turn.at) {
			topAt, top = turn.at, m.sign*(turn.level-m.probe.bound)
		} else {
			topAt = a.t
		}
	case g1 > g0 && g1 > g2 && m.matters(g0, g1, g2):
		topAt, top = summit(a.t, b.t, g0, g(o.mid.t), g2, g)
	default:
		topAt = a.t
	}
	if math.IsNaN(m.first) && math.Max(top, g2) > m.slack {
		lo, hi := a.t, b.t
		if top > m.slack {
			hi = topAt
		} else {
			lo = topAt
		}
		m.first = bisect(lo, hi, true, func(t float64) float64 { return g(t) - m.slack })
	}
	m.see(top, topAt)
	m.see(g2, b.t)
}

// matters tells that a summit near the middle value g1 may be a new greatest value, or bring the condition about: a parabola through the three rises
// over its middle by an eighth of what that is over the lower end, at most; twice that is allowed.
func (m *tracker) matters(g0, g1, g2 float64) bool {
	top := g1 + (g1-math.Min(g0, g2))/4
	return top > m.most || top > m.slack && math.IsNaN(m.first)
}

// level returns the vessel whose level the tracker follows, or -1.
func (m *tracker) level() int {
	if m.probe.subject == Level || m.probe.subject == Emptied {
		return m.probe.at[0]
	}
	return -1
}

// valueAt returns value − bound at time t within the last step.
func (m *tracker) valueAt(o *observer, t float64) float64 {
	p, sim := m.probe, o.sim
	switch {
	case p.subject == Level || p.subject == Emptied:
		return sim.lookAt(p.at[0], t).level - p.bound
	case p.subject == Pressure && !p.rating:
		return sim.gasAt(p.at[0], t) - p.bound
	case p.subject == Flow && p.outside == nil:
		return sim.flowAt(p.at[0], t) - p.bound
	case p.subject == Flow:
		var sum float64
		for k, i := range p.outside {
			sum += p.sign[k] * sim.flowAt(i, t)
		}
		return sum - p.bound
	}
	o.at(&o.sample, t)
	return p.value(sim, &o.sample)
}

// window is the part of a run in which a limit counts.
type window struct {
	since, until *Edge        // of the limit itself: conditional edges are known by their place; nil with inverse
	allowed      [][2]float64 // of only_between: spans in which flow is permitted, s
	inverse      bool         // counts outside the allowed spans
}

// holds tells whether the limit counts just after the present time.
func (w *window) holds(sim *simulation) bool {
	if w.inverse {
		for _, a := range w.allowed {
			if sim.t >= a[0] && sim.t < a[1] {
				return false
			}
		}
		return true
	}
	if w.since.Given && !(sim.edgeAt(w.since) <= sim.t) {
		return false
	}
	return !w.until.Given || !(sim.edgeAt(w.until) <= sim.t)
}

// edgeAt returns when an edge of a window came; NaN while it has not.
func (sim *simulation) edgeAt(e *Edge) float64 {
	switch {
	case e.At.Given:
		return e.At.S
	case e.After != "":
		if i, ok := sim.control.byID[e.After]; ok {
			return sim.control.steps[i].done
		}
	case e.When != nil:
		if t, ok := sim.edges[e]; ok {
			return t
		}
	}
	return math.NaN()
}

// addEdges watches the conditions that open or close windows.
func (w *watcher) addEdges() error {
	sim := w.sim
	for _, l := range sim.plan.Limits {
		for _, e := range []*Edge{&l.Since, &l.Until} {
			if e.When == nil {
				continue
			}
			p, err := sim.sys.newProbe(e.When)
			if err != nil {
				return err
			}
			dir := -1
			if p.above {
				dir = 1
			}
			w.triggers = append(w.triggers, trigger{
				value:  func(s *snapshot) float64 { return p.value(sim, s) },
				active: func() bool { _, came := sim.edges[e]; return !came },
				fire:   func(t float64) { sim.edges[e] = t },
				dir:    dir, sees: p.views(sim.sys), levels: p.ofLevels(), jumps: true,
			})
		}
	}
	return nil
}

// nextEdge returns the next time at which a window opens or closes by the clock.
func (sim *simulation) nextEdge(t float64) float64 {
	n := math.Inf(1)
	for _, m := range sim.obs.trackers {
		if m.window == nil {
			continue
		}
		for _, a := range m.window.allowed {
			for _, x := range a {
				if x > t {
					n = math.Min(n, x)
				}
			}
		}
		for _, e := range []*Edge{m.window.since, m.window.until} {
			if e != nil && e.At.Given && e.At.S > t {
				n = math.Min(n, e.At.S)
			}
		}
	}
	return n
}
