package network

import (
	"fmt"
	"math"
)

// cautions returns the cautions that apply to this run, and the standing one first.
func cautions(p *Plant, r *Result) []string {
	all := []string{"Planning estimate from the data in the file. Check it against local rules, the site permit and a competent engineer. It replaces no isolation, gas test or independent level reading."}
	add := func(format string, a ...any) { all = append(all, fmt.Sprintf(format, a...)) }
	for _, v := range p.Vessels {
		x := r.Vessels[v.Tag]
		if v.Cover != nil {
			add("%s is covered: prove its vent open by sight before its drain is opened. Vacuum damage takes seconds. Steam, hot rinse, gas absorption and weather cooling are not in this run.", v.Tag)
		}
		if x.Gas != nil && x.Gas.LowAdiabatic != nil && x.Gas.Low < -stoppedVacuum {
			add("%s is tight and its drain works against a vacuum: where the flow slows or stops is not to be relied on. The vessel collapses, or gulps air, first.", v.Tag)
		}
		if x.EmptiedAt != nil && len(p.meets[v.Tag]) > 0 {
			add("%s is emptied but still connected: it is not isolated by this plan. Entry needs positive isolation.", v.Tag)
		}
	}
	for _, l := range p.Lines {
		x := r.Lines[l.Tag]
		if len(x.RunsBackward) > 0 {
			add("Liquid runs back through %s into %s. A shut valve on the sheet must be proved shut.", l.Tag, l.From)
		}
		if x.CrestLow != nil && *x.CrestLow < 0 {
			for _, tag := range []string{l.From, l.To} {
				if t := p.tee(tag); t != nil && math.IsNaN(t.Elevation) && p.Assume.HeaderAir != "ignored" {
					add("%s has no elevation: whether a branch of it that runs dry breaks the siphon of %s is not judged.", tag, l.Tag)
				}
			}
			add("%s runs under suction at its high point: it may break siphon, draw in air or dirt, or collapse weak pipe.", l.Tag)
		}
	}
	for _, a := range r.Alarms {
		if a.Have != nil && a.Need != nil && *a.Have < *a.Need {
			add("Alarm %s of %s gives less time than its response needs: reduce the rate, or station a person at the valve.", a.Name, a.Vessel)
		}
	}
	if len(p.Outside) > 0 {
		add("Permission, sampling and the time window of a discharge are the discharger's duty.")
	}
	return all
}

// stoppedVacuum is the vacuum, Pa, from which a tight vessel's flow is said to be unreliable: the low-pressure tank standards start near there.
const stoppedVacuum = 500
