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
		at, name := stamp(p.clock.At(*h.At, Near)), h.ID
		if what := strings.TrimPrefix(h.Says, "HOLD: "); what != "" {
			name += ", " + what + ","
		}
		switch {
		case h.LongestWait == nil:
			said := "how long it may last is not known"
			if p.res.Verdict == network.DoNotRun {
				said = "no wait is told, since the plan fails without one"
			}
			p.put("Hold", "%s%s: %s", at, strings.TrimSuffix(name, ","), said)
		case *h.LongestWait >= h.UpTo:
			p.put("Hold", "%s%s may last its full %s", at, name, keep(Duration(h.UpTo, Down)))
		default:
			p.put("Hold", "%s%s may last until %s (%s); the plan allows %s", at, name, keep(p.clock.At(*h.At+*h.LongestWait, Down)),
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
		said := "no other limit is reached after it"
		if a.Have != nil {
			said = keep(Duration(*a.Have, Down)) + " until " + p.reached(a)
			if a.Need != nil {
				said += "; " + keep(Duration(*a.Need, Up)) + " needed to act"
				if *a.Need > *a.Have {
					said += ": TOO SHORT"
				}
			}
		}
		if _, tail, answered := strings.Cut(a.Says, "; answered, "); answered {
			said += ". Acted on, " + p.plainly(tail)
		}
		p.put("Alarm", "%s%s %s: %s", stamp(p.clock.When(*a.At, Down)), a.Vessel, a.Name, said)
	}
}

// reached is what the vessel of an alarm breaks after it.
func (p *page) reached(a *network.AlarmResult) string {
	for _, l := range p.res.Limits {
		if a.LimitAt != nil && l.FirstFail != nil && *l.FirstFail == *a.LimitAt && p.verb(l) != "" {
			return "it " + p.verb(l) + " " + p.bound(l)
		}
	}
	return "the limit"
}

// plainly says a limit that a sentence names as the rest of the page does.
func (p *page) plainly(said string) string {
	for _, l := range p.res.Limits {
		if rest, found := strings.CutPrefix(said, l.Says+" still fails"); found && p.verb(l) != "" {
			return p.name(l) + " still " + p.verb(l) + " " + p.bound(l) + rest
		}
	}
	return said
}
