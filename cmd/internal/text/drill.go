package text

import (
	"fmt"
	"io"
	"strings"
	"time"

	"headfall/network"
	"headfall/network/study"
)

// drillShown is how many rehearsals are printed unless all are asked for.
const drillShown = 15

// studied is what pages of studies have in common.
type studied struct {
	*sheet
	clock Clock
	units Units
	opt   Options
}

func newStudied(w io.Writer, h *study.Head, opt Options) studied {
	s := studied{sheet: newSheet(w, opt.Width), opt: opt,
		units: UnitsOf(network.Show{Level: h.Show.Level, Flow: h.Show.Flow, Volume: h.Show.Volume, Pressure: h.Show.Pressure})}
	if h.Scenario.Start != nil {
		s.clock.Start, _ = time.Parse("2006-01-02T15:04:05", *h.Scenario.Start)
	}
	return s
}

// plan names the plan.
func (s *studied) plan(h *study.Head) {
	said := []string{h.Scenario.Title}
	if r := h.Scenario.Revision; r != "" {
		said = append(said, "revision "+r)
	}
	if c := h.Scenario.Case; c != nil && *c != "" {
		said = append(said, "case "+*c)
	}
	if day := s.clock.Day(); day != "" {
		said = append(said, "starts "+keep(day))
	}
	s.put("Plan", "%s", join(said, ", "))
}

// Drill writes a drill as a shift lead reads it: what fails, the one that leaves the least time to act first; then how far each step may be moved.
func Drill(w io.Writer, d *study.DrillResult, opt Options) error {
	s := newStudied(w, &d.Head, opt)
	s.drillFirst(d)
	if opt.Quiet {
		return s.err
	}
	s.plan(&d.Head)
	s.unfinished(d.Complete, d.Done, d.Of, "rehearsals and steps", d.Trouble)
	s.rehearsals(d)
	s.drillSteps(d)
	s.put("Leaves out", "doubts in the numbers (see spread); faults that come together (--pairs)")
	for _, name := range opt.Saved {
		s.put("Saved", "%s", keep(name))
	}
	s.put("Exit code", "%d, of the plan itself", d.ExitCode)
	return s.err
}

func (s *studied) drillFirst(d *study.DrillResult) {
	words := "PLAN HOLDS"
	if d.Plan.Verdict != network.Run {
		words = "PLAN FAILS"
	}
	v := d.Plan.Verdict
	if !d.Complete {
		words, v = "NOT FINISHED", network.NotJudged
	}
	s.raw(fmt.Sprintf("%s - %d of %s\n", paint(words, v, s.opt.Colour), d.Fails, counted(len(d.Cases), "rehearsal fails a limit", "rehearsals fail a limit")))
	if d.Plan.FirstFail != nil && !s.opt.Quiet {
		s.put("By itself", "%s%s fails", stamp(s.clock.When(*d.Plan.FirstFail, Down)), d.Plan.Limit)
	}
}

// unfinished says how far it came.
func (s *studied) unfinished(complete bool, done, of int, what, why string) {
	if complete {
		return
	}
	said := fmt.Sprintf("%d of %d %s were done", done, of, what)
	s.put("Not finished", "%s", join([]string{said, why}, "; "))
}

// rehearsals writes what fails, and counts what does not.
func (s *studied) rehearsals(d *study.DrillResult) {
	as, lost, holds := 0, 0, 0
	shown := 0
	for _, r := range d.Cases {
		switch {
		case r.Verdict == network.Holds:
			holds++
		case r.Verdict == network.NotJudged:
			lost++
			s.put("Not known", "%s: %s", r.Case, r.Trouble)
		case r.AsPlanned:
			as++
		default:
			if shown++; shown <= drillShown || s.opt.All {
				s.rehearsal(r)
			}
		}
	}
	if rest := shown - drillShown; rest > 0 && !s.opt.All {
		s.put("", "and %s; --all shows them", counted(rest, "more that fails", "more that fail"))
	}
	if as > 0 {
		s.put("As planned", "%s no more than the plan itself does", counted(as, "rehearsal fails", "rehearsals fail"))
	}
	if holds > 0 {
		s.put("Holds", "%s every limit", counted(holds, "rehearsal keeps", "rehearsals keep"))
	}
}

// rehearsal writes one: the time to act in front, then when, what goes wrong and what follows.
func (s *studied) rehearsal(r *study.DrillRow) {
	label := "At once"
	if r.TimeToAct != nil && *r.TimeToAct >= 0.1 {
		label = Duration(*r.TimeToAct, Down)
	}
	when := ""
	if r.FirstFail != nil {
		when = stamp(s.clock.When(*r.FirstFail, Down))
	} else {
		label = "Not done"
	}
	said := []string{r.Case + ": " + follows(r)}
	if r.Spilled > 0 {
		said = append(said, "spills "+keep(s.units.VolumeOf(r.Spilled, Up)))
	} else if r.Headroom != nil && *r.Headroom >= 0 && strings.HasPrefix(r.Limit, "level") {
		said = append(said, "least headroom "+keep(s.units.LevelOf(*r.Headroom, Down))+" in "+r.WorstVessel)
	}
	if r.TimeToAct != nil && strings.HasPrefix(r.Since, "alarm") {
		said = append(said, s.answered(r))
	}
	s.put(label, "%s%s", when, join(said, "; "))
}

// follows says what fails.
func follows(r *study.DrillRow) string {
	if r.Limit == "" {
		return strings.Join(r.NotReached, ", ") + " never come"
	}
	said := r.Limit + " fails"
	if r.Fails > 1 {
		said += fmt.Sprintf(" (%d limits in all)", r.Fails)
	}
	return said
}

// answered says how the time to act compares with what an answer to the alarm takes.
func (s *studied) answered(r *study.DrillRow) string {
	said := "from " + r.Since
	if r.ActBefore != r.Limit {
		said += " to " + r.ActBefore
	}
	if r.Need == nil {
		return said
	}
	said += ", " + keep(Duration(*r.Need, Up)) + " needed to act"
	switch {
	case r.Answered == "holds":
		return said + "; acted on, that holds"
	case *r.Need > *r.TimeToAct:
		return said + ": TOO SHORT"
	case r.Answered == "fails":
		return said + "; acted on, it still fails"
	}
	return said
}

// drillSteps writes how early and how late each step may be.
func (s *studied) drillSteps(d *study.DrillResult) {
	if len(d.Steps) == 0 {
		if d.Plan.Verdict != network.Run {
			s.put("Steps", "how early or late they may be is not known while the plan itself fails")
		}
		return
	}
	rows := [][]string{{"Step", "planned", "not before", "not later than", ""}}
	for _, m := range d.Steps {
		early, late := "-", "-"
		if m.Earliest != nil {
			early = s.clock.At(*m.Earliest, Up)
			if m.Fixed {
				early = "any time"
			}
		}
		if m.Latest != nil {
			late = s.clock.At(*m.Latest, Down)
			if m.Unbounded {
				late = "any time"
			}
		}
		rows = append(rows, []string{pad(m.ID, indent-2), s.clock.At(m.At, Near), early, late, m.Says})
	}
	s.raw("\n" + table(rows, len(rows[0])-1) + "\n")
}
