package viz

import (
	"github.com/go-echarts/go-echarts/v2/charts"
	"github.com/go-echarts/go-echarts/v2/opts"

	"headfall/network"
)

// addSpread adds the band of a curve as two series that stand on one another: its lower edge, unseen, and what lies over it, tinted. The script fills them.
func addSpread(line *charts.Line, c curve) {
	for _, part := range []struct {
		id      string
		opacity float32
	}{{"bandlow", 0}, {"bandup", 0.2}} {
		line.AddSeries(clean(c.name), []opts.LineData{}, charts.WithSeriesId(part.id+"/"+clean(c.name)),
			charts.WithLineChartOpts(opts.LineChart{ShowSymbol: opts.Bool(false), Stack: "band/" + clean(c.name)}),
			charts.WithLineStyleOpts(opts.LineStyle{Width: 0, Opacity: opts.Float(0)}),
			charts.WithAreaStyleOpts(opts.AreaStyle{Opacity: opts.Float(part.opacity)}))
	}
}

// bandOf returns the band of a vessel's level; nil where there is none, or where it is no wider than the line that is drawn.
func bandOf(r *network.Result, tag string) *network.LevelBand {
	if r.SeriesBand == nil || r.SeriesBand.Level[tag] == nil {
		return nil
	}
	b := r.SeriesBand.Level[tag]
	if n := len(r.SeriesBand.Time); len(b.Low) != n || len(b.High) != n {
		return nil
	}
	for k := range b.Low {
		if !finite(b.Low[k]) || !finite(b.High[k]) {
			return nil
		}
	}
	return b
}

// plainBand is the band of the samples as the page carries it: six digits.
func plainBand(b *network.SeriesBand) *network.SeriesBand {
	if b == nil {
		return nil
	}
	out := &network.SeriesBand{Time: b.Time, Level: map[string]*network.LevelBand{}}
	for tag, l := range b.Level {
		out.Level[tag] = &network.LevelBand{Low: six6(l.Low), Mid: six6(l.Mid), High: six6(l.High)}
	}
	return out
}

func six6(v []float64) []float64 {
	out := make([]float64, len(v))
	for i, x := range v {
		out[i] = round6(x)
	}
	return out
}
