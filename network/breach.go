package network

import (
	"fmt"

	"headfall/elements/quantity"
)

// breached tells that what a covered vessel spilled had no way out but through what gave way: it has no vent that passes anything.
func (sim *simulation) breached(v *Vessel) bool {
	return v.Cover != nil && sim.sys.tightNow(sim.sys.vesselAt[v.Tag])
}

// breachFlag says that a vessel was filled to its roof with no vent open.
func (sim *simulation) breachFlag(v *Vessel, x *VesselResult) *Flag {
	p, vol := sim.plan, x.Spilled
	f := &Flag{Kind: "pressure_rating", Where: v.Tag, From: 0, To: 0, Size: &vol,
		Says: fmt.Sprintf("%s is full and sealed: what fills it bursts it, lifts its roof or comes to a stand; %s is booked as spilled, and its pressure from then on means nothing",
			v.Tag, quantity.Format(vol, quantity.Volume, p.Show.Volume, 3)),
		Do: "open a vent before it is filled, and stop what fills it well below its roof"}
	if x.FirstSpill != nil && x.SpillEnds != nil {
		f.From, f.To = *x.FirstSpill, *x.SpillEnds
	}
	return f
}
