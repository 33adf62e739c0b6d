package text

import (
	"fmt"
	"sort"
	"strings"

	"headfall/network"
)

// finishes writes when each vessel is empty, with its band, the last one first; then what stays in those that are drained but not empty.
func (p *page) finishes() {
	type done struct {
		tag string
		at  float64
	}
	var list []done
	for _, v := range p.plant.Vessels {
		if r := p.res.Vessels[v.Tag]; r != nil && r.EmptiedAt != nil {
			list = append(list, done{v.Tag, *r.EmptiedAt})
		}
	}
	sort.SliceStable(list, func(i, j int) bool { return list[i].at > list[j].at })
	var said []string
	for _, d := range list {
		said = append(said, stamp(p.clock.When(d.at, Up))+d.tag+p.emptyBand(d.tag))
	}
	if len(said) > 0 {
		p.put("Empty by", "%s", strings.Join(said, "; "))
	}
	p.left()
}

// emptyBand writes ", band 08:14 to 08:50".
func (p *page) emptyBand(tag string) string {
	b, ok := p.res.Bands["emptied_at_s"][tag]
	switch {
	case !ok || b.Low == nil:
		return ""
	case b.High == nil:
		return " (band from " + keep(p.clock.At(*b.Low, Down)) + ", not always)"
	}
	return " (band " + keep(p.clock.At(*b.Low, Down)+" to "+p.clock.At(*b.High, Up)) + ")"
}

// left writes what stays behind in the vessels that lost liquid and are not empty.
func (p *page) left() {
	var said []string
	for _, v := range p.plant.Vessels {
		r := p.res.Vessels[v.Tag]
		if r == nil || r.EmptiedAt != nil || r.EndVolume >= r.StartVolume {
			continue
		}
		said = append(said, v.Tag+" "+p.stays(r))
	}
	if len(said) > 0 {
		label := "Not empty"
		if !p.res.Complete {
			label = "Still holds"
		}
		p.put(label, "%s", strings.Join(said, "; "))
	}
}

func (p *page) stays(r *network.VesselResult) string {
	s := keep(p.units.VolumeOf(r.EndVolume, Up)) + " at " + keep(p.units.LevelOf(r.EndLevel, Up))
	if r.LeftWhy != "" {
		s += fmt.Sprintf(" (%s)", r.LeftWhy)
	}
	return s
}
