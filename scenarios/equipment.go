package scenarios

import (
	"headfall/elements"
	"headfall/elements/quantity"
	"headfall/network"
)

// gaugeWords are what a gauge may show.
var gaugeWords = append([]string{"percent", "%", "length"}, quantity.Units(quantity.Length)...)

func (d *decoder) gaugeFields(g *network.Gauge) []field {
	g.Percent = true
	return []field{
		{key: "tag", help: "tag of the instrument", written: aTagWritten, read: func(n *node, _ string) {
			if t := d.declare(n, aGauge); t != nil {
				g.Tag = n.text
			}
		}},
		d.number(&g.Zero, "zero", quantity.Length, elements.Required, "height over base that shows as 0 %"),
		d.number(&g.Span, "span", quantity.Length, elements.Required, "height from 0 % to 100 %", elements.Positive),
		{key: "shows", help: "what the panel shows: percent, or a length or its unit", written: &writing{style: aWord, words: gaugeWords}, read: func(n *node, _ string) {
			if w, ok := d.oneOf(n, "shows", gaugeWords); ok {
				g.Percent = w == "percent" || w == "%"
			}
		}},
	}
}

func (d *decoder) gauge(v *network.Vessel, g *network.Gauge) {
	v.Gauge = g
	if t := d.things[g.Tag]; t != nil && t.class == aGauge {
		t.vessel = v
	}
}

// batch is a batch as it is being read.
type batch struct{ to *network.Batch }

func (d *decoder) batchFields(b *batch) []field {
	b.to = &network.Batch{}
	return []field{
		{key: "id", need: elements.Required, help: "tag of the batch, which steps may cancel", written: aTagWritten, read: func(n *node, _ string) {
			if t := d.declare(n, aBatch); t != nil {
				b.to.ID, b.to.Place = n.text, n.at
			}
		}},
		d.momentField(&b.to.At, "at", elements.Required, "when it begins"),
		d.number(&b.to.Volume, "volume", quantity.Volume, elements.Required, "what comes in", elements.Positive),
		d.number(&b.to.Over, "over", quantity.Time, elements.Required, "how long it takes", elements.Positive),
	}
}

// alarm is an alarm as it is being read.
type alarm struct {
	to   *network.Alarm
	when bound
}

func (d *decoder) alarmsField(v *network.Vessel) field {
	item := writing{style: anObject, name: "alarm", fields: func() []field { return d.alarmFields(v, &alarm{}) }}
	return field{key: "alarms", help: "levels with a name, and what people do when they come", written: &writing{style: aList, item: &item}, read: func(n *node, _ string) {
		d.list(n, "alarms", func(_ int, entry *node) {
			a := &alarm{}
			whole := d.mapping(entry, "alarm", "", d.alarmFields(v, a))
			a.when.typo = !whole
			if d.finish(entry, "alarm", &a.when) && whole {
				a.to.Place = entry.at
				v.Alarms = append(v.Alarms, a.to)
			}
		})
	}}
}

func (d *decoder) alarmFields(v *network.Vessel, a *alarm) []field {
	a.to = &network.Alarm{}
	a.when = bound{to: &a.to.When, vessel: v}
	name := d.freeText(&a.to.Name, "name", elements.Required, "as on the panel")
	response := object(d, "response", elements.Optional, "what people do", "response", d.responseFields, func(r *network.Response, n *node) {
		if d.response(r, n) {
			a.to.Response = r
		}
	})
	return append([]field{name, response}, d.conditionFields(&a.when)...)
}

func (d *decoder) responseFields(r *network.Response) []field {
	return []field{
		d.plainNumber(&r.Detect, "detect", quantity.Time, elements.Optional, "until someone sees it", elements.NotNegative),
		d.plainNumber(&r.Walk, "walk", quantity.Time, elements.Optional, "until someone stands there", elements.NotNegative),
		d.tagField(&r.Valve, "valve", elements.Optional, "valve that is moved", aValve),
		d.tagField(&r.Pump, "pump", elements.Optional, "pump that is switched", aPump),
		{key: "to", need: elements.Required, help: "travel of the valve, or mode of the pump", written: &writing{style: aQuantity, dim: quantity.Ratio,
			or: &writing{style: aWord, words: modes}}, read: func(*node, string) {}},
	}
}

func (d *decoder) response(r *network.Response, n *node) bool {
	key, ok := d.one(n, "response", "valve", "pump")
	if !ok {
		return false
	}
	to := n.get("to")
	if key == "pump" {
		r.Mode, ok = d.mode(to, "to")
		return ok
	}
	v, ok := d.fixed(to, "to", quantity.Ratio, elements.Share)
	r.To = v.SI
	return ok
}

var modes = []string{"off", "on", "auto", "standby"}

// mode reads the mode of a pump.
func (d *decoder) mode(n *node, key string) (elements.Mode, bool) {
	w, ok := d.oneOf(n, key, modes)
	for i, m := range modes {
		if ok && m == w {
			return elements.Mode(i), true
		}
	}
	return 0, false
}

// openShut makes a field for a small vent that is open or shut.
func (d *decoder) openShut(p *bool, key, help string) field {
	words := []string{"yes", "no", "open", "shut"}
	return field{key: key, help: help, written: &writing{style: aYesNo, or: &writing{style: aWord, words: words}}, read: func(n *node, _ string) {
		if yes, ok := d.isOpen(n, key); ok {
			*p = yes
		}
	}}
}

func (d *decoder) isOpen(n *node, key string) (open, ok bool) {
	w, ok := d.oneOf(n, key, []string{"yes", "no", "open", "shut", "closed", "true", "false"})
	return w == "yes" || w == "open" || w == "true", ok
}
