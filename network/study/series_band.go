package study

import (
	"slices"
	"sort"

	"gonum.org/v1/gonum/stat"

	"headfall/network"
)

const (
	bandSpaces = 96 // between the evenly spread moments at which levels are banded
	bandSteps  = 24 // so many steps have a moment of their own
)

// bandTimes are the moments of the level bands, s, ascending.
func bandTimes(p *network.Plant, r *network.Result) []float64 {
	at := make([]float64, 0, bandSpaces+1+bandSteps)
	for i := range bandSpaces + 1 {
		at = append(at, p.RunFor*float64(i)/bandSpaces)
	}
	steps := 0
	for _, s := range r.Steps {
		if s.Done != nil && *s.Done > 0 && *s.Done < p.RunFor && steps < bandSteps {
			at, steps = append(at, *s.Done), steps+1
		}
	}
	sort.Float64s(at)
	return slices.Compact(at)
}

// seriesBand lays the levels of the samples over one another.
func seriesBand(p *network.Plant, samples []sample) *network.SeriesBand {
	if len(samples) == 0 || samples[0].levels == nil {
		return nil
	}
	at := samples[0].levels.At
	band := &network.SeriesBand{Time: at, Level: map[string]*network.LevelBand{}}
	column := make([]float64, len(samples))
	for i, v := range p.Vessels {
		b := &network.LevelBand{Low: make([]float64, len(at)), Mid: make([]float64, len(at)), High: make([]float64, len(at))}
		for k := range at {
			for n := range samples {
				column[n] = samples[n].levels.Levels[i*len(at)+k]
			}
			sort.Float64s(column)
			b.Low[k], b.Mid[k], b.High[k] = point(0.05, column), point(0.5, column), point(0.95, column)
		}
		band.Level[v.Tag] = b
	}
	return band
}

// point is a quantile of numbers in ascending order.
func point(p float64, sorted []float64) float64 { return stat.Quantile(p, stat.Empirical, sorted, nil) }
