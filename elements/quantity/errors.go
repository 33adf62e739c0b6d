package quantity

import (
	"strings"
	"unicode/utf8"
)

// Error says what is wrong with a text and how to write it.
type Error struct {
	Msg    string // what is wrong, without the place: `"4.2" needs a unit`
	Hint   string // the right spelling: "e.g. 4.2 m"; may be empty
	Offset int    // where the fault begins, runes from the start of the text
	Length int    // how many runes it spans, at least 1 unless the text is empty

	Number  string // a bare number that lacks nothing but its unit, else ""
	Example bool   // Hint is any value of the dimension; who knows what is asked for may show a likelier one
}

// Error returns message and hint in one line.
func (e *Error) Error() string {
	if e.Hint == "" {
		return e.Msg
	}
	return e.Msg + ", " + e.Hint
}

// fault makes an Error for the bytes s[from:to].
func fault(s string, from, to int, msg, hint string) *Error {
	from = min(from, len(s))
	to = min(max(to, from), len(s))
	e := &Error{Msg: msg, Hint: hint}
	e.Offset = utf8.RuneCountInString(s[:from])
	e.Length = utf8.RuneCountInString(s[from:to])
	if e.Length == 0 && len(s) > 0 {
		e.Length = 1
		e.Offset = min(e.Offset, utf8.RuneCountInString(s)-1)
	}
	return e
}

// example marks the hint as any value of the dimension.
func (e *Error) example() *Error {
	e.Example = true
	return e
}

// quote puts a piece of the user's text in quotes, shortened when long.
func quote(s string) string {
	s = strings.TrimSpace(s)
	if utf8.RuneCountInString(s) > 40 {
		s = string([]rune(s)[:39]) + "…"
	}
	return `"` + strings.Map(printable, s) + `"`
}

// printable keeps control characters and broken encoding out of messages.
func printable(r rune) rune {
	if r < ' ' || r == 0x7f || r >= 0x80 && r < 0xa0 {
		return '?'
	}
	return r
}
