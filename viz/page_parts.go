package viz

import (
	"html/template"
	"strconv"

	"headfall/network"
)

// readings is the table under the plant.
type readings struct{ Vessels, Lines []reading3 }

type reading3 struct{ Tag, A, B string }

func newReadings(plant *network.Plant, r *network.Result, u units) readings {
	var out readings
	for _, v := range plant.Vessels {
		if q := r.Vessels[v.Tag]; q != nil {
			out.Vessels = append(out.Vessels, reading3{v.Tag, u.Level.With(q.StartLevel), u.Volume.With(q.StartVolume)})
		}
	}
	for _, l := range plant.Lines {
		flow := none
		if r.Series != nil && len(r.Series.Flow[l.Tag]) > 0 {
			flow = u.Flow.With(r.Series.Flow[l.Tag][0])
		}
		out.Lines = append(out.Lines, reading3{l.Tag, flow, l.From + " → " + l.To})
	}
	return out
}

// axisLabel is a moment under the opening strip.
type axisLabel struct {
	Place template.CSS
	Text  string
}

func axisLabels(r *network.Result, c clock) []axisLabel {
	var out []axisLabel
	for i := range 5 {
		f := float64(i) / 4
		out = append(out, axisLabel{template.CSS(css(100 * f)), c.At(f*r.End, earlier)})
	}
	return out
}

// cells4 is the block in the corner of the page, as on a drawing.
func cells4(plant *network.Plant, r *network.Result, c clock) [][2]string {
	out := [][2]string{{"Revision", plant.Revision}}
	if plant.Revision == "" {
		out[0][1] = "not stated"
	}
	if plant.Case != "" {
		out = append(out, [2]string{"Case", plant.Case})
	}
	if c.Known() {
		out = append(out, [2]string{"Start", c.Day(0) + " " + c.At(0, earlier)})
	}
	out = append(out, [2]string{"Run", c.Span(r.End, earlier)}, [2]string{"File", plant.File}, [2]string{"SHA-256", short(plant.SHA256, 17)},
		[2]string{"Program", r.Program.Name + " " + r.Program.Version})
	return out
}

func alarms(r *network.Result, c clock) [][]string {
	var out [][]string
	for _, a := range r.Alarms {
		have, need := none, none
		if a.Have != nil {
			have = c.Span(*a.Have, earlier)
		}
		if a.Need != nil {
			need = c.Span(*a.Need, later)
		}
		comes := "does not come"
		if a.At != nil {
			comes = c.At(*a.At, earlier)
		}
		out = append(out, []string{a.Vessel + " " + a.Name, comes, c.Opt(a.LimitAt, earlier), have, need, a.Says})
	}
	return out
}

func milestones(r *network.Result, c clock) [][]string {
	var out [][]string
	for _, m := range r.Milestones {
		at := "not reached"
		if m.At != nil {
			at = c.Both(*m.At, later)
		}
		out = append(out, []string{m.Name, at})
	}
	return out
}

func provenance(plant *network.Plant, r *network.Result) [][2]string {
	out := [][2]string{{"Program", r.Program.Name + " " + r.Program.Version}, {"File", plant.File}, {"SHA-256 of the file", plant.SHA256}}
	for _, w := range work(r) {
		out = append(out, w)
	}
	out = append(out, [2]string{"Doubts", allowance(r)})
	if r.Allowance.Samples > 0 {
		out = append(out, [2]string{"Seed", strconv.FormatInt(r.Allowance.Seed, 10)})
	}
	return out
}
