package study

import (
	"context"
	"math"

	"headfall/network"
)

// compareOne judges one plan and makes its row.
func compareOne(ctx context.Context, c Contender, load Load, must []string, opt Options) (*ComparedPlan, error) {
	plant, err := load()
	if err != nil {
		return nil, err
	}
	row := &ComparedPlan{Name: c.Name, File: c.File, Plant: plant, Verdict: network.NotJudged, Peaks: map[string]float64{}}
	res, err := Judge(ctx, load, opt)
	if err != nil && (res == nil || !calculable(err)) {
		return nil, err
	}
	if err != nil {
		row.Why, row.Result = "the calculation could not finish", res
		return row, nil
	}
	row.Result, row.Verdict, row.Why, row.Tightest = res, res.Verdict, whyNotRun(res), marginOf(res.Tightest())
	if l := firstFailure(res); l != nil {
		row.FailsAt = l.FirstFail
	}
	row.room(plant, res)
	if f, ok := finishOf(res, must); ok && len(must) > 0 {
		row.Finish = &f
		row.Low, row.High = finishBand(res, must)
	}
	for _, o := range plant.Outside {
		row.Peaks[o.Tag] = res.Outside[o.Tag].PeakFlow
	}
	for _, v := range plant.Vessels {
		row.Spilled += res.Vessels[v.Tag].Spilled
	}
	return row, nil
}

// room finds the least headroom of any vessel whose level rises, or of all when none does.
func (c *ComparedPlan) room(p *network.Plant, res *network.Result) {
	least := math.Inf(1)
	for _, rising := range []bool{true, false} {
		for _, v := range p.Vessels {
			x := res.Vessels[v.Tag]
			if rising && x.PeakLevel <= x.StartLevel+1e-6 {
				continue
			}
			for _, h := range []struct {
				to string
				m  *float64
			}{{"alarm", x.HeadroomTo.Alarm}, {"sill", x.HeadroomTo.Sill}, {"rim", x.HeadroomTo.Rim}} {
				if h.m != nil && *h.m < least {
					least = *h.m
					c.Vessel, c.Headroom, c.To = v.Tag, h.m, h.to
				}
			}
		}
		if c.Headroom != nil {
			return
		}
	}
}
