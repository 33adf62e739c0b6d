package text

import (
	"fmt"
	"io"
	"strings"

	"headfall/network"
	"headfall/network/study"
)

// Plan writes the plan that was found: when it ends, its steps by the clock, and what forbids an earlier end.
func Plan(w io.Writer, plant *network.Plant, r *study.FoundPlan, opt Options) error {
	p := asked(w, plant, opt)
	switch {
	case r.Found:
		p.first("PLAN FOUND", network.Run, fmt.Sprintf("%s empty by %s%s; every limit holds%s", strings.Join(r.Empties, " and "), p.clock.When(*r.Finish, Up), p.band(r.Low, r.High), allowance(r.Result)))
	case !r.Complete:
		p.first("NOT FINISHED", network.NotJudged, "no plan was found so far")
	default:
		p.first("NO PLAN FOUND", network.DoNotRun, "with what is marked free, no plan keeps every limit")
	}
	if opt.Quiet {
		return p.err
	}
	p.about(r.Scenario, r.Ending)
	for _, f := range r.Fails {
		p.put("Cannot keep", "%s", f)
	}
	if len(r.Promising) > 0 {
		p.put("Best so far", "%s; not judged with the doubts", strings.Join(r.Promising, ", "))
	}
	if r.Found {
		p.plannedSteps(r)
		p.hand("Least margin", r.Tightest)
		p.holdBack(r)
	}
	said := Words(r.Written.Verdict)
	if r.Written.Finish != nil {
		said += ", empty by " + keep(p.clock.When(*r.Written.Finish, Up))
	}
	if r.Written.Why != "" {
		said += "; " + r.Written.Why
		if r.Written.Verdict != network.NotJudged {
			said += " does not hold"
		}
	}
	p.put("As written", "%s", said)
	p.put("Tried", "%s, %d judged", counted(r.Searched, "plan", "plans"), r.Judged)
	if r.Found {
		p.tryIt(r.Scenario, r.Set)
	}
	return p.close(r.ExitCode)
}

// plannedSteps writes the steps that were free.
func (p *page) plannedSteps(r *study.FoundPlan) {
	rows := [][]string{{"Step", "when", "what", "in the file"}}
	for _, s := range r.Steps {
		when, was := "-", []string{}
		if s.At != nil {
			when = p.clock.At(*s.At, Near)
		}
		if s.WasAt != nil {
			was = append(was, p.clock.At(*s.WasAt, Near))
		}
		if s.WasTo != nil {
			was = append(was, network.Percent(*s.WasTo))
		}
		rows = append(rows, []string{pad(s.ID, indent-2), when, s.Says, join(was, ", ")})
	}
	p.raw("\n" + table(rows, 1, 2, 3) + "\n")
}

// holdBack writes which moves would end sooner, and what forbids them.
func (p *page) holdBack(r *study.FoundPlan) {
	label := "Binds"
	for _, b := range r.Binds {
		switch {
		case b.Limit == "the end of what is marked free":
			p.put(label, "%s is the end of what is marked free", b.Move)
		default:
			p.put(label, "%s would end sooner, but %s would not hold%s", b.Move, b.Limit, allowed(r.Result))
		}
		label = ""
	}
	if len(r.Binds) == 0 {
		p.put("Binds", "nothing: no single move would end sooner")
	}
}

func allowed(r *network.Result) string {
	if r == nil || r.Allowance.Doubts == "none" {
		return ""
	}
	return " with its doubts"
}
