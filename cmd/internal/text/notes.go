package text

import (
	"fmt"
	"regexp"
	"strings"
)

// assumed writes what the answer rests on that the file does not say: the doubts that were filled in, alike ones together, and the defaults.
func (p *page) assumed() {
	var order []string
	count := map[string]int{}
	for _, a := range p.res.Assumptions {
		key := alike(a.What)
		if count[key]++; count[key] == 1 {
			order = append(order, key)
		}
	}
	var said []string
	for _, key := range order {
		if n := count[key]; n > 1 {
			key += fmt.Sprintf(" (%d)", n)
		}
		said = append(said, keep(key))
	}
	tail := ""
	if n := len(p.plant.Defaults); n > 0 {
		tail = counted(n, "default, shown by check", "defaults, shown by check")
	}
	list := strings.Join(said, ", ")
	if list != "" {
		list = "where the file states no doubt: " + list
	}
	if both := join([]string{list, tail}, "; "); both != "" {
		p.put("Assumed", "%s", both)
	}
}

var place = regexp.MustCompile(`\[\d+\]`)

// alike leaves out which thing a doubt is of: "L-1.pipe[2].roughness × or ÷ 2" becomes "pipe.roughness × or ÷ 2".
func alike(what string) string {
	name, doubt, _ := strings.Cut(what, " ")
	if _, path, found := strings.Cut(name, "."); found {
		return place.ReplaceAllString(path, "") + " " + doubt
	}
	return what
}
