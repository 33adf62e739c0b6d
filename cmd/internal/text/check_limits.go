package text

import "headfall/network"

// limits writes what must hold; rims and cover ratings are watched besides.
func (e *echo) limits() {
	for i, l := range e.plant.Limits {
		said := []string{l.Says(), window(l)}
		if l.Why != "" {
			said = append(said, "("+l.Why+")")
		}
		e.put(first(i, "Limits"), "%s", join(said, " "))
	}
	e.put(first(len(e.plant.Limits), "Limits"), "every rim, and every rating of a cover")
}

// window writes from when to when a limit counts.
func window(l *network.Limit) string {
	return join([]string{edge("since", l.Since), edge("until", l.Until)}, " ")
}

func edge(word string, e network.Edge) string {
	switch {
	case e.When != nil:
		return word + " " + e.When.Says()
	case e.After != "":
		return word + " " + e.After + " is done"
	case e.At.Given:
		return word + " " + keep(e.At.Text)
	}
	return ""
}
