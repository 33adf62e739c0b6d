package text

import (
	"io"

	"headfall/network"
)

// Options are how a page is written.
type Options struct {
	Width  int  // columns of the terminal; 0 when there is none
	Colour bool // paint the verdict
	Quiet  bool // the first line only
	All    bool // every rehearsal of a drill
	Report string
	Set    []string // what --set changed, for words that tell how to run it again
	Saved  []string // other files written
}

// page is one answer being written.
type page struct {
	*sheet
	plant *network.Plant
	res   *network.Result
	clock Clock
	units Units
	opt   Options
	steps map[string]*network.Step
}

// Run writes the answer of one run: the verdict first, then what a shift lead asks next, in the order it is asked.
func Run(w io.Writer, plant *network.Plant, res *network.Result, opt Options) error {
	p := &page{
		sheet: newSheet(w, opt.Width), plant: plant, res: res, opt: opt,
		clock: Clock{plant.Start, res.End}, units: UnitsOf(plant.Show), steps: map[string]*network.Step{},
	}
	for _, s := range plant.Steps {
		p.steps[s.ID] = s
	}
	p.verdict()
	if opt.Quiet {
		return p.err
	}
	for _, section := range []func(){
		p.trouble, p.failures, p.tooClose, p.margin, p.finish, p.headroom,
		p.left, p.backward, p.holds, p.alarms, p.flags, p.gap, p.cautions, p.assumed, p.files,
	} {
		section()
	}
	return p.err
}

// files says what was written and how the program ends.
func (p *page) files() {
	for _, name := range p.opt.Saved {
		p.put("Saved", "%s", keep(name))
	}
	report := "none written"
	if p.opt.Report != "" {
		report = p.opt.Report
	}
	p.put("Report", "%s, exit code %d", keep(report), p.res.ExitCode)
}
