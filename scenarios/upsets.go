package scenarios

import (
	"headfall/elements"
	"headfall/elements/quantity"
	"headfall/network"
)

// upset is an upset as it is being read.
type upset struct {
	*network.Upset
	set map[string]float64 // values by key
}

// upsetForms are the keys that belong to what is upset.
var upsetForms = map[string][]string{
	"pump":  {"fails_at"},
	"valve": {"sticks_at", "stops_at"},
	"vent":  {"blocked"},
	"line":  {"extra_k", "after_passing"},
}

var upsetKeys = []string{"pump", "valve", "vent", "line"}

// upset reads one thing that goes wrong.
func (d *decoder) upset(n *node) {
	u := &upset{Upset: &network.Upset{Place: n.at}, set: map[string]float64{}}
	if !d.mapping(n, "upset", "", d.upsetFields(u)) {
		return
	}
	what, ok := d.one(n, "upset", upsetKeys...)
	if ok && d.wholeUpset(u, what, n) {
		d.plant.Upsets = append(d.plant.Upsets, u.Upset)
	}
}

func (d *decoder) upsetFields(u *upset) []field {
	value := func(key string, dim quantity.Dim, help string, check elements.Check) field {
		return field{key: key, help: help, written: inUnits(dim), read: func(n *node, _ string) {
			if v, ok := d.fixed(n, key, dim, check); ok {
				u.set[key] = v.SI
			}
		}}
	}
	return []field{
		d.tagField(&u.Target, "pump", elements.Optional, "pump that fails", aPump),
		d.tagField(&u.Target, "valve", elements.Optional, "valve that will not move", aValve),
		d.tagField(&u.Target, "vent", elements.Optional, "vent that is blocked", aVent),
		d.tagField(&u.Target, "line", elements.Optional, "line that clogs", aLine),
		d.momentField(&u.At, "fails_at", elements.Optional, "when the pump fails"),
		value("sticks_at", quantity.Ratio, "travel at which the valve stands from the start, whatever is ordered", elements.Share),
		value("stops_at", quantity.Ratio, "travel at which a move of the valve ends", elements.Share),
		value("blocked", quantity.Ratio, "share of the vent that is blocked", elements.Share),
		value("extra_k", quantity.Number, "loss coefficient that comes in on the line's first bore", elements.NotNegative),
		value("after_passing", quantity.Volume, "volume that passes before it does; default none", elements.NotNegative),
	}
}

// wholeUpset checks that the keys go together and sets what goes wrong.
func (d *decoder) wholeUpset(u *upset, what string, n *node) bool {
	for _, other := range upsetKeys {
		for _, key := range upsetForms[other] {
			if v := n.get(key); v != nil && other != what {
				d.problem(v, key+" does not go with "+what, "it goes with "+other)
				return false
			}
		}
	}
	switch what {
	case "valve":
		key, ok := d.one(n, "upset of a valve", "sticks_at", "stops_at")
		u.Kind, u.Value = network.ValveSticks, u.set[key]
		if key == "stops_at" {
			u.Kind = network.ValveStops
		}
		return ok
	case "pump":
		u.Kind = network.PumpFails
	case "vent":
		u.Kind, u.Value = network.VentBlocked, u.set["blocked"]
	case "line":
		u.Kind, u.Value, u.After = network.ExtraLoss, u.set["extra_k"], u.set["after_passing"]
	}
	if n.get(upsetForms[what][0]) == nil {
		key := upsetForms[what][0]
		d.problem(n, "upset of a "+what+" needs "+key, "e.g. "+key+": "+map[string]string{"fails_at": "20 min", "blocked": "100 %", "extra_k": "8"}[key])
		return false
	}
	return true
}

// milestone reads one moment to report.
func (d *decoder) milestone(n *node) {
	m := &network.Milestone{Place: n.at}
	b := &bound{to: &m.When}
	whole := d.mapping(n, "milestone", "", d.milestoneFields(m, b))
	b.typo = !whole
	if d.finish(n, "milestone", b) && whole {
		d.plant.Milestones = append(d.plant.Milestones, m)
	}
}

func (d *decoder) milestoneFields(m *network.Milestone, b *bound) []field {
	return append([]field{d.freeText(&m.Name, "name", elements.Required, "what it is called")}, d.conditionFields(b)...)
}
