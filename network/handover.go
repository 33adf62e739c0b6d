package network

import (
	"fmt"
	"math"
	"sort"
)

// addHandovers arranges a look at the plant at each handover within the run.
func (c *control) addHandovers() {
	for _, m := range c.sim.plan.Handover {
		if m.S >= 0 && m.S <= c.sim.plan.RunFor {
			c.schedule(timed{at: m.S, what: handOver})
		}
	}
}

// handoverAt takes down how the plant stands, before what is due at that time is done.
func (sim *simulation) handoverAt(t float64) *HandoverBlock {
	s := sim.sys
	h := &HandoverBlock{At: t, Clock: sim.plan.clock(t), Levels: sim.levelsNow(), Rates: map[string]float64{}, Valves: map[string]float64{}, Pumps: map[string]string{}}
	for i, v := range sim.plan.Vessels {
		_, slope := s.stations[i].shape.Level(sim.y[i])
		if t > 0 {
			h.Rates[v.Tag] = sim.obs.now.dv[i] * slope
		}
	}
	for k := range s.actuators {
		switch a := &s.actuators[k]; a.kind {
		case aPump:
			h.Pumps[a.tag] = a.stands()
		default:
			h.Valves[a.tag] = a.at(t)
		}
	}
	return h
}

// stands says how a pump stands: its mode, and whether it runs.
func (a *actuator) stands() string {
	switch runs := a.to > 0; {
	case a.failed:
		return "failed"
	case runs && a.mode.String() != "on":
		return a.mode.String() + ", running"
	case !runs && a.mode.String() == "on":
		return "on, stopped"
	default:
		return a.mode.String()
	}
}

// handoverResults completes the blocks with what comes next: the first step from then on, and the limit that goes first or comes nearest.
func (sim *simulation) handoverResults(r *Result) {
	r.Handover = []*HandoverBlock{}
	for _, h := range sim.control.handover {
		h.NextStep, h.NextLimit = r.nextStep(h.At), r.nextLimit(h.At)
		r.Handover = append(r.Handover, h)
	}
	sort.SliceStable(r.Handover, func(i, j int) bool { return r.Handover[i].At < r.Handover[j].At })
}

// nextStep names the first step from time t on.
func (r *Result) nextStep(t float64) string {
	at, says := math.Inf(1), ""
	for _, s := range r.Steps {
		due := s.Done
		if due == nil {
			due = s.Due
		}
		if due != nil && *due >= t && *due < at {
			at, says = *due, s.ID+" "+s.Says
		}
	}
	for _, h := range r.Holds {
		if h.At != nil && *h.At >= t && *h.At < at {
			at, says = *h.At, h.ID+" "+h.Says
		}
	}
	return says
}

// nextLimit names the limit that fails first from time t on; failing that, the one that comes nearest then.
func (r *Result) nextLimit(t float64) string {
	var next *LimitResult
	for _, l := range r.Limits {
		if l.FirstFail != nil && *l.FirstFail >= t && (next == nil || *l.FirstFail < *next.FirstFail) {
			next = l
		}
	}
	if next != nil {
		return fmt.Sprintf("%s FAILS", next.Says)
	}
	for _, l := range r.Limits {
		if l.WorstAt != nil && *l.WorstAt >= t && l.Margin != nil && (next == nil || l.Share() < next.Share()) {
			next = l
		}
	}
	if next == nil {
		return ""
	}
	return next.Says
}

// Share is the margin as a share of the bound, or of the worst value where the bound is nothing, for ranking limits of different kinds; +Inf where
// there is no margin.
func (l *LimitResult) Share() float64 {
	if l.Margin == nil {
		return math.Inf(1)
	}
	scale := 0.0
	if l.BoundSI != nil {
		scale = math.Abs(*l.BoundSI)
	}
	if scale == 0 && l.Worst != nil {
		scale = math.Abs(*l.Worst)
	}
	if scale == 0 {
		scale = math.Max(math.Abs(*l.Margin), math.SmallestNonzeroFloat64)
	}
	return *l.Margin / scale
}
