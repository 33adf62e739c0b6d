package text

import (
	"fmt"
	"io"
	"math"
	"strings"

	"headfall/elements/quantity"
	"headfall/network"
	"headfall/network/study"
)

const (
	rowsShown = 30 // readings printed; JSON holds all
	barHalf   = 10 // columns of a residual's bar either way
)

// Fit writes the numbers that were fitted with their bands, what to mind, and the readings beside the fit.
func Fit(w io.Writer, plant *network.Plant, r *study.FitResult, opt Options) error {
	p := asked(w, plant, opt)
	words, v := "FITTED", network.Run
	switch {
	case !r.Complete:
		words, v = "NOT FINISHED", network.NotJudged
	case r.Verdict == study.NotApart:
		words, v = "CANNOT BE TOLD", network.TooClose
	case r.Verdict == study.NotFitted:
		words, v = "DID NOT SETTLE", network.NotJudged
	}
	var said []string
	for _, x := range r.Values {
		said = append(said, x.Name+" "+x.Says)
	}
	p.first(words, v, strings.Join(said, "; "))
	if opt.Quiet {
		return p.err
	}
	p.about(r.Scenario, r.Ending)
	for _, x := range r.Values {
		p.fitted(x)
	}
	p.put("Readings", "%d of %d used, scatter %s", r.Used, r.Of, keep(figures(1000*r.Scatter, 2, 0.1, Up)+" mm"))
	for _, tag := range r.Tags() {
		t := r.Range[tag]
		p.put("Tested", "%s from %s down to %s, %s", tag, keep(fine3(t.High)), keep(fine3(t.Low)), p.exactly(t.From)+" to "+p.exactly(t.To))
	}
	p.list("Mind", r.Warnings)
	p.residuals(r)
	if r.Verdict == study.Fitted {
		for _, x := range r.Values {
			p.put("Write", "%s: %s", x.Name, keep(x.Says))
		}
	}
	return p.close(r.ExitCode)
}

// fitted writes one number.
func (p *page) fitted(x *study.FittedValue) {
	show := func(v float64) string { return keep(numberOf(x, v)) }
	said := "was " + show(x.Was)
	if x.Low != nil {
		said += "; 95 % band by the readings alone " + show(*x.Low) + " to " + show(*x.High)
	}
	if x.LowAll != nil && len(x.PulledBy) > 0 {
		said += ", with the doubts of what was not fitted " + show(*x.LowAll) + " to " + show(*x.HighAll) + ", most by " + x.PulledBy[0].Name
	}
	p.put("Value", "%s %s, %s", x.Name, show(x.Value), said)
}

// numberOf writes a value of a fitted number, four figures.
func numberOf(x *study.FittedValue, v float64) string {
	unit := x.Shown
	if x.Dim.Bare() {
		unit = ""
	}
	return quantity.Format(v, x.Dim, unit, 4)
}

func fine3(m float64) string { return quantity.Format(m, quantity.Length, "m", 3) }

// residuals writes the readings beside the fit: all of them, or evenly chosen ones and all that were left out.
func (p *page) residuals(r *study.FitResult) {
	if len(r.Rows) == 0 {
		return
	}
	most := 0.0
	for _, x := range r.Rows {
		if x.Weight > 0 {
			most = math.Max(most, math.Abs(x.Read-x.Level))
		}
	}
	every := (len(r.Rows) + rowsShown - 1) / rowsShown
	rows := [][]string{{"Time", "vessel", "read", "fitted", "read less fitted", ""}}
	for i, x := range r.Rows {
		if i%every != 0 && x.Weight > 0 {
			continue
		}
		off := x.Read - x.Level
		mark := bar(off, most)
		if x.Weight == 0 {
			mark = "left out"
		}
		rows = append(rows, []string{pad(p.exactly(x.Time), indent-2), x.Vessel, fine3(x.Read), fine3(math.Max(0, x.Level)), fmt.Sprintf("%+.1f mm", 1000*off), mark})
	}
	p.raw("\n" + table(rows, 1, 5) + "\n")
}

// bar draws a residual as a mark left or right of the middle.
func bar(v, most float64) string {
	line := []rune(strings.Repeat(" ", barHalf) + "|" + strings.Repeat(" ", barHalf))
	if most > 0 {
		at := barHalf + int(math.Round(v/most*barHalf))
		line[max(0, min(2*barHalf, at))] = '*'
	}
	return strings.TrimRight(string(line), " ")
}
