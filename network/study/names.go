package study

import (
	"fmt"
	"regexp"
	"strings"

	"headfall/network"
)

var partIndex = regexp.MustCompile(`\[\d+\]`)

// numberNamed finds a number of the plant by its name. The index of a part may be left out where there is one such part; so may what stands
// between the tag and the last word where only one number ends so.
func numberNamed(p *network.Plant, name string) (*network.Number, error) {
	name = strings.TrimSpace(name)
	var found []*network.Number
	for _, fits := range []func(full string) bool{
		func(full string) bool { return full == name },
		func(full string) bool { return full == strings.ReplaceAll(name, "[1]", "") },
		func(full string) bool { return partIndex.ReplaceAllString(full, "") == name },
		func(full string) bool { return endsAlike(full, name) },
	} {
		for _, n := range p.Numbers {
			if fits(n.Name) {
				found = append(found, n)
			}
		}
		if len(found) > 0 {
			break
		}
	}
	switch len(found) {
	case 1:
		return found[0], nil
	case 0:
		return nil, fmt.Errorf("there is no number %q; %s", name, near(p, name))
	}
	return nil, fmt.Errorf("%q could be %s", name, listed(found))
}

// endsAlike tells whether both begin with the same tag and end with the same words.
func endsAlike(full, name string) bool {
	tag, rest, ok := strings.Cut(name, ".")
	return ok && strings.HasPrefix(full, tag+".") && strings.HasSuffix(full, "."+rest)
}

// near names the numbers of the same tag, or says how to find them.
func near(p *network.Plant, name string) string {
	tag, _, _ := strings.Cut(name, ".")
	var same []*network.Number
	for _, n := range p.Numbers {
		if strings.HasPrefix(n.Name, tag+".") {
			same = append(same, n)
		}
	}
	if len(same) == 0 {
		return "headfall check FILE --json - lists them"
	}
	return tag + " has " + listed(same)
}

func listed(numbers []*network.Number) string {
	var names []string
	for i, n := range numbers {
		if i == 12 {
			names = append(names, "…")
			break
		}
		names = append(names, n.Name)
	}
	return strings.Join(names, ", ")
}

// allowed says what a number's checks have against a value; "" when nothing.
func allowed(n *network.Number, v float64) string {
	for _, check := range n.Check {
		if says := check(v); says != "" {
			return says
		}
	}
	return ""
}
