package network

import (
	"math"

	"headfall/integrate"
)

// watcher holds the state functions at which something acts: conditions of steps, switches of pumps, corners of shapes, siphons, faults that
// come with volume. It is what the integrator looks at within its steps.
type watcher struct {
	sim      *simulation
	triggers []trigger
	begun    []func() // what forgets the last run
	fixed    int      // triggers of the plan; those of one run come after
	sees     *viewer  // what the active triggers look at
	look     snapshot
	f        []float64
}

// trigger is one function with what it does when it crosses zero.
type trigger struct {
	value  func(w *snapshot) float64
	active func() bool
	fire   func(t float64)
	dir    int // +1 rising, -1 falling, 0 both
	sees   view
	levels bool // of levels alone: at its bound is past it when it is armed
	jumps  bool // may be true at once, without crossing: looked at whenever something acted
	on     bool // active in this segment
}

var _ integrate.Events = (*watcher)(nil)

func newWatcher(sim *simulation) (*watcher, error) {
	w := &watcher{sim: sim, sees: newViewer(sim.sys), look: sim.sys.newSnapshot(), f: make([]float64, sim.sys.n)}
	if err := w.addSteps(); err != nil {
		return nil, err
	}
	w.addPumps()
	w.addCorners()
	w.addCrowns()
	w.addFouling(sim.plan.Upsets)
	err := w.addEdges()
	w.fixed = len(w.triggers)
	return w, err
}

// begin forgets what the last run added, and adds what this one watches besides the plan.
func (w *watcher) begin() error {
	n := len(w.begun)
	for _, forget := range w.begun {
		forget()
	}
	w.triggers = w.triggers[:w.fixed]
	w.addFouling(w.sim.changes.Upsets)
	w.begun = w.begun[:n]
	w.foulNow()
	return w.addResponses()
}

// foulNow gives lines the extra loss that they have from the start.
func (w *watcher) foulNow() {
	for _, u := range w.sim.control.upsets {
		if i, ok := w.sim.sys.lineAt[u.Target]; ok && u.Kind == ExtraLoss && u.After <= 0 {
			w.sim.sys.foul(&w.sim.sys.lines[i], u.Value)
		}
	}
}

// addSteps watches the conditions of steps.
func (w *watcher) addSteps() error {
	c := &w.sim.control
	for i, st := range w.sim.plan.Steps {
		if st.When == nil {
			continue
		}
		p, err := w.sim.sys.newProbe(st.When)
		if err != nil {
			return err
		}
		dir := -1
		if p.above {
			dir = 1
		}
		w.triggers = append(w.triggers, trigger{
			value:  func(s *snapshot) float64 { return p.value(w.sim, s) },
			active: func() bool { return c.waits(i) },
			fire:   func(t float64) { c.trigger(i, t) },
			dir:    dir, sees: p.views(w.sim.sys), levels: p.ofLevels(), jumps: true,
		})
	}
	return nil
}

// waits tells that step i waits for its condition.
func (c *control) waits(i int) bool {
	st := &c.steps[i]
	return st.armed && st.armedAt <= c.sim.t && math.IsNaN(st.done) && math.IsInf(st.due, 1)
}

// addCorners watches the levels at which the surface area of a vessel jumps.
func (w *watcher) addCorners() {
	for i := range w.sim.sys.stations {
		for _, h := range w.sim.sys.stations[i].shape.Corners() {
			w.triggers = append(w.triggers, trigger{
				value:  func(s *snapshot) float64 { return s.level[i] - h },
				active: func() bool { return true },
				fire:   func(float64) {},
				sees:   view{vessels: w.sim.sys.just(i)},
			})
		}
	}
}

// arm chooses what is watched in the coming segment.
func (w *watcher) arm() {
	w.sees.begin()
	for i := range w.triggers {
		t := &w.triggers[i]
		if t.on = t.active(); t.on {
			w.sees.add(w.sim.sys, &t.sees)
		}
	}
}

// Reads returns the unknowns that the functions look at.
func (w *watcher) Reads() (unknowns []int32, all bool) { return w.sees.reads, w.sees.whole }

// Len returns the number of functions.
func (w *watcher) Len() int { return len(w.triggers) }

// Direction tells which crossings count.
func (w *watcher) Direction(i int) int { return w.triggers[i].dir }

// Values evaluates the functions.
func (w *watcher) Values(t float64, y, v []float64) {
	w.sees.fill(w.sim, &w.look, t, y, w.f)
	for i := range w.triggers {
		if tr := &w.triggers[i]; tr.on {
			v[i] = tr.value(&w.look)
		} else {
			v[i] = math.NaN()
		}
	}
}

// fire carries out what the events at the end of a segment do.
func (w *watcher) fire(hit []int) {
	for _, i := range hit {
		w.triggers[i].fire(w.sim.t)
	}
}

// settled looks at the plant just after something acted and fires what is true without having crossed anything: a condition that was true when it
// was armed, or that came true at once with what acted. It says whether anything fired.
func (w *watcher) settled() (fired bool) {
	w.sees.begin()
	for i := range w.triggers {
		t := &w.triggers[i]
		if t.on = t.jumps && t.active(); t.on {
			w.sees.add(w.sim.sys, &t.sees)
		}
	}
	w.sees.fill(w.sim, &w.look, w.sim.t, w.sim.solver.Y(), w.f)
	for i := range w.triggers {
		t := &w.triggers[i]
		if !t.on {
			continue
		}
		if v := t.value(&w.look); v == 0 && t.levels || v > 0 && t.dir > 0 || v < 0 && t.dir < 0 {
			t.fire(w.sim.t)
			fired = true
		}
	}
	return fired
}
