package study

import (
	"context"
	"fmt"
	"math"
	"sort"

	"headfall/elements/quantity"
)

// others finds how far the doubts of the numbers that were not fitted move those that were: each such number is put to the upper end of its
// band, and the fit follows the readings along its slopes. A level read 20 mm too high or a bore given wrong hides in a coefficient; the
// scatter of the readings does not show it.
func (f *fitter) others(ctx context.Context, s *solved, res *FitResult) error {
	var doubtful []scaled
	for i, n := range f.plant.Numbers {
		if n.Value.Doubt.Stated() && !f.varied(i) {
			doubtful = append(doubtful, scaled{at: i, n: n})
		}
	}
	f.runner.Progress = func(share float64) { f.opt.Progress(0.9 + 0.1*share) }
	rows, _, err := Each(ctx, f.runner, len(doubtful), func(ctx context.Context, bench *Bench, i int) ([]float64, error) {
		d := doubtful[i]
		high := upperEnd(*d.n.At, d.n.Value.Doubt)
		if allowed(d.n, high) != "" {
			return nil, nil
		}
		idx, values := []int{d.at}, []float64{high}
		for k := range f.numbers {
			idx, values = append(idx, f.numbers[k].at), append(values, f.numbers[k].from(s.x[k]))
		}
		return f.row(ctx, bench, idx, values)
	})
	if err != nil {
		return err
	}
	res.Work.Runs += len(doubtful)
	f.pull(s, res, doubtful, rows)
	return nil
}

// pull works out from the residuals with each doubtful number at its upper end how far that moves the fitted ones, and widens the bands by it.
func (f *fitter) pull(s *solved, res *FitResult, doubtful []scaled, rows [][]float64) {
	b := certaintyOf(s)
	sums := make([]float64, len(res.Values))
	for i, row := range rows {
		if row == nil {
			continue
		}
		for j := range row {
			row[j] -= s.r[j]
		}
		for k, dx := range b.pulled(s, row) {
			v := res.Values[k]
			sums[k] += dx * dx
			if by := v.scaled.out(v.x+dx) - v.scaled.out(v.x); math.Abs(by) > 1e-6*math.Abs(v.Value) {
				v.PulledBy = append(v.PulledBy, Pull{doubtful[i].n.Name, by})
			}
		}
	}
	for k, v := range res.Values {
		sort.SliceStable(v.PulledBy, func(i, j int) bool { return math.Abs(v.PulledBy[i].By) > math.Abs(v.PulledBy[j].By) })
		if v.Low != nil {
			v.LowAll, v.HighAll = v.band(math.Hypot(v.half, math.Sqrt(sums[k])))
		}
		v.Says = v.written()
	}
}

func (f *fitter) varied(place int) bool {
	for _, s := range f.numbers {
		if s.at == place {
			return true
		}
	}
	return false
}

// upperEnd is the upper end of a number's 95 % band.
func upperEnd(v float64, d quantity.Doubt) float64 {
	switch d.Kind {
	case quantity.Normal95:
		return v + d.Half
	case quantity.Factor:
		return v * d.Factor
	case quantity.Uniform:
		return v + 0.95*(d.High-d.Low)/2
	}
	return v
}

// written writes the value with its band as the file would have it, the band's first two figures deciding how many count.
func (v *FittedValue) written() string {
	unit := v.Shown
	if unit == "" {
		unit = v.Unit
	}
	if v.Dim.Bare() {
		unit = ""
	}
	if v.LowAll == nil {
		return quantity.Format(v.Value, v.Dim, unit, 4)
	}
	half := (*v.HighAll - *v.LowAll) / 2
	figures := 4
	if v.Value != 0 && half > 0 {
		figures = int(math.Floor(math.Log10(math.Abs(v.Value)))-math.Floor(math.Log10(half))) + 2
	}
	return fmt.Sprintf("%s ± %s", quantity.Format(v.Value, v.Dim, unit, max(2, min(figures, 6))), quantity.Format(half, v.Dim, unit, 2))
}
