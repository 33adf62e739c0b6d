package scenarios

import (
	"fmt"
	"strings"

	"headfall/elements"
	"headfall/elements/quantity"
	"headfall/network"
)

// decoder walks a tree and fills a plant. It collects problems and goes on.
type decoder struct {
	src    *source
	plant  *network.Plant
	probs  []Problem
	advice int // nearest spellings looked for; see hints

	things map[string]*thing         // by tag
	refs   []reference               // looked up when all tags are known
	after  []func()                  // checks that need the whole file
	trims  map[string][][]float64    // rows by name
	lines  []*network.Line           // also those with faults
	parts  map[*network.Line][]*node // that were read
	wrote  map[*network.Line]int     // parts that stand in the file

	sets    map[string]*node // numbers and words given from outside, by full name
	collect bool             // note the names that may be set
	names   []string         // these names
	cache   map[written]reading
	slab    []network.Number
}

// written is a text read as one dimension; files repeat themselves.
type written struct {
	text string
	dim  quantity.Dim
}

type reading struct {
	value quantity.Value
	echo  string
}

func newDecoder(src *source) *decoder {
	return &decoder{src: src, plant: &network.Plant{}, things: map[string]*thing{}, trims: map[string][][]float64{},
		parts: map[*network.Line][]*node{}, wrote: map[*network.Line]int{}, cache: map[written]reading{}}
}

// problem notes a fault of a node.
func (d *decoder) problem(n *node, says, hint string) { d.within(n, 0, 0, says, hint) }

// within notes a fault of a part of a scalar's text.
func (d *decoder) within(n *node, offset, length int, says, hint string) {
	column, width := n.span(offset, length)
	d.probs = append(d.probs, Problem{File: n.src.name, At: network.Place{Line: n.at.Line, Column: column}, Says: says, Hint: hint,
		Source: n.src.line(n.at.Line), Width: width})
}

const enoughAdvice = 200 // nearest spellings a file gets; looking for them among many words takes its time

// hint returns the nearest of the words, or all of them.
func (d *decoder) hint(w string, words []string) string {
	if d.advice++; d.advice > enoughAdvice {
		return ""
	}
	return didYouMean(w, words)
}

// mapping reads a mapping along a table of fields and reports whether it had no fault of its own. what is how messages speak of it, owner the name
// that its numbers begin with.
func (d *decoder) mapping(n *node, what, owner string, fields []field) bool {
	before := len(d.probs)
	if n.form != mapping {
		d.problem(n, what+" is written as keys with values", needs(fields))
		return false
	}
	values := make([]*node, len(fields))
	meant := map[string]bool(nil) // keys that misspelt ones stand for
	for i, k := range n.keys {
		j := indexOf(fields, k.text)
		switch {
		case j < 0:
			if near := d.unknown(k, n.items[i], what, fields); near != "" {
				meant = also(meant, near)
			}
		case values[j] != nil:
			d.problem(k, fmt.Sprintf("%s is given twice", k.text), fmt.Sprintf("it stands in line %d already", values[j].at.Line))
		case n.items[i].empty && !fields[j].mayBeEmpty():
			d.problem(k, k.text+" has no value", "")
			values[j] = n.items[i]
		default:
			values[j] = n.items[i]
		}
	}
	d.override(owner, fields, values)
	var missing []string
	for j := range fields {
		f, v := &fields[j], values[j]
		switch {
		case v != nil && v.empty && !f.mayBeEmpty():
		case v != nil:
			f.read(v, owner)
		case meant[f.key]:
		case f.need == elements.Required:
			missing = append(missing, f.key)
		case f.absent != nil:
			f.absent(n, owner)
		}
	}
	if len(missing) > 0 {
		d.problem(n, what+" needs "+listed(missing, "and"), "")
	}
	return len(d.probs) == before
}

// override puts values from outside in the place of the file's.
func (d *decoder) override(owner string, fields []field, values []*node) {
	if owner == "" || d.sets == nil && !d.collect {
		return
	}
	for j := range fields {
		if !fields[j].settable() {
			continue
		}
		name := owner + "." + fields[j].key
		if d.collect {
			d.names = append(d.names, name)
		}
		if v := d.sets[name]; v != nil {
			values[j] = v
			for _, other := range fields[j].instead {
				values[indexOf(fields, other)] = nil
			}
		}
	}
}

// set reports whether a value comes from outside.
func (d *decoder) set(owner, key string) bool { return owner != "" && d.sets[owner+"."+key] != nil }

func also(set map[string]bool, word string) map[string]bool {
	if set == nil {
		set = map[string]bool{}
	}
	set[word] = true
	return set
}

// unknown notes a key that is not in the table and returns the one it is most like, or "".
func (d *decoder) unknown(k, v *node, what string, fields []field) (near string) {
	if k.form != scalar || k.text == "<<" {
		return "" // noted when the tree was made
	}
	keys := keysOf(fields)
	near = nearest(k.text, keys)
	hint := d.hint(k.text, keys)
	if v.empty && v.text == "" && near == "" && strings.ContainsAny(k.src.line(k.at.Line), "{[") {
		hint = "a comma ends a text inside braces: put the whole text in quotes, or write one key a line"
	}
	d.problem(k, fmt.Sprintf("%s has no key %s", what, quoted(k.text)), hint)
	return near
}
