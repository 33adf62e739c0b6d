package text

import "strings"

const assumedShown = 6

// assumed writes what the answer rests on that the file does not say.
func (p *page) assumed() {
	var said []string
	for i, a := range p.res.Assumptions {
		if i == assumedShown {
			said = append(said, counted(len(p.res.Assumptions)-i, "more", "more"))
			break
		}
		what := a.What
		if a.Because != "" && (i == 0 || p.res.Assumptions[i-1].Because != a.Because) {
			what += " (" + a.Because + ")"
		}
		said = append(said, what)
	}
	if n := len(p.plant.Defaults); n > 0 {
		said = append(said, counted(n, "default, shown by check", "defaults, shown by check"))
	}
	if len(said) == 0 {
		return
	}
	p.put("Assumed", "%s", strings.Join(said, "; "))
}
