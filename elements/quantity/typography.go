package quantity

import (
	"strings"
	"unicode"
)

// plain replaces typographic forms that mean one thing only by the plain
// character the units are spelled with. It changes rune for rune, so that places
// in the result are places in the text.
func plain(s string) string {
	for i := 0; i < len(s); i++ {
		if s[i] >= 0x80 || s[i] < ' ' {
			return replaceRunes(s)
		}
	}
	return s
}

func replaceRunes(s string) string {
	var b strings.Builder
	b.Grow(len(s))
	prev := ' '
	for _, r := range s {
		p := plainRune(r, prev)
		b.WriteRune(p)
		prev = p
	}
	return b.String()
}

// plainRune returns the plain form of r, which follows prev.
func plainRune(r, prev rune) rune {
	switch r {
	case 'º', '˚': // ordinal indicator, ring above: meant as the degree sign
		return '°'
	case 'μ': // Greek mu: meant as the micro sign
		return 'µ'
	case '\u2212', '\u2010', '\u2011', '\u2012', '\u2013', '\ufe63', '\uff0d': // minus, hyphens, en dash
		return '-'
	case '\u2044', '\u2215': // fraction and division slash
		return '/'
	case '⋅', '∙', '•':
		return '·'
	case '²', '³': // only behind a letter: "m³", but 10³ is not 103
		if unicode.IsLetter(prev) {
			return '2' + (r - '²')
		}
		return r
	case '\t', '\n', '\r', '\u200b', '\ufeff', '\u2060', '\u00ad', '\u200e', '\u200f':
		return ' '
	}
	if r > 0x7f && unicode.Is(unicode.Zs, r) { // no-break, thin, figure spaces
		return ' '
	}
	return r
}
