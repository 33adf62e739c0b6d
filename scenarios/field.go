package scenarios

import (
	"fmt"
	"slices"
	"strings"
	"unicode"

	"headfall/elements"
	"headfall/elements/quantity"
)

// field is one key of a mapping: what it means, how it is written and where its value goes. Decoding and the JSON Schema both follow from it.
type field struct {
	key     string
	need    elements.Need
	help    string
	written *writing
	read    func(n *node, owner string)
	absent  func(n *node, owner string) // what to do when it is not written; n is the mapping; may be nil
	instead []string                    // keys that a value from outside takes the place of
}

// style is a way of writing a value.
type style int

const (
	anyText   style = iota // free text
	aTag                   // the tag of a thing
	aQuantity              // a number, with a unit where its dimension has one
	aMoment                // a clock time or a duration
	aDate                  // date and time
	aWord                  // one of words
	aYesNo                 // yes or no
	aKind                  // a kind of a room: its bare word, or a mapping of one key
	anObject               // a mapping along fields
	aTable                 // rows of quantities
	aList                  // a list of item
	aMap                   // a mapping from names to item
	aCondition
)

// writing tells how a value is written.
type writing struct {
	style  style
	dim    quantity.Dim
	cols   []quantity.Dim
	words  []string
	room   elements.Room
	name   string         // of an object, among the definitions of the schema
	fields func() []field // of an object
	unless string         // a key of an object that stands for those it needs
	item   *writing       // of a list or map
	least  int            // entries of a list at least
	or     *writing       // another way
}

// The commonest ways of writing are made once.
var (
	asText      = &writing{style: anyText}
	aTagWritten = &writing{style: aTag}
	asMoment    = &writing{style: aMoment}
	asYesNo     = &writing{style: aYesNo}
	unitWays    = func() (all []*writing) {
		for d := quantity.Number; d <= quantity.SurfaceTension; d++ {
			all = append(all, &writing{style: aQuantity, dim: d})
		}
		return all
	}()
)

// inUnits is how a quantity of a dimension is written.
func inUnits(dim quantity.Dim) *writing { return unitWays[dim] }

// settable reports whether a value from outside may be put here: whatever is one scalar.
func (f *field) settable() bool {
	if f.key == "tag" || f.key == "id" || f.key == "like" {
		return false
	}
	for w := f.written; w != nil; w = w.or {
		switch w.style {
		case anyText, aQuantity, aMoment, aWord, aYesNo, aKind, aTag, aTable:
			return true
		}
	}
	return false
}

// mayBeEmpty reports whether nothing is a value: an empty list or section.
func (f *field) mayBeEmpty() bool { return f.written.style == aList || f.written.style == aMap }

func indexOf(fields []field, key string) int {
	for j := range fields {
		if fields[j].key == key {
			return j
		}
	}
	return -1
}

func keysOf(fields []field) []string {
	keys := make([]string, len(fields))
	for j := range fields {
		keys[j] = fields[j].key
	}
	return keys
}

// needs shows as a hint how a kind is written, or the keys that must be: those named, or all.
func (d *decoder) needs(k *elements.Kind, fields []field, only ...string) string {
	if k != nil && k.Sample != "" {
		return sampleOf(k)
	}
	var must []string
	for j := range fields {
		if f := &fields[j]; f.need == elements.Required && (len(only) == 0 || slices.Contains(only, f.key)) {
			must = append(must, d.sample(f))
		}
	}
	switch {
	case len(must) == 0:
		return "each key on a line of its own, with its value behind a colon"
	case len(only) > 0:
		return "e.g. " + strings.Join(must, ", ")
	}
	return "e.g. {" + strings.Join(must, ", ") + "}"
}

// sub names what stands under a key; what belongs to nothing with a name has none.
func sub(owner, key string) string {
	if owner == "" {
		return ""
	}
	return owner + "." + key
}

// listed joins words: "a, b and c".
func listed(words []string, and string) string {
	if len(words) < 2 {
		return strings.Join(words, "")
	}
	return strings.Join(words[:len(words)-1], ", ") + " " + and + " " + words[len(words)-1]
}

// quoted puts a piece of the file in quotes, shortened when long.
func quoted(s string) string {
	runes := []rune(strings.ToValidUTF8(s, "?"))
	if len(runes) > 40 {
		runes = append(runes[:39], '…')
	}
	var b strings.Builder
	for _, r := range runes {
		switch {
		case unicode.IsControl(r):
			b.WriteByte(' ')
		case unicode.Is(unicode.Cf, r): // blanks without width, turns of direction
			fmt.Fprintf(&b, `\u%04x`, r)
		default:
			b.WriteRune(r)
		}
	}
	return `"` + b.String() + `"`
}

// object makes a field that holds a mapping of its own; take gets the value when all was read.
func object[T any](d *decoder, key string, need elements.Need, help, what string, fields func(*T) []field, take func(v *T, n *node)) field {
	return field{key: key, need: need, help: help, written: &writing{style: anObject, name: what, fields: func() []field { return fields(new(T)) }},
		read: func(n *node, owner string) {
			v := new(T)
			if d.mapping(n, what, sub(owner, key), fields(v)) {
				take(v, n)
			}
		}}
}

// objects makes a field that holds a list of mappings.
func objects[T any](d *decoder, key string, help, what string, fields func(*T) []field, take func(v *T, n *node)) field {
	item := writing{style: anObject, name: what, fields: func() []field { return fields(new(T)) }}
	return field{key: key, help: help, written: &writing{style: aList, item: &item},
		read: func(n *node, _ string) {
			d.list(n, key, func(_ int, entry *node) {
				v := new(T)
				if d.mapping(entry, what, idOf(entry), fields(v)) {
					take(v, entry)
				}
			})
		}}
}
