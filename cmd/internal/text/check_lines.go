package text

import (
	"fmt"
	"strings"

	"headfall/elements"
	"headfall/network"
)

// noticed is the share of the liquid from which what stands in the lines is worth a warning.
const noticed = 0.02

// lines writes every line with its parts in order and what it holds.
func (e *echo) lines() {
	total, held := 0.0, 0.0
	for i, l := range e.plant.Lines {
		var parts []string
		for _, f := range l.Parts {
			parts = append(parts, partName(f))
		}
		v := LineVolume(l)
		total += v
		e.put(first(i, "Lines"), "%s%s to %s: %s; holds %s", stamp(l.Tag), l.From, l.To, join(parts, ", "), keep(e.units.VolumeOf(v, Near)))
	}
	for _, v := range e.plant.Vessels {
		if v.Shape != nil {
			held += v.StartVolume()
		}
	}
	if total == 0 || held == 0 {
		return
	}
	said := fmt.Sprintf("%s in all, %s %% of what the vessels hold; it is not in the balance", keep(e.units.VolumeOf(total, Near)),
		figures(100*total/held, 2, 0.1, Up))
	if total > noticed*held {
		said += ". WARNING: that is enough to shift the answer"
	}
	e.put("", "%s", said)
}

// first gives a label to the first line of a list only.
func first(i int, label string) string {
	if i == 0 {
		return label
	}
	return ""
}

func partName(f *network.Fitted) string {
	name := f.Name
	if f.Kind != nil {
		name = strings.ReplaceAll(f.Kind.Name, "_", " ")
	}
	if t, ok := f.Part.(elements.Tagged); ok && t.Tag() != "" {
		name += " " + t.Tag()
	}
	return name
}

// LineVolume returns what the parts of a line hold when full, m³.
func LineVolume(l *network.Line) float64 {
	v := 0.0
	for _, f := range l.Parts {
		if h, ok := f.Part.(elements.Holds); ok {
			v += h.Holds()
		}
	}
	return v
}
