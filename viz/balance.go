package viz

import (
	"sort"
	"strconv"

	"headfall/network"
	"headfall/viz/export"
)

// balanceRow is one vessel of the balance, in display units.
type balanceRow struct {
	Tag, Start, In, Out, Spilled, Left, Depth, Why string
}

// balanceView is the balance of every vessel and of the whole plant.
type balanceView struct {
	Unit     string
	Rows     []balanceRow
	Whole    balanceRow
	Relative string
	Outside  [][]string // tag, received, supplied, peak flow, over capacity
	Pumps    [][]string
	Lines    [][]string
}

func balance(plant *network.Plant, r *network.Result, u units, c clock) balanceView {
	v, b := u.Volume, r.Balance
	v.Least = 1e-5 * v.K * (b.Start + b.In) // what is less is no volume to speak of
	out := balanceView{Unit: v.Name, Relative: digits(b.Relative, 2),
		Whole: balanceRow{"Whole plant", v.Text(b.Start), v.Text(b.In), v.Text(b.Out), v.Text(b.Spilled), v.Text(b.Left), "", ""}}
	for _, x := range plant.Vessels {
		if q := r.Vessels[x.Tag]; q != nil {
			out.Rows = append(out.Rows, balanceRow{x.Tag, v.Text(q.StartVolume), v.Text(q.In), v.Text(q.Out), v.Text(q.Spilled), v.Text(q.Left),
				u.Level.With(q.EndLevel), q.LeftWhy})
		}
	}
	for _, x := range plant.Outside {
		if q := r.Outside[x.Tag]; q != nil {
			out.Outside = append(out.Outside, []string{x.Tag, v.With(q.Received), v.With(q.Supplied), u.Flow.With(q.PeakFlow), c.At(q.PeakFlowAt, near),
				v.With(q.OverCapacity)})
		}
	}
	for _, tag := range export.Movers(plant) {
		if q := r.Pumps[tag]; q != nil {
			out.Pumps = append(out.Pumps, []string{tag, strconv.Itoa(q.Starts), c.Span(q.Ran, later), strconv.Itoa(q.MostInHour)})
		}
	}
	for _, x := range plant.Lines {
		if q := r.Lines[x.Tag]; q != nil {
			back := v.With(q.Backward)
			for _, run := range q.RunsBackward {
				back += "; " + c.At(run.From, earlier) + " to " + c.At(run.To, later)
			}
			crest := none
			if q.CrestLow != nil {
				crest = u.Level.With(*q.CrestLow) + " at " + c.Opt(q.CrestLowAt, earlier)
			}
			out.Lines = append(out.Lines, []string{x.Tag, x.From + " → " + x.To, v.With(q.Forward), back, u.Flow.With(q.PeakFlow) + " at " + c.At(q.PeakFlowAt, near),
				u.Speed.With(q.PeakVelocity), crest})
		}
	}
	return out
}

// flagRow is one thing that happened; choosing it moves the playback there.
type flagRow struct {
	T                            float64
	From, To, Where, Kind, Words string
	Do                           string
}

func flags(r *network.Result, c clock) []flagRow {
	var out []flagRow
	all := append([]*network.Flag(nil), r.Flags...)
	sort.SliceStable(all, func(a, b int) bool { return all[a].From < all[b].From })
	for _, f := range all {
		out = append(out, flagRow{round10(f.From), c.At(f.From, earlier), c.At(f.To, later), f.Where, plainKind(f.Kind), f.Says, f.Do})
	}
	return out
}
