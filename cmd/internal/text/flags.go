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
		when := p.clock.Span(g.first.From, g.first.To)
		if g.first.Kind == "air_drawn_in" {
			when = p.clock.Span(g.first.From, g.last)
			p.put(first(i, "Watch"), "%s%s", stamp(when), p.together(g))
			continue
		}
		if g.again > 0 {
			when += fmt.Sprintf(" and %s until %s", counted(g.again, "more time", "more times"), p.clock.At(g.last, Up))
		}
		p.put(first(i, "Watch"), "%s%s", stamp(when), sentences(g.first.Says, g.first.Do))
	}
}

// gathering is one flag, how often it comes again and when it ends for good.
type gathering struct {
	first *network.Flag
	again int
	last  float64  // s
	where []string // the vessels that drain, of air drawn in
}

// together words what the inlets of several lines do.
func (p *page) together(g *gathering) string {
	places := g.where
	if n := len(places) - placesShown; n > 0 {
		places = append(append([]string(nil), places[:placesShown]...), fmt.Sprintf("%d more", n))
	}
	return "the last of " + keep(strings.Join(places, ", ")) + " gulps air: flow surges and is slower than shown. Throttle, or stop before the last of it."
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

// gathered joins flags that say the same of the same place, and all inlets that draw air.
func (p *page) gathered() []*gathering {
	var list []*gathering
	seen := map[[3]string]*gathering{}
	for _, f := range p.res.Flags {
		if elsewhere[f.Kind] || f.Says == "" {
			continue
		}
		key := [3]string{f.Kind, f.Where, f.Says}
		if f.Kind == "air_drawn_in" { // of all lines one
			key = [3]string{f.Kind}
		}
		if g := seen[key]; g != nil {
			if at := p.drains(f.Where); !slices.Contains(g.where, at) {
				g.where = append(g.where, at)
			}
			g.again, g.last = g.again+1, max(g.last, f.To)
			continue
		}
		seen[key] = &gathering{f, 0, f.To, []string{p.drains(f.Where)}}
		list = append(list, seen[key])
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
