package viz

import (
	"html/template"
	"math"

	"headfall/elements"
	"headfall/network"
)

// The plant in elevation: one vertical scale and datum for everything; across, things stand in columns in the order that the liquid takes.
const (
	headroomPx = 30.0 // over the highest thing
	footPx     = 46.0 // under the lowest
	labelPx    = 34.0 // over a vessel, for its tag and its level
	railPx     = 58.0 // on the left, for the elevations
	leastScale = 0.62 // on a narrow window the drawing shrinks to this share; then it scrolls
)

// sheet of the drawing.
type canvas struct {
	plant         *network.Plant
	result        *network.Result
	u             units
	c             clock
	top, low      float64 // m over datum
	scale         float64 // px/m
	width, height float64
	spots         []*spot
	byTag         map[string]*spot
	routes        []*route
	squeezed      bool
}

// y turns an elevation into a coordinate.
func (k *canvas) y(z float64) float64 { return headroomPx + labelPx + (k.top-z)*k.scale }

// picture is the drawing with what playback needs to move it.
type picture struct {
	SVG      template.HTML
	Squeezed bool
	Broad    bool // too wide to be read on upright paper
	Live     live
}

// elevation draws the plant as it stands at the start; playback moves it.
func elevation(plant *network.Plant, r *network.Result, u units, c clock) picture {
	k := &canvas{plant: plant, result: r, u: u, c: c, byTag: map[string]*spot{}}
	k.collect()
	k.choose()
	k.measure()
	k.place()
	k.connect()
	var d drawing
	d.open("svg", "viewBox", "0 0 "+px(k.width)+" "+px(k.height), "width", k.width, "height", k.height, "style", "max-width:"+px(k.width)+"px;min-width:"+px(leastScale*k.width)+"px", "class", "plant", "id", "plant-svg",
		"role", "img", "aria-labelledby", "plant-title plant-desc")
	d.open("title", "id", "plant-title")
	d.WriteString("Plant in elevation")
	d.end("title")
	d.open("desc", "id", "plant-desc")
	d.WriteString("Vessels, lines and outside points at their true heights; the table after the drawing says the same in numbers.")
	d.end("desc")
	k.drawRail(&d)
	l := live{}
	for _, s := range k.spots {
		if s.vessel != nil {
			k.drawVessel(&d, s, &l)
		}
	}
	for i, rt := range k.routes {
		k.drawWay(&d, i, rt)
	}
	for i, rt := range k.routes {
		k.drawParts(&d, i, rt, &l)
	}
	for _, s := range k.spots {
		switch {
		case s.tee != nil:
			k.drawTee(&d, s)
		case s.outside != nil:
			k.drawOutside(&d, s, &l)
		}
	}
	d.end("svg")
	return picture{SVG: d.done(), Squeezed: k.squeezed, Broad: k.width > 1100, Live: l}
}

// choose finds the extent in height and the scale: the smallest vessel must stay readable and the sheet of a handy size.
func (k *canvas) choose() {
	k.top, k.low = math.Inf(-1), math.Inf(1)
	least := math.Inf(1)
	for _, s := range k.spots {
		k.top, k.low = math.Max(k.top, s.high), math.Min(k.low, s.low)
		if s.vessel != nil && s.high > s.low {
			least = math.Min(least, s.high-s.low)
		}
	}
	for _, l := range k.plant.Lines {
		for _, f := range l.Parts {
			if h, ok := f.Part.(elements.Humps); ok {
				k.top, k.low = math.Max(k.top, h.Crown().Elevation), math.Min(k.low, h.Crown().Elevation)
			}
		}
	}
	if !finite(k.top) || !finite(k.low) {
		k.top, k.low = 1, 0
	}
	span := k.top - k.low
	if span <= 0 {
		span = math.Max(math.Abs(k.top)*1e-6, 1e-9)
		k.top = k.low + span
	}
	want := 420.0
	if finite(least) {
		want = math.Max(want, 56*span/least)
	}
	k.scale = math.Min(want, 900) / span
	k.height = headroomPx + labelPx + footPx + span*k.scale
}

// drawRail draws the elevations on the left and their lines across.
func (k *canvas) drawRail(d *drawing) {
	step := niceStep((k.top - k.low) / 7)
	d.open("g", "class", "rail", "aria-hidden", "true")
	dec := max(0, -int(math.Floor(math.Log10(step)+1e-9)))
	for z := math.Ceil(k.low/step-1e-9) * step; z <= k.top+step*1e-6; z += step {
		y := k.y(z)
		d.el("line", "x1", railPx-8, "y1", y, "x2", k.width-6, "y2", y)
		if dec < 8 && math.Abs(z) < 1e6 {
			d.text(railPx-12, y+4, "elev", fixedPlaces(z, dec))
		} else {
			d.text(railPx-12, y+4, "elev", digits(z, 4))
		}
	}
	d.text(railPx-12, 22, "elev", "m")
	d.end("g")
}

// niceStep returns 1, 2 or 5 times a power of ten, at least about x.
func niceStep(x float64) float64 {
	if !(x > 0) {
		return 1
	}
	p := math.Pow(10, math.Floor(math.Log10(x)))
	for _, m := range []float64{1, 2, 5, 10} {
		if x <= m*p*1.0001 {
			return m * p
		}
	}
	return 10 * p
}

func fixedPlaces(x float64, dec int) string {
	if math.Abs(x) < 0.5*math.Pow10(-dec) {
		x = 0
	}
	return places(x, dec)
}
