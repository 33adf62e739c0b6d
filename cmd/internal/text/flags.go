package text

import "headfall/network"

const flagsShown = 5

// elsewhere are the flags that other lines of the page tell already.
var elsewhere = map[string]bool{"ran_backwards": true, "step_never_reached": true}

// flags writes what is worth acting on, in the order of the clock.
func (p *page) flags() {
	var list []*network.Flag
	for _, f := range p.res.Flags {
		if !elsewhere[f.Kind] && f.Says != "" {
			list = append(list, f)
		}
	}
	for i, f := range list {
		if i == flagsShown {
			p.put("", "and %s in the report", counted(len(list)-i, "more", "more"))
			return
		}
		label := ""
		if i == 0 {
			label = "Watch"
		}
		p.put(label, "%s%s", stamp(p.clock.Span(f.From, f.To)), join([]string{f.Says, f.Do}, " "))
	}
}
