package scenarios

import (
	"fmt"

	"headfall/elements"
	"headfall/elements/quantity"
	"headfall/network"
)

// meets are the classes of things that lines run between.
var meets = []class{aVessel, aTee, anOutside}

// line reads one line under its tag.
func (d *decoder) line(key, n *node) {
	t := d.declare(key, aLine)
	l := &network.Line{Tag: key.text, Place: key.at, Entry: nan, Exit: nan}
	if t != nil {
		t.line = l
	}
	before := len(d.probs)
	d.mapping(n, "line "+l.Tag, l.Tag, d.lineFields(l))
	if to := n.get("to"); to != nil && l.From == l.To && l.From != "" {
		d.problem(to, fmt.Sprintf("line %s runs from %s to itself", l.Tag, l.From), "to: names another vessel, tee or outside point")
	}
	d.lines = append(d.lines, l)
	if len(d.probs) == before {
		d.plant.Lines = append(d.plant.Lines, l)
	}
}

func (d *decoder) lineFields(l *network.Line) []field {
	var inlet string
	entry := d.number(&l.Entry, "entry", quantity.Number, elements.Optional, "loss coefficient where liquid enters the line, at either end", elements.NotNegative)
	exit := d.number(&l.Exit, "exit", quantity.Number, elements.Optional, "loss coefficient where it leaves", elements.NotNegative)
	entry.absent, exit.absent = nil, nil // by the rule of the laws, with the direction of flow
	return []field{
		d.endField(&l.From, "from", "vessel, tee or outside point where it begins"),
		d.endField(&l.To, "to", "vessel, tee or outside point where it ends"),
		d.portField(&l.Leaves, "leaves", "from", &l.From),
		d.portField(&l.Enters, "enters", "to", &l.To),
		{key: "inlet", help: "full: an ideal opening, no limit from an uncovering inlet", written: &writing{style: aWord, words: inletWords}, read: func(n *node, _ string) {
			inlet, _ = d.oneOf(n, "inlet", inletWords)
			l.InletFull = inlet == "full"
		}},
		entry, exit,
		{key: "parts", need: elements.Required, help: "in the order met going from `from` to `to`",
			written: &writing{style: aList, item: &writing{style: aKind, room: elements.Parts}, least: 1}, read: func(n *node, _ string) { d.fittings(l, n) }},
	}
}

var inletWords = []string{"limited", "full"}

func (d *decoder) endField(p *string, key, help string) field {
	return field{key: key, need: elements.Required, help: help, written: aTagWritten, read: func(n *node, _ string) {
		*p = d.refer(n, key, nil, meets...)
	}}
}

// fittings reads the parts of a line.
func (d *decoder) fittings(l *network.Line, n *node) {
	if n.empty || n.form == list && len(n.items) == 0 {
		d.problem(n, "parts: a line has at least one part", "e.g. - pipe: {length: 12 m, bore: 82.5 mm, roughness: 0.05 mm}")
		return
	}
	d.wrote[l] = len(n.items)
	total := map[string]int{}
	for _, item := range n.items {
		total[kindText(item)]++
	}
	count := map[string]int{}
	d.list(n, "parts", func(_ int, item *node) {
		kind := kindText(item)
		count[kind]++
		name := l.Tag + "." + kind
		if total[kind] > 1 {
			name = fmt.Sprintf("%s[%d]", name, count[kind])
		}
		d.part(l, item, name)
	})
}

// kindText returns the word that a part begins with.
func kindText(n *node) string {
	switch {
	case n.form == scalar:
		return n.text
	case n.form == mapping && len(n.keys) == 1:
		return n.keys[0].text
	}
	return ""
}

// part reads one part of a line; name is what its numbers begin with when it has no tag.
func (d *decoder) part(l *network.Line, n *node, name string) {
	c, ok := d.element(elements.Parts, n, "part", func(_ string, body *node) string {
		if tag := body.get("tag"); tag != nil && tag.form == scalar && tag.text != "" {
			name = tag.text
		}
		return name
	})
	if c.element == nil {
		return
	}
	p, is := c.element.(elements.Part)
	if !is {
		return
	}
	d.tagPart(c, name)
	if !ok {
		return
	}
	l.Parts = append(l.Parts, &network.Fitted{Kind: elements.Lookup(elements.Parts, c.kind), Part: p, Place: n.at, Name: name})
	d.parts[l] = append(d.parts[l], n)
}

// tagPart declares the tag of a part and looks up what it refers to.
func (d *decoder) tagPart(c chosen, name string) {
	cl := aPart
	_, isPump := c.element.(elements.Pumps)
	_, isValve := c.element.(elements.Actuated)
	_, oneWay := c.element.(elements.OneWay)
	switch {
	case isPump:
		cl = aPump
	case isValve:
		cl = aValve
	case oneWay:
		cl = aCheckValve
	}
	if tag := c.body.get("tag"); tag != nil && tag.form == scalar && !tag.empty {
		d.declare(tag, cl)
	}
	if v, ok := c.element.(interface{ Recovers() (float64, string) }); ok && c.body.get("fl") == nil && !d.set(name, "fl") {
		fl, source := v.Recovers()
		d.assumed(name, "fl", fmt.Sprintf("%g (%s)", fl, source))
	}
	if isPump {
		if other := c.body.get("standby_for"); other != nil {
			d.refer(other, "standby_for", nil, aPump)
		}
	}
}
