package scenarios

import (
	"bytes"
	"strconv"
	"strings"
)

// Normalise writes a plant file in plain form: block style, every text in quotes, quantities in plain typography, aliases and copies written out. It
// loads to the same plant. The error is a *Problems.
func Normalise(name string, data []byte) ([]byte, error) {
	src := newSource(name, data)
	if _, err := load(src, Options{}); err != nil {
		return nil, err
	}
	d := newDecoder(src)
	root := d.copies(d.tree())
	d.decode(root) // leaves its reading of every quantity in the tree
	for _, c := range casesOf(root) {
		newDecoder(src).decode(d.apply(root, c))
	}
	var b bytes.Buffer
	write(&b, root, 0)
	return b.Bytes(), nil
}

// write writes a mapping or list whose lines are indented by so many steps.
func write(b *bytes.Buffer, n *node, depth int) {
	indent := strings.Repeat("  ", depth)
	for i, item := range n.items {
		b.WriteString(indent)
		if n.form == mapping {
			b.WriteString(plainKey(n.keys[i].text) + ":")
		} else {
			b.WriteString("-")
		}
		switch {
		case item.form == scalar:
			b.WriteString(" " + plainScalar(item) + "\n")
		case len(item.items) == 0:
			b.WriteString(map[form]string{mapping: " {}\n", list: " []\n"}[item.form])
		case flat(item):
			b.WriteString(" " + inline(item) + "\n")
		default:
			b.WriteString("\n")
			write(b, item, depth+1)
		}
	}
}

// flat reports whether a node is a row of a table.
func flat(n *node) bool {
	if n.form != list {
		return false
	}
	for _, item := range n.items {
		if item.form != scalar {
			return false
		}
	}
	return true
}

func inline(n *node) string {
	cells := make([]string, len(n.items))
	for i, item := range n.items {
		cells[i] = plainScalar(item)
	}
	return "[" + strings.Join(cells, ", ") + "]"
}

func plainScalar(n *node) string {
	switch {
	case n.empty:
		return ""
	case n.echo != "":
		return quote(n.echo)
	}
	return quote(n.text)
}

// quote writes a text between double quotes as YAML reads it.
func quote(s string) string {
	var b strings.Builder
	b.WriteByte('"')
	for _, r := range s {
		switch {
		case r == '"' || r == '\\':
			b.WriteByte('\\')
			b.WriteRune(r)
		case r == '\n':
			b.WriteString(`\n`)
		case r < ' ' || r == 0x7f || r >= 0x80 && r < 0xa0 || r == 0x2028 || r == 0x2029 || r == 0xfeff || r >= 0xd800 && r < 0xe000:
			b.WriteString(`\u` + hex4(r))
		default:
			b.WriteRune(r)
		}
	}
	b.WriteByte('"')
	return b.String()
}

func hex4(r rune) string {
	h := strconv.FormatInt(int64(r), 16)
	return strings.Repeat("0", 4-len(h)) + h
}

// plainKey writes a key: in quotes when it is more than a word.
func plainKey(s string) string {
	for i, r := range s {
		letter := r >= 'a' && r <= 'z' || r >= 'A' && r <= 'Z'
		if !letter && (i == 0 || !(r >= '0' && r <= '9') && !strings.ContainsRune("-_/.", r)) {
			return quote(s)
		}
	}
	if s == "" || len(s) == 1 {
		return quote(s)
	}
	for _, w := range turned {
		if strings.EqualFold(s, w) {
			return quote(s)
		}
	}
	return s
}
