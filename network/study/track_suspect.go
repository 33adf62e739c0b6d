package study

import (
	"fmt"
	"math"
)

// Patterns of a rate ratio.
const (
	onPlan   = 0.10 // off by less is as planned
	stopped  = 0.10 // under it, nothing moves
	fouls    = 0.75 // late over early, under which an outlet is fouling
	disagree = 0.35 // between a vessel and the one it drains to
)

// suspect names what the readings look like: fouling, a line-up that is not as ordered, a gauge.
func (t *tracking) suspect() {
	for _, tag := range t.opt.Readings.Vessels {
		x := t.res.Vessels[tag]
		if x == nil {
			continue
		}
		t.strays(tag)
		if x.RateRatio == nil || x.Expected >= x.First {
			continue
		}
		r := *x.RateRatio
		down, downRatio := t.receiver(tag)
		switch {
		case down != "" && math.Abs(downRatio-r) > disagree && math.Abs(downRatio-1) < 2*onPlan:
			t.say("%s gains what the plan expects, %s does not lose it: the gauge of %s may be stuck or wrong; dip it by hand", down, tag, tag)
		case r < -stopped:
			t.say("%s rises where it should fall: something runs into it; look for a valve left open, or liquid running back", tag)
		case r < stopped:
			t.say("%s does not move: a shut valve, a plug, an air lock, a wrong line-up or a stuck gauge; stop and find out which before anything else is opened", tag)
		case x.early != nil && x.late != nil && *x.late < fouls**x.early:
			t.say("%s drains ever slower (%s of the rate expected at first, %s now): its outlet is plugging; expect it to get worse", tag, percent(*x.early), percent(*x.late))
		case down != "" && math.Abs(downRatio-r) > disagree:
			t.say("%s and %s do not agree (%s and %s of what is expected): one gauge is wrong, or liquid goes elsewhere; walk the line", tag, down, percent(r), percent(downRatio))
		case math.Abs(1-r) < x.blur():
		case r < 1-onPlan:
			t.say("%s drains steadily at %s of the rate expected: a valve not as far open as ordered, a part plugged from the start, or a coefficient that was too high; look at the valve first", tag, percent(r))
		case r > 1+onPlan:
			t.say("%s drains at %s of the rate expected: a valve further open than ordered, or another way out is open; check the line-up", tag, percent(r))
		}
	}
	for _, f := range t.res.Fitted {
		if !f.Met {
			t.say("no %s explains the readings of %s: the cause is not in %s alone", f.Name, f.Vessel, f.Line)
		}
	}
}

func (t *tracking) say(format string, args ...any) {
	t.res.Suspects = append(t.res.Suspects, fmt.Sprintf(format, args...))
}

// receiver returns the vessel that a vessel's main outlet runs to, where it was read and should have risen, with its own ratio.
func (t *tracking) receiver(tag string) (to string, ratio float64) {
	l := t.outletOf(tag)
	if l == nil {
		return "", 0
	}
	if x := t.res.Vessels[l.To]; x != nil && x.RateRatio != nil && x.Expected > x.First {
		return l.To, *x.RateRatio
	}
	return "", 0
}

// strays finds single readings that neither neighbour agrees with: of several in a row the one that is furthest off.
func (t *tracking) strays(tag string) {
	list := t.opt.Readings.Of(tag)
	off := make([]float64, len(list))
	for i := 1; i+1 < len(list); i++ {
		a, b, c := list[i-1], list[i], list[i+1]
		if c.Time > a.Time {
			off[i] = math.Abs(b.Level - a.Level - (c.Level-a.Level)*(b.Time-a.Time)/(c.Time-a.Time))
		}
	}
	for i := 1; i+1 < len(list); i++ {
		moved := math.Abs(list[i+1].Level - list[i-1].Level)
		if off[i] > 4*gaugeFit && off[i] > 0.6*moved && off[i] >= off[i-1] && off[i] >= off[i+1] {
			t.say("the reading of %s at %s (%s) fits neither the one before nor the one after: read it again", tag, momentText(t.plant, list[i].Time, true), list[i].Text)
		}
	}
}

// blur is how far a rate ratio may be off because levels are read to a gauge's own fineness.
func (x *TrackedVessel) blur() float64 {
	return math.Sqrt2 * gaugeFit / math.Abs(x.First-x.Expected)
}

func percent(share float64) string { return fmt.Sprintf("%.0f %%", 100*share) }

// headline takes the pace from the vessel that should have lost most.
func (t *tracking) headline() {
	var most float64
	for _, tag := range t.opt.Readings.Vessels {
		x := t.res.Vessels[tag]
		if x == nil || x.RateRatio == nil || x.Expected >= x.First {
			continue
		}
		v := t.vessel(tag)
		a, _ := v.Shape.Volume(math.Max(0, x.First))
		b, _ := v.Shape.Volume(math.Max(0, x.Expected))
		if a-b <= most {
			continue
		}
		most = a - b
		t.res.Ratio, t.res.By = x.RateRatio, tag
		switch r := *x.RateRatio; {
		case r < stopped:
			t.res.Pace = "not_moving"
		case math.Abs(1-r) < x.blur():
			t.res.Pace = "on_plan"
		case r < 1-onPlan/2:
			t.res.Pace = "slow"
		case r > 1+onPlan/2:
			t.res.Pace = "fast"
		default:
			t.res.Pace = "on_plan"
		}
	}
}
