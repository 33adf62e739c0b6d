package viz

import (
	"math"

	"headfall/elements"
	"headfall/elements/shape"
	"headfall/network"
)

// spot is one thing that stands on the drawing.
type spot struct {
	tag       string
	vessel    *network.Vessel
	tee       *network.Tee
	outside   *network.Outside
	beyond    *elements.Outside
	low, high float64 // m over datum
	outline   []shape.Point
	across    float64 // px/m across, of a vessel
	x, w      float64 // px: middle and width
	y0, y1    float64 // px: what it takes up, labels included
	box       [4]float64
	col       int
	ports     []*port
}

// collect lists what is to be drawn with its heights.
func (k *canvas) collect() {
	add := func(s *spot) {
		if k.byTag[s.tag] == nil {
			k.spots = append(k.spots, s)
			k.byTag[s.tag] = s
		}
	}
	for _, v := range k.plant.Vessels {
		s := &spot{tag: v.Tag, vessel: v, low: v.Base}
		if v.Shape != nil {
			s.outline = v.Shape.Outline()
			s.high = v.Base + v.Shape.Height()
		}
		if len(s.outline) < 3 || !finite(s.high) || s.high <= s.low {
			s.outline = []shape.Point{{X: 0.5, Y: 0}, {X: 0.5, Y: 1}, {X: -0.5, Y: 1}, {X: -0.5, Y: 0}}
			s.high = v.Base + 1
		}
		add(s)
	}
	for _, o := range k.plant.Outside {
		s := &spot{tag: o.Tag, outside: o}
		if o.Element != nil {
			s.beyond = o.Element.Outside()
		}
		if s.beyond == nil {
			s.beyond = &elements.Outside{}
		}
		s.low, s.high = s.beyond.Elevation, s.beyond.Elevation
		if n := len(s.beyond.Surface); n > 0 {
			s.low, s.high = math.Inf(1), math.Inf(-1)
			for _, row := range s.beyond.Surface {
				s.low, s.high = math.Min(s.low, row[1]), math.Max(s.high, row[1])
			}
		}
		add(s)
	}
	for _, t := range k.plant.Tees {
		s := &spot{tag: t.Tag, tee: t, low: t.Elevation, high: t.Elevation}
		if !finite(t.Elevation) {
			s.low = k.guess(t.Tag)
			s.high = s.low
		}
		add(s)
	}
}

// guess gives a tee without an elevation one for the drawing: the lowest end of the lines that meet there.
func (k *canvas) guess(tag string) float64 {
	z := math.Inf(1)
	for _, l := range k.plant.Lines {
		if l.From != tag && l.To != tag {
			continue
		}
		for i, end := range []string{l.From, l.To} {
			if s := k.byTag[end]; s != nil && end != tag {
				z = math.Min(z, s.low+portHeight([]network.Port{l.Leaves, l.Enters}[i]))
			}
		}
	}
	if !finite(z) {
		return 0
	}
	return z
}

func portHeight(p network.Port) float64 {
	if p.Form == network.Bottom || !finite(p.Height) {
		return 0
	}
	return p.Height
}

// measure gives every spot its width and the room it takes up and down.
func (k *canvas) measure() {
	lines := map[string]int{}
	for _, l := range k.plant.Lines {
		lines[l.From]++
		lines[l.To]++
	}
	for _, s := range k.spots {
		switch {
		case s.vessel != nil:
			half := 0.0
			for _, p := range s.outline {
				half = math.Max(half, math.Abs(p.X))
			}
			if half == 0 {
				half = 0.5
			}
			s.across = k.scale
			if w := 2 * half * k.scale; w > 190 || w < 40 {
				s.across = math.Min(math.Max(w, 40), 190) / (2 * half)
				k.squeezed = true
			}
			s.w = 2 * half * s.across
			s.y0, s.y1 = k.y(s.high)-labelPx-17, k.y(s.low)+18
			s.box = [4]float64{-s.w/2 - 5, k.y(s.high) - labelPx - 13, s.w/2 + 5, k.y(s.low) + 5}
		case s.tee != nil:
			s.w = math.Max(float64(lines[s.tag])*11, 22)
			y := k.y(s.low)
			s.y0, s.y1 = y-26, y+30
			s.box = [4]float64{-s.w/2 - 3, y - 4, s.w/2 + 12 + 6.5*float64(len([]rune(short(s.tag, 12)))), y + 4}
		default:
			s.w = math.Max(float64(lines[s.tag])*11+12, 46)
			s.y0, s.y1 = k.y(s.high)-24, k.y(s.low)+40
			s.box = [4]float64{-s.w / 2, k.y(s.high) - 2, s.w / 2, k.y(s.low) + 32}
		}
	}
}

// slack is the width of the widest label that a spot carries, px.
func (s *spot) slack() float64 { return math.Max(s.w, 78) }
