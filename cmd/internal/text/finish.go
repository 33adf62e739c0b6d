package text

import (
	"fmt"
	"sort"
	"strings"
)

// finish writes when the last vessel is empty, with its band; the others are in the table.
func (p *page) finish() {
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
	if len(list) > 0 {
		last := list[0]
		said := stamp(p.clock.When(last.at, Up)) + last.tag
		if len(list) > 1 {
			said += fmt.Sprintf(", the last of %d", len(list))
		}
		p.put("Empty by", "%s", said+p.emptyBand(last.tag))
	}
}

const leftShown = 4 // vessels that are not empty; the rest is counted

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
		said = append(said, v.Tag+" "+keep(p.units.VolumeOf(r.EndVolume, Up)+" at "+p.units.LevelOf(r.EndLevel, Up)))
	}
	if n := len(said) - leftShown; n > 0 {
		said = append(said[:leftShown], fmt.Sprintf("%d more", n))
	}
	if len(said) > 0 {
		label := "Not empty"
		if !p.res.Complete {
			label = "Still holds"
		}
		p.put(label, "%s", strings.Join(said, "; "))
	}
}
