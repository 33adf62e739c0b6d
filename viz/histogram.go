package viz

import (
	"fmt"
	"html/template"
	"strings"

	"headfall/network/study"
)

// histogram is how many samples end when.
type histogram struct {
	Of, Desc, Never string
	SVG             template.HTML
	Axis            []axisLabel
	Rows            [][2]string // from when to when, and how many
}

const (
	barWidth = 20
	barsHigh = 120
)

// newHistogram draws the bins as bars over a time axis.
func newHistogram(h *study.Histogram, c clock) *histogram {
	if h == nil || len(h.Counts) == 0 {
		return nil
	}
	v := &histogram{Of: clean(h.Of)}
	most, all := 0, h.Never
	for _, n := range h.Counts {
		most, all = max(most, n), all+n
	}
	var b strings.Builder
	wide := barWidth * len(h.Counts)
	fmt.Fprintf(&b, `<svg class="bins" viewBox="0 0 %d %d" preserveAspectRatio="none" aria-hidden="true">`, wide, barsHigh)
	for i, n := range h.Counts {
		from := h.From + h.Width*float64(i)
		v.Rows = append(v.Rows, [2]string{c.At(from, earlier) + " to " + c.At(from+h.Width, later), fmt.Sprint(n)})
		if n == 0 || most == 0 {
			continue
		}
		high := float64(barsHigh) * float64(n) / float64(most)
		fmt.Fprintf(&b, `<rect x="%s" y="%s" width="%d" height="%s"/>`, px(float64(barWidth*i)+1), px(barsHigh-high), barWidth-2, px(high))
	}
	b.WriteString("</svg>")
	v.SVG = template.HTML(b.String())
	end := h.From + h.Width*float64(len(h.Counts))
	for i := range 5 {
		f := float64(i) / 4
		v.Axis = append(v.Axis, axisLabel{template.CSS(css(100 * f)), c.At(h.From+f*(end-h.From), near)})
	}
	v.Desc = fmt.Sprintf("%s between %s and %s; the highest bar is %d of %d samples.", v.Of, c.At(h.From, earlier), c.At(end, later), most, all)
	if h.Never > 0 {
		v.Never = fmt.Sprintf("Never in %d of %d samples.", h.Never, all)
	}
	return v
}
