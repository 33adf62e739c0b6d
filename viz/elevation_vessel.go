package viz

import (
	"fmt"
	"math"

	"headfall/elements/shape"
)

// drawVessel draws a vessel in its shape with liquid, marks and labels.
func (k *canvas) drawVessel(d *drawing, s *spot, l *live) {
	v, q := s.vessel, k.result.Vessels[s.tag]
	id := fmt.Sprintf("v%d", len(l.Vessels))
	top, bottom := k.y(s.high), k.y(s.low)
	poly := make([][2]float64, len(s.outline))
	for i, p := range s.outline {
		poly[i] = [2]float64{s.x + p.X*s.across, bottom - p.Y*k.scale}
	}
	level, peak := v.Level, math.NaN()
	if q != nil {
		level, peak = q.StartLevel, q.PeakLevel
	}
	if !finite(level) {
		level = 0
	}
	d.open("g", "class", "vessel", "id", id)
	d.title(k.vesselWords(s))
	d.open("clipPath", "id", id+"-in")
	d.el("polygon", "points", dots(poly))
	d.end("clipPath")
	d.el("polygon", "points", dots(poly), "class", "inside")
	h := math.Min(math.Max(level, 0), s.high-s.low) * k.scale
	d.open("g", "clip-path", "url(#"+id+"-in)")
	d.el("rect", "x", s.x-s.w/2, "y", bottom-h, "width", s.w, "height", h, "class", "liquid", "id", id+"-liquid")
	d.el("line", "x1", s.x-s.w/2, "x2", s.x+s.w/2, "y1", bottom-h, "y2", bottom-h, "class", "surface", "id", id+"-surface")
	d.end("g")
	if v.Cover == nil {
		d.el("polyline", "points", dots(opened(s.outline, poly)), "class", "wall")
	} else {
		d.el("polygon", "points", dots(poly), "class", "wall")
	}
	k.vesselMarks(d, s, peak)
	d.text(s.x, top-19, "tag", short(s.tag, 14))
	d.text(s.x, top-6, "read", k.u.Level.With(level), "id", id+"-text")
	if q != nil && q.Gas != nil {
		d.text(s.x, top+14, "gas", "", "id", id+"-gas")
	}
	d.end("g")
	l.Vessels = append(l.Vessels, liveVessel{ID: id, Tag: s.tag, Key: "level/" + s.tag, Gas: "gas/" + s.tag, Bottom: coord(bottom), Scale: coord(k.scale),
		Height: s.high - s.low, Rim: rimOf(v)})
}

// vesselMarks draws rim, sills, alarms, limits and the peak as ticks on the walls.
func (k *canvas) vesselMarks(d *drawing, s *spot, peak float64) {
	for _, m := range vesselLines(k.plant, k.result, s.tag) {
		if m.At < 0 || m.At > s.high-s.low+1e-9 {
			continue
		}
		y := k.y(s.low + m.At)
		half := s.halfAt(m.At) * s.across
		d.open("g", "class", "mark "+m.Kind)
		d.title(m.Words + " " + k.u.Level.With(m.At))
		if m.Kind == "limit" || m.Kind == "rim" {
			d.el("line", "x1", s.x-half, "x2", s.x+half, "y1", y, "y2", y)
		} else {
			d.el("line", "x1", s.x+half-9, "x2", s.x+half+4, "y1", y, "y2", y)
		}
		d.end("g")
	}
	if finite(peak) && peak >= 0 {
		y := k.y(s.low + math.Min(peak, s.high-s.low))
		x := s.x - s.halfAt(peak)*s.across
		d.open("g", "class", "mark peak")
		d.title("Peak " + k.u.Level.With(peak))
		d.el("polygon", "points", dots([][2]float64{{x - 1, y}, {x - 8, y - 4}, {x - 8, y + 4}}))
		d.end("g")
	}
}

func (k *canvas) vesselWords(s *spot) string {
	words := s.tag + ": " + plainKind(s.vessel.Kind) + ", base at " + digits(s.low, 5) + " m"
	if q := k.result.Vessels[s.tag]; q != nil {
		words += fmt.Sprintf("; start %s, peak %s at %s, end %s", k.u.Level.With(q.StartLevel), k.u.Level.With(q.PeakLevel),
			k.c.At(q.PeakAt, near), k.u.Level.With(q.EndLevel))
	}
	return words
}

// opened returns the outline without its top edge: an open vessel.
func opened(outline []shape.Point, poly [][2]float64) [][2]float64 {
	best, length, top := -1, 0.0, math.Inf(-1)
	for _, p := range outline {
		top = math.Max(top, p.Y)
	}
	n := len(outline)
	for i, a := range outline {
		b := outline[(i+1)%n]
		if w := math.Abs(a.X - b.X); a.Y > top-1e-9 && b.Y > top-1e-9 && w > length {
			best, length = i, w
		}
	}
	if best < 0 {
		return append(append([][2]float64(nil), poly...), poly[0])
	}
	out := make([][2]float64, 0, n)
	for i := range n {
		out = append(out, poly[(best+1+i)%n])
	}
	return out
}

func coord(x float64) float64 { return math.Round(x*1000) / 1000 }
