package text

import (
	"io"
	"strings"

	"headfall/elements/quantity"
	"headfall/network"
	"headfall/network/study"
)

// asked is the page of a study that answers one question about one plan.
func asked(w io.Writer, plant *network.Plant, opt Options) *page {
	return &page{sheet: newSheet(w, opt.Width), plant: plant, opt: opt, clock: Clock{Start: plant.Start}, units: UnitsOf(plant.Show)}
}

// first writes the answer's first words and what they are about.
func (p *page) first(words string, v network.Verdict, rest string) {
	p.raw(soft(paint(words, v, p.opt.Colour) + " - " + rest + "\n"))
}

// about names the plan, and why an answer is not whole.
func (p *page) about(s network.Scenario, e study.Ending) {
	said := []string{s.Title}
	if s.Revision != "" {
		said = append(said, "revision "+s.Revision)
	}
	if s.Case != nil && *s.Case != "" {
		said = append(said, "case "+*s.Case)
	}
	if day := p.clock.Day(); day != "" {
		said = append(said, "starts "+keep(day))
	}
	p.put("Plan", "%s", join(said, ", "))
	if !e.Complete {
		p.put("Not finished", "%s; what follows is what was found by then", e.Trouble)
	}
}

// hand writes what a limit has in hand.
func (p *page) hand(label string, m *study.Margin) {
	if m == nil || m.SI == nil || m.Of == nil {
		return
	}
	l := m.Of
	said := p.named(l) + ": " + keep(p.value(l, *m.SI, true, Down)) + " in hand"
	if *m.SI < 0 {
		said = p.named(l) + ": " + keep(p.value(l, -*m.SI, true, Up)) + " short"
	}
	if l.MarginLow != nil && l.MarginHigh != nil {
		said += ", band " + keep(p.value(l, *l.MarginLow, true, Down)+" to "+p.value(l, *l.MarginHigh, true, Down))
	}
	p.put(label, "%s", said)
}

// close writes what was saved and how the program ends.
func (p *page) close(exit int) error {
	for _, name := range p.opt.Saved {
		p.put("Saved", "%s", keep(name))
	}
	p.put("Exit code", "%d", exit)
	return p.err
}

// tryIt writes how to run what was found.
func (p *page) tryIt(of network.Scenario, set []string) {
	file := of.File
	if file == "" || strings.ContainsAny(file, " ") {
		file = "FILE"
	}
	said := "headfall run " + file
	if of.Case != nil {
		said += " --case " + *of.Case
	}
	for _, s := range append(p.opt.Set[:len(p.opt.Set):len(p.opt.Set)], set...) {
		if strings.ContainsAny(s, " %:") {
			s = "'" + s + "'"
		}
		said += " --set " + keep(s)
	}
	p.put("Run it", "%s", said)
}

// band writes " (band 08:01 to 08:12)" of a moment; "" without one.
func (p *page) band(low, high *float64) string {
	switch {
	case low == nil:
		return ""
	case high == nil:
		return " (band from " + keep(p.clock.At(*low, Down)) + ", not always)"
	}
	return " (band " + keep(p.clock.At(*low, Down)+" to "+p.clock.At(*high, Up)) + ")"
}

// exactly writes the moment of a reading to the second.
func (p *page) exactly(s float64) string {
	if p.clock.Start.IsZero() {
		return quantity.FormatDuration(s)
	}
	h, m, sec := p.clock.Start.Clock()
	return quantity.FormatClock(s + float64(h*3600+m*60+sec))
}
