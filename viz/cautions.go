package viz

import (
	"strings"

	"headfall/network"
)

// standing is the caution on every report.
const standing = "Planning estimate from the data in the file. Check against local rules, the site permit and a competent engineer before use. " +
	"It does not replace isolation, gas test, or an independent level reading."

// hole is where a tag stood in a caution.
const hole = "\x00"

// cautions are those of the run, the standing one first and once. Those that differ by a vessel only are one: "T-1 (also T-2, T-3) is emptied …".
func cautions(plant *network.Plant, r *network.Result) []string {
	vessels := map[string]bool{}
	for _, v := range plant.Vessels {
		vessels[v.Tag] = true
	}
	var order []string
	tags := map[string][]string{}
	if len(r.Cautions) == 0 || !strings.HasPrefix(r.Cautions[0], standing[:28]) {
		order, tags[standing] = []string{standing}, []string{""}
	}
	for _, c := range r.Cautions {
		tag := ""
		for _, word := range strings.Fields(c) {
			if word = strings.TrimRight(word, ".,:;"); vessels[word] {
				tag = word
				break
			}
		}
		key := c
		if tag != "" {
			key = strings.Replace(c, tag, hole, 1)
		}
		if tags[key] == nil {
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
