package text

import "strings"

const cautionLines = 4 // of the page; the rest is counted, and in the report

// cautions writes those that apply to this run; one that applies to several things is written once. The standing one is written in full, of the others
// the first sentence: the report has all of it.
func (p *page) cautions() {
	all, used := p.merged(), 0
	for i, c := range all {
		if i > 0 {
			c = sentence(c)
		}
		lines := len(wrap(c, p.width-indent))
		if i > 0 && (used+lines > cautionLines || used+lines == cautionLines && i < len(all)-1) {
			p.put("", "and %s in the report", counted(len(all)-i, "more", "more"))
			return
		}
		p.put(first(i, "Caution"), "%s", c)
		used += lines
	}
}

// sentence is the first sentence of a text.
func sentence(s string) string {
	if i := strings.Index(s, ". "); i >= 0 {
		return s[:i+1]
	}
	return s
}

const alsoShown = 3 // vessels of one caution besides the first

const hole = "\x00" // where the tag stood

// merged joins cautions that differ by a tag only: "T-1 (also T-2, T-3) is emptied …".
func (p *page) merged() []string {
	var order []string
	tags := map[string][]string{}
	for _, c := range p.res.Cautions {
		tag := p.tagIn(c)
		key := c
		if tag != "" {
			key = strings.Replace(c, tag, hole, 1)
		}
		if _, seen := tags[key]; !seen {
			order = append(order, key)
		}
		tags[key] = append(tags[key], tag)
	}
	for i, key := range order {
		all := tags[key][0]
		if rest := tags[key][1:]; len(rest) > 0 && all != "" {
			if n := len(rest) - alsoShown; n > 0 {
				rest = append(rest[:alsoShown:alsoShown], counted(n, "more", "more"))
			}
			all += " (also " + strings.Join(rest, ", ") + ")"
		}
		order[i] = strings.Replace(key, hole, all, 1)
	}
	return order
}

// tagIn returns the first word of a caution that is the tag of a vessel.
func (p *page) tagIn(caution string) string {
	for _, word := range strings.Fields(caution) {
		word = strings.TrimRight(word, ".,:;")
		for _, v := range p.plant.Vessels {
			if v.Tag == word {
				return word
			}
		}
	}
	return ""
}
