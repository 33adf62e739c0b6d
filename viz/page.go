package viz

import (
	"bytes"
	"errors"
	"html/template"
	"io"
	"strings"

	"headfall/network"
	"headfall/network/study"
	"headfall/viz/export"
)

// Page is what a report shows: a plant, what was computed for it, and the studies made of it, if any.
type Page struct {
	Plant  *network.Plant
	Result *network.Result
	Drill  *study.DrillResult  // nil when none was made
	Spread *study.SpreadResult // nil when none was made
}

// view is everything that the templates print.
type view struct {
	CSP, Title         string
	CSS                template.CSS
	Script, Echarts    template.JS
	Cells              [][2]string
	V                  verdictView
	Cautions           []string
	Contents           [][2]string
	Headroom           []headroomRow
	HasBands, Whiskers bool
	Margins            []marginRow
	Reach, StartClock  string
	Picture            picture
	Readings           readings
	Lanes              []lane
	Ticks              []tick
	Axis               []axisLabel
	TickRows           int // px over the first row of steps
	Groups             []group
	Sheet              []*sheetPage
	Balance            balanceView
	Drill              *drillView
	Spread             *spreadView
	Alarms, Milestones [][]string
	Flags              []flagRow
	Inputs             inputsView
	OutsideModel       []string
	Provenance         [][2]string
	Text, Notices      string
	Data               dataset
	Live, ResultJSON   template.JS
}

var templates = template.Must(template.ParseFS(assets, "assets/*.tmpl"))

// Write writes the report: one self-contained HTML file, byte-identical for the same page.
func Write(w io.Writer, p Page) error {
	v, err := newView(p)
	if err != nil {
		return err
	}
	lib, err := echarts()
	if err != nil {
		return err
	}
	script := asset("report.js")
	v.Echarts, v.Script = template.JS(lib), template.JS(script)
	v.CSS = template.CSS(asset("report.css") + asset("sheet.css"))
	v.CSP = "default-src 'none'; script-src " + cspHash(lib) + " " + cspHash(script) +
		"; style-src 'unsafe-inline'; img-src data:; base-uri 'none'; form-action 'none'"
	return execute(w, "report.html.tmpl", v)
}

// WriteSheet writes the sequence sheet alone, as HTML for print.
func WriteSheet(w io.Writer, p Page) error {
	if p.Plant == nil || p.Result == nil {
		return errNothing
	}
	u, c := newUnits(p.Plant.Show), newClock(p)
	v := view{Title: title(p.Plant), Sheet: sheetPages(p, sheetRows(p, u, c), c, handovers(p, u, c))}
	v.CSS = template.CSS(asset("sheet.css"))
	v.CSP = "default-src 'none'; style-src 'unsafe-inline'; base-uri 'none'; form-action 'none'"
	return execute(w, "sheetonly", v)
}

// execute prints a template, without the characters that turn the direction of text: what stands on a sheet must read as it was written.
func execute(w io.Writer, name string, v any) error {
	var b bytes.Buffer
	if err := templates.ExecuteTemplate(&b, name, v); err != nil {
		return err
	}
	_, err := turning.WriteString(w, b.String())
	return err
}

var turning = strings.NewReplacer("\u202a", "", "\u202b", "", "\u202c", "", "\u202d", "", "\u202e", "", "\u2066", "", "\u2067", "", "\u2068", "",
	"\u2069", "", "\u200e", "", "\u200f", "")

var errNothing = errors.New("report: no plant or no result to show")

func title(plant *network.Plant) string {
	switch {
	case plant.Title != "":
		return clean(plant.Title)
	case plant.File != "":
		return clean(plant.File)
	}
	return "Untitled plant"
}

// newView works out everything that the page prints.
func newView(p Page) (*view, error) {
	if p.Plant == nil || p.Result == nil {
		return nil, errNothing
	}
	plant, r := p.Plant, p.Result
	u, c := newUnits(plant.Show), newClock(p)
	rows := sheetRows(p, u, c)
	v := &view{Title: title(plant), V: newVerdict(plant, r, u, c), Cautions: cautions(plant, r)}
	v.Cells = cells4(plant, r, c)
	v.Headroom = headroom(plant, r, u, c)
	for _, h := range v.Headroom {
		v.HasBands = v.HasBands || h.Band != ""
	}
	v.Margins, v.Reach = margins(r, u, c)
	for _, m := range v.Margins {
		v.Whiskers = v.Whiskers || m.Whisker
	}
	v.StartClock = c.At(0, earlier)
	v.Picture = elevation(plant, r, u, c)
	v.Readings = newReadings(plant, r, u)
	v.Lanes, v.Ticks, v.Axis = strip(plant, r), ticks(rows, r.End), axisLabels(r, c)
	for _, k := range v.Ticks {
		v.TickRows = max(v.TickRows, 23*k.Row)
	}
	v.Data = newDataset(plant, r, u, c, events(plant, r, rows))
	h := &charter{plant: plant, r: r, u: u, c: c, steps: rows, set: v.Data}
	v.Groups = h.groups()
	v.Sheet = sheetPages(p, rows, c, handovers(p, u, c))
	v.Drill, v.Spread = newDrill(p.Drill, u, c), newSpread(p.Spread, plant, u, c)
	v.Balance = balance(plant, r, u, c)
	v.Alarms, v.Milestones = alarms(r, c), milestones(r, c)
	v.Flags = flags(r, c)
	v.Inputs, v.OutsideModel = inputs(plant, r, u, c), outsideModel
	v.Provenance = provenance(plant, r)
	v.Text, v.Notices = clean(plant.Text), Notices()
	v.contents()
	var err error
	if v.Live, err = island(v.Picture.Live); err != nil {
		return nil, err
	}
	bare := *r
	bare.Series, bare.SeriesBand, bare.Work.Wall = nil, plainBand(r.SeriesBand), 0
	v.ResultJSON, err = island(bare)
	return v, err
}

// island writes data for a script element: JSON in which no character can end the element.
func island(x any) (template.JS, error) {
	var b bytes.Buffer
	err := export.JSON(&b, x)
	return template.JS(b.String()), err
}

// contents lists the sections that there are.
func (v *view) contents() {
	add := func(id, name string, there bool) {
		if there {
			v.Contents = append(v.Contents, [2]string{id, name})
		}
	}
	add("headroom", "Headroom", true)
	add("margins", "Margins", true)
	add("plant", "Plant", true)
	add("strip", "Openings in time", len(v.Lanes) > 0)
	for _, g := range v.Groups {
		add(g.ID, g.Title, true)
	}
	add("sheet", "Sequence sheet", true)
	add("drill", "Late, missed, stuck", v.Drill != nil)
	add("spread", "Doubts", v.Spread != nil)
	add("balance", "Balance", true)
	add("flags", "What happens", true)
	add("inputs", "Inputs", true)
	add("provenance", "Provenance", true)
}
