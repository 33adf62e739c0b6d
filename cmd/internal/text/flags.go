package text

import (
	"fmt"
	"slices"
	"strings"
	"unicode"
	"unicode/utf8"

	"headfall/network"
)

const flagsShown = 4

// elsewhere are the flags that other lines of the page tell already.
var elsewhere = map[string]bool{"ran_backwards": true, "step_never_reached": true}

// flags writes what is worth acting on, in the order of the clock; what comes again and again is written once.
func (p *page) flags() {
	list := p.gathered()
	for i, g := range list {
		if i == flagsShown {
			p.put("", "and %s in the report", counted(len(list)-i, "more", "more"))
			return
		}
		p.put(first(i, "Watch"), "%s%s", stamp(p.spell(g)), p.gathering(g))
	}
}

// gathering is one flag, how often it comes again and when it ends for good.
type gathering struct {
	first   *network.Flag
	again   int
	last    float64
	changes bool // it does not always say the same
	drains  []drained
}

// drained is a vessel whose last draws air, from a moment on.
type drained struct {
	tag  string
	from float64
}

// spell is when it is so.
func (p *page) spell(g *gathering) string {
	switch when := p.clock.Span(g.first.From, g.first.To); {
	case joined[g.first.Kind]:
		return p.clock.Span(g.first.From, g.last)
	case g.again > 0:
		return when + fmt.Sprintf(" and %s until %s", counted(g.again, "more time", "more times"), p.clock.At(g.last, Up))
	default:
		return when
	}
}

func (p *page) gathering(g *gathering) string {
	switch {
	case g.first.Kind == "air_drawn_in":
		return p.together(g)
	case g.changes:
		return sentences(g.first.Where+" runs part full or surges near its open end, at times; full-pipe flow is assumed", g.first.Do)
	}
	return sentences(g.first.Says, g.first.Do)
}

// together words what the inlets of several lines do.
func (p *page) together(g *gathering) string {
	var said []string
	for i, d := range g.drains {
		if i == placesShown {
			said = append(said, fmt.Sprintf("%d more", len(g.drains)-i))
			break
		}
		tag := d.tag
		if i > 0 {
			tag += " from " + p.clock.At(d.from, Down)
		}
		said = append(said, keep(tag))
	}
	return "the last of " + strings.Join(said, ", ") + " gulps air: flow surges and is slower than shown. Throttle, or stop before the last of it."
}

const placesShown = 6

// drains is the vessel that a line drains, or the line's own tag.
func (p *page) drains(tag string) string {
	for _, l := range p.plant.Lines {
		if l.Tag == tag && p.res.Vessels[l.From] != nil {
			return l.From
		}
	}
	return tag
}

// joined are the flags that are told once from their first moment to their last: air drawn in of all lines together, part-full flow of each line.
var joined = map[string]bool{"air_drawn_in": true, "part_full": true}

// gathered joins flags that say the same of the same place, and those that are told together.
func (p *page) gathered() []*gathering {
	var list []*gathering
	seen := map[[3]string]*gathering{}
	for _, f := range p.res.Flags {
		if elsewhere[f.Kind] || f.Says == "" {
			continue
		}
		key := [3]string{f.Kind, f.Where, f.Says}
		switch {
		case f.Kind == "air_drawn_in":
			key = [3]string{f.Kind}
		case joined[f.Kind]:
			key = [3]string{f.Kind, f.Where}
		}
		g := seen[key]
		if g == nil {
			g = &gathering{first: f, last: f.To}
			seen[key], list = g, append(list, g)
		} else {
			g.again, g.last, g.changes = g.again+1, max(g.last, f.To), g.changes || f.Says != g.first.Says
		}
		if at := p.drains(f.Where); f.Kind == "air_drawn_in" && !slices.ContainsFunc(g.drains, func(d drained) bool { return d.tag == at }) {
			g.drains = append(g.drains, drained{at, f.From})
		}
	}
	return list
}

// sentences puts what is and what to do about it one after the other, each a sentence.
func sentences(list ...string) string {
	var said []string
	for _, s := range list {
		s = strings.TrimSpace(s)
		if s == "" {
			continue
		}
		if !strings.HasSuffix(s, ".") {
			s += "."
		}
		if len(said) > 0 {
			first, size := utf8.DecodeRuneInString(s)
			s = string(unicode.ToUpper(first)) + s[size:]
		}
		said = append(said, s)
	}
	return strings.Join(said, " ")
}
