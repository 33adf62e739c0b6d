package viz

import (
	"sort"

	"headfall/network"
)

// event is a moment that playback can go to.
type event struct {
	T    float64 `json:"t"`
	Says string  `json:"says"`
}

// events lists the moments of a run in time order: steps, first fails, flags, spills, vessels emptied, milestones.
func events(plant *network.Plant, r *network.Result, rows []sheetRow) []event {
	all := []event{{0, "start"}}
	add := func(t *float64, says string) {
		if t != nil && finite(*t) {
			all = append(all, event{*t, short(clean(says), 120)})
		}
	}
	for _, s := range rows {
		if s.Hold {
			add(s.at, "hold: "+s.Action)
		} else {
			add(s.at, "step "+s.N+": "+s.Action)
		}
	}
	for _, l := range r.Limits {
		if l.Verdict == network.Fails {
			add(l.FirstFail, "fails: "+l.Says)
		}
	}
	for _, v := range plant.Vessels {
		if q := r.Vessels[v.Tag]; q != nil {
			add(q.EmptiedAt, v.Tag+" empty")
			add(q.FirstSpill, v.Tag+" spills")
			add(q.SpillEnds, v.Tag+" stops spilling")
		}
	}
	for _, f := range r.Flags {
		from := f.From
		add(&from, f.Says)
	}
	for _, a := range r.Alarms {
		add(a.At, a.Vessel+" "+a.Name)
	}
	for _, m := range r.Milestones {
		add(m.At, m.Name)
	}
	end := r.End
	add(&end, "end")
	for i := range all {
		all[i].T = round10(all[i].T)
	}
	sort.SliceStable(all, func(a, b int) bool { return all[a].T < all[b].T })
	return all
}
