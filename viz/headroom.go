package viz

import (
	"math"
	"sort"

	"headfall/network"
)

// headroomRow is one vessel of the headroom table.
type headroomRow struct {
	Tag, Start, Peak, When, Alarm, Sill, Rim, Empty, Band string
	Verdict, Class                                        string
	AlarmBad, SillBad, RimBad                             bool
	T                                                     float64
	least                                                 float64
}

// headroom lists every vessel, the one with the least headroom first.
func headroom(plant *network.Plant, r *network.Result, u units, c clock) []headroomRow {
	var rows []headroomRow
	for _, v := range plant.Vessels {
		q := r.Vessels[v.Tag]
		if q == nil {
			continue
		}
		row := headroomRow{Tag: v.Tag, Start: u.Level.With(q.StartLevel), Peak: u.Level.Toward(q.PeakLevel, later), When: c.At(q.PeakAt, near), T: q.PeakAt,
			Alarm: u.Level.Opt(q.HeadroomTo.Alarm), Sill: u.Level.Opt(q.HeadroomTo.Sill), Rim: u.Level.Opt(q.HeadroomTo.Rim),
			Empty: c.Opt(q.EmptiedAt, later), least: math.Inf(1)}
		row.AlarmBad, row.SillBad, row.RimBad = passed(q.HeadroomTo.Alarm), passed(q.HeadroomTo.Sill), passed(q.HeadroomTo.Rim)
		if b, ok := r.Bands["peak_level_m"][v.Tag]; ok && wide(b) {
			row.Band = u.Level.Text(*b.Low) + " to " + u.Level.Toward(*b.High, later)
		}
		for _, h := range []*float64{q.HeadroomTo.Alarm, q.HeadroomTo.Sill, q.HeadroomTo.Rim} {
			if h != nil && finite(*h) {
				row.least = math.Min(row.least, *h)
			}
		}
		row.Verdict, row.Class = vesselVerdict(r, v.Tag, q)
		rows = append(rows, row)
	}
	rank := map[string]int{"fail": 0, "close": 1}
	sort.SliceStable(rows, func(a, b int) bool {
		ra, oka := rank[rows[a].Class]
		rb, okb := rank[rows[b].Class]
		if !oka {
			ra = 2
		}
		if !okb {
			rb = 2
		}
		if ra != rb {
			return ra < rb
		}
		return rows[a].least < rows[b].least
	})
	return rows
}

func passed(h *float64) bool { return h != nil && *h < 0 }

// vesselVerdict is the worst of the limits that name the vessel; a vessel that spills has failed whatever they say.
func vesselVerdict(r *network.Result, tag string, q *network.VesselResult) (words, class string) {
	worst, named := network.Holds, false
	for _, l := range r.Limits {
		for _, of := range l.Of {
			if of == tag {
				named = true
				worst = graver(worst, l.Verdict)
			}
		}
	}
	switch {
	case q.Spilled > 0:
		return "SPILLS", "fail"
	case worst == network.Fails:
		return "FAILS", "fail"
	case worst == network.TooClose:
		return "too close", "close"
	case worst == network.NotJudged:
		return "not judged", "open"
	case !named:
		return "no limit", "open"
	}
	return "holds", "hold"
}

func graver(a, b network.Verdict) network.Verdict {
	rank := map[network.Verdict]int{network.Fails: 3, network.TooClose: 2, network.NotJudged: 1}
	if rank[b] > rank[a] {
		return b
	}
	return a
}
