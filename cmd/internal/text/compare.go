package text

import (
	"io"

	"headfall/network"
	"headfall/network/study"
)

// Compare writes plans side by side: the best first in words, then a row each.
func Compare(w io.Writer, r *study.CompareResult, opt Options) error {
	if len(r.Rows) == 0 {
		s := newSheet(w, opt.Width)
		s.raw("NOT FINISHED - nothing was judged\n")
		return s.err
	}
	p := asked(w, r.Rows[0].Plant, opt)
	runs := 0
	for _, row := range r.Rows {
		if row.Verdict == network.Run {
			runs++
		}
	}
	switch {
	case r.Best != "" && runs == 1:
		p.first(r.Best, network.Run, "the only one that holds, of "+counted(len(r.Rows), "plan", "plans"))
	case r.Best != "":
		p.first(r.Best, network.Run, counted(runs, "plan holds", "plans hold")+" of "+amount(len(r.Rows))+"; of those it ends first")
	case !r.Complete:
		p.first("NOT FINISHED", network.NotJudged, "none of those judged holds")
	default:
		p.first("NONE HOLDS", network.DoNotRun, "of "+counted(len(r.Rows), "plan", "plans"))
	}
	if opt.Quiet {
		return p.err
	}
	if !r.Complete {
		p.put("Not finished", "%s; what follows is what was judged by then", r.Trouble)
	}
	p.compared(r)
	p.whyNot(r)
	p.put("Limits", "%d stated in the file and the rims, the same for all", len(r.Limits))
	for _, n := range r.Notes {
		p.put("Mind", "%s", n)
	}
	return p.close(r.ExitCode)
}

// whyNot says of each plan that does not hold what fails first.
func (p *page) whyNot(r *study.CompareResult) {
	label := "Why not"
	for _, row := range r.Rows {
		if row.Why == "" {
			continue
		}
		when := ""
		if row.FailsAt != nil {
			when = stamp(p.clock.When(*row.FailsAt, Down))
		}
		p.put(label, "%s: %s%s", row.Name, when, row.Why)
		label = ""
	}
}

// compared writes the table.
func (p *page) compared(r *study.CompareResult) {
	head := []string{"Plan", "verdict", "least headroom", "empty by", "band"}
	for _, o := range r.Outside {
		head = append(head, "peak to "+o)
	}
	rows := [][]string{append(head, "spilled")}
	for _, c := range r.Rows {
		room, finish, band := "-", "-", "-"
		if c.Headroom != nil {
			room = c.Vessel + " " + p.units.LevelOf(*c.Headroom, Down) + " to " + c.To
		}
		if c.Finish != nil {
			finish = p.clock.At(*c.Finish, Up)
		}
		if c.Low != nil && c.High != nil {
			band = p.clock.At(*c.Low, Down) + " to " + p.clock.At(*c.High, Up)
		}
		row := []string{pad(c.Name, indent-2), Words(c.Verdict), room, finish, band}
		for _, o := range r.Outside {
			if q, ok := c.Peaks[o]; ok {
				row = append(row, p.units.FlowOf(q, Up))
			} else {
				row = append(row, "-")
			}
		}
		spilled := "-"
		if c.Spilled > 0 {
			spilled = p.units.VolumeOf(c.Spilled, Up)
		}
		rows = append(rows, append(row, spilled))
	}
	p.raw("\n" + table(rows, 1, 2) + "\n")
}
