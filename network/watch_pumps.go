package network

import (
	"fmt"
	"math"

	"headfall/elements"
)

// dryShare of the suction bore is the depth over its invert at which a pump has lost its suction; dryDepth is the least, m. It may start again
// 50 mm higher. Common practice, no source.
const (
	dryShare   = 0.1
	dryDepth   = 0.002
	dryRestart = 0.050
)

// addPumps watches start and stop levels and the suction of every pump.
func (w *watcher) addPumps() {
	s := w.sim.sys
	for k := range s.actuators {
		a := &s.actuators[k]
		if a.kind != aPump {
			continue
		}
		w.addSwitch(a, a.drive.Starts, true)
		w.addSwitch(a, a.drive.Stops, false)
		w.addSuction(a)
	}
}

func (w *watcher) addSwitch(a *actuator, sw elements.LevelSwitch, start bool) {
	v, ok := w.sim.sys.vesselAt[sw.Vessel]
	if !sw.Given || !ok {
		return
	}
	dir := -1
	if sw.Above {
		dir = 1
	}
	c := &w.sim.control
	w.triggers = append(w.triggers, trigger{
		value:  func(s *snapshot) float64 { return s.level[v] - sw.Level },
		active: func() bool { return a.automatic() && (a.to > 0) != start && !a.chatters(w.sim.t) },
		fire:   func(t float64) { w.turn(c, a, start, t) },
		dir:    dir,
		sees:   view{vessels: w.sim.sys.just(v)},
	})
}

// turn starts or stops a pump by its level; one that turns too often is held for a second and flagged.
func (w *watcher) turn(c *control, a *actuator, on bool, t float64) {
	c.run(a, on, t)
	if a.chatters(t) {
		c.schedule(timed{at: t + 1})
		if f := w.sim.flag("chatter", a.tag, t, "set its start and stop levels further apart"); f != nil {
			f.Says = fmt.Sprintf("%s starts and stops many times a second; it is held as it is for a second at a time", a.tag)
		}
	}
}

// addSuction watches the depth over the suction of a pump.
func (w *watcher) addSuction(a *actuator) {
	l := &w.sim.sys.lines[a.line]
	if l.from.kind != toVessel {
		return
	}
	v := l.from.at
	low := l.from.invert - w.sim.sys.stations[v].base + math.Max(dryDepth, dryShare*l.plan.endBore(false))
	c := &w.sim.control
	w.triggers = append(w.triggers,
		trigger{
			value:  func(s *snapshot) float64 { return s.level[v] - low },
			active: func() bool { return a.to > 0 },
			dir:    -1, jumps: true, levels: true, sees: view{vessels: w.sim.sys.just(v)},
			fire: func(t float64) {
				c.run(a, false, t)
				a.dry = true
				if f := w.sim.flag("pump_dry", a.tag, t, "stop it before; running dry can wreck a pump"); f != nil {
					f.Says = fmt.Sprintf("%s loses its suction: %s is down to the suction of %s", a.tag, w.sim.plan.Vessels[v].Tag, l.plan.Tag)
				}
			},
		},
		trigger{
			value:  func(s *snapshot) float64 { return s.level[v] - low - dryRestart },
			active: func() bool { return a.dry },
			dir:    1, sees: view{vessels: w.sim.sys.just(v)},
			fire: func(t float64) {
				a.dry = false
				if a.mode == elements.On {
					c.run(a, true, t)
				}
			},
		})
}

// switchPumps starts and stops pumps whose levels ask for it as they stand.
func (w *watcher) switchPumps() (acted bool) {
	s := w.sim.sys
	level := func(tag string) float64 {
		i := s.vesselAt[tag]
		h, _ := s.stations[i].shape.Level(w.sim.y[i])
		return h
	}
	for k := range s.actuators {
		a := &s.actuators[k]
		if !a.automatic() || a.chatters(w.sim.t) || a.dry {
			continue
		}
		start, stop := a.wants(level)
		if on := a.to > 0; start && !stop && !on {
			w.sim.control.run(a, true, w.sim.t)
			acted = acted || a.to > 0
		} else if stop && !start && on {
			w.sim.control.run(a, false, w.sim.t)
			acted = true
		}
	}
	return acted
}
