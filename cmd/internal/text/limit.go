package text

import (
	"strings"

	"headfall/elements/quantity"
	"headfall/network"
)

// nouns are what a limit looks at, as it is spoken of after the tag.
var nouns = map[string]string{
	"level": "level", "flow": "flow", "velocity": "velocity", "pressure": "gas pressure", "crest": "head at the high point",
	"opening": "opening", "difference": "difference of levels", "rising": "rate of rise", "falling": "rate of fall",
	"passed": "volume passed", "backflow": "volume run back", "spilled": "volume spilled", "starts": "starts", "emptied": "time to empty",
}

// value writes a number of a limit's kind; apart is a difference, not a reading.
func (p *page) value(l *network.LimitResult, si float64, apart bool, dir Dir) string {
	switch l.Subject {
	case "level", "difference", "crest":
		return p.units.LevelOf(si, dir)
	case "flow":
		return p.units.FlowOf(si, dir)
	case "passed", "backflow", "spilled":
		return p.units.VolumeOf(si, dir)
	case "pressure":
		if apart {
			return p.units.PressureBy(si, dir)
		}
		return p.units.PressureOf(si, dir)
	case "opening":
		return figures(si*100, 3, 1, dir) + " %"
	case "velocity", "rising", "falling":
		return inUnit(si, quantity.Velocity, rateUnit(l), dir)
	case "emptied":
		if apart {
			return Duration(si, dir)
		}
		return p.clock.When(si, dir)
	}
	if l.UnitSI == "1" || l.UnitSI == "" { // a count
		return figures(si, 3, 1, dir)
	}
	return figures(si, 3, 0.001, dir) + " " + l.UnitSI
}

// rateUnit is the unit the limit was written in, so that both can be compared by eye.
func rateUnit(l *network.LimitResult) string {
	if v, err := quantity.Parse(l.AsWritten, quantity.Velocity); err == nil && v.Unit != "" {
		return v.Unit
	}
	if l.Subject == "velocity" {
		return "m/s"
	}
	return "mm/min"
}

// name writes "SUMP level", "T-1 and T-2 difference of levels".
func (p *page) name(l *network.LimitResult) string {
	noun, known := nouns[l.Subject]
	if !known {
		noun = l.Subject
	}
	return strings.Join(l.Of, " and ") + " " + noun
}

// named writes the limit in full: "SUMP level below 1.9 m".
func (p *page) named(l *network.LimitResult) string {
	if l.AsWritten == "" || len(l.Of) == 0 || l.Bound == "only_between" {
		return l.Says
	}
	return join([]string{p.name(l), l.Bound, p.bound(l)}, " ") + over(l)
}

// bound writes the bound as in the file; what the vessel itself bears is called by its name.
func (p *page) bound(l *network.LimitResult) string {
	switch {
	case l.Implicit && l.Why == "full and sealed" && l.BoundSI != nil:
		return "full and sealed, " + keep(p.units.LevelOf(*l.BoundSI, Down))
	case l.Implicit && l.Subject == "level" && l.BoundSI != nil:
		return "its rim, " + keep(p.units.LevelOf(*l.BoundSI, Down))
	case l.Implicit && l.Subject == "pressure":
		return "its rating, " + keep(l.AsWritten)
	}
	return keep(l.AsWritten)
}

// over writes the time over which a limit counts: ", averaged over 15 min".
func over(l *network.LimitResult) string {
	_, rest, found := strings.Cut(l.Says, ", ")
	if !found {
		return ""
	}
	return ", " + keep(rest)
}

// broken writes what happens when a limit fails: "SUMP level goes over 1.9 m".
func (p *page) broken(l *network.LimitResult) string {
	switch {
	case l.Subject == "emptied" && len(l.Of) > 0:
		return join([]string{l.Of[0], "is not empty", l.Bound, keep(l.AsWritten)}, " ")
	case p.verb(l) == "":
		return l.Says + " does not hold"
	}
	return join([]string{p.name(l), p.verb(l), p.bound(l)}, " ") + over(l)
}

// verb is what a thing does when it breaks a bound; "" for a limit that is no bound of one thing.
func (p *page) verb(l *network.LimitResult) string {
	if l.AsWritten == "" || len(l.Of) == 0 || l.Subject == "emptied" {
		return ""
	}
	return map[string]string{"below": "goes over", "above": "goes under"}[l.Bound]
}

// worst writes the worst value and when: ", worst 2.91 m at 06:55".
func (p *page) worst(l *network.LimitResult) string {
	if l.Worst == nil || l.Subject == "emptied" {
		return ""
	}
	dir := Down
	if l.Bound == "below" {
		dir = Up
	}
	said := "comes to " + keep(p.value(l, *l.Worst, false, dir))
	if l.WorstAt != nil {
		said += " at " + keep(p.clock.At(*l.WorstAt, Near))
	}
	return said
}

// gravity ranks verdicts, the worst first.
func gravity(v network.Verdict) int {
	switch v {
	case network.Fails:
		return 0
	case network.TooClose:
		return 1
	case network.NotJudged:
		return 2
	}
	return 3
}
