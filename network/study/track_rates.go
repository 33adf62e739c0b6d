package study

import (
	"context"
	"math"
	"sort"
	"strings"

	"headfall/elements/quantity"
	"headfall/network"
)

const (
	tellTale = 0.030 // m: a level that is to move by less tells no rate
	gaugeFit = 0.010 // m: how well a level is read
)

// rates finds the rate ratio of each vessel with two readings or more.
func (t *tracking) rates(ctx context.Context) error {
	jumps, err := t.settle(ctx, t.firsts(), nil)
	if err != nil {
		return err
	}
	res, err := t.run(ctx, t.corrected(jumps, nil), t.now)
	if err != nil {
		return err
	}
	for _, tag := range t.opt.Readings.Vessels {
		list := t.opt.Readings.Of(tag)
		if len(list) == 0 {
			continue
		}
		v := t.vessel(tag)
		last := list[len(list)-1]
		x := &TrackedVessel{First: list[0].Level, FirstAt: list[0].Time, Last: last.Level, LastAt: last.Time, Readings: len(list),
			Plan: levelAt(t.plan.Series, tag, last.Time), Expected: levelAt(res.Series, tag, last.Time)}
		t.res.Vessels[tag] = x
		if len(list) < 2 || last.Time <= list[0].Time {
			continue
		}
		x.RateRatio = ratio(v, x.First, x.Last, x.Expected)
		if len(list) > 2 {
			mid := list[len(list)/2]
			at := levelAt(res.Series, tag, mid.Time)
			x.early = ratio(v, x.First, mid.Level, at)
			x.late = ratio(v, mid.Level, x.Last, x.Expected+mid.Level-at)
		}
	}
	t.opt.Progress(0.2)
	return nil
}

// ratio is the volume lost over the volume that should have been lost; nil where that is too little to tell.
func ratio(v *network.Vessel, first, last, expected float64) *float64 {
	if math.Abs(first-expected) < tellTale {
		return nil
	}
	vol := func(h float64) float64 { q, _ := v.Shape.Volume(math.Max(0, h)); return q }
	r := (vol(first) - vol(last)) / (vol(first) - vol(expected))
	return &r
}

// fit changes the coefficient of each drained vessel's main outlet until the run from its first reading meets its last; the uppermost vessels
// first, since they feed the others.
func (t *tracking) fit(ctx context.Context) error {
	var order []string
	for tag, x := range t.res.Vessels {
		if x.RateRatio != nil && x.Expected < x.First && *x.RateRatio > 0.02 && math.Abs(x.Expected-x.Last) > gaugeFit {
			order = append(order, tag)
		}
	}
	sort.Slice(order, func(i, k int) bool {
		a, b := t.vessel(order[i]), t.vessel(order[k])
		if a.Base != b.Base {
			return a.Base > b.Base
		}
		return a.Tag < b.Tag
	})
	for i, tag := range order {
		line := t.outletOf(tag)
		n, sign := governing(t.plant, line)
		if n < 0 {
			continue
		}
		s := scaledOutlet{number: n, name: t.plant.Numbers[n].Name, factor: 1}
		x := t.res.Vessels[tag]
		s.doubt = math.Max(0.02, 2*gaugeFit/math.Abs(x.First-x.Last))
		met, err := t.meet(ctx, tag, &s, sign)
		if err != nil {
			return err
		}
		t.scales = append(t.scales, s)
		number := t.plant.Numbers[n]
		t.res.Fitted = append(t.res.Fitted, FittedOutlet{Name: s.name, Line: line.Tag, Vessel: tag, Factor: s.factor, From: number.Value.SI, To: number.Value.SI * s.factor, Met: met})
		t.opt.Progress(0.2 + 0.2*float64(i+1)/float64(len(order)))
	}
	return nil
}

// meet finds the factor by bisection on its logarithm; sign is +1 where a larger coefficient drains faster. It says whether the reading was met.
func (t *tracking) meet(ctx context.Context, tag string, s *scaledOutlet, sign float64) (bool, error) {
	x := t.res.Vessels[tag]
	at := func(u float64) (float64, error) {
		s.factor = math.Exp(sign * u)
		scales := append(t.scales[:len(t.scales):len(t.scales)], *s)
		jumps, err := t.settle(ctx, t.firsts(), scales)
		if err != nil {
			return 0, err
		}
		res, err := t.run(ctx, t.corrected(jumps, scales), t.now)
		if err != nil {
			return 0, err
		}
		return levelAt(res.Series, tag, x.LastAt) - x.Last, nil // falls with u
	}
	lo, hi := math.Log(1.0/20), math.Log(20.0)
	for _, end := range []float64{lo, hi} {
		d, err := at(end)
		if err != nil {
			return false, err
		}
		if end == lo && d < 0 || end == hi && d > 0 {
			return math.Abs(d) < gaugeFit, nil
		}
	}
	for hi-lo > 1e-3 {
		m := (lo + hi) / 2
		d, err := at(m)
		if err != nil {
			return false, err
		}
		if d > 0 {
			lo = m
		} else {
			hi = m
		}
	}
	s.factor = math.Exp(sign * (lo + hi) / 2)
	return true, nil
}

// outletOf is the line through which the plan drains a vessel most between its readings.
func (t *tracking) outletOf(tag string) *network.Line {
	var most *network.Line
	best := 0.0
	x := t.res.Vessels[tag]
	for _, l := range t.plant.Lines {
		if l.From != tag && l.To != tag {
			continue
		}
		q := t.plan.Series.Flow[l.Tag]
		var sum float64
		for i := range 50 {
			sum += courseAt(t.plan.Series.Time, q, x.FirstAt+(x.LastAt-x.FirstAt)*(float64(i)+0.5)/50)
		}
		if l.To == tag {
			sum = -sum
		}
		if sum > best {
			most, best = l, sum
		}
	}
	return most
}

// governing returns the place of the coefficient that governs a line, and how its flow goes with it: Kv of a valve, Cd of an orifice or nozzle, or K of
// fittings; -1 for none.
func governing(p *network.Plant, l *network.Line) (place int, sign float64) {
	if l == nil {
		return -1, 0
	}
	for _, key := range []string{"kv", "cv", "cd", "k"} {
		for _, f := range l.Parts {
			for i, n := range p.Numbers {
				if n.Key == key && strings.HasPrefix(n.Name, f.Name+".") && *n.At > 0 {
					if key == "k" {
						return i, -1
					}
					return i, 1
				}
			}
		}
	}
	return -1, 0
}

func normal(half float64) quantity.Doubt { return quantity.Doubt{Kind: quantity.Normal95, Half: half} }
