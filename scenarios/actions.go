package scenarios

import (
	"fmt"

	"headfall/elements"
	"headfall/elements/quantity"
	"headfall/network"
)

var actionKeys = []string{"valve", "pump", "inflow", "vent", "cancel", "hold"}

// action checks what a step does and reads its `to`.
func (d *decoder) action(s *step, n *node) bool {
	if _, ok := d.one(n, "step "+s.ID, actionKeys...); !ok {
		return false
	}
	if s.Action == network.HoldPoint && s.thing != nil {
		s.thing.class = aHold
	}
	ok := d.belongs(s, n, "over", network.MoveValve, "a valve is moved over a time")
	ok = d.belongs(s, n, "up_to", network.HoldPoint, "only a hold lasts up to a time") && ok
	ok = d.reading(s, n) && ok
	return d.target(s, n) && d.freedom(s) && ok
}

// belongs refuses a key that only another action has.
func (d *decoder) belongs(s *step, n *node, key string, action network.ActionKind, why string) bool {
	v := n.get(key)
	if v != nil && s.Action != action {
		d.problem(v, fmt.Sprintf("step %s: %s does not go with %s", s.ID, key, actionKeys[s.Action]), why)
		return false
	}
	if v == nil && key == "up_to" && s.Action == network.HoldPoint {
		d.problem(n, fmt.Sprintf("hold %s needs up_to", s.ID), "the longest time it may last, e.g. up_to: 30 min")
		return false
	}
	return true
}

// reading checks that a reading has its place and its time.
func (d *decoder) reading(s *step, n *node) bool {
	read, after := n.get("read"), n.get("check_after")
	switch {
	case read == nil && after != nil:
		d.problem(after, fmt.Sprintf("step %s: check_after needs read", s.ID), "write which vessel is read, e.g. read: T-1")
	case read != nil && after == nil:
		d.problem(read, fmt.Sprintf("step %s: read needs check_after", s.ID), "write when it is read, e.g. check_after: 10 min")
	default:
		return true
	}
	return false
}

// target reads `to` by the action.
func (d *decoder) target(s *step, n *node) bool {
	noTarget := s.Action == network.HoldPoint || s.Action == network.CancelBatch
	switch {
	case noTarget && s.to != nil:
		d.problem(s.to, fmt.Sprintf("step %s: to does not go with %s", s.ID, actionKeys[s.Action]), "leave it out")
		return false
	case noTarget:
		return true
	case s.to == nil:
		d.problem(n, fmt.Sprintf("step %s needs to", s.ID), map[network.ActionKind]string{network.MoveValve: "e.g. to: 40 %", network.SetPump: "off, on, auto or standby",
			network.SetInflow: "e.g. to: 0 m3/h", network.SetVent: "open or shut"}[s.Action])
		return false
	}
	switch s.Action {
	case network.SetPump:
		mode, ok := d.mode(s.to, "to")
		s.Mode = mode
		return ok
	case network.SetVent:
		open, ok := d.isOpen(s.to, "to")
		if open {
			s.To = 1
		}
		return ok
	case network.SetInflow:
		return d.toNumber(s, quantity.Flow, elements.NotNegative)
	}
	return d.toNumber(s, quantity.Ratio, elements.Share)
}

func (d *decoder) toNumber(s *step, dim quantity.Dim, check elements.Check) bool {
	v, ok := d.quantity(s.to, "to", dim)
	if !ok || !d.check(s.to, "to", v, []elements.Check{check}) {
		return false
	}
	s.To = v.SI
	d.register(s.to, s.ID, "to", v, &s.Step.To, []elements.Check{check})
	return true
}

// freedom reads what plan may move.
func (d *decoder) freedom(s *step) bool {
	if s.free == nil {
		return true
	}
	f := &network.Free{At: [2]float64{nan, nan}, To: [2]float64{nan, nan}}
	if !d.mapping(s.free, "free", "", d.freeFields(f, s.Action)) {
		return false
	}
	if s.free.get("at") != nil && !s.At.Given {
		d.problem(s.free, fmt.Sprintf("step %s: its time is free, so it needs one to begin with", s.ID), `write at: "08:00"`)
		return false
	}
	s.Free = f
	return true
}

func (d *decoder) freeFields(f *network.Free, action network.ActionKind) []field {
	dim, check := quantity.Ratio, elements.Check(elements.Share)
	if action == network.SetInflow {
		dim, check = quantity.Flow, elements.NotNegative
	}
	pair := func(key, help string, to *[2]float64, w writing, one func(n *node) (float64, bool)) field {
		return field{key: key, help: help, written: &writing{style: aList, item: &w, least: 2}, read: func(n *node, _ string) { d.pair(n, key, to, one) }}
	}
	return []field{
		pair("at", "earliest and latest time", &f.At, writing{style: aMoment}, func(n *node) (float64, bool) {
			m, ok := d.moment(n, "at")
			return m.S, ok
		}),
		pair("to", "least and most", &f.To, writing{style: aQuantity, dim: dim}, func(n *node) (float64, bool) {
			if action != network.MoveValve && action != network.SetInflow {
				d.problem(n, "free to: only travel and inflow can be free", "leave to out of free")
				return 0, false
			}
			v, ok := d.fixed(n, "to", dim, check)
			return v.SI, ok
		}),
	}
}

// pair reads two values, the second not under the first.
func (d *decoder) pair(n *node, key string, to *[2]float64, one func(n *node) (float64, bool)) {
	if n.form != list || len(n.items) != 2 {
		d.problem(n, key+" is two values: from and to", "e.g. "+key+": "+map[string]string{"at": `["07:00", "09:00"]`, "to": "[10 %, 100 %]"}[key])
		return
	}
	a, okA := one(n.items[0])
	b, okB := one(n.items[1])
	if okA && okB && b < a {
		d.problem(n, key+": the second value is under the first", "write the lower one first")
		return
	}
	*to = [2]float64{a, b}
}
