package viz

import (
	"html"
	"html/template"
	"math"
	"strconv"
	"strings"
)

// drawing collects SVG. Every text goes through html.EscapeString; colours and strokes come from the style sheet by class.
type drawing struct{ strings.Builder }

// px writes a coordinate to a tenth of a pixel.
func px(x float64) string {
	if !finite(x) {
		x = 0
	}
	s := strconv.FormatFloat(math.Round(x*10)/10, 'f', -1, 64)
	if s == "-0" {
		return "0"
	}
	return s
}

// attr writes name="value" pairs; numbers are coordinates.
func (d *drawing) attr(pairs ...any) {
	for i := 0; i+1 < len(pairs); i += 2 {
		d.WriteByte(' ')
		d.WriteString(pairs[i].(string))
		d.WriteString(`="`)
		switch v := pairs[i+1].(type) {
		case float64:
			d.WriteString(px(v))
		case int:
			d.WriteString(strconv.Itoa(v))
		case string:
			d.WriteString(html.EscapeString(v))
		}
		d.WriteByte('"')
	}
}

// el writes an empty element.
func (d *drawing) el(name string, pairs ...any) {
	d.WriteByte('<')
	d.WriteString(name)
	d.attr(pairs...)
	d.WriteString("/>")
}

// open begins an element; end ends it.
func (d *drawing) open(name string, pairs ...any) {
	d.WriteByte('<')
	d.WriteString(name)
	d.attr(pairs...)
	d.WriteByte('>')
}

func (d *drawing) end(name string) {
	d.WriteString("</")
	d.WriteString(name)
	d.WriteByte('>')
}

// text writes words at a place.
func (d *drawing) text(x, y float64, class, words string, pairs ...any) {
	d.WriteString("<text")
	d.attr("x", x, "y", y, "class", class)
	d.attr(pairs...)
	d.WriteByte('>')
	d.WriteString(html.EscapeString(clean(words)))
	d.WriteString("</text>")
}

// title writes the words shown on hover and read aloud.
func (d *drawing) title(words string) {
	d.WriteString("<title>")
	d.WriteString(html.EscapeString(clean(words)))
	d.WriteString("</title>")
}

// done hands the drawing to a template.
func (d *drawing) done() template.HTML { return template.HTML(d.String()) }

// clean takes out what XML does not allow and what turns the direction of text.
func clean(s string) string {
	return strings.Map(func(r rune) rune {
		switch {
		case r < ' ' && r != '\n' && r != '\t', r == 0x7f, r == 0xFFFE, r == 0xFFFF:
			return -1
		case r >= 0x202A && r <= 0x202E, r >= 0x2066 && r <= 0x2069, r == 0x200E, r == 0x200F:
			return -1
		}
		return r
	}, strings.ToValidUTF8(s, "\uFFFD"))
}

// short cuts words to n characters.
func short(s string, n int) string {
	r := []rune(s)
	if len(r) <= n {
		return s
	}
	return string(r[:n-1]) + "…"
}

// dots writes points of a polygon.
func dots(ps [][2]float64) string {
	var b strings.Builder
	for i, p := range ps {
		if i > 0 {
			b.WriteByte(' ')
		}
		b.WriteString(px(p[0]))
		b.WriteByte(',')
		b.WriteString(px(p[1]))
	}
	return b.String()
}
