package network

import (
	"math"

	"headfall/elements"
)

// actuator is what moves in a plant: a valve by its travel, a pump by its running state, a vent by its opening. Its position is one straight
// ramp at a time; actions replace the ramp.
type actuator struct {
	tag    string
	kind   actuatorKind
	from   float64 // position at t0
	to     float64 // position at t1
	t0, t1 float64 // s
	line   int     // -1: none
	part   int
	valve  *elements.Actuator
	drive  *elements.Drive
	stuck  float64 // travel at which it stands whatever is ordered; NaN
	stops  float64 // travel that it does not pass; NaN

	mode    elements.Mode // of a pump
	failed  bool
	dry     bool
	waiting bool // standby: the pump it stands by for has not failed
	starts  []float64
	since   float64 // running since
	ran     float64
	toggles []float64 // latest times of automatic switching, for chatter
}

type actuatorKind int8

const (
	aValve actuatorKind = iota
	aPump
	aVent // of a high point
)

// at returns the position at time t.
func (a *actuator) at(t float64) float64 {
	switch {
	case t >= a.t1:
		return a.to
	case t <= a.t0:
		return a.from
	}
	return a.from + (a.to-a.from)*(t-a.t0)/(a.t1-a.t0)
}

// rate returns the speed of the ramp that holds just after t, 1/s.
func (a *actuator) rate(t float64) float64 {
	if t >= a.t0 && t < a.t1 {
		return (a.to - a.from) / (a.t1 - a.t0)
	}
	return 0
}

// moveTo starts a move to x at time t, lasting over seconds (NaN: at the stroke rate), and returns when it ends.
func (a *actuator) moveTo(t, x, over float64) (end float64) {
	now := a.at(t)
	if !math.IsNaN(a.stuck) {
		x = now
	}
	if math.IsNaN(over) {
		over = 0
		if a.valve != nil {
			over = math.Abs(x-now) * a.valve.Stroke
		}
	}
	if s := a.stops; !math.IsNaN(s) && (now-s)*(x-s) <= 0 && now != x {
		over *= math.Abs(s-now) / math.Abs(x-now)
		x, a.stuck = s, s
	}
	a.from, a.to, a.t0, a.t1 = now, x, t, t+over
	return t + over
}
