package network

import (
	"math"
	"slices"

	"headfall/integrate"
)

// newSeries makes an empty series with a column for everything that the plant has.
func (o *observer) newSeries() *Series {
	s := o.sim.sys
	nv, nl := len(s.stations), len(s.lines)
	r := &Series{Level: make(map[string][]float64, nv), Volume: make(map[string][]float64, nv), Gas: map[string][]float64{}, Flow: make(map[string][]float64, nl),
		Opening: map[string][]float64{}, Running: map[string][]float64{}, TeeHead: map[string][]*float64{}, Crest: map[string][]float64{}}
	o.columns = slices.Grow(o.columns[:0], 2*nv+nl)
	add := func(into map[string][]float64, tag string, value func(w *snapshot) float64) {
		o.columns = append(o.columns, column{into, tag, nil, value})
	}
	for i, v := range o.sim.plan.Vessels {
		add(r.Level, v.Tag, func(w *snapshot) float64 { return w.level[i] })
		add(r.Volume, v.Tag, func(w *snapshot) float64 { return o.y[i] })
		if v.Cover != nil {
			add(r.Gas, v.Tag, func(w *snapshot) float64 { return w.gas[i] - s.atmosphere })
		}
	}
	for i, l := range o.sim.plan.Lines {
		add(r.Flow, l.Tag, func(w *snapshot) float64 { return w.q[i] })
		if len(s.lines[i].crowns) > 0 {
			add(r.Crest, l.Tag, func(*snapshot) float64 { return s.crestHead(i) })
		}
	}
	for k := range s.actuators {
		a := &s.actuators[k]
		into := r.Opening
		if a.kind == aPump {
			into = r.Running
		}
		add(into, a.tag, func(w *snapshot) float64 { return a.at(w.t) })
	}
	guess := int(o.sim.plan.RunFor/o.sim.plan.ReportEvery) + 4 + 4*len(o.sim.plan.Steps)
	room := make([]float64, guess*len(o.columns))
	r.Time = make([]float64, 0, guess)
	for i := range o.columns {
		o.columns[i].data, room = room[:0:guess], room[guess:]
	}
	return r
}

// column is one number of the series.
type column struct {
	into  map[string][]float64
	tag   string
	data  []float64
	value func(w *snapshot) float64
}

// record adds a sample of a snapshot that belongs to the present state of the system.
func (o *observer) record(w *snapshot) {
	if n := len(o.series.Time); n > 1 && o.series.Time[n-1] == w.t && o.series.Time[n-2] == w.t {
		o.drop() // two samples at one time are enough: before and after
	}
	o.series.Time = append(o.series.Time, w.t)
	copy(o.y, o.sim.sys.y)
	for i := range o.columns {
		c := &o.columns[i]
		c.data = append(c.data, c.value(w))
	}
	s := o.sim.sys
	for i, t := range o.sim.plan.Tees {
		var head *float64
		if s.teeDefined(i) {
			h := (s.y[s.teeRow+i] - s.atmosphere) / s.gamma
			head = &h
		}
		o.series.TeeHead[t.Tag] = append(o.series.TeeHead[t.Tag], head)
	}
}

// drop takes the last sample back.
func (o *observer) drop() {
	n := len(o.series.Time) - 1
	o.series.Time = o.series.Time[:n]
	for i := range o.columns {
		o.columns[i].data = o.columns[i].data[:n]
	}
	for _, t := range o.sim.plan.Tees {
		o.series.TeeHead[t.Tag] = o.series.TeeHead[t.Tag][:n]
	}
}

// advance moves on to the next regular sample.
func (o *observer) advance() {
	o.index++
	o.next = math.Min(float64(o.index)*o.sim.plan.ReportEvery, o.sim.plan.RunFor)
	if float64(o.index-1)*o.sim.plan.ReportEvery >= o.sim.plan.RunFor {
		o.next = math.Inf(1)
	}
}

// samples records the regular samples within the step just taken.
func (o *observer) samples(out *integrate.Outcome) {
	if !o.keep {
		return
	}
	for o.next < out.T || o.next == out.T && out.Stop == integrate.Stepped {
		o.at(&o.sample, o.next)
		o.smooth(&o.sample)
		o.note(&o.sample) // what is shown is never outside the extremes that are told
		o.record(&o.sample)
		o.advance()
	}
}

// smooth takes the flows of lines at tees from the polynomials of their volumes: within a step the pressure of a tee is good to its tolerance only,
// which may be much against a small flow.
func (o *observer) smooth(w *snapshot) {
	s, d := o.sim.sys, o.sim.solver.Dense()
	for i := range s.lines {
		if s.lines[i].gmin > 0 {
			w.q[i] = d.RateZ(i, w.t)
		}
	}
}

// finish closes the series: after an end at rest the last values repeat up to run_for.
func (o *observer) finish() {
	o.finishMarks()
	o.sim.led.finish(o.sim.solver.Z())
	if !o.keep {
		return
	}
	o.again()
	if n := len(o.series.Time); n > 0 && o.series.Time[n-1] < o.sim.t {
		o.record(&o.now)
	}
	if o.sim.stopped == "at_rest" {
		for !math.IsInf(o.next, 1) {
			o.now.t = o.next
			o.record(&o.now)
			o.advance()
		}
		o.now.t = o.sim.t
	}
	for i := range o.columns {
		c := &o.columns[i]
		c.into[c.tag] = c.data
	}
}

// teeDefined tells whether some open path joins the tee to liquid, so that its pressure means something.
func (s *system) teeDefined(i int) bool {
	seen := make(map[int]bool, 4)
	return s.joined(i, seen)
}

func (s *system) joined(i int, seen map[int]bool) bool {
	if seen[i] {
		return false
	}
	seen[i] = true
	for _, k := range s.tees[i].lines {
		l := &s.lines[k.line]
		if l.shut {
			continue
		}
		far := &l.from
		if k.sign < 0 {
			far = &l.to
		}
		switch far.kind {
		case toTee:
			if s.joined(far.at, seen) {
				return true
			}
		case toAir:
			if l.q != 0 {
				return true
			}
		default:
			return true
		}
	}
	return false
}
