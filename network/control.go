package network

import (
	"math"

	"headfall/elements"
)

// stepState is where a step stands in a run.
type stepState struct {
	plan    *Step
	armed   bool    // its `at` has come and its `after` is done
	armedAt float64 // s
	due     float64 // s at which it acts; +Inf while not known
	done    float64 // s; NaN
	movedBy float64 // s at which its move ends; NaN
	seen    record
}

// control carries what people, switches and faults do: which action comes next in time, and which conditions are waited for.
type control struct {
	sim     *simulation
	steps   []stepState
	byID    map[string]int
	timed   []timed
	inflows map[string]override
	gone    map[string]bool // batches cancelled
	upsets  []*Upset

	handover []*HandoverBlock
}

// override is an inflow set by a step.
type override struct{ value, since float64 }

// timed is something at a known time that is not a step.
type timed struct {
	at    float64
	what  happening
	k     int    // the pump, or the step
	alarm *Alarm // that is answered
	done  bool
}

type happening int8

const (
	lookAgain happening = iota // nothing but that conditions are looked at anew
	failPump
	readLevel
	handOver
	answerAlarm
)

// happens carries out what is due.
func (c *control) happens(a timed, t float64) {
	switch a.what {
	case failPump:
		c.failPump(a.k, t)
	case readLevel:
		c.readLevel(a.k)
	case handOver:
		if c.sim.obs.keep {
			c.handover = append(c.handover, c.sim.handoverAt(t))
		}
	case answerAlarm:
		c.answer(a.alarm, t)
	}
}

// begin puts everything at its start.
func (c *control) begin(sim *simulation) {
	p, ch := sim.plan, &sim.changes
	if c.sim == nil {
		*c = control{sim: sim, byID: make(map[string]int, len(p.Steps)), inflows: map[string]override{}, gone: map[string]bool{}}
		for i, st := range p.Steps {
			c.byID[st.ID] = i
		}
	}
	clear(c.inflows)
	clear(c.gone)
	c.steps, c.timed, c.upsets, c.handover = c.steps[:0], c.timed[:0], c.upsets[:0], nil
	for _, st := range p.Steps {
		c.steps = append(c.steps, stepState{plan: st, due: math.Inf(1), done: math.NaN(), movedBy: math.NaN(),
			seen: record{from: math.NaN(), read: math.NaN()}})
	}
	c.upsets = append(append(c.upsets, p.Upsets...), ch.Upsets...)
	c.startActuators(ch)
	for _, u := range c.upsets {
		c.startUpset(u)
	}
	c.addHandovers()
	for i := range c.steps {
		c.arm(i, 0)
	}
}

// startActuators sets valves, pumps and vents as at the start.
func (c *control) startActuators(ch *Changes) {
	s := c.sim.sys
	for i := range s.actuators {
		a := &s.actuators[i]
		a.stuck, a.stops = math.NaN(), math.NaN()
		a.failed, a.dry, a.starts, a.ran, a.toggles = false, false, a.starts[:0], 0, a.toggles[:0]
		x := 0.0
		switch a.kind {
		case aValve:
			x = a.valve.Open
			if v, ok := ch.Open[a.tag]; ok {
				x = v
			}
		case aPump:
			a.mode = a.drive.Mode
			a.waiting = a.mode == elements.Standby && a.drive.StandbyFor != ""
			if a.mode == elements.On {
				x = 1
				a.since = 0
			}
		case aVent:
			x = c.sim.ventStart(a)
		}
		a.from, a.to, a.t0, a.t1 = x, x, 0, 0
	}
}

// startUpset sets one fault up.
func (c *control) startUpset(u *Upset) {
	s := c.sim.sys
	k, ok := s.actuatorAt[u.Target]
	switch u.Kind {
	case PumpFails:
		if ok {
			c.schedule(timed{at: u.At.S, what: failPump, k: k})
		}
	case ValveSticks:
		if ok {
			a := &s.actuators[k]
			a.from, a.to, a.stuck = u.Value, u.Value, u.Value
		}
	case ValveStops:
		if ok {
			s.actuators[k].stops = u.Value
		}
	case VentBlocked:
		s.blockVent(u.Target, u.Value)
	}
}

func (c *control) schedule(a timed) { c.timed = append(c.timed, a) }

// arm works out when step i acts, as far as that is known at time t: its `at` and its `after` arm it; then its condition, if it has one; then its wait.
func (c *control) arm(i int, t float64) {
	st := &c.steps[i]
	if !math.IsNaN(st.done) || c.sim.changes.Missed[st.plan.ID] {
		return
	}
	at := 0.0
	if st.plan.At.Given {
		at = st.plan.At.S
	}
	if st.plan.After != "" {
		k, ok := c.byID[st.plan.After]
		if !ok || math.IsNaN(c.steps[k].done) {
			return
		}
		at = math.Max(at, c.steps[k].done)
	}
	st.armed, st.armedAt = true, at
	if st.plan.When == nil {
		c.trigger(i, at)
	}
}

// trigger notes that step i was triggered at time t.
func (c *control) trigger(i int, t float64) {
	st := &c.steps[i]
	st.due = math.Max(0, t+st.plan.Wait+c.sim.changes.Shift[st.plan.ID])
	if st.plan.Action == HoldPoint {
		st.due += c.sim.changes.wait(st.plan)
	}
	st.due = math.Max(st.due, c.sim.t)
}

// next returns the time of the next action after t.
func (c *control) next(t float64) float64 {
	n := math.Inf(1)
	for i := range c.steps {
		st := &c.steps[i]
		if !math.IsNaN(st.done) {
			continue
		}
		if st.due > t && st.due < n {
			n = st.due
		}
		if st.armed && st.plan.When != nil && math.IsInf(st.due, 1) && st.armedAt > t && st.armedAt < n {
			n = st.armedAt
		}
	}
	for i := range c.timed {
		if a := &c.timed[i]; !a.done && a.at > t && a.at < n {
			n = a.at
		}
	}
	return n
}

// act does everything that is due at time t, in the order of the file, and says whether anything was done.
func (c *control) act(t float64) (acted bool) {
	for i := range c.timed {
		if a := &c.timed[i]; !a.done && a.at <= t {
			a.done, acted = true, true
			c.happens(*a, t)
		}
	}
	for i := range c.steps {
		st := &c.steps[i]
		if !math.IsNaN(st.done) || !(st.due <= t) {
			continue
		}
		st.done, st.movedBy = t, t
		c.noteStep(i, t)
		acted = true
		c.do(st, t)
		for k := range c.steps {
			if c.steps[k].plan.After == st.plan.ID {
				c.arm(k, t)
			}
		}
	}
	return acted
}

// do carries a step's action out.
func (c *control) do(st *stepState, t float64) {
	s, p := c.sim.sys, st.plan
	switch p.Action {
	case MoveValve:
		a := &s.actuators[s.actuatorAt[p.Target]]
		to, over := p.To, p.Over
		if w := c.sim.changes.partWay(p.ID); !math.IsNaN(w) {
			from := a.at(t)
			to = from + w*(p.To-from)
			if !math.IsNaN(over) {
				over *= w
			}
			st.movedBy = a.moveTo(t, to, over)
			a.stuck = to
			return
		}
		st.movedBy = a.moveTo(t, to, over)
		c.sim.screenClosure(s.actuatorAt[p.Target], t)
	case SetPump:
		c.setPump(s.actuatorAt[p.Target], p.Mode, t)
	case SetInflow:
		c.inflows[p.Target] = override{p.To, t}
	case SetVent:
		if k, ok := s.actuatorAt[p.Target]; ok {
			s.actuators[k].moveTo(t, p.To, 0)
		} else {
			s.setVent(p.Target, p.To)
		}
	case CancelBatch:
		c.gone[p.Target] = true
	}
}
