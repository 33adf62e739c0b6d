package viz

import (
	"fmt"
	"math"

	"headfall/network"
	"headfall/viz/export"
)

const (
	levelsAPanel = 4 // with rims, sills, alarms and limits more cannot be told apart
	linesAPanel  = 6
)

// group is charts of one kind under one heading.
type group struct {
	ID, Title, Note string
	Charts          []chart
}

// groups makes every chart of the page: all levels, flows, openings, gas and crest pressures.
func (h *charter) groups() []group {
	var all []group
	add := func(g group) {
		if len(g.Charts) > 0 {
			all = append(all, g)
		}
	}
	add(group{"levels", "Levels", "Above each vessel's base. Thin lines: rim; dashes: overflow sill; dots: alarm; heavy: limit, with the forbidden side tinted. " +
		"Triangle: peak. Tinted band and whiskers: 5 to 95 % of the samples.", h.panels("levels", "level", "Levels", h.u.Level, h.levels(), levelsAPanel)})
	add(group{"flows", "Flows", "Positive in the line's direction.", h.panels("flows", "flow", "Flows", h.u.Flow, h.flows(), linesAPanel)})
	add(group{"openings", "Openings", "Travel of valves; a running pump is at 100 %.", h.panels("openings", "opening", "Openings", h.u.Share, h.openings(), linesAPanel)})
	gas := h.u.Pressure
	gas.Name += "(g)"
	add(group{"gas", "Gas pressures", "Over atmosphere, in covered vessels. Heavy lines: what the cover withstands.",
		h.panels("gas", "gas", "Gas pressures", gas, h.gas(), linesAPanel)})
	add(group{"crests", "Pressures at high points", "As gauge head in metres of the liquid, in the unit of levels.",
		h.panels("crests", "crest", "Pressures at high points", h.u.Level, h.crests(), linesAPanel)})
	return all
}

// panels splits curves into panels of at most most, about equally full.
func (h *charter) panels(id, unitKey, title string, u unit, curves []curve, most int) []chart {
	n := (len(curves) + most - 1) / most
	var out []chart
	for i := range n {
		part := curves[i*len(curves)/n : (i+1)*len(curves)/n]
		words := title
		if n > 1 {
			words = fmt.Sprintf("%s, %d of %d: %s to %s", title, i+1, n, part[0].name, part[len(part)-1].name)
		}
		out = append(out, h.build(fmt.Sprintf("%s-%d", id, i+1), unitKey, words, u, part))
	}
	return out
}

func (h *charter) levels() []curve {
	var out []curve
	for _, v := range h.plant.Vessels {
		key := "level/" + v.Tag
		if !h.set.Keys[key] {
			continue
		}
		c := curve{key: key, name: v.Tag, marks: vesselLines(h.plant, h.r, v.Tag), toward: later, spread: bandOf(h.r, v.Tag)}
		if q := h.r.Vessels[v.Tag]; q != nil {
			c.peak, c.peakT, c.peakV = true, q.PeakAt, q.PeakLevel
			if b, ok := h.r.Bands["peak_level_m"][v.Tag]; ok && wide(b) && finite(q.PeakAt) {
				c.bands = append(c.bands, [2][2]float64{{q.PeakAt, *b.Low}, {q.PeakAt, *b.High}})
			}
			if b, ok := h.r.Bands["emptied_at_s"][v.Tag]; ok && wide(b) && q.EmptyAtLevel != nil {
				c.bands = append(c.bands, [2][2]float64{{*b.Low, *q.EmptyAtLevel}, {*b.High, *q.EmptyAtLevel}})
			}
		}
		out = append(out, c)
	}
	return out
}

func wide(b network.Band) bool {
	return b.Low != nil && b.High != nil && finite(*b.Low) && finite(*b.High) && *b.Low < *b.High
}

func (h *charter) flows() []curve {
	var out []curve
	for _, l := range h.plant.Lines {
		key := "flow/" + l.Tag
		if !h.set.Keys[key] {
			continue
		}
		c := curve{key: key, name: l.Tag, marks: h.bounds("flow", l.Tag), toward: later}
		if q := h.r.Lines[l.Tag]; q != nil {
			c.peak, c.peakT, c.peakV = true, q.PeakFlowAt, q.PeakFlow
			if math.Abs(q.LowFlow) > math.Abs(q.PeakFlow) {
				c.peakT, c.peakV = q.LowFlowAt, q.LowFlow
			}
		}
		out = append(out, c)
	}
	for _, o := range h.plant.Outside {
		if key := "into/" + o.Tag; h.set.Keys[key] {
			out = append(out, curve{key: key, name: "all into " + o.Tag, marks: h.bounds("flow", o.Tag)})
		}
	}
	return out
}

// bounds returns the limits on one subject of one tag.
func (h *charter) bounds(subject, tag string) []mark {
	var out []mark
	for _, l := range h.r.Limits {
		if l.Subject == subject && len(l.Of) == 1 && l.Of[0] == tag && l.BoundSI != nil && finite(*l.BoundSI) && (l.Bound == "above" || l.Bound == "below") {
			out = append(out, mark{Kind: "limit", Words: "limit", At: *l.BoundSI, Above: l.Bound == "below", From: l.Window[0], To: l.Window[1]})
		}
	}
	return out
}

func (h *charter) openings() []curve {
	var out []curve
	for _, tag := range export.Movers(h.plant) {
		for _, what := range []string{"opening/", "running/"} {
			if h.set.Keys[what+tag] {
				out = append(out, curve{key: what + tag, name: tag})
			}
		}
	}
	return out
}

func (h *charter) gas() []curve {
	var out []curve
	for _, v := range h.plant.Vessels {
		key := "gas/" + v.Tag
		if !h.set.Keys[key] {
			continue
		}
		c := curve{key: key, name: v.Tag}
		if v.Cover != nil && finite(v.Cover.Vacuum) {
			c.marks = append(c.marks, mark{Kind: "limit", Words: "vacuum rating", At: -v.Cover.Vacuum})
		}
		if v.Cover != nil && finite(v.Cover.Overpress) {
			c.marks = append(c.marks, mark{Kind: "limit", Words: "pressure rating", At: v.Cover.Overpress, Above: true})
		}
		out = append(out, c)
	}
	return out
}

func (h *charter) crests() []curve {
	var out []curve
	for _, l := range h.plant.Lines {
		if key := "crest/" + l.Tag; h.set.Keys[key] {
			out = append(out, curve{key: key, name: l.Tag, marks: h.bounds("crest", l.Tag)})
		}
	}
	return out
}
