package elementtest

import (
	"fmt"
	"strings"
)

// node is a piece of a sample: a scalar, a mapping or a list.
type node struct {
	text string
	keys []string
	of   map[string]*node // nil: no mapping
	list []*node          // nil: no list
}

// read parses the flow style of the file format, as far as samples need it: braces, brackets, plain scalars.
func read(s string) (*node, error) {
	r := &reader{s: s}
	n := r.value()
	r.blank()
	if r.at < len(r.s) || r.bad {
		return nil, fmt.Errorf("sample %q: not understood from %q", s, r.s[min(r.at, len(s)):])
	}
	return n, nil
}

type reader struct {
	s   string
	at  int
	bad bool
}

func (r *reader) blank() {
	for r.at < len(r.s) && r.s[r.at] == ' ' {
		r.at++
	}
}

// take steps over c if it comes next.
func (r *reader) take(c byte) bool {
	r.blank()
	if r.at < len(r.s) && r.s[r.at] == c {
		r.at++
		return true
	}
	return false
}

func (r *reader) value() *node {
	switch {
	case r.take('{'):
		return r.mapping()
	case r.take('['):
		return r.sequence()
	}
	return &node{text: r.scalar(",]}")}
}

func (r *reader) scalar(ends string) string {
	from := r.at
	for r.at < len(r.s) && !strings.ContainsRune(ends, rune(r.s[r.at])) {
		r.at++
	}
	return strings.TrimSpace(r.s[from:r.at])
}

func (r *reader) mapping() *node {
	n := &node{of: map[string]*node{}}
	for !r.take('}') {
		r.blank()
		key := r.scalar(":}")
		if !r.take(':') {
			r.bad = true
			return n
		}
		n.keys = append(n.keys, key)
		n.of[key] = r.value()
		r.take(',')
	}
	return n
}

func (r *reader) sequence() *node {
	n := &node{list: []*node{}}
	for !r.take(']') {
		if r.at >= len(r.s) {
			r.bad = true
			return n
		}
		n.list = append(n.list, r.value())
		r.take(',')
	}
	return n
}
