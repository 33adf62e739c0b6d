package text

import (
	"strings"

	"headfall/network"
)

// holds writes how long each hold may last before a limit goes.
func (p *page) holds() {
	for _, h := range p.res.Holds {
		if h.At == nil {
			continue
		}
		at := stamp(p.clock.At(*h.At, Near))
		switch {
		case h.LongestWait == nil:
			said := "how long it may last is not known"
			if p.res.Verdict == network.DoNotRun {
				said = "no wait is told, since the plan fails without one"
			}
			p.put("Hold", "%s%s: %s", at, h.ID, said)
		case *h.LongestWait >= h.UpTo:
			p.put("Hold", "%s%s may last its full %s", at, h.ID, keep(Duration(h.UpTo, Down)))
		default:
			p.put("Hold", "%s%s may last until %s (%s); the plan allows %s", at, h.ID, keep(p.clock.At(*h.At+*h.LongestWait, Down)),
				keep(Duration(*h.LongestWait, Down)), keep(Duration(h.UpTo, Up)))
		}
	}
}

// alarms writes, for every alarm that comes, whether there is time to act on it.
func (p *page) alarms() {
	for _, a := range p.res.Alarms {
		if a.At == nil {
			continue
		}
		said := "no limit is reached after it"
		if a.Have != nil {
			said = keep(Duration(*a.Have, Down)) + " until the limit"
			if a.Need != nil {
				said += ", " + keep(Duration(*a.Need, Up)) + " needed"
				if *a.Need > *a.Have {
					said += ": TOO SHORT"
				}
			}
		}
		if _, tail, answered := strings.Cut(a.Says, "; answered, "); answered {
			said += "; answered, " + tail
		}
		p.put("Alarm", "%s%s %s: %s", stamp(p.clock.When(*a.At, Down)), a.Vessel, a.Name, said)
	}
}
