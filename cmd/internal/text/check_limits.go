package text

import (
	"strings"

	"headfall/network"
)

// subjects are the words of conditions.
var subjects = map[network.Subject]string{
	network.Level: "level", network.Flow: "flow", network.Velocity: "velocity", network.Pressure: "pressure", network.CrestHead: "crest",
	network.Opening: "opening", network.Difference: "difference", network.Rising: "rising", network.Falling: "falling",
	network.Passed: "passed", network.Backflow: "backflow", network.Spilled: "spilled", network.Starts: "starts", network.Emptied: "emptied",
}

func condition(c network.Condition) string {
	said := strings.Join(c.Of, " and ") + " " + subjects[c.Subject]
	if c.Text == "" {
		return said
	}
	if c.Above {
		return said + " above " + keep(c.Text)
	}
	return said + " below " + keep(c.Text)
}

// limits writes what must hold; rims and cover ratings are watched besides.
func (e *echo) limits() {
	for i, l := range e.plant.Limits {
		said := []string{limitWords(l), window(l)}
		if l.Why != "" {
			said = append(said, "("+l.Why+")")
		}
		e.put(first(i, "Limits"), "%s", join(said, " "))
	}
	e.put(first(len(e.plant.Limits), "Limits"), "every rim, and every rating of a cover")
}

func limitWords(l *network.Limit) string {
	of := strings.Join(l.Must.Of, " and ")
	switch {
	case l.Permitted:
		return of + " flows only between " + keep(l.OnlyBetween[0].Text) + " and " + keep(l.OnlyBetween[1].Text)
	case l.Must.Subject == network.Emptied && l.Within.Clock:
		return of + " emptied by " + keep(l.Within.Text)
	case l.Must.Subject == network.Emptied:
		return of + " emptied within " + keep(l.Within.Text)
	}
	return condition(l.Must)
}

// window writes over what time a limit counts.
func window(l *network.Limit) string {
	var said []string
	if l.AveragedOver > 0 {
		said = append(said, "averaged over "+keep(Duration(l.AveragedOver, Near)))
	}
	if l.EachDay {
		said = append(said, "each day")
	}
	if l.EachHour {
		said = append(said, "each hour")
	}
	if l.InAny > 0 {
		said = append(said, "in any "+keep(Duration(l.InAny, Near)))
	}
	return join(append(said, edge("since", l.Since), edge("until", l.Until)), " ")
}

func edge(word string, e network.Edge) string {
	switch {
	case e.When != nil:
		return word + " " + condition(*e.When)
	case e.After != "":
		return word + " " + e.After + " is done"
	case e.At.Given:
		return word + " " + keep(e.At.Text)
	}
	return ""
}
