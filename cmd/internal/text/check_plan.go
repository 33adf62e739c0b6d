package text

import (
	"fmt"
	"strings"

	"headfall/elements"
	"headfall/network"
)

// lineUp writes how everything that can be moved stands before the first step.
func (e *echo) lineUp() {
	var said []string
	for _, l := range e.plant.Lines {
		for _, f := range l.Parts {
			if x, ok := f.Part.(elements.Actuated); ok {
				said = append(said, keep(x.Actuator().Tag+" "+Position(x.Actuator().Open)))
			}
			if x, ok := f.Part.(elements.Pumps); ok {
				said = append(said, keep(x.Drive().Tag+" "+x.Drive().Mode.String()))
			}
			if x, ok := f.Part.(elements.Humps); ok && x.Crown().Vent.Tag != "" {
				said = append(said, keep(x.Crown().Vent.Tag+" "+openOrShut(x.Crown().Vent.Open)))
			}
		}
	}
	if len(said) > 0 {
		e.put("Line-up", "%s", strings.Join(said, ", "))
	}
}

// Position writes a travel: shut, open, 35 %.
func Position(travel float64) string {
	switch travel {
	case 0:
		return "shut"
	case 1:
		return "open"
	}
	return strings.TrimSuffix(inSteps(100*travel, 0.1, Near), ".0") + " %"
}

func openOrShut(open bool) string {
	if open {
		return "open"
	}
	return "shut"
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
		said = append(said, "when "+condition(*s.When))
	}
	if s.After != "" {
		said = append(said, "after "+s.After)
	}
	if s.Wait > 0 {
		said = append(said, "and "+keep(Duration(s.Wait, Near))+" more")
	}
	return join(said, " ")
}

func action(s *network.Step) string {
	switch s.Action {
	case network.HoldPoint:
		return fmt.Sprintf("hold: %s, up to %s", s.Hold, keep(Duration(s.UpTo, Near)))
	case network.CancelBatch:
		return "cancel " + s.Target
	case network.SetPump:
		return s.Target + " " + s.Mode.String()
	case network.SetVent:
		return s.Target + " " + openOrShut(s.To > 0)
	}
	said := s.Target + " to " + keep(s.ToText)
	if s.Over > 0 {
		said += " over " + keep(Duration(s.Over, Near))
	}
	return said
}
