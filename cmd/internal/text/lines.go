package text

import (
	"fmt"
	"io"
	"strings"
	"unicode"
	"unicode/utf8"
)

const (
	indent   = 13  // columns before the text of a labelled line
	widest   = 110 // columns of a page when nobody says how wide the terminal is
	narrowed = 60  // no narrower than this
)

// sheet writes labelled lines, wrapped under their own text.
type sheet struct {
	w     io.Writer
	width int
	blank bool // the last line was
	err   error
}

func newSheet(w io.Writer, width int) *sheet {
	if width <= 0 || width > widest {
		width = widest
	}
	return &sheet{w: w, width: max(width, narrowed)}
}

// list writes lines under one label.
func (s *sheet) list(label string, said []string) {
	for _, line := range said {
		s.put(label, "%s", line)
		label = ""
	}
}

// put writes one labelled line; an empty label goes on under the last.
func (s *sheet) put(label, format string, args ...any) {
	body := format
	if len(args) > 0 {
		body = fmt.Sprintf(format, args...)
	}
	for i, line := range wrap(body, s.width-indent) {
		if i > 0 {
			label = ""
		}
		s.raw(strings.TrimRight(pad(label, indent)+line, " ") + "\n")
	}
}

// raw writes text as it is.
func (s *sheet) raw(text string) {
	if s.err == nil {
		_, s.err = io.WriteString(s.w, text)
	}
	s.blank = strings.HasSuffix(text, "\n\n")
}

// gap parts two paragraphs, once.
func (s *sheet) gap() {
	if !s.blank {
		s.raw("\n")
		s.blank = true
	}
}

// pad fills up to so many columns, and leaves a blank at least.
func pad(s string, columns int) string {
	if s == "" {
		return strings.Repeat(" ", columns)
	}
	return s + strings.Repeat(" ", max(1, columns-utf8.RuneCountInString(s)))
}

// wrap breaks text at blanks into lines of at most so many columns; a number stays with its unit.
func wrap(text string, columns int) []string {
	words := strings.Fields(text)
	if len(words) == 0 {
		return []string{""}
	}
	for i, word := range words {
		words[i] = printable(word)
	}
	lines := []string{words[0]}
	for _, word := range words[1:] {
		last := &lines[len(lines)-1]
		if utf8.RuneCountInString(*last)+1+utf8.RuneCountInString(word) > columns {
			lines = append(lines, word)
			continue
		}
		*last += " " + word
	}
	for i := range lines {
		lines[i] = strings.ReplaceAll(lines[i], hard, " ")
	}
	return lines
}

const hard = "\x1f" // stands for a blank that is not broken at

// keep makes the blanks of a short text unbreakable.
func keep(s string) string { return strings.ReplaceAll(s, " ", hard) }

// stamp sets a moment in front of the fact.
func stamp(when string) string { return keep(when + "  ") }

// printable takes out what would move the cursor or colour the page: names and reasons come from a file that anybody may have written.
func printable(s string) string {
	return strings.Map(func(r rune) rune {
		if r != rune(hard[0]) && unicode.IsControl(r) {
			return '?'
		}
		return r
	}, s)
}
