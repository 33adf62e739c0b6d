package viz

import (
	"encoding/json"
	"fmt"
	"html/template"
	"math"

	"github.com/go-echarts/go-echarts/v2/charts"
	"github.com/go-echarts/go-echarts/v2/opts"

	"headfall/network"
)

// chart is one panel of the page. Its options are made here; the script puts in the data, by the id of each series, and the colours.
type chart struct {
	ID     string
	Unit   string // key of the data's units
	Title  string
	Desc   string // read aloud in place of the picture
	JSON   template.JS
	Head   []string   // of the table behind it
	Rows   [][]string // a dozen moments
	series []curve
}

// curve is one line of a chart.
type curve struct {
	key, name string
	marks     []mark
	peakT     float64
	peakV     float64 // SI
	peak      bool
	peakPlace string             // of the peak's label; "" for none
	toward    side               // to which its peak is rounded
	bands     [][2][2]float64    // whiskers: two points each, s and SI
	spread    *network.LevelBand // of the samples; nil when there were none
}

// charter makes the charts of a page.
type charter struct {
	plant *network.Plant
	r     *network.Result
	u     units
	c     clock
	steps []sheetRow
	set   dataset
}

// x turns a moment into what the axis takes: milliseconds of a time axis, or seconds for runs too short for one.
func (h *charter) x(t float64) float64 {
	if h.short() {
		return round10(t)
	}
	ms := math.Round(t*1e6) / 1e3
	if h.c.Known() {
		ms += float64(h.c.start.UnixMilli())
	}
	return ms
}

func (h *charter) short() bool { return h.r.End < 10 }

// span is the range of the time axis; a run without length gets one.
func (h *charter) span() (from, to float64) {
	to = h.r.End
	if !(to > 0) {
		to = 1
	}
	if h.short() {
		return 0, to
	}
	return h.x(0), h.x(to)
}

// build makes one panel.
func (h *charter) build(id, unitKey, title string, u unit, curves []curve) chart {
	line := charts.NewLine()
	kind := "time"
	if h.short() {
		kind = "value"
	}
	from, to := h.span()
	axis := u.Name
	low, high := h.reach(unitKey, u, curves)
	spreadLabels(curves, (high-low)/u.K)
	placePeaks(curves, h.r.End, high/u.K, (high-low)/u.K)
	line.SetGlobalOptions(
		charts.WithAnimation(false),
		charts.WithGridOpts(opts.Grid{Left: "76", Right: "104", Top: "46", Bottom: "34"}),
		charts.WithLegendOpts(opts.Legend{Show: opts.Bool(true), Type: "plain", Left: "76", Top: "2", ItemWidth: 26, ItemHeight: 10, Data: names(curves)}),
		charts.WithTooltipOpts(opts.Tooltip{Show: opts.Bool(true), Trigger: "axis", AxisPointer: &opts.AxisPointer{Type: "line", Snap: opts.Bool(false)}}),
		charts.WithXAxisOpts(opts.XAxis{Type: kind, Min: from, Max: to, AxisLabel: &opts.AxisLabel{HideOverlap: opts.Bool(true)}}),
		charts.WithYAxisOpts(opts.YAxis{Type: "value", Name: axis, Min: low, Max: high, SplitNumber: 5}),
		charts.WithDataZoomOpts(opts.DataZoom{Type: "inside", XAxisIndex: []int{0}, FilterMode: "none"}),
		charts.WithAriaOpts(&opts.Aria{Enabled: opts.Bool(true), Label: &opts.AriaLabel{Description: h.describe(title, u, curves)}}),
	)
	for _, c := range curves {
		h.addCurve(line, c, u, low, high)
	}
	h.addSteps(line)
	line.Validate()
	js, err := json.Marshal(line.JSON())
	if err != nil {
		js = []byte("{}") // a number that is not finite; nothing of ours lets one through
	}
	ch := chart{ID: id, Unit: unitKey, Title: title, Desc: h.describe(title, u, curves), JSON: template.JS(js), series: curves}
	ch.Head, ch.Rows = h.table(u, curves)
	return ch
}

func names(curves []curve) []string {
	out := make([]string, len(curves))
	for i, c := range curves {
		out[i] = clean(c.name)
	}
	return out
}

func (h *charter) describe(title string, u unit, curves []curve) string {
	words := clean(title) + " over time, in " + u.Name + "."
	for _, c := range curves {
		if c.peak {
			words += fmt.Sprintf(" %s: peak %s at %s.", clean(c.name), u.Toward(c.peakV, c.toward), h.c.At(c.peakT, near))
		}
	}
	return words
}

// addCurve adds a series with its marks. The data comes by its id.
func (h *charter) addCurve(line *charts.Line, c curve, u unit, low, high float64) {
	options := []charts.SeriesOpts{
		charts.WithSeriesId(clean(c.key)),
		charts.WithLineChartOpts(opts.LineChart{ShowSymbol: opts.Bool(false)}),
		charts.WithLineStyleOpts(opts.LineStyle{Width: 2}),
		charts.WithSeriesOpts(func(s *charts.SingleSeries) {
			s.MarkLines = h.markLines(c, u)
		}),
	}
	for _, m := range c.marks {
		if m.Kind == "limit" {
			options = append(options, charts.WithMarkAreaNameCoordItemOpts(h.forbidden(m, u, low, high)))
		}
	}
	if c.peak && finite(c.peakV) && finite(c.peakT) && c.peakV != 0 {
		options = append(options, charts.WithMarkPointNameCoordItemOpts(opts.MarkPointNameCoordItem{
			Name: "peak", Coordinate: []any{h.x(c.peakT), round6(c.peakV * u.K)}, Value: u.Toward(c.peakV, c.toward), Symbol: "triangle", SymbolSize: 9,
			Label: &opts.Label{Show: opts.Bool(c.peakPlace != ""), Position: c.peakPlace, Formatter: "{c}", FontSize: 11},
		}))
	}
	line.AddSeries(clean(c.name), []opts.LineData{}, options...)
	if c.spread != nil {
		addSpread(line, c)
	}
	for _, b := range c.bands {
		size := []int{2, 11}
		if b[0][0] == b[1][0] {
			size = []int{11, 2}
		}
		data := []opts.LineData{{Value: []float64{h.x(b[0][0]), round6(b[0][1] * u.K)}}, {Value: []float64{h.x(b[1][0]), round6(b[1][1] * u.K)}}}
		line.AddSeries(clean(c.name), data,
			charts.WithLineChartOpts(opts.LineChart{ShowSymbol: opts.Bool(true), Symbol: "rect", SymbolSize: size}),
			charts.WithLineStyleOpts(opts.LineStyle{Width: 1.5}))
	}
}

// markLines draws rims, sills, alarms and limits across the chart, a limit only over its window.
func (h *charter) markLines(c curve, u unit) *opts.MarkLines {
	if len(c.marks) == 0 {
		return nil
	}
	type end struct {
		Name      string          `json:"name,omitempty"`
		Coord     []any           `json:"coord,omitempty"`
		LineStyle *opts.LineStyle `json:"lineStyle,omitempty"`
		Label     *opts.Label     `json:"label,omitempty"`
	}
	looks := map[string]opts.LineStyle{
		"rim": {Type: "solid", Width: 1}, "sill": {Type: "dashed", Width: 1}, "alarm": {Type: "dotted", Width: 1.5}, "limit": {Type: "solid", Width: 2.5},
	}
	m := &opts.MarkLines{MarkLineStyle: opts.MarkLineStyle{Symbol: []string{"none", "none"}}}
	for _, k := range c.marks {
		if !finite(k.At) {
			continue
		}
		from, to := h.window(k)
		look := looks[k.Kind]
		y := round6(k.At * u.K)
		m.Data = append(m.Data, []end{
			{Name: short(clean(c.name), 14) + " " + short(clean(k.Words), 22), Coord: []any{from, y}, LineStyle: &look,
				Label: &opts.Label{Show: opts.Bool(k.place != ""), Position: k.place, Formatter: "{b}", FontSize: 10}},
			{Coord: []any{to, y}},
		})
	}
	return m
}

// window is the part of the time axis over which a mark holds.
func (h *charter) window(m mark) (from, to float64) {
	from, to = h.span()
	if m.From != nil && finite(*m.From) {
		from = math.Max(from, h.x(*m.From))
	}
	if m.To != nil && finite(*m.To) {
		to = math.Min(to, h.x(*m.To))
	}
	return from, to
}

// forbidden is a band on the side of a limit on which the curve must not be.
func (h *charter) forbidden(m mark, u unit, low, high float64) opts.MarkAreaNameCoordItem {
	from, to := h.window(m)
	band := 0.07 * (high - low)
	edge := math.Max(m.At*u.K-band, low)
	if m.Above {
		edge = math.Min(m.At*u.K+band, high)
	}
	edge = round6(edge)
	return opts.MarkAreaNameCoordItem{
		Coordinate0: []any{from, round6(m.At * u.K)}, Coordinate1: []any{to, edge},
		ItemStyle: &opts.ItemStyle{Opacity: opts.Float(0.16)},
	}
}

// addSteps marks the steps, numbered as on the sheet.
func (h *charter) addSteps(line *charts.Line) {
	items := []opts.MarkLineNameXAxisItem{}
	before, named := math.Inf(-1), 0
	for _, s := range h.steps {
		if s.at == nil || !finite(*s.at) {
			continue
		}
		n := s.N
		if s.Hold {
			n = "H"
		}
		if len(items) > 0 && *s.at-before < 0.012*h.r.End { // their labels would cover one another
			items[named].Name += "," + n
			if *s.at == before {
				continue
			}
			n = ""
		} else {
			named = len(items)
		}
		items = append(items, opts.MarkLineNameXAxisItem{Name: n, XAxis: h.x(*s.at)})
		before = *s.at
	}
	line.AddSeries("steps", []opts.LineData{}, charts.WithSeriesId("steps"),
		charts.WithMarkLineNameXAxisItemOpts(items...),
		charts.WithMarkLineStyleOpts(opts.MarkLineStyle{Symbol: []string{"none", "none"},
			Label:     &opts.Label{Show: opts.Bool(true), Formatter: "{b}", Position: "end", FontSize: 10},
			LineStyle: &opts.LineStyle{Type: "dotted", Width: 1}}))
}
