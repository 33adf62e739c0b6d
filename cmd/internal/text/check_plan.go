package text

import (
	"math"
	"strings"

	"headfall/network"
)

// lineUp writes how everything that can be moved stands before the first step.
func (e *echo) lineUp() {
	var said []string
	for _, row := range e.plant.LineUp() {
		said = append(said, keep(row.Valve+" "+row.Position))
	}
	if len(said) > 0 {
		e.put("Line-up", "%s", strings.Join(said, ", "))
	}
	label := "Not in plan"
	for _, row := range e.plant.LineUp() {
		if row.Opens != "" {
			e.put(label, "%s %s; if it is not, liquid can go from %s", row.Valve, row.Position, row.Opens)
			label = ""
		}
	}
}

// steps writes what people do, in the order of the file.
func (e *echo) steps() {
	for i, s := range e.plant.Steps {
		said := []string{trigger(s), action(s)}
		if s.Optional {
			said = append(said, "optional")
		}
		e.put(first(i, "Steps"), "%s: %s", s.ID, join(said, ", "))
	}
}

func trigger(s *network.Step) string {
	var said []string
	if s.At.Given {
		said = append(said, "at "+keep(s.At.Text))
	}
	if s.When != nil {
		said = append(said, "when "+s.When.Says())
	}
	if s.After != "" {
		said = append(said, "after "+s.After)
	}
	if s.Wait > 0 {
		said = append(said, "and "+keep(Duration(s.Wait, Near))+" more")
	}
	return join(said, " ")
}

// action writes the order, verb first, and how long a hold may last.
func action(s *network.Step) string {
	if s.Action == network.HoldPoint {
		return s.Says(math.NaN()) + ", up to " + keep(Duration(s.UpTo, Near))
	}
	return s.Says(math.NaN())
}
