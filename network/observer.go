package network

import (
	"math"

	"headfall/integrate"
)

// observer sees every step: it books volumes, finds extremes between samples, watches limits and keeps the series.
type observer struct {
	sim    *simulation
	prev   snapshot // start of the step
	mid    snapshot
	now    snapshot // end of the step
	sample snapshot
	y      []float64
	f      []float64

	level, gas []extreme // of the vessels
	spill      []extreme
	flow       []extreme // of the lines
	crest      []extreme
	inflow     []extreme // of the outside points
	over       []float64 // m³ over the capacity of outside points
	rims       []*tracker
	sums       [3]float64
	spilled    []float64 // s, when a vessel was last seen spilling
	trackers   []*tracker
	followed   []*tracker // those of the trackers that are evaluated step by step
	marks      []marks    // the others, by vessel
	turned     []turn     // of the vessels in the step just taken
	turnedNow  []int32
	watched    []bool // vessels whose level is followed in a window of time
	summed     bool   // integrals within steps are asked for
	keep       bool
	brief      bool // extremes of flows and states of lines are not wanted
	columns    []column
	series     *Series
	next       float64 // next sample
	index      int
	limits     []*judged
	milestones []*moment
	emptied    []*moment
	alarms     []*moment
	histories  []*history
	regimes    []*regime // by line; nil while there was none
	noted      []int8    // by line, the regimes that last
}

// extreme is the least and the most of a number, and when.
type extreme struct{ low, lowAt, high, highAt float64 }

func (e *extreme) see(v, t float64) {
	if v < e.low {
		e.low, e.lowAt = v, t
	}
	if v > e.high {
		e.high, e.highAt = v, t
	}
}

func newObserver(sim *simulation) (*observer, error) {
	s := sim.sys
	o := &observer{sim: sim, prev: s.newSnapshot(), mid: s.newSnapshot(), now: s.newSnapshot(), sample: s.newSnapshot(),
		y: make([]float64, s.n), f: make([]float64, s.n)}
	o.level, o.gas, o.spill = make([]extreme, len(s.stations)), make([]extreme, len(s.stations)), make([]extreme, len(s.stations))
	o.flow, o.crest, o.over = make([]extreme, len(s.lines)), make([]extreme, len(s.lines)), make([]float64, len(s.outside))
	o.inflow, o.spilled = make([]extreme, len(s.outside)), make([]float64, len(s.stations))
	o.regimes, o.noted = make([]*regime, len(s.lines)), make([]int8, len(s.lines))
	o.turned, o.watched = make([]turn, len(s.stations)), make([]bool, len(s.stations))
	o.turnedNow = make([]int32, 0, 2*len(s.stations))
	for i := range o.turned {
		o.turned[i].at = math.NaN()
	}
	if err := o.addTrackers(); err != nil {
		return nil, err
	}
	o.sortTrackers()
	return o, nil
}

func (o *observer) begin(series, brief bool) {
	clean := extreme{low: math.Inf(1), high: math.Inf(-1)}
	for _, list := range [][]extreme{o.level, o.gas, o.spill, o.flow, o.crest, o.inflow} {
		for i := range list {
			list[i] = clean
		}
	}
	clear(o.over)
	clear(o.spilled)
	clear(o.now.q)
	clear(o.now.dv)
	for _, r := range o.regimes {
		if r != nil {
			*r = regime{}
		}
	}
	clear(o.noted)
	for _, m := range o.trackers {
		m.begin()
	}
	o.beginMarks()
	for _, h := range o.histories {
		h.begin()
	}
	o.keep, o.brief, o.series, o.next, o.index = series, brief, nil, 0, 0
	if series {
		o.series = o.newSeries()
	}
}

// fill evaluates the plant at (t, y) into w, integrals apart.
func (sim *simulation) fill(w *snapshot, t float64, y, f []float64) {
	s := sim.sys
	w.t = t
	s.Rates(t, y, f, w.z) // w.z holds the rates of the integrals for a moment: the flows
	copy(w.q, w.z[:len(s.lines)])
	s.lookAll(y)
	for i := range s.stations {
		st := &s.stations[i]
		w.level[i], w.gas[i], w.spill[i] = st.level, st.gas, st.spill
	}
	copy(w.dv, f)
}

// start looks at the plant just after something acted.
func (o *observer) start() {
	sim := o.sim
	sim.fill(&o.now, sim.t, sim.solver.Y(), o.f)
	copy(o.now.z, sim.solver.Z())
	copy(sim.y, sim.solver.Y())
	o.note(&o.now)
	o.look(&o.now, 2)
	for _, m := range o.followed {
		m.resume(o)
	}
	o.startMarks()
	if o.keep {
		if sim.t >= o.next {
			o.advance()
		}
		o.record(&o.now)
	}
}

// step looks at the step just taken.
func (o *observer) step(out *integrate.Outcome) {
	sim := o.sim
	o.prev, o.now = o.now, o.prev
	for _, m := range o.followed {
		m.v[0] = m.v[2]
	}
	o.here(out.T)
	o.note(&o.now)
	o.look(&o.now, 2)
	if !o.brief {
		o.regime() // while the system stands at the end of the step: what follows looks about within it
	}
	o.middle(out.T0 + (out.T-out.T0)/2)
	o.samples(out)
	for _, i := range o.turnedNow {
		o.turned[i].at = math.NaN()
	}
	o.turnedNow = o.turnedNow[:0]
	o.turns(&o.prev, &o.mid)
	o.turns(&o.mid, &o.now)
	if !o.brief {
		o.peaks()
	}
	for _, m := range o.followed {
		m.step(o)
	}
	o.passMarks()
	o.knots(&o.prev)
	sim.led.book(sim, &o.prev, &o.mid)
	o.knots(&o.mid)
	sim.led.book(sim, &o.mid, &o.now)
	o.knots(&o.now)
	o.beyond()
	if o.keep && out.Stop != integrate.Stepped {
		o.again()
		if out.T >= o.next {
			o.advance()
		}
		o.record(&o.now)
	}
}

// again puts the system back to the present state, from which looks within the last step have moved it.
func (o *observer) again() {
	z := o.sim.solver.Z()
	o.sim.fill(&o.now, o.now.t, o.sim.y, o.f)
	copy(o.now.z, z)
}

func (o *observer) knots(w *snapshot) {
	for _, h := range o.histories {
		h.knot(w)
	}
}

// at fills w at time t within the last step.
func (o *observer) at(w *snapshot, t float64) {
	sim := o.sim
	sim.solver.Eval(t, o.y)
	sim.fill(w, t, o.y, o.f)
	if o.summed {
		sim.solver.EvalZ(t, w.z)
	}
}

// here fills o.now with the end of the step. The solver's own rates there serve: its next step begins with them.
func (o *observer) here(t float64) {
	sim, s := o.sim, o.sim.sys
	w, y := &o.now, sim.y
	f, g := sim.solver.Rates()
	w.t = t
	copy(w.q, g[:len(s.lines)])
	copy(w.dv, f)
	copy(w.z, sim.solver.Z())
	copy(w.spill, g[len(s.lines):])
	for i := range w.level {
		w.level[i] = s.levelOf(i, y[i])
	}
	for _, i := range s.closed {
		w.gas[i] = s.stations[i].gas
	}
}

// middle fills o.mid from the polynomials of the step: near enough to tell where an extreme lies, which is then looked for with the laws themselves.
func (o *observer) middle(t float64) {
	sim, s, d, w := o.sim, o.sim.sys, o.sim.solver.Dense(), &o.mid
	w.t = t
	d.Half(o.y, w.dv)
	if o.summed {
		sim.solver.EvalZ(t, w.z)
	}
	d.HalfZ(w.q)
	for i, q := range w.q {
		a, b := o.prev.q[i], o.now.q[i]
		if q < 0 && a >= 0 && b >= 0 || q > 0 && a <= 0 && b <= 0 {
			w.q[i] = sim.flowAt(i, t) // a turn and back within the step, if it is no rounding of the polynomial
		}
	}
	for _, i := range s.crowned {
		w.q[i] = sim.flowAt(int(i), t)
		o.crest[i].see(s.crestHead(int(i)), t)
	}
	clear(w.spill)
	for i, v := range o.y[:len(w.level)] {
		if b := &s.basins[i]; b.holds(v) {
			w.level[i] = b.at(v)
			continue
		}
		st := s.lookInto(i, o.y)
		w.level[i], w.gas[i], w.spill[i] = st.level, st.gas, st.spill
	}
	o.look(w, 1)
}

// note takes the values at a snapshot that belongs to the present state of the system.
func (o *observer) note(w *snapshot) {
	s := o.sim.sys
	for i, h := range w.level {
		o.level[i].see(h, w.t)
	}
	for i, q := range w.q {
		o.flow[i].see(q, w.t)
	}
	for i, q := range w.spill {
		if q > 0 {
			o.spill[i].see(q, w.t)
		}
	}
	for _, i := range s.closed {
		o.gas[i].see(w.gas[i], w.t)
	}
	for _, i := range s.crowned {
		o.crest[i].see(s.crestHead(int(i)), w.t)
	}
}

// look evaluates what is followed; k is 1 in the middle and 2 at the end of a step.
func (o *observer) look(w *snapshot, k int) {
	for _, m := range o.followed {
		m.v[k] = m.probe.value(o.sim, w)
	}
}

// turn is where the level of a vessel turns within the step just taken, and that level; at is NaN where it does not, or where it matters to nobody.
type turn struct{ at, level float64 }

// turns finds the extremes of level where a volume turns between two snapshots.
func (o *observer) turns(a, b *snapshot) {
	s, d, h := o.sim.sys, o.sim.solver.Dense(), b.t-a.t
	least := turnLeast * s.rtol
	da, db := a.dv[:len(o.level)], b.dv[:len(o.level)]
	for i := range da {
		if !(da[i]*db[i] < 0) {
			continue
		}

		if e := &o.level[i]; !o.watched[i] {
			slope := s.slopeOf(i)
			over := 4. / 27 * h * slope * math.Abs(da[i]-db[i]) // a cubic is no further beyond its ends
			if over < least || da[i] > 0 && math.Max(a.level[i], b.level[i])+over <= e.high || da[i] < 0 && math.Min(a.level[i], b.level[i])-over >= e.low {
				continue
			}
			top := hermiteTurn(a.level[i], b.level[i], a.dv[i]*slope, b.dv[i]*slope, b.t-a.t)
			slack := turnSlack * math.Abs(top-a.level[i])
			if a.dv[i] > 0 && top+slack <= e.high || a.dv[i] < 0 && top-slack >= e.low {
				continue
			}
		}

		t := d.Turn(i, a.t, b.t)
		h, _ := s.stations[i].shape.Level(d.One(i, t))
		o.level[i].see(h, t)
		o.turned[i] = turn{t, h}
		o.turnedNow = append(o.turnedNow, int32(i))
	}
}

// turnLeast is the rise of a level between two looks, m over the tolerance, under which its extreme is not looked for: a hundredth of the error allowed.
const turnLeast = 1e-3

// turnSlack is the share of its rise by which the estimate of a turn may be off.
const turnSlack = 0.05

// hermiteTurn returns the extreme between its ends of the cubic with values va, vb and slopes da, db of opposite signs over a time h.
func hermiteTurn(va, vb, da, db, h float64) float64 {
	// v' = da + 2(3e/h − 2da − db)·u·… with e = vb − va; in u = t/h: c₀ + c₁u + c₂u²
	e := (vb - va) / h
	c0, c1, c2 := da, 6*e-4*da-2*db, 3*(da+db)-6*e
	u := da / (da - db)
	if disc := c1*c1 - 4*c0*c2; disc > 0 {
		q := -(c1 + math.Copysign(math.Sqrt(disc), c1)) / 2
		for _, r := range [2]float64{q / c2, c0 / q} {
			if r > 0 && r < 1 {
				u = r
			}
		}
	}
	return va + h*u*(c0+u*(c1/2+u*c2/3))
}

// peaks refines extremes of flow, spill and gas pressure that lie inside the step.
func (o *observer) peaks() {
	sim := o.sim
	a, m, b := &o.prev, &o.mid, &o.now
	for i := range o.flow {
		o.flow[i].refine(a.t, b.t, a.q[i], m.q[i], b.q[i], func(t float64) float64 { return sim.flowAt(i, t) })
	}
	for _, i := range sim.sys.closed {
		o.gas[i].refine(a.t, b.t, a.gas[i], m.gas[i], b.gas[i], func(t float64) float64 { return sim.gasAt(int(i), t) })
	}
	for i, q := range m.spill {
		if q > 0 {
			o.spill[i].refine(a.t, b.t, a.spill[i], m.spill[i], b.spill[i], func(t float64) float64 { return sim.spillAt(i, t) })
		}
	}
}

// peakShare is the share of what a number has ranged over that an extreme between two looks must add to be looked for.
const peakShare = 1e-7

// refine looks for an extreme between a, the middle and b where the middle is beyond both ends.
func (e *extreme) refine(a, b, va, vm, vb float64, f func(float64) float64) {
	least := max(1e-9*math.Abs(vm), peakShare*(e.high-e.low))
	up := vm > va && vm > vb && vm-max(va, vb) > least
	down := vm < va && vm < vb && min(va, vb)-vm > least
	if !up && !down || up && vm+(vm-math.Min(va, vb))/4 <= e.high || down && vm-(math.Max(va, vb)-vm)/4 >= e.low {
		return
	}
	vm = f(a + (b-a)/2)
	sign := 1.0
	if down {
		sign = -1
	}
	t, v := summit(a, b, sign*va, sign*vm, sign*vb, func(t float64) float64 { return sign * f(t) })
	e.see(sign*v, t)
}
