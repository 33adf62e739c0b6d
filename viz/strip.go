package viz

import (
	"html/template"
	"math"

	"headfall/network"
	"headfall/viz/export"
)

// lane is one valve or pump of the opening strip; its bars are drawn on 1000 × 22 and stretched over the time axis.
type lane struct {
	Tag, Where string
	SVG        template.HTML
}

// tick is a numbered step over the strip, at a share of the run.
type tick struct {
	N, Title string
	Share    float64
	T        float64
	Row      int // stacked where steps come close together
}

// Left is the tick's place over the strip.
func (t tick) Left() template.CSS {
	return template.CSS("left:" + css(100*t.Share) + ";bottom:" + px(float64(23*t.Row)) + "px")
}

const (
	laneWide = 1000.0
	laneHigh = 22.0
)

// strip draws how far everything stands open over the run.
func strip(plant *network.Plant, r *network.Result) []lane {
	var out []lane
	if r.Series == nil {
		return nil
	}
	for _, tag := range export.Movers(plant) {
		v, ok := r.Series.Opening[tag]
		if !ok {
			v, ok = r.Series.Running[tag]
		}
		if !ok {
			continue
		}
		out = append(out, lane{Tag: tag, SVG: laneBars(r.Series.Time, v, r.End)})
	}
	return out
}

// laneBars draws one lane: as high as it stands open.
func laneBars(t, v []float64, end float64) template.HTML {
	var d drawing
	d.open("svg", "viewBox", "0 0 1000 22", "preserveAspectRatio", "none", "class", "lane-svg", "aria-hidden", "true", "focusable", "false")
	if !(end > 0) {
		end = 1
	}
	kept := thin(t, v, 600)
	var shape [][2]float64
	for n, i := range kept {
		if !finite(v[i]) {
			continue
		}
		x := math.Min(math.Max(t[i]/end, 0), 1) * laneWide
		y := laneHigh - (laneHigh-2)*math.Min(math.Max(v[i], 0), 1)
		if n == 0 {
			shape = append(shape, [2]float64{x, laneHigh})
		}
		shape = append(shape, [2]float64{x, y})
	}
	if n := len(shape); n > 0 {
		shape = append(shape, [2]float64{shape[n-1][0], laneHigh})
		d.el("polygon", "points", dots(shape), "class", "open")
		d.el("polyline", "points", dots(shape[1:n]), "class", "edge")
	}
	d.el("line", "x1", 0, "x2", laneWide, "y1", laneHigh-0.5, "y2", laneHigh-0.5, "class", "base")
	d.end("svg")
	return d.done()
}

// ticks numbers the steps along the time axis.
func ticks(rows []sheetRow, end float64) []tick {
	var out []tick
	last := [3]float64{-1, -1, -1}
	for _, s := range rows {
		if s.at == nil || !finite(*s.at) {
			continue
		}
		f := 0.0
		if end > 0 {
			f = math.Min(math.Max(*s.at/end, 0), 1)
		}
		n := s.N
		if s.Hold {
			n = "H"
		}
		row := 0
		for row < 2 && last[row] > f-0.035 {
			row++
		}
		last[row] = f
		out = append(out, tick{n, s.Clock + " " + s.Action, f, *s.at, row})
	}
	return out
}
