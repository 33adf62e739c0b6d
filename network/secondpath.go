package network

import (
	"sort"
	"strings"

	"headfall/elements"
)

// secondPath says what a valve that is shut, and that no step moves, would let through if it were not: from where to where. It is "" for the
// valves of the plan. Tees are followed through lines that are open at the start or that the plan opens.
func (p *Plant) secondPath(l *Line, a *elements.Actuator) string {
	if a.Open > 0 || p.moved(a.Tag) {
		return ""
	}
	from, to := p.beyondTees(l.From, l, nil), p.beyondTees(l.To, l, nil)
	if len(from) == 0 || len(to) == 0 {
		return ""
	}
	return strings.Join(from, ", ") + " to " + strings.Join(to, ", ")
}

// moved tells whether some step moves the valve.
func (p *Plant) moved(valve string) bool {
	for _, s := range p.Steps {
		if s.Action == MoveValve && s.Target == valve {
			return true
		}
	}
	return false
}

// beyondTees returns the vessels and outside points that are reached from a tag without passing line not, by name.
func (p *Plant) beyondTees(tag string, not *Line, seen map[string]bool) (tags []string) {
	if p.tee(tag) == nil {
		return []string{tag}
	}
	if seen == nil {
		seen = map[string]bool{}
	}
	if seen[tag] {
		return nil
	}
	seen[tag] = true
	for _, l := range p.meets[tag] {
		if l == not || !p.passable(l) {
			continue
		}
		far := l.To
		if far == tag {
			far = l.From
		}
		for _, t := range p.beyondTees(far, l, seen) {
			if i := sort.SearchStrings(tags, t); i == len(tags) || tags[i] != t {
				tags = append(tags, t)
				sort.Strings(tags)
			}
		}
	}
	return tags
}

// passable tells whether every valve of a line is open at the start or moved by the plan.
func (p *Plant) passable(l *Line) bool {
	for _, f := range l.Parts {
		if v, ok := f.Part.(elements.Actuated); ok {
			if a := v.Actuator(); a.Open == 0 && !p.moved(a.Tag) {
				return false
			}
		}
	}
	return true
}
