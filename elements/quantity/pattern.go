package quantity

import (
	"regexp"
	"slices"
	"strings"
)

// Pattern returns a regular expression, of the kind that Go and JavaScript share, which holds for every text that [Parse] reads as d. It is for
// editors: it sees a unit that is missing or of another dimension, and leaves the rest to Parse.
func Pattern(d Dim) string {
	number := `^` + blanks + `[-+` + minuses + `]?` + blanks + `\.?[0-9]`
	if d.Bare() {
		return number + `[0-9.eE+\-]*` + blanks + share(d) + blanks + `((±|×÷|\+-|\+/-|\*/|to).*)?$`
	}
	var spellings []string
	for name := range tables[d].byName {
		spellings = append(spellings, loosely(name))
	}
	slices.Sort(spellings)
	after := `[^0-9A-Za-z²³°º˚%µμ/^·(]` // what may stand behind a unit
	if d == Time {
		after = `[^A-Za-z/]`
	}
	return number + `(.*[0-9])?` + blanks + `(` + strings.Join(slices.Compact(spellings), "|") + `)(` + after + `|$)`
}

func share(d Dim) string {
	if d == Ratio {
		return `%?`
	}
	return ""
}

const (
	blanks  = "[\\s\u00a0\u2000-\u200b\u202f\u205f\u2060\u3000\ufeff]*"
	minuses = "\u2212\u2010\u2011\u2012\u2013\ufe63\uff0d"
)

// loosely is an expression for a unit in every typography that is forgiven.
func loosely(name string) string {
	var b strings.Builder
	for _, r := range name {
		switch r {
		case '2', '3':
			b.WriteString(`\^?[` + string(r) + map[rune]string{'2': "²", '3': "³"}[r] + `]`)
		case '/':
			b.WriteString(blanks + "[/\u2044\u2215]" + blanks)
		case '.':
			b.WriteString("(" + blanks + "[.·⋅∙•*]" + blanks + "|[\\s\u00a0\u2009\u202f])")
		case '(', ')':
			b.WriteString(blanks + `\` + string(r) + blanks)
		case '°':
			b.WriteString("[°º˚]" + blanks)
		case 'µ':
			b.WriteString("[µμ]")
		default:
			b.WriteString(regexp.QuoteMeta(string(r)))
		}
	}
	return b.String()
}
