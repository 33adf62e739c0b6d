package scenarios

import (
	"strings"
	"unicode/utf8"

	"headfall/network"
)

// source is a text that nodes come from: the file, or an argument of --set.
type source struct {
	name  string
	text  string
	lines []string // filled when first asked for
}

// newSource takes a file; a mark of its byte order is no part of the text.
func newSource(name string, data []byte) *source {
	return &source{name: name, text: strings.TrimPrefix(string(data), "\ufeff")}
}

// line returns a line of the text by its number from 1, without its end.
func (s *source) line(n int) string {
	if s.lines == nil {
		s.lines = linesOf(s.text)
	}
	if n < 1 || n > len(s.lines) {
		return ""
	}
	return s.lines[n-1]
}

// lineEnds makes one of all that YAML takes for the end of a line, also those of old machines.
var lineEnds = strings.NewReplacer("\r\n", "\n", "\r", "\n", "\u0085", "\n", "\u2028", "\n", "\u2029", "\n")

func linesOf(text string) []string { return strings.Split(lineEnds.Replace(text), "\n") }

// spot returns a node without content at a byte of the text, for a fault that stands there.
func (s *source) spot(at int) *node {
	before := linesOf(s.text[:at])
	return &node{src: s, at: network.Place{Line: len(before), Column: 1 + utf8.RuneCountInString(before[len(before)-1])}}
}
