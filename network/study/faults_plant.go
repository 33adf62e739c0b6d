package study

import (
	"fmt"
	"slices"

	"headfall/elements"
	"headfall/network"
)

// Shares of what is left or lost in a rehearsal. Common practice, no source.
const (
	weakPump  = 0.7 // of head, or of rate
	leakCheck = 0.1 // of the Kv of every check valve, in reverse
	halfVent  = 0.5 // of a vent, blocked
)

// parts calls f with every part of the plant and its line.
func parts(p *network.Plant, f func(l *network.Line, part elements.Part)) {
	for _, l := range p.Lines {
		for _, x := range l.Parts {
			f(l, x.Part)
		}
	}
}

// valveFaults: every valve stuck shut, half open, open and as it stands at the start, whatever is ordered; every normally shut valve left open.
func valveFaults(p *network.Plant) (all []*fault) {
	moved := map[string]bool{}
	for _, s := range p.Steps {
		moved[s.Target] = true
	}
	parts(p, func(_ *network.Line, part elements.Part) {
		v, ok := part.(elements.Actuated)
		if !ok {
			return
		}
		a := v.Actuator()
		places := []float64{0, 0.5, 1}
		if !slices.Contains(places, a.Open) {
			places = append(places, a.Open)
		}
		for _, x := range places {
			if x == a.Open && !moved[a.Tag] {
				continue // as planned
			}
			all = append(all, &fault{"valve_stuck", a.Tag, fmt.Sprintf("%s is stuck %s", a.Tag, stands(x)), 0,
				network.Changes{Upsets: []*network.Upset{{Kind: network.ValveSticks, Target: a.Tag, Value: x}}}})
		}
		if a.Normally == 0 && a.Open == 0 {
			all = append(all, &fault{"left_open", a.Tag, a.Tag + " is left open, until it is moved", 0, network.Changes{Open: one(a.Tag, 1.0)}})
		}
	})
	return all
}

func stands(x float64) string {
	switch {
	case x <= 0:
		return "shut"
	case x >= 1:
		return "open"
	}
	return "at " + network.Percent(x)
}

// pumpFaults: every pump that does not run from the start, that stops when the vessel it draws from stands highest, and that is weak.
func pumpFaults(p *network.Plant, plan *network.Result) (all []*fault) {
	parts(p, func(l *network.Line, part elements.Part) {
		d, ok := part.(elements.Pumps)
		if !ok {
			return
		}
		tag := d.Drive().Tag
		fails := func(at float64, says string) {
			all = append(all, &fault{"pump_fails", tag, tag + " " + says, at,
				network.Changes{Upsets: []*network.Upset{{Kind: network.PumpFails, Target: tag, At: network.Moment{S: at, Given: true}}}}})
		}
		fails(0, "does not run at all")
		if v := plan.Vessels[l.From]; v != nil && v.PeakAt > 0 {
			fails(v.PeakAt, "fails while "+l.From+" stands highest")
		}
		all = append(all, &fault{"pump_weak", tag, fmt.Sprintf("%s gives %s of its head or rate", tag, network.Percent(weakPump)), 0,
			network.Changes{Weaken: one(tag, weakPump)}})
	})
	return all
}

// ventFaults: every vent of a cover blocked by half of what it has left, and wholly.
func ventFaults(p *network.Plant) (all []*fault) {
	for _, v := range p.Vessels {
		if v.Cover == nil {
			continue
		}
		for _, w := range v.Cover.Vents {
			half := 1 - halfVent*(1-w.Blocked)
			all = append(all,
				&fault{"vent_blocked", w.Tag, w.Tag + " of " + v.Tag + " is half blocked", 0, network.Changes{BlockVent: one(w.Tag, half)}},
				&fault{"vent_blocked", w.Tag, w.Tag + " of " + v.Tag + " is blocked", 0, network.Changes{BlockVent: one(w.Tag, 1.0)}})
		}
	}
	return all
}

// checkFaults: all check valves leak.
func checkFaults(p *network.Plant) []*fault {
	found := false
	parts(p, func(_ *network.Line, part elements.Part) {
		c, ok := part.(elements.OneWay)
		found = found || ok && c.Leak() < leakCheck
	})
	if !found {
		return nil
	}
	return []*fault{{"check_leaks", "check valves", fmt.Sprintf("every check valve passes %s of its Kv backwards", network.Percent(leakCheck)), 0,
		network.Changes{CheckLeak: leakCheck}}}
}

// fouling grows: K on the first bore of a line, after shares of what the line passes in the plan. Common practice, no source.
var fouling = []struct{ share, k float64 }{{0.25, 10}, {0.5, 30}, {0.75, 100}}

// foulFaults: every line that carries something clogs little by little.
func foulFaults(p *network.Plant, plan *network.Result) (all []*fault) {
	const least = 0.1 // m³
	for _, l := range p.Lines {
		passes := plan.Lines[l.Tag].Forward
		if passes < least || !bored(l) {
			continue
		}
		f := &fault{kind: "fouling", target: l.Tag, says: l.Tag + " clogs: K grows to 100 as it drains"}
		for _, x := range fouling {
			f.ch.Upsets = append(f.ch.Upsets, &network.Upset{Kind: network.ExtraLoss, Target: l.Tag, Value: x.k, After: x.share * passes})
		}
		all = append(all, f)
	}
	return all
}

func bored(l *network.Line) bool {
	for _, x := range l.Parts {
		if b, ok := x.Part.(elements.Bored); ok && b.Bore() > 0 {
			return true
		}
	}
	return false
}
