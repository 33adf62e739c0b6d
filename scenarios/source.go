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

// line returns a line of the text by its number from 1, without its end.
func (s *source) line(n int) string {
	if s.lines == nil {
		s.lines = strings.Split(s.text, "\n")
	}
	if n < 1 || n > len(s.lines) {
		return ""
	}
	return strings.TrimRight(s.lines[n-1], "\r")
}

// spot returns a node without content at a byte of the text, for a fault that stands there.
func (s *source) spot(at int) *node {
	before := s.text[:at]
	start := strings.LastIndexByte(before, '\n') + 1
	return &node{src: s, at: network.Place{Line: 1 + strings.Count(before, "\n"), Column: 1 + utf8.RuneCountInString(before[start:])}}
}
