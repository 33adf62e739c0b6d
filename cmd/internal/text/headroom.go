package text

import (
	"math"
	"sort"

	"headfall/network"
)

// headroom writes a row for every vessel, limit or not, the one with the least room first.
func (p *page) headroom() {
	vessels := p.byRoom()
	if len(vessels) == 0 {
		return
	}
	rows := [][]string{{"Headroom", "start", "peak", "when", "to alarm", "to sill", "to rim", "empty", ""}}
	for _, tag := range vessels {
		r := p.res.Vessels[tag]
		empty := "-"
		if r.EmptiedAt != nil {
			empty = p.clock.At(*r.EmptiedAt, Up)
		}
		rows = append(rows, []string{
			pad(tag, indent-2), p.units.LevelOf(r.StartLevel, Near), p.units.LevelOf(r.PeakLevel, Up), p.clock.At(r.PeakAt, Near),
			p.room(r.HeadroomTo.Alarm), p.room(r.HeadroomTo.Sill), p.room(r.HeadroomTo.Rim), empty, p.judged(tag),
		})
	}
	p.raw("\n" + table(rows, len(rows[0])-1) + "\n")
}

// room writes a headroom; a dash where there is no such height.
func (p *page) room(m *float64) string {
	if m == nil {
		return "-"
	}
	return p.units.LevelOf(*m, Down)
}

// byRoom returns the vessels, least headroom first.
func (p *page) byRoom() []string {
	var tags []string
	for _, v := range p.plant.Vessels {
		if p.res.Vessels[v.Tag] != nil {
			tags = append(tags, v.Tag)
		}
	}
	sort.SliceStable(tags, func(i, j int) bool {
		return least(p.res.Vessels[tags[i]].HeadroomTo) < least(p.res.Vessels[tags[j]].HeadroomTo)
	})
	return tags
}

func least(h network.Headroom) float64 {
	m := math.Inf(1)
	for _, x := range []*float64{h.Alarm, h.Sill, h.Rim} {
		if x != nil {
			m = math.Min(m, *x)
		}
	}
	return m
}

// judged is the worst verdict among the limits that name the vessel, and whether it spills.
func (p *page) judged(tag string) string {
	worst, found := 3, false
	for _, l := range p.res.Limits {
		for _, of := range l.Of {
			if of == tag {
				worst, found = min(worst, gravity(l.Verdict)), true
			}
		}
	}
	said := ""
	if found {
		said = []string{"FAILS", "too close", "not judged", "holds"}[worst]
	}
	if r := p.res.Vessels[tag]; r.Spilled > 0 {
		said = join([]string{said, "spills " + p.units.VolumeOf(r.Spilled, Up)}, ", ")
	}
	return said
}
