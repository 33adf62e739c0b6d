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
	deep     bool // some active trigger needs more than levels
	look     snapshot
	f        []float64
}

// trigger is one function with what it does when it crosses zero.
type trigger struct {
	value  func(w *snapshot) float64
	active func() bool
	fire   func(t float64)
	dir    int  // +1 rising, -1 falling, 0 both
	deep   bool // needs more than levels
	on     bool // active in this segment
}

var _ integrate.Events = (*watcher)(nil)

func newWatcher(sim *simulation) (*watcher, error) {
	w := &watcher{sim: sim, look: sim.sys.newSnapshot(), f: make([]float64, sim.sys.n)}
	if err := w.addSteps(); err != nil {
		return nil, err
	}
	w.addPumps()
	w.addCorners()
	w.addCrowns()
	w.addFouling()
	return w, w.addEdges()
}

// begin forgets what the last run added.
func (w *watcher) begin() {}

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
			dir:    dir, deep: !p.cheap(),
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
			})
		}
	}
}

// arm chooses what is watched in the coming segment.
func (w *watcher) arm() {
	w.deep = false
	for i := range w.triggers {
		t := &w.triggers[i]
		t.on = t.active()
		w.deep = w.deep || t.on && t.deep
	}
}

// Len returns the number of functions.
func (w *watcher) Len() int { return len(w.triggers) }

// Direction tells which crossings count.
func (w *watcher) Direction(i int) int { return w.triggers[i].dir }

// Values evaluates the functions.
func (w *watcher) Values(t float64, y, v []float64) {
	w.see(t, y)
	for i := range w.triggers {
		if tr := &w.triggers[i]; tr.on {
			v[i] = tr.value(&w.look)
		} else {
			v[i] = math.NaN()
		}
	}
}

// see fills the snapshot at (t, y) as far as the active triggers need it.
func (w *watcher) see(t float64, y []float64) {
	s := w.sim.sys
	w.look.t = t
	if !w.deep {
		for i := range s.stations {
			w.look.level[i], _ = s.stations[i].shape.Level(y[i])
		}
		return
	}
	w.sim.fill(&w.look, t, y, w.f)
	d := w.sim.solver.Dense()
	for i := range w.look.z {
		w.look.z[i] = d.OneZ(i, t)
	}
}

// fire carries out what the events at the end of a segment do.
func (w *watcher) fire(hit []int) {
	for _, i := range hit {
		w.triggers[i].fire(w.sim.t)
	}
}

// immediate looks at what is true already when it is armed, and acts at once; it says whether anything did.
func (w *watcher) immediate() (acted bool) {
	sim := w.sim
	c := &sim.control
	seen := false
	n := 0
	for i, st := range sim.plan.Steps {
		if st.When == nil {
			continue
		}
		tr := &w.triggers[n]
		n++
		if !c.waits(i) || c.steps[i].looked {
			continue
		}
		c.steps[i].looked = true
		if !seen {
			seen = true
			w.deep = true
			sim.sys.freeze(sim)
			w.seeNow()
		}
		if v := tr.value(&w.look); v == 0 || (v > 0) == (tr.dir > 0) {
			c.trigger(i, sim.t)
			acted = true
		}
	}
	return w.switchPumps() || acted
}

// seeNow fills the snapshot at the present state.
func (w *watcher) seeNow() {
	w.sim.fill(&w.look, w.sim.t, w.sim.y, w.f)
	copy(w.look.z, w.sim.solver.Z())
}
