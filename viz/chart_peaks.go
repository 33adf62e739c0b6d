package viz

import "sort"

// box is the place of a label on a chart: across in shares of the time axis, upright in the unit of the axis.
type box struct{ left, right, low, high float64 }

func (a box) meets(b box) bool {
	return a.left < b.right && b.left < a.right && a.low < b.high && b.low < a.high
}

// How wide the labels of peaks and of heights are, as shares of the time axis.
const (
	peakWide = 0.085
	markWide = 0.14
	early    = 0.04 // a peak in this share of the run is in the table, and its label would stand on the axis
)

// placePeaks says where the label of each peak stands, the highest first: over it, beside it or under it, where it covers no other; one that has no room
// is left out, and the table tells it. The labels of heights are placed by then. The number of steps stands over the chart's upper edge.
func placePeaks(curves []curve, end, top, span float64) {
	high := labelHigh * span
	var taken []box
	var peaks []*curve
	for i := range curves {
		c := &curves[i]
		for _, m := range c.marks {
			if b, shown := m.box(high); shown {
				taken = append(taken, b)
			}
		}
		if c.peak && finite(c.peakV) && finite(c.peakT) && c.peakT > early*end {
			peaks = append(peaks, c)
		}
	}
	sort.SliceStable(peaks, func(i, j int) bool { return peaks[i].peakV > peaks[j].peakV })
	for _, c := range peaks {
		x, y := c.peakT/end, c.peakV
		for _, try := range []struct {
			place string
			at    box
		}{
			{"top", box{x - peakWide/2, x + peakWide/2, y, y + high}},
			{"right", box{x, x + peakWide, y - high/2, y + high/2}},
			{"left", box{x - peakWide, x, y - high/2, y + high/2}},
			{"bottom", box{x - peakWide/2, x + peakWide/2, y - high, y}},
		} {
			if try.at.high > top+high/4 || try.at.right > 1.01 || try.at.left < 0 || hits(taken, try.at) {
				continue
			}
			c.peakPlace = try.place
			taken = append(taken, try.at)
			break
		}
	}
}

func hits(taken []box, b box) bool {
	for _, x := range taken {
		if x.meets(b) {
			return true
		}
	}
	return false
}

// box is where the label of a height stands.
func (m mark) box(high float64) (b box, shown bool) {
	b = box{0, markWide, m.At, m.At + high}
	switch m.place {
	case "":
		return b, false
	case "insideEndTop", "insideEndBottom":
		b.left, b.right = 1-markWide, 1
	case "insideMiddleTop", "insideMiddleBottom":
		b.left, b.right = 0.5-markWide/2, 0.5+markWide/2
	}
	if m.place[len(m.place)-1] == 'm' {
		b.low, b.high = m.At-high, m.At
	}
	return b, true
}
