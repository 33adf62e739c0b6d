package scenarios

import (
	"regexp"
	"strings"
	"unicode/utf8"

	"headfall/network"
)

// slip is a common reason why a text is no YAML, told in the words of its author. The reader of YAML tells most of them by what it missed, some
// lines later.
type slip struct {
	at         network.Place
	text       string // that is wrong
	says, hint string
}

// slipOf looks for the first slip of a text that cannot be read. It is a guess: it knows the plain ways of writing only.
func slipOf(src *source) (slip, bool) {
	l := looker{src: src, indents: []int{0}}
	for n := 1; n == 1 || n <= len(src.lines); n++ {
		if l.line(n, src.line(n)) {
			return l.found, true
		}
	}
	if len(l.open) > 0 {
		l.unclosed(l.open[0])
		return l.found, true
	}
	return slip{}, false
}

// looker goes through a text line by line.
type looker struct {
	src     *source
	open    []bracket // of the kinds { and [
	indents []int     // of the blocks around this line
	block   int       // indentation of the key of a text in | or >; -1 outside
	inBlock bool
	found   slip
}

type bracket struct {
	kind     byte
	line, at int // in bytes of the line
}

var (
	slipKey    = regexp.MustCompile(`^((?:- +)*)([^\s#"'{\[:][^:#{\["']*):(\s+|$)`)
	slipJoined = regexp.MustCompile(`^((?:- +)*)([a-z_]+):([^\s:/][^:]*)$`)
	slipBlock  = regexp.MustCompile(`[:-]\s+[|>][-+0-9]*\s*(#.*)?$`)
	slipColon  = regexp.MustCompile(`:(\s|$)`)
)

const reserved = "@`%" // no plain text begins with these

// line looks at one line and reports whether it holds a slip.
func (l *looker) line(n int, text string) bool {
	body := strings.TrimLeft(text, " \t")
	indent := len(text) - len(body)
	if body == "" || body[0] == '#' {
		return false
	}
	if l.inBlock && indent > l.block {
		return false
	}
	l.inBlock = false
	if tab := strings.IndexByte(text[:indent], '\t'); tab >= 0 && len(l.open) == 0 {
		return l.slip(n, tab, "\t", "this line is indented with a tab", "indent with blanks")
	}
	if len(l.open) == 0 && l.plain(n, indent, body) {
		return true
	}
	if slipBlock.MatchString(text) && len(l.open) == 0 {
		l.inBlock, l.block = true, indent
	}
	return l.marks(n, text)
}

// plain looks at a line outside braces: its indentation, its key, the beginning of its text.
func (l *looker) plain(n, indent int, body string) bool {
	if m := slipJoined.FindStringSubmatch(body); m != nil {
		return l.slip(n, indent+len(m[1]), m[2]+":", "a blank is missing behind the colon", "write "+m[2]+": "+short(m[3]))
	}
	m := slipKey.FindStringSubmatch(body)
	if m == nil {
		return false
	}
	if l.indented(indent, indent+len(m[1])) {
		return l.slip(n, indent, m[2], "this line is indented like none before it", "what belongs together begins in the same column")
	}
	rest := body[len(m[0]):]
	at := indent + len(m[0])
	switch {
	case rest == "":
	case strings.IndexByte(reserved, rest[0]) >= 0:
		return l.slip(n, at, rest[:1], "a text cannot begin with "+rest[:1], "put it in quotes: "+short(m[2])+": "+quoted(withoutComment(rest)))
	case strings.IndexByte("\"'{[|>&*!#", rest[0]) < 0 && slipColon.MatchString(withoutComment(rest)):
		return l.slip(n, at, withoutComment(rest), "a text with a colon in it stands in quotes", "put it in quotes: "+short(m[2])+": "+quoted(withoutComment(rest)))
	}
	return false
}

// indented keeps the columns in which the blocks around a line begin, and reports a line that falls back to none of them. An entry of a list
// begins with its dash, and its keys in the column of the first one.
func (l *looker) indented(indent, key int) (lost bool) {
	last := len(l.indents) - 1
	for ; last > 0 && indent < l.indents[last]; last-- {
		lost = true
	}
	lost = lost && indent != l.indents[last]
	l.indents = l.indents[:last+1]
	for _, at := range []int{indent, key} {
		if at > l.indents[len(l.indents)-1] {
			l.indents = append(l.indents, at)
		}
	}
	return lost
}

// marks follows quotes and brackets through a line.
func (l *looker) marks(n int, text string) bool {
	var quote byte
	from := 0
	before := byte(' ')
	for i := 0; i < len(text); i++ {
		c := text[i]
		switch {
		case quote == '"' && c == '\\':
			i++
		case quote != 0:
			if c == quote {
				quote = 0
			}
		case (c == '"' || c == '\'') && strings.IndexByte(" {[,:-", before) >= 0:
			quote, from = c, i
		case c == '#' && (before == ' ' || before == '\t'):
			return false
		case c == '{' || c == '[':
			if len(l.open) > 0 || strings.IndexByte(" {[,", before) >= 0 {
				l.open = append(l.open, bracket{c, n, i})
			}
		case c == '}' || c == ']':
			if len(l.open) == 0 {
				break
			}
			last := l.open[len(l.open)-1]
			if last.kind != c-2 {
				l.unclosed(last)
				return true
			}
			l.open = l.open[:len(l.open)-1]
		}
		before = c
	}
	if quote != 0 {
		return l.slip(n, from, text[from:from+1], "these quotes are not closed in this line", "close them where the text ends")
	}
	return false
}

func (l *looker) unclosed(b bracket) {
	l.slip(b.line, b.at, string(b.kind), "this "+string(b.kind)+" is never closed", "write "+string(b.kind+2)+" where it ends")
}

func (l *looker) slip(n, at int, text, says, hint string) bool {
	l.found = slip{at: network.Place{Line: n, Column: 1 + utf8.RuneCountInString(l.src.line(n)[:at])}, text: text, says: says, hint: hint}
	return true
}

// short cuts what is too long for a hint.
func short(s string) string {
	if r := []rune(s); len(r) > 40 {
		return string(r[:39]) + "…"
	}
	return s
}

// withoutComment takes away what stands behind a # and the blanks before it.
func withoutComment(s string) string {
	if i := strings.Index(s, " #"); i >= 0 {
		s = s[:i]
	}
	return strings.TrimSpace(s)
}
