package study

import (
	"context"
	"fmt"
	"math"

	"headfall/network"
)

// Contender is one plan of a comparison.
type Contender struct {
	Name string // of its case, or of its file
	File string
	Load Load
}

// CompareResult is what compare gives back: SI units, unit in the key.
type CompareResult struct {
	Schema  int    `json:"schema"`
	Command string `json:"command"`
	Ending
	Limits  []string        `json:"limits"`  // under which all are judged
	Outside []string        `json:"outside"` // points of the columns
	Rows    []*ComparedPlan `json:"rows"`
	Best    string          `json:"best"` // of those that run the one that ends first; "" for none
	Notes   []string        `json:"notes"`
}

// ComparedPlan is one row.
type ComparedPlan struct {
	Name     string             `json:"name"`
	File     string             `json:"file"`
	Verdict  network.Verdict    `json:"verdict"`
	Why      string             `json:"why"` // what fails first, or what is too close
	FailsAt  *float64           `json:"first_fail_at_s"`
	Tightest *Margin            `json:"smallest_margin"`
	Vessel   string             `json:"worst_vessel"`
	Headroom *float64           `json:"worst_headroom_m"` // the least, to alarm, sill or rim
	To       string             `json:"headroom_to"`
	Finish   *float64           `json:"finish_s"` // last of the vessels to be emptied
	Low      *float64           `json:"finish_low_s"`
	High     *float64           `json:"finish_high_s"`
	Peaks    map[string]float64 `json:"peak_flow_m3_s"`
	Spilled  float64            `json:"spilled_m3"`

	Plant  *network.Plant  `json:"-"`
	Result *network.Result `json:"-"`
}

// Compare judges several plans under the same limits: those of the first, where the plans are of different files. A plan whose calculation cannot
// finish is a row that is not judged. With an error that is ctx's cause the rows so far are kept.
func Compare(ctx context.Context, plans []Contender, opt Options) (*CompareResult, error) {
	res := &CompareResult{Schema: 1, Command: "compare", Ending: Ending{ExitCode: 1}, Rows: []*ComparedPlan{}, Limits: []string{}, Outside: []string{}, Notes: []string{}}
	first, err := plans[0].Load()
	if err != nil {
		return nil, err
	}
	for _, l := range first.Limits {
		res.Limits = append(res.Limits, l.Says())
	}
	must := mustEmpty(first)
	progress := opt.Progress
	for i, c := range plans {
		if progress != nil {
			opt.Progress = func(share float64) { progress((float64(i) + share) / float64(len(plans))) }
		}
		load := c.Load
		if c.File != plans[0].File {
			load = res.sameLimits(c, first)
		}
		row, err := compareOne(ctx, c, load, must, opt)
		if ctx.Err() != nil {
			return res, context.Cause(ctx)
		}
		if err != nil {
			return res, err
		}
		res.Rows = append(res.Rows, row)
	}
	res.columns()
	res.rank()
	res.Complete = true
	return res, nil
}

// sameLimits puts the limits of the first plan in place of a plan's own.
func (r *CompareResult) sameLimits(c Contender, first *network.Plant) Load {
	if p, err := c.Load(); err == nil && fmt.Sprint(saysLimits(p)) != fmt.Sprint(saysLimits(first)) {
		r.Notes = append(r.Notes, fmt.Sprintf("%s is judged by the limits of %s, not by its own", c.File, first.File))
	}
	return func() (*network.Plant, error) {
		p, err := c.Load()
		if err != nil {
			return nil, err
		}
		p.Limits = first.Limits
		for _, l := range first.Limits {
			for _, tag := range l.Must.Of {
				if !knows(p, tag) {
					return nil, Misuse{fmt.Errorf("%s has no %s: it cannot be judged by the limit on the %s", c.File, tag, l.Says())}
				}
			}
		}
		return p, nil
	}
}

func saysLimits(p *network.Plant) (all []string) {
	for _, l := range p.Limits {
		all = append(all, l.Says())
	}
	return all
}

// knows tells whether a plant has something of a tag that limits look at.
func knows(p *network.Plant, tag string) bool {
	for _, v := range p.Vessels {
		if v.Tag == tag {
			return true
		}
	}
	for _, l := range p.Lines {
		if l.Tag == tag {
			return true
		}
	}
	for _, o := range p.Outside {
		if o.Tag == tag {
			return true
		}
	}
	for _, r := range p.LineUp() {
		if r.Valve == tag {
			return true
		}
	}
	return false
}

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
	row.Result, row.Verdict, row.Why, row.Tightest = res, res.Verdict, whyNotRun(res), marginOf(tightest(res.Limits))
	if l := firstFailure(res, ""); l != nil {
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

// columns lists the outside points of all rows.
func (r *CompareResult) columns() {
	seen := map[string]bool{}
	for _, row := range r.Rows {
		for _, o := range row.Plant.Outside {
			if !seen[o.Tag] {
				seen[o.Tag] = true
				r.Outside = append(r.Outside, o.Tag)
			}
		}
	}
}

// rank finds the best: the one that runs and ends first, or that has most in hand where nothing is to be emptied.
func (r *CompareResult) rank() {
	var best *ComparedPlan
	for _, row := range r.Rows {
		if row.Verdict != network.Run {
			continue
		}
		r.ExitCode = 0
		if best == nil || sooner(row, best) {
			best = row
		}
	}
	if best != nil {
		r.Best = best.Name
	}
}

func sooner(a, b *ComparedPlan) bool {
	if a.Finish != nil && b.Finish != nil {
		return *a.Finish < *b.Finish
	}
	if (a.Finish == nil) != (b.Finish == nil) {
		return a.Finish != nil
	}
	return a.Headroom != nil && b.Headroom != nil && *a.Headroom > *b.Headroom
}

// finishBand is the band of a finish: the latest ends of the vessels' bands; nil where it is not always reached.
func finishBand(res *network.Result, must []string) (low, high *float64) {
	always := true
	for _, tag := range must {
		b, ok := res.Bands["emptied_at_s"][tag]
		if !ok {
			return nil, nil
		}
		if b.Low != nil && (low == nil || *b.Low > *low) {
			low = b.Low
		}
		if b.High == nil {
			always = false
		} else if high == nil || *b.High > *high {
			high = b.High
		}
	}
	if !always {
		high = nil
	}
	return low, high
}
