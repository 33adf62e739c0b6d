package study

import (
	"context"

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
