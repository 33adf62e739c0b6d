package text

import (
	"strings"

	"headfall/network"
)

// numbers writes every number by its owner, as it is named in --set; a star marks a default.
func (e *echo) numbers() {
	var owner string
	var said []string
	done := func() {
		if len(said) > 0 {
			e.put(owner, "%s", strings.Join(said, ", "))
		}
		said = nil
	}
	e.raw("\nNumbers as they are named in --set; * not in the file, ~ doubt assumed\n")
	for _, n := range e.plant.Numbers {
		tag, key, _ := strings.Cut(n.Name, ".")
		if tag != owner {
			done()
			owner = tag
		}
		said = append(said, keep(key+" "+number(n)))
	}
	done()
}

func number(n *network.Number) string {
	s := n.Value.Echo()
	if n.Default {
		s += "*"
	}
	if n.Assumed {
		s += "~"
	}
	return s
}

// defaults writes what else the file does not say and how it was taken.
func (e *echo) defaults() {
	if len(e.plant.Defaults) == 0 {
		return
	}
	e.raw("\n")
	e.put("Defaults", "%s", strings.Join(each(e.plant.Defaults, keep), "; "))
}

func each(list []string, f func(string) string) []string {
	out := make([]string, len(list))
	for i, s := range list {
		out[i] = f(s)
	}
	return out
}
