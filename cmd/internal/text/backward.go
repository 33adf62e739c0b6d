package text

import "fmt"

const reversalsShown = 4

// backward writes where liquid runs against the line's direction.
func (p *page) backward() {
	var said []string
	for _, l := range p.plant.Lines {
		r := p.res.Lines[l.Tag]
		if r == nil {
			continue
		}
		for _, b := range r.RunsBackward {
			said = append(said, fmt.Sprintf("%s%s into %s: %s, at most %s", stamp(p.clock.Span(b.From, b.To)), l.Tag, l.From,
				keep(p.units.VolumeOf(b.Volume, Up)), keep(p.units.FlowOf(b.Peak, Up))))
		}
	}
	if n := len(said) - reversalsShown; n > 0 {
		said = append(said[:reversalsShown], "and "+counted(n, "more", "more"))
	}
	p.list("Runs back", said)
}
