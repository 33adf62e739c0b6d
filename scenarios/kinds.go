package scenarios

import (
	"fmt"
	"strings"

	"headfall/elements"
)

// roomWords is how a room is spoken of.
var roomWords = map[elements.Room]string{
	elements.Shapes: "shape", elements.Heads: "head", elements.Parts: "part", elements.Trims: "trim",
	elements.Vents: "vent", elements.Beyond: "outside point", elements.Liquids: "liquid",
}

// chosen is an element that was read.
type chosen struct {
	element elements.Element
	kind    string
	body    *node // its parameters
}

// element reads a kind: its bare word, or a mapping of one key. name is what its numbers begin with.
func (d *decoder) element(room elements.Room, n *node, what string, name func(kind string, body *node) string) (c chosen, ok bool) {
	word, body := d.kindOf(room, n, what)
	if word == nil {
		return c, false
	}
	kind := elements.Lookup(room, word.text)
	if kind == nil {
		if _, named := d.trims[word.text]; named && room == elements.Trims {
			return d.namedTrim(word)
		}
		d.problem(word, fmt.Sprintf("there is no %s %s", roomWords[room], quoted(word.text)), d.hint(word.text, d.kindNames(room)))
		return c, false
	}
	c = chosen{element: kind.New(), kind: kind.Name, body: body}
	fields := d.params(c.element)
	if body.form != mapping {
		body = d.shorthand(body, fields)
		c.body = body
	}
	return c, d.mapping(body, kind.Name, name(kind.Name, body), fields)
}

// kindOf returns the word of a kind and the node of its parameters.
func (d *decoder) kindOf(room elements.Room, n *node, what string) (word, body *node) {
	switch {
	case n.form == scalar && n.empty, n.form == list:
		d.problem(n, what+" names one kind with its values", d.example(room, what))
	case n.form == scalar:
		return n, &node{form: mapping, src: n.src, at: n.at, flow: true}
	case len(n.keys) != 1:
		d.problem(n, fmt.Sprintf("%s names one kind, not %d", what, len(n.keys)), d.example(room, what))
	case n.keys[0].form == scalar:
		body = n.items[0]
		if body.empty {
			body = &node{form: mapping, src: body.src, at: n.keys[0].at}
		}
		return n.keys[0], body
	}
	return nil, nil
}

// example shows how a kind of a room is written.
func (d *decoder) example(room elements.Room, what string) string {
	kinds := elements.Kinds(room)
	if len(kinds) == 0 {
		return ""
	}
	k := kinds[len(kinds)-1]
	if room == elements.Parts {
		return "e.g. - " + k.Name + ": " + braced(k.Sample)
	}
	return "e.g. " + what + ": {" + k.Name + ": " + braced(k.Sample) + "}"
}

// braced puts braces around the parameters of a specimen that lacks them.
func braced(sample string) string {
	if strings.HasPrefix(sample, "{") {
		return sample
	}
	return "{" + sample + "}"
}

// shorthand makes a mapping of parameters that are written as one value, {water: 12 °C}: it is that of the first parameter that can be written so.
func (d *decoder) shorthand(n *node, fields []field) *node {
	for j := range fields {
		if takes(fields[j].written, n.form) {
			key := &node{text: fields[j].key, plain: true, src: n.src, at: n.at}
			return &node{form: mapping, src: n.src, at: n.at, flow: true, keys: []*node{key}, items: []*node{n}}
		}
	}
	return n
}

// takes reports whether a value may be written as a scalar or as a list.
func takes(w *writing, as form) bool {
	for ; w != nil; w = w.or {
		rows := w.style == aTable || w.style == aList
		if rows == (as == list) && w.style != anObject && w.style != aCondition && w.style != aMap {
			return true
		}
	}
	return false
}

func (d *decoder) kindNames(room elements.Room) []string {
	var names []string
	for _, k := range elements.Kinds(room) {
		names = append(names, k.Name)
	}
	if room == elements.Trims {
		for name := range d.trims {
			names = append(names, name)
		}
	}
	return names
}

// ready lets an element work out what follows from its parameters.
func (d *decoder) ready(c chosen, n *node) bool {
	if err := c.element.Ready(); err != nil {
		for _, one := range split(err) {
			d.problem(n, c.kind+": "+one.Error(), "")
		}
		return false
	}
	return true
}

// split takes joined errors apart.
func split(err error) []error {
	if many, ok := err.(interface{ Unwrap() []error }); ok {
		return many.Unwrap()
	}
	return []error{err}
}

// kindField makes a field that holds an element.
func (d *decoder) kindField(room elements.Room, key string, need elements.Need, help string, take func(c chosen, n *node)) field {
	return field{key: key, need: need, help: help, written: &writing{style: aKind, room: room}, read: func(n *node, owner string) {
		name := owner + "." + key
		if owner == "" {
			name = key
		}
		c, ok := d.element(room, n, key, func(string, *node) string { return name })
		if ok && d.ready(c, n) {
			take(c, n)
		}
	}}
}
