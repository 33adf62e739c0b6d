package viz

import (
	"math/rand"
	"testing"
)

// Labels of peaks cover neither one another nor those of heights, and one with room around it stands over its peak.
func TestPeakLabelsStandApart(t *testing.T) {
	draw := rand.New(rand.NewSource(1))
	const end, top, span = 3600.0, 10.0, 10.0
	shown := 0
	for range 300 {
		var curves []curve
		for range 6 {
			curves = append(curves, curve{peak: true, peakT: end * draw.Float64(), peakV: top * draw.Float64(), marks: []mark{{Words: "rim", At: top * draw.Float64()}}})
		}
		spreadLabels(curves, span)
		placePeaks(curves, end, top, span)
		var all []box
		high := labelHigh * span
		for _, c := range curves {
			if b, ok := c.marks[0].box(high); ok {
				all = append(all, b)
			}
			x, y := c.peakT/end, c.peakV
			switch c.peakPlace {
			case "top":
				all = append(all, box{x - peakWide/2, x + peakWide/2, y, y + high})
			case "right":
				all = append(all, box{x, x + peakWide, y - high/2, y + high/2})
			case "left":
				all = append(all, box{x - peakWide, x, y - high/2, y + high/2})
			case "bottom":
				all = append(all, box{x - peakWide/2, x + peakWide/2, y - high, y})
			default:
				continue
			}
			shown++
		}
		for i := range all {
			if hits(all[i+1:], all[i]) {
				t.Fatalf("labels cover one another: %+v", all)
			}
		}
	}
	if shown < 1200 {
		t.Errorf("only %d of 1800 labels found room", shown)
	}
	alone := []curve{{peak: true, peakT: end / 2, peakV: top / 2}, {peak: true, peakT: end / 2, peakV: top}, {peak: true, peakT: 1, peakV: 1}}
	placePeaks(alone, end, top, span)
	if alone[0].peakPlace != "top" || alone[1].peakPlace != "bottom" || alone[2].peakPlace != "" {
		t.Errorf("%q, %q, %q", alone[0].peakPlace, alone[1].peakPlace, alone[2].peakPlace)
	}
}
