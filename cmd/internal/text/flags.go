package text

import (
	"strings"
	"unicode"
	"unicode/utf8"

	"headfall/network"
)

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
		p.put(label, "%s%s", stamp(p.clock.Span(f.From, f.To)), sentences(f.Says, f.Do))
	}
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
