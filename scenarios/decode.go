package scenarios

import (
	"fmt"
	"math"
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
	advice int            // nearest spellings looked for; see hints
	what   string         // is being read
	kind   *elements.Kind // of the mapping that is read next

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
	if len(d.probs) >= mostNoted { // only counted
		d.probs = append(d.probs, Problem{File: n.src.name, At: network.Place{Line: math.MaxInt32, Column: len(d.probs)}})
		return
	}
	n = n.shown()
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
	kind := d.kind
	d.kind = nil
	defer d.during(what)()
	before := len(d.probs)
	if n.form != mapping {
		d.problem(n, what+" is written as keys with values", d.needs(kind, fields))
		return false
	}
	n.respell(keysOf(fields))
	values := make([]*node, len(fields))
	given := make([]*node, len(fields)) // the keys
	meant := map[string]bool{}          // keys that unknown ones may stand for
	for i, k := range n.keys {
		j := indexOf(fields, k.text)
		v := n.items[i]
		if k.was != "" {
			d.misspelt(k, what)
		}
		switch {
		case j < 0:
			meant[d.unknown(k, v, what, fields)] = true
		case given[j] != nil:
			d.problem(k, fmt.Sprintf("%s is given twice", k.text), "it stands "+where(given[j], k)+" already")
		case v.empty && !fields[j].mayBeEmpty():
			d.problem(k, k.text+" has no value", "e.g. "+d.sample(&fields[j]))
			values[j], given[j] = v, k
		case i+1 < len(n.keys) && d.commaBetween(v, n.keys[i+1], n.items[i+1]):
			values[j], given[j] = &node{empty: true}, k
		default:
			values[j], given[j] = v, k
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
	if len(missing) > 0 && !n.lacks {
		d.problem(n, what+" needs "+listed(missing, "and"), d.needs(kind, fields, missing...))
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

// during notes what is being read, for the hints, and returns what ends it.
func (d *decoder) during(what string) (end func()) {
	before := d.what
	d.what = what
	return func() { d.what = before }
}

// misspelt notes a key that was read as the one it is most like.
func (d *decoder) misspelt(k *node, what string) {
	d.problem(k, fmt.Sprintf("%s has no key %s", what, quoted(k.was)), "did you mean "+k.text+"?")
}

// unknown notes a key that is not in the table and returns the one that it may stand for.
func (d *decoder) unknown(k, v *node, what string, fields []field) (near string) {
	if k.form != scalar || k.text == "<<" || k.comma {
		return "" // noted already
	}
	if len(d.probs) >= mostNoted {
		d.problem(k, "", "") // counted
		return ""
	}
	keys := keysOf(fields)
	hint := d.hint(k.text, keys)
	if len(keys) <= fewWords {
		hint = oneOf(keys)
	}
	if v.empty && v.text == "" && strings.ContainsAny(k.src.line(k.at.Line), "{[") {
		hint = "a comma ends a text inside braces: put the whole text in quotes, or write one key a line"
	}
	d.problem(k, fmt.Sprintf("%s has no key %s", what, quoted(k.text)), hint)
	if d.advice > enoughAdvice {
		return ""
	}
	return nearest(k.text, keys)
}

// commaBetween notes a number with a decimal comma inside braces, which YAML reads as a value and a key: {bore: 82,5 mm}.
func (d *decoder) commaBetween(v, next, of *node) bool {
	if v.form != scalar || !v.plain || !next.plain || !of.empty || of.text != "" || !digits(v.text) || next.text == "" || !digits(next.text[:1]) {
		return false
	}
	next.comma = true
	whole := *v
	whole.text = v.text + "," + next.text // as it stands in the line, when there is no blank
	d.problem(&whole, v.key.text+": decimals are parted by a point", "write "+v.text+"."+next.text)
	return true
}

func digits(s string) bool {
	return s != "" && strings.Trim(strings.TrimPrefix(s, "-"), "0123456789") == ""
}

// where tells where a node stands, as seen from another.
func where(n, from *node) string {
	if n.at.Line == from.at.Line {
		return fmt.Sprintf("in column %d", n.at.Column)
	}
	return fmt.Sprintf("in line %d", n.at.Line)
}
