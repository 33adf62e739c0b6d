package export

import (
	"math"

	"headfall/elements/quantity"
	"headfall/network"
)

// table is one sheet of a workbook.
type table struct {
	name   string
	head   []string
	widths []float64
	rows   func() int
	row    func(i int) []any
}

func fixed(name string, head []string, widths []float64, rows [][]any) table {
	return table{name, head, widths, func() int { return len(rows) }, func(i int) []any { return rows[i] }}
}

// scale converts SI numbers of one dimension to a display unit.
type scale struct {
	dim  quantity.Dim
	unit string
}

func (s scale) of(si float64) any {
	if math.IsNaN(si) || math.IsInf(si, 0) {
		return nil
	}
	x, err := quantity.Convert(si, s.dim, s.unit)
	if err != nil {
		return nil
	}
	return x
}

func (s scale) ptr(si *float64) any {
	if si == nil {
		return nil
	}
	return s.of(*si)
}

func or(s, fallback string) string {
	if s == "" {
		return fallback
	}
	return s
}

type scales struct{ level, flow, volume, pressure scale }

func scalesOf(s network.Show) scales {
	return scales{
		level:    scale{quantity.Length, or(s.Level, "m")},
		flow:     scale{quantity.Flow, or(s.Flow, "m3/h")},
		volume:   scale{quantity.Volume, or(s.Volume, "m3")},
		pressure: scale{quantity.Pressure, or(s.Pressure, "mbar")},
	}
}

func sheets(plant *network.Plant, r *network.Result) []table {
	u := scalesOf(plant.Show)
	all := []table{
		summary(plant, r),
		vesselSheet(plant, r, u),
		limitSheet(plant, r),
		stepSheet(plant, r),
		flagSheet(plant, r),
	}
	return append(all, seriesSheets(plant, r, u)...)
}

func summary(plant *network.Plant, r *network.Result) table {
	rows := [][]any{
		{"Title", plant.Title}, {"Revision", plant.Revision}, {"File", plant.File}, {"SHA-256 of the file", plant.SHA256}, {"Case", plant.Case},
		{"Start", Clock(plant.Start, 0)}, {"Verdict", string(r.Verdict)}, {"End, s", r.End}, {"Stopped because", r.Stopped},
		{"Program", r.Program.Name + " " + r.Program.Version}, {"Doubts", r.Allowance.Doubts}, {"Samples", r.Allowance.Samples},
		{"Relative error of the balance", r.Balance.Relative},
	}
	for _, c := range r.Cautions {
		rows = append(rows, []any{"Caution", c})
	}
	for _, a := range r.Assumptions {
		rows = append(rows, []any{"Assumed", a.What + " (" + a.Because + ")"})
	}
	return fixed("Summary", []string{"What", "Value"}, []float64{30, 90}, rows)
}

func vesselSheet(plant *network.Plant, r *network.Result, u scales) table {
	l, v, p := u.level.unit, u.volume.unit, u.pressure.unit
	head := []string{"Vessel", "Start level, " + l, "End level, " + l, "Peak level, " + l, "Peak at, s", "Peak clock", "Low level, " + l, "Low at, s",
		"Headroom to alarm, " + l, "Headroom to sill, " + l, "Headroom to rim, " + l, "Emptied at, s", "Emptied clock", "Start volume, " + v,
		"In, " + v, "Out, " + v, "Spilled, " + v, "Left, " + v, "Why left", "Gas low, " + p + "(g)", "Gas high, " + p + "(g)"}
	var rows [][]any
	for _, x := range plant.Vessels {
		q := r.Vessels[x.Tag]
		if q == nil {
			continue
		}
		var gasLow, gasHigh any
		if q.Gas != nil {
			gasLow, gasHigh = u.pressure.of(q.Gas.Low), u.pressure.of(q.Gas.High)
		}
		rows = append(rows, []any{x.Tag, u.level.of(q.StartLevel), u.level.of(q.EndLevel), u.level.of(q.PeakLevel), q.PeakAt, Clock(plant.Start, q.PeakAt),
			u.level.of(q.LowLevel), q.LowAt, u.level.ptr(q.HeadroomTo.Alarm), u.level.ptr(q.HeadroomTo.Sill), u.level.ptr(q.HeadroomTo.Rim),
			q.EmptiedAt, clockOf(plant, q.EmptiedAt), u.volume.of(q.StartVolume), u.volume.of(q.In), u.volume.of(q.Out), u.volume.of(q.Spilled),
			u.volume.of(q.Left), q.LeftWhy, gasLow, gasHigh})
	}
	return fixed("Vessels", head, []float64{16}, rows)
}

func limitSheet(plant *network.Plant, r *network.Result) table {
	head := []string{"No", "Limit", "As written", "Verdict", "Worst (SI)", "Margin (SI)", "5 % point", "95 % point", "Unit (SI)", "Worst at, s",
		"First fail, s", "First fail clock", "Share of samples that fail", "Why"}
	var rows [][]any
	for _, l := range r.Limits {
		rows = append(rows, []any{l.ID, l.Says, l.AsWritten, string(l.Verdict), l.Worst, l.Margin, l.MarginLow, l.MarginHigh, l.UnitSI, l.WorstAt,
			l.FirstFail, clockOf(plant, l.FirstFail), l.FailsShare, l.Why})
	}
	return fixed("Limits", head, []float64{6, 40, 16, 14}, rows)
}

func stepSheet(plant *network.Plant, r *network.Result) table {
	head := []string{"No", "Id", "Who", "Says", "Due, s", "Done, s", "Done clock", "Moved by, s", "Where", "Turns", "Stop if", "Note"}
	var rows [][]any
	for i, s := range r.Steps {
		rows = append(rows, []any{i + 1, s.ID, s.Who, s.Says, s.Due, s.Done, clockOf(plant, s.Done), s.MovedBy, s.Where, s.Turns, s.StopIf, s.Note})
	}
	return fixed("Steps", head, []float64{6, 12, 14, 40}, rows)
}

func flagSheet(plant *network.Plant, r *network.Result) table {
	var rows [][]any
	for _, f := range r.Flags {
		rows = append(rows, []any{f.Where, f.Kind, f.From, Clock(plant.Start, f.From), f.To, f.Says, f.Do})
	}
	return fixed("Flags", []string{"Where", "Kind", "From, s", "From clock", "To, s", "Says", "Do"}, []float64{14, 22, 12, 20, 12, 60, 60}, rows)
}

func clockOf(plant *network.Plant, s *float64) string {
	if s == nil {
		return ""
	}
	return Clock(plant.Start, *s)
}

// seriesSheets splits the series by what they tell.
func seriesSheets(plant *network.Plant, r *network.Result, u scales) []table {
	if r.Series == nil {
		return nil
	}
	per := scale{quantity.Ratio, "%"}
	kinds := []struct {
		sheet, what, unit string
		by                scale
	}{
		{"Levels", "level", u.level.unit, u.level}, {"Volumes", "volume", u.volume.unit, u.volume}, {"Flows", "flow", u.flow.unit, u.flow},
		{"Openings", "opening", "%", per}, {"Pumps", "running", "%", per}, {"Gas", "gas", u.pressure.unit + "(g)", u.pressure},
		{"Crests", "crest", u.level.unit, u.level}, {"Tees", "head", u.level.unit, u.level},
	}
	cols := Columns(plant, r)
	var all []table
	for _, k := range kinds {
		head := []string{"Time, s", "Clock"}
		var mine [][]float64
		for _, c := range cols {
			if c.What == k.what && len(head) < 16000 {
				head = append(head, c.Tag+", "+k.unit)
				mine = append(mine, c.Values)
			}
		}
		if len(mine) == 0 {
			continue
		}
		row := func(i int) []any {
			t := r.Series.Time[i]
			out := []any{t, Clock(plant.Start, t)}
			for _, v := range mine {
				var x any
				if i < len(v) {
					x = k.by.of(v[i])
				}
				out = append(out, x)
			}
			return out
		}
		const most = 1_000_000 // rows a sheet takes
		all = append(all, table{k.sheet, head, []float64{12, 20}, func() int { return min(len(r.Series.Time), most) }, row})
	}
	return all
}
