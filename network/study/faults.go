package study

import (
	"fmt"
	"maps"
	"strings"

	"headfall/network"
)

// fault is one thing that goes wrong, from a moment on.
type fault struct {
	kind   string // step_late, valve_stuck, …
	target string // tag or step
	says   string
	at     float64 // s from which the plant is not as planned
	ch     network.Changes
}

// latent tells that a fault stands from the start without being seen.
func (f *fault) latent() bool {
	return f.at == 0 && !strings.HasPrefix(f.kind, "step_") && !strings.HasPrefix(f.kind, "hold_")
}

// faultsOf lists what can go wrong with a plan, given how it runs: steps, valves, pumps, vents, check valves, strainers.
func faultsOf(p *network.Plant, plan *network.Result, opt *DrillOptions) []*fault {
	var all []*fault
	for _, list := range [][]*fault{
		stepFaults(p, plan, opt), holdFaults(plan), valveFaults(p), pumpFaults(p, plan), ventFaults(p), checkFaults(p), foulFaults(p, plan),
	} {
		all = append(all, list...)
	}
	return all
}

// pairs joins every two faults of different things.
func pairs(single []*fault) (both []*fault) {
	for i, a := range single {
		for _, b := range single[i+1:] {
			if a.target == b.target {
				continue
			}
			both = append(both, &fault{kind: "pair", target: a.target + " and " + b.target, says: a.says + "; " + b.says,
				at: min(a.at, b.at), ch: joined(a.ch, b.ch)})
		}
	}
	return both
}

// joined makes one change of two that concern different things.
func joined(a, b network.Changes) network.Changes {
	return network.Changes{
		Waits: both(a.Waits, b.Waits), Shift: both(a.Shift, b.Shift), Missed: both(a.Missed, b.Missed), PartWay: both(a.PartWay, b.PartWay),
		Upsets: append(append([]*network.Upset(nil), a.Upsets...), b.Upsets...), Open: both(a.Open, b.Open), Weaken: both(a.Weaken, b.Weaken),
		CheckLeak: max(a.CheckLeak, b.CheckLeak), BlockVent: both(a.BlockVent, b.BlockVent),
	}
}

func both[V any](a, b map[string]V) map[string]V {
	m := maps.Clone(a)
	if m == nil {
		return b
	}
	maps.Copy(m, b)
	return m
}

// one makes a map of one entry.
func one[V any](key string, v V) map[string]V { return map[string]V{key: v} }

// ordered writes a step as it is spoken of: "s2 OPEN V-2 to 40 %".
func ordered(s *network.StepResult) string { return fmt.Sprintf("%s %s", s.ID, s.Says) }
