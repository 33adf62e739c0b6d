package network

import (
	"context"
	"errors"
	"fmt"
	"math"
	"strings"
	"time"

	"headfall/elements/quantity"
	"headfall/integrate"
)

// simulation is one run of a compiled plant: the only place where time, events and steps meet. It is reused from run to run.
type simulation struct {
	plan    *Plant
	method  string
	sys     *system
	solver  *integrate.Solver
	control control
	led     *ledger
	changes Changes
	watch   *watcher
	obs     *observer
	grid    gridder

	t       float64
	y       []float64
	stopped string
	trouble error
	flags   []*Flag
	brief   Brief
	edges   map[*Edge]float64  // when conditional edges of windows came
	answers map[*Alarm]*answer // of the alarms that were answered
	columns []liquidColumn     // lines with a mass that may part
	rescues int                // of them that parted for the solver's sake
}

// Failure tells that the calculation could not finish.
type Failure struct {
	T    float64 // s from the start
	Says string
	Err  error
}

func (f *Failure) Error() string { return f.Says }

// Unwrap returns the cause.
func (f *Failure) Unwrap() error { return f.Err }

func (m *Model) simulation() (*simulation, error) {
	if m.sim == nil {
		method, err := m.sys.methodNamed(m.opt.Method)
		if err != nil {
			return nil, err
		}
		s := m.sys
		sim := &simulation{plan: m.plan, sys: s, led: newLedger(s), y: make([]float64, s.n), edges: map[*Edge]float64{}, answers: map[*Alarm]*answer{}}
		sim.method = strings.ToLower(method.Name())
		sim.solver = integrate.NewSolver(s, integrate.Options{RTol: m.opt.Tolerance, Method: method, MaxSteps: m.opt.MaxSteps})
		if sim.watch, err = newWatcher(sim); err != nil {
			return nil, err
		}
		if sim.obs, err = newObserver(sim); err != nil {
			return nil, err
		}
		m.sim = sim
	}
	return m.sim, nil
}

// Run runs the plant once. The error is a *Failure when the calculation could not finish, or ctx's cause when it was interrupted; the result
// then holds what was computed up to there.
func (m *Model) Run(ctx context.Context, opt RunOptions) (*Result, error) {
	now := opt.Now
	if now == nil {
		now = time.Now
	}
	began := now()
	sim, err := m.carryOut(ctx, &opt, false)
	if sim == nil {
		return nil, err
	}
	r := sim.result()
	r.Work.Wall = now().Sub(began).Seconds()
	return r, err
}

// Brief runs the plant once for what is judged alone; it keeps no series, no extremes of flows, gas pressures and spills, and no flags. What is given back is
// the model's own and good until its next run. Errors are those of Run.
func (m *Model) Brief(ctx context.Context, opt RunOptions) (*Brief, error) {
	opt.Series = false
	sim, err := m.carryOut(ctx, &opt, true)
	if sim == nil {
		return nil, err
	}
	return sim.weigh(), err
}

// carryOut runs the plant from its start to its end; the simulation is nil where it could not begin.
func (m *Model) carryOut(ctx context.Context, opt *RunOptions, brief bool) (*simulation, error) {
	sim, err := m.simulation()
	if err != nil {
		return nil, err
	}
	if err := sim.begin(opt, brief); err != nil {
		return nil, err
	}
	err = sim.run(ctx, opt)
	sim.obs.finish()
	sim.grid.finish(sim)
	return sim, err
}

// begin puts the plant at its start.
func (sim *simulation) begin(opt *RunOptions, brief bool) error {
	sim.changes = opt.Changes
	sim.t, sim.stopped, sim.trouble, sim.flags = 0, "", nil, nil
	clear(sim.edges)
	s := sim.sys
	s.begin(&sim.changes)
	for i := range s.stations {
		st := &s.stations[i]
		sim.y[i] = st.plan.StartVolume()
		if st.massRow >= 0 {
			sim.y[st.massRow] = st.startMass()
		}
	}
	s.guessTees(sim.y)
	sim.beginColumns()
	for _, k := range s.inertial {
		sim.y[s.lines[k].row] = 0
	}
	sim.led.reset()
	sim.solver.Reset()
	sim.control.begin(sim)
	sim.obs.begin(opt.Series, brief)
	sim.grid = gridder{grid: opt.Grid}
	return sim.watch.begin()
}

// run goes from segment to segment: between two of them something acted.
func (sim *simulation) run(ctx context.Context, opt *RunOptions) error {
	end := sim.plan.RunFor
	for {
		if ctx.Err() != nil {
			sim.stopped = "interrupted"
			return context.Cause(ctx)
		}
		sim.settleActions()
		stop := math.Min(end, sim.nextStop())
		sim.sys.freeze(sim)
		sim.project()
		if err := sim.solver.Restart(sim.t, sim.y); err != nil {
			if sim.rescue(err) {
				continue
			}
			return sim.fail(err)
		}
		if sim.watch.settled() || sim.reconsider() {
			continue
		}
		sim.watch.arm()
		sim.obs.start()
		if sim.t >= end {
			sim.stopped = "time"
			return nil
		}
		hit, err := sim.segment(ctx, stop, opt)
		if err != nil || sim.stopped != "" {
			return err
		}
		sim.watch.fire(hit)
	}
}

// segment steps until the segment's end or an event.
func (sim *simulation) segment(ctx context.Context, stop float64, opt *RunOptions) (hit []int, err error) {
	for {
		out, err := sim.solver.Step(stop, sim.watch)
		if err != nil {
			if sim.rescue(err) {
				return nil, nil
			}
			return nil, sim.fail(err)
		}
		sim.t = out.T
		copy(sim.y, sim.solver.Y())
		sim.obs.step(&out)
		sim.grid.step(sim, &out)
		if opt.Progress != nil {
			opt.Progress(sim.t / sim.plan.RunFor)
		}
		if out.Stop != integrate.Stepped {
			return out.Fired, nil
		}
		if sim.reconsider() {
			return nil, nil
		}
		if sim.atRest() {
			sim.stopped = "at_rest"
			return nil, nil
		}
		if ctx.Err() != nil {
			sim.stopped = "interrupted"
			return nil, context.Cause(ctx)
		}
	}
}

// fail puts an error of the solver into words: when, and which vessel or line.
func (sim *simulation) fail(err error) error {
	sim.stopped = "failed"
	f := &Failure{T: sim.t, Err: err}
	what, do := "the calculation did not settle", "Look at the bores, lengths and openings there, or try another --method or a looser --tolerance"
	var e *integrate.Error
	if errors.As(err, &e) {
		f.T = e.T
		if e.Reason == integrate.TooManySteps {
			what, do = fmt.Sprintf("the calculation was ended after %d steps, the last ones", e.Steps), "Look at what is small or quick there, or allow more with --max-steps"
		}
		if tag := sim.sys.unknownName(e.Unknown); tag != "" {
			what += " at " + tag
		}
	}
	f.Says = fmt.Sprintf("%s, %s after the start; results up to there are kept. %s", what, quantity.FormatDuration(math.Floor(f.T)), do)
	sim.trouble = f
	return f
}

// nextStop returns the next time at which something in the plant has a corner.
func (sim *simulation) nextStop() float64 {
	t, s := sim.t, sim.sys
	n := math.Min(sim.control.next(t), sim.nextEdge(t))
	for i := range s.actuators {
		if e := s.actuators[i].t1; e > t {
			n = math.Min(n, e)
		}
	}
	for i := range s.outside {
		n = math.Min(n, Rows(s.outside[i].point.Surface).next(t))
	}
	for _, v := range sim.plan.Vessels {
		if _, set := sim.control.inflows[v.Tag]; !set {
			n = math.Min(n, v.Inflow.next(t))
		}
		for _, b := range v.Batches {
			if sim.control.runs(b) {
				for _, e := range [2]float64{b.At.S, b.At.S + b.Over} {
					if e > t {
						n = math.Min(n, e)
					}
				}
			}
		}
	}
	return n
}

// runs tells whether a batch comes, or has begun before it was cancelled.
func (c *control) runs(b *Batch) bool { return !c.gone[b.ID] }

// settleActions does what is due now until nothing more follows from it.
func (sim *simulation) settleActions() {
	for range 100 {
		a := sim.control.act(sim.t)
		b := sim.watch.switchPumps()
		if !a && !b {
			return
		}
	}
}

// atRest tells that nothing flows, nothing changes and nothing is pending.
func (sim *simulation) atRest() bool {
	w := &sim.obs.now
	for i := range sim.sys.stations {
		st := &sim.sys.stations[i]
		if st.inflow != 0 || math.Abs(w.dv[i]) > restFlow {
			return false
		}
		if st.massRow >= 0 && math.Abs(w.dv[st.massRow])*st.gasN > restGas {
			return false
		}
	}
	for i := range w.q {
		if math.Abs(w.q[i]) > restFlow {
			return false
		}
	}
	for _, k := range sim.sys.inertial { // at the turn of a swing nothing flows either
		if math.Abs(w.dv[sim.sys.lines[k].row]) > restFlow {
			return false
		}
	}
	return math.IsInf(sim.nextStop(), 1)
}

// restGas is the change of a gas pressure, Pa/s, under which nothing changes.
const restGas = 1e-4

// restFlow is the flow, m³/s, under which nothing flows: a drop in a minute.
const restFlow = 1e-9
