package study

import (
	"context"
	"fmt"
	"math"

	"headfall/elements"
	"headfall/network"
)

// FlowsResult is what flows gives back: SI units, unit in the key.
type FlowsResult struct {
	Schema   int              `json:"schema"`
	Command  string           `json:"command"`
	Scenario network.Scenario `json:"scenario"`
	Ending
	Valve  string          `json:"valve"`
	Line   string          `json:"line"`
	At     float64         `json:"at_s"` // moment of the plan whose line-up is taken: the valve's first move
	Heads  []LevelSet      `json:"heads"`
	Rows   []InstalledFlow `json:"rows"`
	Turns  *float64        `json:"turns"` // of full travel
	HalfAt *float64        `json:"half_flow_at"`
	Notes  []string        `json:"notes"`
}

// LevelSet is the levels of one column.
type LevelSet struct {
	Name   string             `json:"name"` // full | half | low
	Levels map[string]float64 `json:"levels_m"`
}

// InstalledFlow is one opening with its flows, one for each head.
type InstalledFlow struct {
	Opening float64   `json:"opening"`
	Flows   []float64 `json:"flows_m3_s"`
	Turns   *float64  `json:"turns"`
}

const openingsShown = 10 // parts of full travel

// heads are the shares of the way from the outlet up to the level of the plan.
var heads = []struct {
	name  string
	share float64
}{{"full", 1}, {"half", 0.5}, {"low", 0.1}}

// Flows finds the flow through a valve as installed: at every tenth of its travel, with the vessels that it drains full, half down and nearly
// down to the outlet. All else stands as it does in the plan when the valve is first moved.
func Flows(ctx context.Context, load Load, opt Options, valve string) (*FlowsResult, error) {
	plant, err := load()
	if err != nil {
		return nil, err
	}
	line, act := valveLine(plant, valve)
	if line == nil {
		return nil, Misuse{fmt.Errorf("there is no valve %q; there are %s", valve, valvesOf(plant))}
	}
	res := &FlowsResult{Schema: 1, Command: "flows", Ending: Ending{ExitCode: 3}, Scenario: scenarioOf(plant), Valve: valve, Line: line.Tag, Notes: []string{}}
	runner := &Runner{Load: load, Model: opt.model(), Workers: opt.Workers}
	bench, err := runner.Bench(ctx)
	if err != nil {
		return nil, err
	}
	full, err := bench.Run(ctx, network.RunOptions{Series: true})
	if err != nil {
		return nil, err
	}
	res.At = firstMove(plant, full, valve)
	stands := lineupOf(plant, full, res.At)
	if act.Turns > 0 {
		res.Turns = &act.Turns
	}
	for i := range openingsShown + 1 {
		x := float64(i) / openingsShown
		row := InstalledFlow{Opening: x}
		if act.Turns > 0 {
			turns := x * act.Turns
			row.Turns = &turns
		}
		res.Rows = append(res.Rows, row)
	}
	for _, h := range heads {
		levels := stands.levelsAt(plant, line, h.share, res)
		res.Heads = append(res.Heads, LevelSet{h.name, levels})
		if err := res.column(ctx, opt, load, stands, valve, levels); err != nil {
			return res, err
		}
	}
	res.look()
	res.ExitCode, res.Complete = 0, true
	return res, nil
}

// column runs one head at every opening for a moment.
func (r *FlowsResult) column(ctx context.Context, opt Options, load Load, s lineup, valve string, levels map[string]float64) error {
	runner := &Runner{Load: s.stand(load, levels), Model: opt.model(), Workers: opt.Workers}
	flows, _, err := Each(ctx, runner, len(r.Rows), func(ctx context.Context, b *Bench, i int) (float64, error) {
		open := map[string]float64{valve: r.Rows[i].Opening}
		for tag, x := range s.open {
			if tag != valve {
				open[tag] = x
			}
		}
		res, err := b.Run(ctx, network.RunOptions{Series: true, Changes: network.Changes{Open: open}})
		if err != nil {
			return 0, err
		}
		list := res.Series.Flow[r.Line]
		return list[len(list)-1], nil
	})
	if err != nil {
		return err
	}
	for i := range r.Rows {
		r.Rows[i].Flows = append(r.Rows[i].Flows, flows[i])
	}
	return nil
}

// look reads off where half of the flow comes, and whether more opening always means more flow.
func (r *FlowsResult) look() {
	rows := r.Rows
	most := rows[len(rows)-1].Flows[0]
	for i := 1; i < len(rows); i++ {
		a, b := rows[i-1].Flows[0], rows[i].Flows[0]
		if r.HalfAt == nil && most > 0 && b >= most/2 {
			x := rows[i-1].Opening
			if b > a {
				x += (most/2 - a) / (b - a) * (rows[i].Opening - rows[i-1].Opening)
			}
			r.HalfAt = &x
		}
	}
	for k := range heads {
		for i := 1; i < len(rows); i++ {
			if rows[i].Flows[k] < rows[i-1].Flows[k]-1e-9 {
				r.Notes = append(r.Notes, fmt.Sprintf("at %s head the flow falls off from %s open on", heads[k].name, network.Percent(rows[i-1].Opening)))
				break
			}
		}
		if q := rows[len(rows)-1].Flows[k]; q < -1e-7 {
			r.Notes = append(r.Notes, fmt.Sprintf("at %s head the line runs backwards", heads[k].name))
		}
	}
}

// firstMove returns when a step first moves the valve; 0 when none does.
func firstMove(p *network.Plant, res *network.Result, valve string) float64 {
	at := math.Inf(1)
	for i, s := range stepsDone(p, res) {
		if s != nil && p.Steps[i].Action == network.MoveValve && p.Steps[i].Target == valve {
			at = math.Min(at, *s)
		}
	}
	if math.IsInf(at, 1) {
		return 0
	}
	return at
}

// stepsDone returns when each step of the plan was done; nil for those that were not, and for holds.
func stepsDone(p *network.Plant, res *network.Result) []*float64 {
	done := make([]*float64, len(p.Steps))
	for i, s := range p.Steps {
		for _, r := range res.Steps {
			if r.ID == s.ID {
				done[i] = r.Done
			}
		}
	}
	return done
}

func valvesOf(p *network.Plant) string {
	var tags []string
	for _, l := range p.Lines {
		for _, f := range l.Parts {
			if a, ok := f.Part.(elements.Actuated); ok {
				tags = append(tags, a.Actuator().Tag)
			}
		}
	}
	if len(tags) == 0 {
		return "none"
	}
	return fmt.Sprint(tags)
}
