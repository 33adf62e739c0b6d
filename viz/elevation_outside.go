package viz

import (
	"fmt"
	"math"
)

// drawTee draws where lines meet: a bar as long as the lines need.
func (k *canvas) drawTee(d *drawing, s *spot) {
	y := k.y(s.low)
	d.open("g", "class", "tee")
	words := s.tag + ": lines meet here"
	if finite(s.tee.Elevation) {
		words += ", at " + digits(s.low, 5) + " m"
	}
	d.title(words)
	d.el("rect", "x", s.x-s.w/2, "y", y-2.5, "width", s.w, "height", 5, "rx", 2.5, "class", "teebar")
	d.text(s.x+s.w/2+6, y+4, "linetag strong", short(s.tag, 12))
	d.end("g")
}

// drawOutside draws a point beyond the plant at its elevation.
func (k *canvas) drawOutside(d *drawing, s *spot, l *live) {
	o, y := s.beyond, k.y(s.high)
	x0, x1 := s.x-s.w/2, s.x+s.w/2
	id := fmt.Sprintf("o%d", len(l.Waters))
	d.open("g", "class", "outside "+cssWord(s.outside.Kind))
	d.title(s.tag + ": " + plainKind(s.outside.Kind) + ", beyond the plant")
	switch {
	case len(o.Surface) > 0:
		low := k.y(s.low)
		at := k.y(o.Surface[0][1])
		d.el("rect", "x", x0, "y", at, "width", s.w, "height", math.Max(low+24-at, 1), "class", "liquid", "id", id+"-liquid")
		d.el("path", "d", wave(x0, at, s.w), "class", "surface", "id", id+"-surface")
		d.text(s.x, low+37, "tag", short(s.tag, 14))
		l.Waters = append(l.Waters, liveWater{ID: id, Rows: o.Surface, Datum: k.top, Top: coord(k.y(k.top)), Scale: coord(k.scale), Foot: coord(low + 24), First: coord(at)})
	case o.Pressed:
		d.el("path", "d", fmt.Sprintf("M%s %s h%s M%s %s h%s", px(x0+6), px(y), px(s.w-12), px(x0+6), px(y+5), px(s.w-12)), "class", "ink")
		d.text(s.x, y+20, "tag", short(s.tag, 14))
	case o.Capacity > 0:
		d.el("path", "d", fmt.Sprintf("M%s %s v10 h%s v-10", px(x0+3), px(y+3), px(s.w-6)), "class", "ink")
		d.el("line", "x1", x0+3, "x2", x1-3, "y1", y+3, "y2", y+3, "class", "ink grate")
		d.text(s.x, y+28, "tag", short(s.tag, 14))
	default:
		for n := -1.0; n <= 1; n++ {
			d.el("line", "x1", s.x+6*n, "x2", s.x+6*n, "y1", y+4, "y2", y+13-2*math.Abs(n), "class", "ink drip")
		}
		d.text(s.x, y+28, "tag", short(s.tag, 14))
	}
	d.end("g")
}

// wave draws a water surface as shallow arcs.
func wave(x, y, w float64) string {
	n := math.Max(math.Round(w/12), 2)
	step := w / n
	s := "M" + px(x) + " " + px(y)
	for range int(n) {
		s += fmt.Sprintf(" q%s -3 %s 0", px(step/2), px(step))
	}
	return s
}

// cssWord keeps letters and underscores of a word.
func cssWord(s string) string {
	out := make([]byte, 0, len(s))
	for i := range len(s) {
		if c := s[i]; c == '_' || c >= 'a' && c <= 'z' {
			out = append(out, c)
		}
	}
	return string(out)
}
