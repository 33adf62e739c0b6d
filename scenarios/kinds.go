package scenarios

import (
	"fmt"
	"regexp"
	"strconv"
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
	is      *elements.Kind // nil for a trim of the file
	body    *node          // its parameters
}

// element reads a kind: its bare word, or a mapping of one key. name is what its numbers begin with.
func (d *decoder) element(room elements.Room, n *node, what string, name func(kind string, body *node) string) (c chosen, ok bool) {
	word, body := d.kindOf(room, n, what)
	if word == nil {
		return c, false
	}
	kind := elements.Lookup(room, word.text)
	if _, named := d.trims[word.text]; kind == nil && !(named && room == elements.Trims) {
		kind = d.likeliest(room, word)
	}
	if kind == nil {
		if _, named := d.trims[word.text]; named && room == elements.Trims {
			return d.namedTrim(word)
		}
		return c, false
	}
	c = chosen{element: kind.New(), kind: kind.Name, is: kind, body: body}
	fields := d.params(c.element)
	if body.form != mapping {
		body = d.shorthand(body, fields)
		c.body = body
	}
	d.kind = kind
	return c, d.mapping(body, kind.Name, name(kind.Name, body), fields)
}

// likeliest notes a kind that there is not, and returns the one that is spelled most like it, so that what it holds is read all the same.
func (d *decoder) likeliest(room elements.Room, word *node) *elements.Kind {
	names := d.kindNames(room)
	hint := d.hint(word.text, names)
	if word.text == "" {
		hint = oneOf(names)
	}
	d.problem(word, fmt.Sprintf("there is no %s %s", roomWords[room], quoted(word.text)), hint)
	return elements.Lookup(room, nearest(word.text, names))
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

// sampleOf shows how a kind is written.
func sampleOf(k *elements.Kind) string { return "e.g. " + k.Name + ": " + braced(k.Sample) }

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
			d.unready(c, n, one.Error())
		}
		return false
	}
	return true
}

// unready notes what is wrong with the parameters of an element, at the one it speaks of.
func (d *decoder) unready(c chosen, n *node, says string) {
	hint := "headfall kinds " + c.kind + " tells what it takes"
	if c.is != nil && c.is.Sample != "" {
		hint = sampleOf(c.is)
	}
	if !strings.Contains(says, c.kind) {
		says = c.kind + ": " + says
	}
	at := spokenOf(c.body, n, says)
	if at.key != nil && (at.key.text == "starts" || at.key.text == "stops") {
		hint = "e.g. starts: {level: SUMP, above: 1.2 m}, stops: {level: SUMP, below: 0.4 m}"
	}
	d.problem(at, says, hint)
}

var (
	spoken    = regexp.MustCompile(`[a-z_]+`)
	spokenRow = regexp.MustCompile(`row (\d+)`)
)

// spokenOf finds what a fault speaks of: a row of a table, or the first of the keys that it names; n when it names none.
func spokenOf(body, n *node, says string) *node {
	if m := spokenRow.FindStringSubmatch(says); m != nil {
		i, _ := strconv.Atoi(m[1])
		if rows := tableIn(body); rows != nil && i >= 1 && i <= len(rows.items) {
			return rows.items[i-1]
		}
	}
	for _, word := range spoken.FindAllString(says, -1) {
		for _, key := range []string{word, word + "s"} {
			if v := body.get(key); v != nil {
				return v
			}
		}
	}
	return n
}

// tableIn is a table: the node itself, or the first of its values that is a list.
func tableIn(n *node) *node {
	if n.form == list {
		return n
	}
	for _, v := range n.items {
		if v.form == list {
			return v
		}
	}
	return nil
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
