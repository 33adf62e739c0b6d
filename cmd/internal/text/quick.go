package text

import (
	"io"
	"strings"

	"headfall/network"
)

// QuickResult is what quick gives back: SI units, unit in the key.
type QuickResult struct {
	Schema   int      `json:"schema"`
	Command  string   `json:"command"`
	ExitCode int      `json:"exit_code"`
	Complete bool     `json:"complete"`
	Emptied  *float64 `json:"emptied_at_s"`
	Low      *float64 `json:"emptied_low_s"`
	High     *float64 `json:"emptied_high_s"`
	EmptyAt  *float64 `json:"empty_at_m"`
	Half     *float64 `json:"half_at_s"`
	Volume   float64  `json:"start_volume_m3"`
	Peak     float64  `json:"peak_flow_m3_s"`
	Left     float64  `json:"left_m3"`
	End      float64  `json:"end_level_m"`

	doubts []string
}

// QuickOf takes the answer out of a run.
func QuickOf(r *network.Result) QuickResult {
	v := r.Vessels["VESSEL"]
	q := QuickResult{Schema: 1, Command: "quick", Complete: r.Complete, Emptied: v.EmptiedAt, EmptyAt: v.EmptyAtLevel, Volume: v.StartVolume,
		Peak: r.Lines["LINE"].PeakFlow, Left: v.EndVolume, End: v.EndLevel}
	if b, ok := r.Bands["emptied_at_s"]["VESSEL"]; ok {
		q.Low, q.High = b.Low, b.High
	}
	for _, m := range r.Milestones {
		q.Half = m.At
	}
	if q.Emptied == nil {
		q.ExitCode = 1
	}
	for _, a := range r.Assumptions {
		q.doubts = append(q.doubts, strings.ReplaceAll(strings.TrimPrefix(strings.TrimPrefix(a.What, "VESSEL."), "LINE."), "VALVE.", ""))
	}
	return q
}

// Quick writes three lines: when it is empty, what flows, and what that rests on.
func Quick(w io.Writer, plant *network.Plant, q *QuickResult, what string, opt Options) error {
	p := asked(w, plant, opt)
	if q.Emptied == nil {
		p.first("DOES NOT EMPTY", network.DoNotRun, "it stays at "+p.units.LevelOf(q.End, Up)+", "+p.units.VolumeOf(q.Left, Up))
	} else {
		p.first("EMPTY in "+Duration(*q.Emptied, Up)+p.quickBand(q), network.Run, p.quickEnd(q))
	}
	if opt.Quiet {
		return p.err
	}
	said := p.units.FlowOf(q.Peak, Up) + " at most, " + p.units.VolumeOf(q.Volume, Near) + " in all"
	if q.Half != nil {
		said += "; half of it is out after " + Duration(*q.Half, Up)
	}
	p.put("Flow", "%s", said)
	rests := what + ", water; a planning estimate"
	if len(q.doubts) > 0 {
		rests += ", allowing for " + strings.Join(q.doubts, ", ")
	}
	p.put("Rests on", "%s", rests)
	return p.err
}

// quickBand writes ", band 1 h 8 min to 1 h 16 min".
func (p *page) quickBand(q *QuickResult) string {
	if q.Low == nil || q.High == nil {
		return ""
	}
	return ", band " + Duration(*q.Low, Down) + " to " + Duration(*q.High, Up)
}

// quickEnd says at what time and at what level it counts as empty.
func (p *page) quickEnd(q *QuickResult) string {
	said := "down to " + figures(1000**q.EmptyAt, 3, 1, Up) + " mm"
	if !p.clock.Start.IsZero() {
		said = "by " + p.clock.At(*q.Emptied, Up) + ", " + said
	}
	return said
}
