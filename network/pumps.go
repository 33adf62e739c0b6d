package network

import (
	"headfall/elements"
)

// chatterLimit is how many times a switch may turn within a second before it is held for a second and flagged.
const chatterLimit = 6

// setPump is a person's order.
func (c *control) setPump(k int, m elements.Mode, t float64) {
	a := &c.sim.sys.actuators[k]
	a.mode = m
	a.waiting = m == elements.Standby && a.drive.StandbyFor != ""
	switch m {
	case elements.On:
		c.run(a, true, t)
	case elements.Off:
		c.run(a, false, t)
	}
}

// run starts or stops a pump.
func (c *control) run(a *actuator, on bool, t float64) {
	running := a.to > 0
	if on && (a.failed || a.dry) || on == running {
		return
	}
	x := 0.0
	if on {
		x = 1
		a.starts = append(a.starts, t)
		a.since = t
	} else {
		a.ran += t - a.since
	}
	a.from, a.to, a.t0, a.t1 = x, x, t, t
	a.toggles = append(a.toggles, t)
}

// failPump stops a pump for good; one that stands by for it takes over.
func (c *control) failPump(k int, t float64) {
	a := &c.sim.sys.actuators[k]
	c.run(a, false, t)
	a.failed = true
	for i := range c.sim.sys.actuators {
		b := &c.sim.sys.actuators[i]
		if b.kind == aPump && b.waiting && b.drive.StandbyFor == a.tag {
			b.waiting = false
			if !b.drive.Starts.Given {
				c.run(b, true, t)
			}
		}
	}
}

// automatic tells whether the pump's own levels switch it.
func (a *actuator) automatic() bool {
	return a.kind == aPump && !a.failed && !a.waiting && (a.mode == elements.Auto || a.mode == elements.Standby)
}

// wants tells what the pump's levels ask for at the present levels: start, stop, or nothing.
func (a *actuator) wants(level func(string) float64) (start, stop bool) {
	d := a.drive
	beyond := func(w elements.LevelSwitch) bool {
		h := level(w.Vessel)
		return w.Above && h >= w.Level || !w.Above && h <= w.Level
	}
	return d.Starts.Given && beyond(d.Starts), d.Stops.Given && beyond(d.Stops)
}

// chatters tells whether the switch has turned too often within the last second, and notes it.
func (a *actuator) chatters(t float64) bool {
	n := len(a.toggles)
	return n >= chatterLimit && t-a.toggles[n-chatterLimit] < 1
}
