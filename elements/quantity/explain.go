package quantity

import (
	"fmt"
	"strings"
)

// shareUnit is per cent of the value, allowed in a doubt of any dimension.
var shareUnit = newUnit("%", product("1/100"))

// needsUnit is the fault of a bare number at s[i:end].
func (p *parser) needsUnit(i, end int, number string) *Error {
	return fault(p.s, i, end, quote(number)+" needs a unit", "e.g. "+number+" "+words[p.d].example)
}

// badUnit is the fault of a unit that is not one of the dimension's.
func (p *parser) badUnit(f *figure, name string) *Error {
	number := f.num.plain()
	if p.d.Bare() && p.d != Ratio {
		return fault(p.s, f.unitAt, f.end, words[p.d].why, "write "+bare(f, name))
	}
	if word, _, more := strings.Cut(name, " "); more && p.tab.find(word) != nil {
		return p.leftover(p.skip(f.unitAt + len(word)))
	}
	msg, better := explainUnit(name, p.d)
	hint := "e.g. " + exampleOf(p.d)
	if better != "" {
		hint = "write " + number + " " + strings.ReplaceAll(better, " or ", " or "+number+" ")
	} else if strings.HasPrefix(msg, "unknown") {
		hint = "units of " + words[p.d].noun + ": " + known(p.d)
	}
	return fault(p.s, f.unitAt, f.end, msg, hint)
}

// bare is the number of a figure without its unit; 62 % is 0.62.
func bare(f *figure, name string) string {
	if name == "%" {
		if x, ok := toSI(&f.num, shareUnit, false); ok {
			return exactText(x, Number, tables[Number].si, false)
		}
	}
	return f.num.plain()
}

// leftover is the fault of text that follows a complete value; nil when there is none.
func (p *parser) leftover(i int) *Error {
	if i >= len(p.s) {
		return nil
	}
	rest := p.s[i:]
	msg, hint := quote(rest)+" is not understood here", "e.g. "+exampleOf(p.d)
	switch op, _ := scanOperator(p.s, i); {
	case op != noOperator:
		msg, hint = "one doubt is enough", "e.g. 0.62 ± 0.04, or 0.58 to 0.66"
	case rest[0] == '-' || rest[0] == '+':
		msg, hint = "sums are not read", "write the result, or ± for a doubt"
	case isDigit(rest[0]) && p.d != Time:
		msg = "only durations are written in parts"
	}
	return fault(p.s, i, len(p.s), msg, hint)
}

// explainUnit says what is wrong with a unit's name and which one of d was meant
// ("" when that cannot be told).
func explainUnit(name string, d Dim) (msg, better string) {
	short := squeeze(name)
	if m := meant(short, d); m != "" {
		return "unknown unit " + quote(name), m
	}
	if near := nearest(short, d, true); near != "" {
		return "unknown unit " + quote(name), near
	}
	for other := Length; other < numDims; other++ {
		if other == d || tables[other].find(short) == nil {
			continue
		}
		return fmt.Sprintf("%s measures %s; %s is needed", name, words[other].noun, words[d].noun), ""
	}
	if name == "%" {
		return "per cent is not understood here; " + words[d].noun + " is needed", ""
	}
	return "unknown unit " + quote(name), nearest(short, d, false)
}

// known lists the first few units of d.
func known(d Dim) string {
	names := Units(d)
	if len(names) > 12 {
		names = append(names[:12:12], "…")
	}
	return strings.Join(names, " ")
}
