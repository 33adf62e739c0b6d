package text

import (
	"fmt"
	"strconv"
	"strings"

	"headfall/network"
)

// verdict writes the first line: the words, how many limits stand behind them, and which plan this is.
func (p *page) verdict() {
	words := Words(p.res.Verdict)
	painted := paint(words, p.res.Verdict, p.opt.Colour)
	tail := ""
	if p.res.Allowance.Doubts == "none" && p.res.Verdict != network.NotJudged {
		tail = " without allowance"
	}
	p.raw(painted + tail + " - " + p.count() + "\n")
	if p.opt.Quiet {
		return
	}
	p.put("Plan", "%s", p.title())
}

// count says how many limits hold, fail, are too close, were not judged.
func (p *page) count() string {
	n := map[network.Verdict]int{}
	stated := 0
	for _, l := range p.res.Limits {
		n[l.Verdict]++
		if !l.Implicit {
			stated++
		}
	}
	all := len(p.res.Limits)
	var said []string
	if k := n[network.Fails]; k > 0 {
		verb := "fail"
		if k == 1 {
			verb = "fails"
		}
		said = append(said, fmt.Sprintf("%d of %s %s", k, counted(all, "limit", "limits"), verb))
	}
	if k := len(p.missed()); k > 0 {
		said = append(said, counted(k, "step is never reached", "steps are never reached"))
	}
	if k := len(p.missedHolds()); k > 0 {
		said = append(said, counted(k, "hold is never reached", "holds are never reached"))
	}
	if n[network.TooClose] > 0 {
		said = append(said, fmt.Sprintf("%d of %s too close to call", n[network.TooClose], counted(all, "limit", "limits")))
	}
	if n[network.NotJudged] > 0 {
		said = append(said, fmt.Sprintf("%d of %s not judged", n[network.NotJudged], counted(all, "limit", "limits")))
	}
	if len(said) == 0 && all > 0 {
		said = append(said, counted(all, "limit holds", "limits hold")+", "+amount(stated)+" of them stated in the file")
	}
	if len(said) == 0 {
		said = append(said, "no limit to judge by")
	}
	return strings.Join(said, ", ")
}

func (p *page) title() string {
	said := []string{p.res.Scenario.Title}
	if r := p.res.Scenario.Revision; r != "" {
		said = append(said, "revision "+r)
	}
	if c := p.res.Scenario.Case; c != nil && *c != "" {
		said = append(said, "case "+*c)
	}
	if day := p.clock.Day(); day != "" {
		said = append(said, "starts "+keep(day))
	}
	return join(said, ", ")
}

func amount(n int) string {
	if n == 0 {
		return "none"
	}
	return strconv.Itoa(n)
}

// counted writes "1 limit", "3 limits".
func counted(n int, one, many string) string {
	if n == 1 {
		return "1 " + one
	}
	return fmt.Sprintf("%d %s", n, many)
}

// trouble says why there is no whole answer.
func (p *page) trouble() {
	if p.res.Complete {
		return
	}
	why := map[string]string{
		"interrupted": "interrupted", "failed": "the calculation could not go on",
	}[p.res.Stopped]
	if why == "" {
		why = "stopped"
	}
	until := p.clock.When(p.res.End, Down)
	p.put("Not finished", "%s; what follows reaches to %s", why, keep(until))
	if p.res.Trouble != "" {
		p.put("", "%s", p.res.Trouble)
	}
}
