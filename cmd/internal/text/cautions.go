package text

import "strings"

// cautions writes those that apply to this run; one that applies to several things is written once.
func (p *page) cautions() {
	for i, c := range p.merged() {
		p.put(first(i, "Caution"), "%s", c)
	}
}

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
