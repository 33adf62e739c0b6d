package study

import (
	"headfall/elements"
	"headfall/network"
)

// valveLine returns the line that a valve is in and the valve, or nil.
func valveLine(p *network.Plant, tag string) (*network.Line, *elements.Actuator) {
	for _, l := range p.Lines {
		for _, f := range l.Parts {
			if a, ok := f.Part.(elements.Actuated); ok && a.Actuator().Tag == tag {
				return l, a.Actuator()
			}
		}
	}
	return nil, nil
}

// feeding returns the vessels that a line draws from: the one it leaves, or those behind the tee it leaves, through lines that run towards it.
func feeding(p *network.Plant, l *network.Line) []*network.Vessel {
	var out []*network.Vessel
	seen := map[string]bool{}
	var walk func(tag string)
	walk = func(tag string) {
		if seen[tag] {
			return
		}
		seen[tag] = true
		for _, v := range p.Vessels {
			if v.Tag == tag {
				out = append(out, v)
				return
			}
		}
		for _, t := range p.Tees {
			if t.Tag != tag {
				continue
			}
			for _, m := range p.Lines {
				if m.To == tag {
					walk(m.From)
				}
			}
		}
	}
	walk(l.From)
	return out
}
