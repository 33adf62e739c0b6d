package text

import (
	"fmt"
	"io"
	"strings"

	"headfall/network"
	"headfall/network/study"
)

// Flows writes the flow through a valve against its opening.
func Flows(w io.Writer, plant *network.Plant, r *study.FlowsResult, opt Options) error {
	p := asked(w, plant, opt)
	last := r.Rows[len(r.Rows)-1]
	if !r.Complete || len(last.Flows) == 0 {
		p.first("NOT FINISHED", network.NotJudged, "flow through "+r.Valve)
		return p.err
	}
	said := fmt.Sprintf("through %s wide open at full head", r.Valve)
	if r.HalfAt != nil {
		said += fmt.Sprintf("; half of it at about %s", percent(*r.HalfAt, Near))
	}
	p.first(p.units.FlowOf(last.Flows[0], Near), network.Run, said)
	if opt.Quiet {
		return p.err
	}
	p.about(r.Scenario, r.Ending)
	p.put("Valve", "%s in %s, all else as the plan has it at %s", r.Valve, r.Line, keep(p.clock.When(r.At, Near)))
	for _, h := range r.Heads {
		var levels []string
		for _, v := range feeds(plant, r) {
			levels = append(levels, v+" at "+keep(p.units.LevelOf(h.Levels[v], Near)))
		}
		p.put(strings.ToUpper(h.Name[:1])+h.Name[1:]+" head", "%s", strings.Join(levels, ", "))
	}
	p.installed(r)
	for _, n := range r.Notes {
		p.put("Mind", "%s", n)
	}
	return p.close(r.ExitCode)
}

// installed writes the table.
func (p *page) installed(r *study.FlowsResult) {
	last := r.Rows[len(r.Rows)-1]
	head := []string{"Open"}
	if r.Turns != nil {
		head = append(head, "turns")
	}
	for _, h := range r.Heads {
		head = append(head, h.Name)
	}
	rows := [][]string{append(head, "of full flow")}
	for _, x := range r.Rows {
		row := []string{pad(network.Percent(x.Opening), indent-2)}
		if x.Turns != nil {
			row = append(row, figures(*x.Turns, 3, 0.1, Down))
		}
		for _, q := range x.Flows {
			row = append(row, p.units.FlowOf(q, Near))
		}
		share := "-"
		if last.Flows[0] != 0 {
			share = soft(percent(x.Flows[0]/last.Flows[0], Near))
		}
		rows = append(rows, append(row, share))
	}
	p.raw("\n" + table(rows) + "\n")
}

// feeds lists the vessels whose level differs between the heads.
func feeds(plant *network.Plant, r *study.FlowsResult) []string {
	var tags []string
	for _, v := range plant.Vessels {
		if r.Heads[0].Levels[v.Tag] != r.Heads[len(r.Heads)-1].Levels[v.Tag] {
			tags = append(tags, v.Tag)
		}
	}
	return tags
}
