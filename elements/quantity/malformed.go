package quantity

import (
	"strings"
	"unicode/utf8"
)

// wellFormed looks at the number read from s[i:end] and at what touches it, and
// explains every spelling that is not a plain decimal number. It also refuses
// what other languages take for numbers: nan, inf, 0x10, 1_000.
func (p *parser) wellFormed(n *number, i, end int) *Error {
	if end == i {
		return p.noNumber(i)
	}
	if len(n.text) > 1 && n.text[0] == '0' && isDigit(n.text[1]) && !strings.HasPrefix(p.s[end:], ":") {
		return p.respell(i, end, "a number has no leading noughts")
	}
	if end == len(p.s) || 'a' <= p.s[end] && p.s[end] < 'x' {
		return nil
	}
	return p.touching(n, i, end)
}

// touching explains what stands directly behind a number.
func (p *parser) touching(n *number, i, end int) *Error {
	rest := p.s[end:]
	digit := len(rest) > 1 && isDigit(rest[1])
	switch c := rest[0]; {
	case c == ' ':
		if thousandsBlank(n, rest) {
			return p.respell(i, runEnd(p.s, i), "a number has no blanks inside")
		}
	case c == ',' && digit:
		run := p.s[i:runEnd(p.s, i)]
		if one, other, two := twoReadings(run); two {
			return fault(p.s, i, i+len(run), quote(run)+" can be read two ways",
				"write "+p.with(i, i+len(run), one)+" or "+p.with(i, i+len(run), other))
		}
		if strings.Count(run, ",") > 1 || strings.Contains(run, ".") {
			return p.respell(i, i+len(run), "a number has no thousands separators")
		}
		return p.respell(i, i+len(run), "decimals are parted by a point")
	case c == '_' && digit, c == '\'' && digit, strings.HasPrefix(rest, "’"):
		return p.respell(i, runEnd(p.s, i), "a number has no thousands separators")
	case strings.HasPrefix(rest, ".."):
		return p.rangeHint(i, end, strings.TrimLeft(rest, "."))
	case c == '.':
		return p.respell(i, runEnd(p.s, i), quote(p.s[i:runEnd(p.s, i)])+" is not a number")
	case c == '-' && digit:
		return p.rangeHint(i, end, rest[1:])
	case c == ':' && digit:
		msg := "this is a time of day; " + words[p.d].noun + " is needed"
		if p.d == Time {
			return fault(p.s, i, len(p.s), msg, "e.g. 6 h 30 min")
		}
		return fault(p.s, i, len(p.s), msg, "e.g. "+exampleOf(p.d)).example()
	case c == '/' && digit:
		return fault(p.s, i, end+2, "fractions are not read", "write the decimal, e.g. 0.5")
	case superscript(rest):
		return fault(p.s, i, len(p.s), "powers are not read", "write the number out, or as in 1e3")
	case c|0x20 == 'x' && n.text == "0" && digit:
		return fault(p.s, i, len(p.s), "hexadecimal numbers are not read", "write the decimal number")
	}
	return nil
}

// superscript reports whether s begins with a raised digit or sign.
func superscript(s string) bool {
	r, _ := utf8.DecodeRuneInString(s)
	return strings.ContainsRune("⁰¹²³⁴⁵⁶⁷⁸⁹⁺⁻", r)
}

// noNumber explains a text that does not begin with a number.
func (p *parser) noNumber(i int) *Error {
	rest := p.s[i:]
	msg := quote(rest) + " is not a number"
	hint := "e.g. " + exampleOf(p.d)
	switch {
	case strings.TrimSpace(p.s) == "":
		msg = "a value is missing"
	case rest == "":
		msg = "a number is missing behind " + quote(p.s)
	case strings.HasPrefix(rest, "<"), strings.HasPrefix(rest, ">"), strings.HasPrefix(rest, "~"):
		msg = "write the number alone"
	}
	return fault(p.s, i, len(p.s), msg, hint).example()
}

// exampleOf is a right spelling of something of this dimension.
func exampleOf(d Dim) string {
	example := [...]string{Number: "0.62", Ratio: "35 %", Count: "3", Kv: "95", Cv: "110", Length: "4.2 m",
		Temperature: "12 °C", Angle: "90 deg", Pressure: "5 mbar(g)", Density: "1000 kg/m3", Viscosity: "1.2 mPa.s",
		Time: "20 min", numDims: ""}[d]
	if example == "" {
		example = "2 " + words[d].example
	}
	return example
}

// respell is a fault at s[i:end] with the whole text in its right spelling as hint.
func (p *parser) respell(i, end int, msg string) *Error {
	return fault(p.s, i, end, msg, "write "+strings.TrimSpace(repair(p.s)))
}

// with returns the text with s[i:end] replaced and the rest repaired.
func (p *parser) with(i, end int, number string) string {
	return strings.TrimSpace(repair(p.s[:i]) + number + repair(p.s[end:]))
}

// rangeHint shows how a range is written, its first number being s[i:end].
func (p *parser) rangeHint(i, end int, rest string) *Error {
	rest = strings.TrimLeft(rest, " ")
	return fault(p.s, i, len(p.s), "a range is written with \"to\"", "write "+p.s[i:end]+" to "+strings.TrimSpace(repair(rest)))
}
