package viz

import (
	"headfall/network"
)

// mark is a height that matters in a vessel.
type mark struct {
	Kind  string // rim, sill, alarm, limit
	Words string
	At    float64 // m over base
	Above bool    // a limit: what lies over it is forbidden
	From  *float64
	To    *float64
	place string // of its label on a chart
}

// vesselLines returns the heights that matter in a vessel: rim, overflow sills, alarms, and the limits on its level.
func vesselLines(plant *network.Plant, r *network.Result, tag string) []mark {
	var all []mark
	for _, v := range plant.Vessels {
		if v.Tag != tag {
			continue
		}
		if rim := rimOf(v); finite(rim) && v.Cover == nil {
			all = append(all, mark{Kind: "rim", Words: "rim", At: rim})
		}
		for _, a := range v.Alarms {
			if a.When.Subject == network.Level && finite(a.When.Bound) {
				all = append(all, mark{Kind: "alarm", Words: a.Name, At: a.When.Bound, Above: a.When.Above})
			}
		}
	}
	for _, l := range plant.Lines {
		if l.From == tag && l.Leaves.Form == network.Crest && finite(l.Leaves.Height) {
			all = append(all, mark{Kind: "sill", Words: "sill of " + l.Tag, At: l.Leaves.Height})
		}
	}
	for _, l := range r.Limits {
		if l.Subject == "level" && !l.Implicit && len(l.Of) == 1 && l.Of[0] == tag && l.BoundSI != nil && finite(*l.BoundSI) {
			all = append(all, mark{Kind: "limit", Words: "limit", At: *l.BoundSI, Above: l.Bound == "below", From: l.Window[0], To: l.Window[1]})
		}
	}
	return all
}
