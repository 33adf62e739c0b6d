package scenarios

import (
	"fmt"

	"headfall/elements"
	"headfall/elements/quantity"
	"headfall/network"
)

// step is a step as it is being read.
type step struct {
	*network.Step
	thing *thing
	to    *node
	inout *node // what `to` belongs to
	free  *node
}

// step reads one step or hold.
func (d *decoder) step(n *node) {
	s := &step{Step: &network.Step{Place: n.at, Over: nan, CheckAfter: nan}}
	whole := d.mapping(n, "step", idOf(n), d.stepFields(s))
	if n.form != mapping {
		return
	}
	ok := d.trigger(s, n)
	if d.action(s, n) && ok && whole {
		d.plant.Steps = append(d.plant.Steps, s.Step)
	}
}

// idOf returns the id that a thing in a list gives itself; its numbers are named by it.
func idOf(n *node) string {
	if id := n.get("id"); id != nil && id.form == scalar {
		return id.text
	}
	return ""
}

func (d *decoder) stepFields(s *step) []field {
	return []field{
		{key: "id", need: elements.Required, help: "tag of the step", written: aTagWritten, read: func(n *node, _ string) {
			if s.thing = d.declare(n, aStep); s.thing != nil {
				s.ID, s.Place = n.text, n.at
			}
		}},
		d.momentField(&s.At, "at", elements.Optional, "when: a clock time, or a duration from the start"),
		d.conditionField(&s.When, "when", "when this comes true; with after: once that is done"),
		d.tagField(&s.After, "after", elements.Optional, "when that step or hold is done", aStep, aHold),
		d.number(&s.Wait, "wait", quantity.Time, elements.Optional, "time to let pass after the trigger", elements.NotNegative),
		d.freeText(&s.Who, "who", elements.Optional, "who does it"),
		d.actionField(s, "valve", network.MoveValve, "valve that is moved", aValve),
		d.actionField(s, "pump", network.SetPump, "pump whose mode is set", aPump),
		d.actionField(s, "inflow", network.SetInflow, "vessel whose inflow is set", aVessel),
		d.actionField(s, "vent", network.SetVent, "vent of a line that is opened or shut", aDevice),
		d.actionField(s, "cancel", network.CancelBatch, "batch that will not come", aBatch),
		{key: "hold", help: "what is waited for", written: asText, read: func(n *node, _ string) {
			if d.text(n, "hold") {
				s.Action, s.Hold = network.HoldPoint, n.text
			}
		}},
		d.toField(s),
		d.number(&s.Over, "over", quantity.Time, elements.Optional, "time of the move; default by the valve's stroke", elements.NotNegative),
		d.number(&s.UpTo, "up_to", quantity.Time, elements.Optional, "time that a hold may last", elements.NotNegative),
		d.yesNo(&s.Optional, "optional", elements.Optional, "not reaching it is no failure"),
		d.freeText(&s.Note, "note", elements.Optional, "words to add"),
		d.plainNumber(&s.CheckAfter, "check_after", quantity.Time, elements.Optional, "time after which a reading is expected", elements.NotNegative),
		d.readField(s),
		d.conditionField(&s.StopIf, "stop_if", "when to stop and ask"),
		{key: "free", help: "what plan may move: at and to, each from and to", written: &writing{style: anObject, name: "free", fields: func() []field { return d.freeFields(&network.Free{}, network.MoveValve) }},
			read: func(n *node, _ string) { s.free = n }},
	}
}

func (d *decoder) actionField(s *step, key string, action network.ActionKind, help string, c class) field {
	return field{key: key, help: help, written: aTagWritten, read: func(n *node, _ string) {
		s.Action = action
		s.Target = d.refer(n, key, nil, c)
	}}
}

// toField keeps what is written until the action is known.
func (d *decoder) toField(s *step) field {
	flow := writing{style: aQuantity, dim: quantity.Flow}
	words := writing{style: aWord, words: append(append([]string{}, modes...), "open", "shut"), or: &flow}
	return field{key: "to", help: "travel of a valve, mode of a pump, flow of an inflow, open or shut of a vent", written: &writing{style: aQuantity, dim: quantity.Ratio, or: &words},
		read: func(n *node, _ string) {
			s.to, s.ToText = n, n.text
		}}
}

// readField reads which vessel, or which gauge, is looked at.
func (d *decoder) readField(s *step) field {
	return field{key: "read", help: "vessel or gauge whose reading is expected then", written: aTagWritten, read: func(n *node, _ string) {
		s.Read = d.refer(n, "read", func(t *thing) {
			if t.vessel != nil {
				s.Read = t.vessel.Tag
			}
		}, aVessel, aGauge)
	}}
}

// trigger checks that a step has one trigger.
func (d *decoder) trigger(s *step, n *node) bool {
	at, when, after := n.get("at") != nil, n.get("when") != nil, n.get("after") != nil
	switch {
	case d.set(s.ID, "at"):
		return true
	case !at && !when && !after:
		d.problem(n, fmt.Sprintf("step %s has no trigger", s.ID), `it needs at: "06:20" or 20 min, when: a condition, or after: another step`)
		return false
	case at && when:
		d.problem(n.get("when"), fmt.Sprintf("step %s has two triggers: at and when", s.ID), "a step acts on one; with after, when is looked at once that is done")
		return false
	case at && after:
		d.problem(n.get("after"), fmt.Sprintf("step %s has two triggers: at and after", s.ID), "a step acts on one; wait: adds time to after")
		return false
	}
	return true
}
