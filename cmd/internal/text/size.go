package text

import (
	"fmt"
	"io"

	"headfall/network"
	"headfall/network/study"
)

// Size writes the value that was found, what it leaves in hand, and what forbids the next.
func Size(w io.Writer, plant *network.Plant, r *study.SizeResult, opt Options) error {
	p := asked(w, plant, opt)
	switch {
	case r.Found:
		p.first(r.As, network.Run, fmt.Sprintf("the %s %s with which every limit holds%s", r.Looking, r.Name, allowance(r.Result)))
	case !r.Complete:
		p.first("NOT FINISHED", network.NotJudged, "the "+r.Looking+" "+r.Name+" with which every limit holds is not known")
	default:
		p.first("NOTHING FOUND", network.DoNotRun, fmt.Sprintf("no %s between the ends with which every limit holds", r.Name))
	}
	if opt.Quiet {
		return p.err
	}
	p.about(r.Scenario, r.Ending)
	p.hand("Least margin", r.Tightest)
	switch {
	case r.NextAs != "":
		p.put("Not", "%s: %s", keep(r.NextAs), r.Next)
	case !r.Found && r.Next != "":
		p.put("Nearest to it", "%s does not hold", r.Next)
	}
	p.turning(r)
	for i, h := range r.HoldsAs {
		label := "Holds"
		if i > 0 {
			label = ""
		}
		p.put(label, "%s", keep(h))
	}
	if len(r.Holds) > 1 {
		p.put("Mind", "it holds in several stretches with gaps between them: more is not always worse")
	}
	if r.Found {
		p.tryIt(r.Scenario, []string{r.Name + "=" + r.As})
	}
	return p.close(r.ExitCode)
}

// turning writes where a plain run ceases to hold.
func (p *page) turning(r *study.SizeResult) {
	if r.Edge != nil {
		said := "without allowance for doubts it holds up to " + keep(r.EdgeAs)
		if r.Looking == "smallest" {
			said = "without allowance for doubts it holds from " + keep(r.EdgeAs) + " on"
		}
		if r.Beyond == "" {
			said += ", the end of what was looked at"
		} else {
			said += "; beyond: " + r.Beyond
		}
		p.put("Plain run", "%s", said)
	}
}

// allowance says what the verdict allows for.
func allowance(r *network.Result) string {
	if r == nil || r.Allowance.Doubts == "none" {
		return ", without allowance for doubts"
	}
	return ", doubts allowed for"
}
