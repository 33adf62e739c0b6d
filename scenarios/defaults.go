package scenarios

import (
	"fmt"
	"math"

	"headfall/elements"
	"headfall/elements/quantity"
)

const (
	standardGravity    = 9.80665  // m/s²
	standardAtmosphere = 101325.0 // Pa
	mostSamples        = 5e6      // of the stored series
	mostNumbers        = 5e7      // in all series together: 400 MB
)

// spacing fills in the spacing of the series and refuses one that would make it too long.
func (d *decoder) spacing(root *node) {
	p := d.plant
	if p.ReportEvery == 0 && p.RunFor > 0 {
		p.ReportEvery = defaultSpacing(p.RunFor)
		d.assumed("", "report_every", quantity.FormatDuration(p.ReportEvery))
	}
	if p.ReportEvery > 0 && p.RunFor/p.ReportEvery > mostSamples {
		d.problem(first(root.get("report_every"), first(root.get("run_for"), root)), "report_every is too short for this run_for: the stored series would be too long", "leave it out, or write e.g. report_every: "+quantity.FormatDuration(defaultSpacing(p.RunFor)))
	}
}

// storable refuses a series that would not fit into memory.
func (d *decoder) storable(root *node) {
	p := d.plant
	columns := 3*len(p.Vessels) + 2*len(p.Lines) + len(p.Tees)
	for _, l := range p.Lines {
		columns += len(l.Parts)
	}
	if rows := p.RunFor / p.ReportEvery; p.ReportEvery > 0 && rows <= mostSamples && rows*float64(columns) > mostNumbers {
		d.problem(first(root.get("report_every"), first(root.get("run_for"), root)),
			fmt.Sprintf("the stored series would hold %.0f million numbers, %.0f million are taken", rows*float64(columns)/1e6, mostNumbers/1e6),
			"write a longer report_every, e.g. "+quantity.FormatDuration(defaultSpacing(p.RunFor)))
	}
}

// siteByDefault takes gravity and air of a plant that states neither.
func (d *decoder) siteByDefault(root *node, _ string) {
	d.mapping(&node{form: mapping, src: root.src, at: root.at}, "site", "site", d.siteFields())
}

// waterByDefault puts water into a plant that states no liquid.
func (d *decoder) waterByDefault(root *node, _ string) {
	word := &node{text: "water", plain: true, src: root.src, at: root.at}
	temperature := &node{text: "15 °C", plain: true, src: root.src, at: root.at}
	body := &node{form: mapping, src: root.src, at: root.at, keys: []*node{word}, items: []*node{temperature}}
	c, ok := d.element(elements.Liquids, body, "liquid", func(string, *node) string { return "liquid" })
	if ok && d.ready(c, root) {
		d.plant.Liquid, _ = c.element.(elements.Liquid)
		d.assumed("", "liquid", "water, 15 °C")
	}
}

// defaultSpacing returns the round time nearest to a 500th of the run.
func defaultSpacing(run float64) float64 {
	want := run / 500
	best := 0.0
	for _, unit := range []float64{1e-3, 1e-2, 0.1, 1, 60, 3600, day} {
		for _, n := range []float64{1, 2, 5, 10, 15, 20, 30} {
			if (n > 10 || n == 10 && unit < 1) && (unit < 1 || unit == day) || unit == 3600 && n > 12 {
				continue
			}
			if r := n * unit; best == 0 || math.Abs(r-want) < math.Abs(best-want) {
				best = r
			}
		}
	}
	return best
}
