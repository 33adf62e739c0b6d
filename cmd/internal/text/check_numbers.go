package text

import (
	"strings"

	"headfall/elements/quantity"
	"headfall/network"
	"headfall/network/study"
)

// numbers writes every number by its owner, as it is named in --set; a star marks a default. What a step leaves out is not told.
func (e *echo) numbers() {
	var owner string
	var said []string
	done := func() {
		if len(said) > 0 {
			e.put(owner, "%s", strings.Join(said, ", "))
		}
		said = nil
	}
	steps := map[string]*network.Step{}
	for _, s := range e.plant.Steps {
		steps[s.ID] = s
	}
	written := map[string]string{} // defaults as they would be written
	for _, d := range e.plant.Defaults {
		if name, text, found := strings.Cut(d, ": "); found {
			written[name] = text
		}
	}
	e.raw("\nNumbers as they are named in --set; * not in the file, ~ doubt assumed\n")
	for _, n := range e.plant.Numbers {
		tag, key, _ := strings.Cut(n.Name, ".")
		if tag != owner {
			done()
			owner = tag
		}
		step := steps[tag]
		if step != nil && n.Default {
			continue
		}
		value := number(n, written[n.Name])
		if step != nil && n.At == &step.At.S {
			value = step.At.Text
		}
		said = append(said, keep(key+" "+value))
	}
	done()
}

// number writes a value as the file does, a default as it would; a doubt that is assumed as it is declared.
func number(n *network.Number, written string) string {
	s := n.Value.Echo()
	if n.Assumed {
		bare := n.Value
		bare.Doubt = quantity.Doubt{}
		s = bare.Echo() + " " + study.SaysDoubt(n) + "~"
	} else if n.Default && written != "" {
		s = written
	}
	if n.Default {
		s += "*"
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
