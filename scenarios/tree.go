package scenarios

import (
	"slices"
	"unicode/utf8"

	"headfall/network"
)

// form is how a node is written.
type form int8

const (
	scalar form = iota
	mapping
	list
)

// node is one value of a file with its place. Aliases share their node.
type node struct {
	form  form
	plain bool   // a scalar without quotes
	empty bool   // nothing, ~ or null
	flow  bool   // in braces or brackets
	comma bool   // of a key that is the second half of a number with a decimal comma
	lacks bool   // of a mapping that is not whole because of a fault that is noted
	text  string // of a scalar, as it was written between its quotes
	src   *source
	at    network.Place
	keys  []*node // of a mapping
	items []*node // values of a mapping, or entries of a list
	key   *node   // that it is the value of; nil for an entry of a list
	was   string  // of a key that was misspelt: how
	echo  string  // of a scalar read as a quantity: the same in plain typography
}

// shown is the node that a caret goes under: a mapping or a list is shown by the key it stands under, or by its first key.
func (n *node) shown() *node {
	switch {
	case n.form == scalar:
	case n.key != nil:
		return n.key
	case len(n.keys) > 0 && n.keys[0].at == n.at:
		return n.keys[0]
	}
	return n
}

// respell takes keys that are not among the words for the word each is most like, where that is not written as well.
func (n *node) respell(words []string) {
	tried := 0
	for _, k := range n.keys {
		if k.form != scalar || slices.Contains(words, k.text) {
			continue
		}
		if tried++; tried > enoughAdvice {
			return
		}
		if near := nearest(k.text, words); near != "" && slipped(k.text, near) && n.get(near) == nil {
			k.was, k.text = k.text, near
		}
	}
}

// span returns where a part of a scalar's text stands in its line: the column and the runes. Texts over several lines or with escapes are shown
// by their beginning.
func (n *node) span(offset, length int) (column, width int) {
	if n.form != scalar || n.text == "" {
		return n.at.Column, 1
	}
	quote := 1
	if n.plain {
		quote = 0
	}
	text := n.text
	if n.was != "" {
		text = n.was
	}
	all := utf8.RuneCountInString(text)
	line := []rune(n.src.line(n.at.Line))
	from := n.at.Column - 1 + quote
	switch {
	case from < 0 || from+all > len(line) || string(line[from:from+all]) != text:
		return n.at.Column, 1
	case length <= 0 || offset < 0 || offset+length > all:
		return n.at.Column, all + 2*quote
	}
	return from + 1 + offset, length
}

// keyOf returns a key of a mapping, or the mapping.
func (n *node) keyOf(key string) *node {
	for _, k := range n.keys {
		if k.text == key {
			return k
		}
	}
	return n
}

// get returns the value of a key of a mapping, or nil.
func (n *node) get(key string) *node {
	if n == nil || n.form != mapping {
		return nil
	}
	for i, k := range n.keys {
		if k.text == key {
			return n.items[i]
		}
	}
	return nil
}

// with returns a copy of a mapping in which key has another value; it is added when it was not there.
func (n *node) with(key, value *node) *node {
	c := *n
	c.keys = append([]*node(nil), n.keys...)
	c.items = append([]*node(nil), n.items...)
	for i, k := range c.keys {
		if k.text == key.text {
			c.keys[i], c.items[i] = key, value
			return &c
		}
	}
	c.keys, c.items = append(c.keys, key), append(c.items, value)
	return &c
}

// without returns a copy of a mapping that lacks the keys.
func (n *node) without(keys ...string) *node {
	c := *n
	c.keys, c.items = nil, nil
next:
	for i, k := range n.keys {
		for _, key := range keys {
			if k.text == key {
				continue next
			}
		}
		c.keys, c.items = append(c.keys, k), append(c.items, n.items[i])
	}
	return &c
}
