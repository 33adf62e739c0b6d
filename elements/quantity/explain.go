package quantity

import (
	"fmt"
	"strings"
)

// shareUnit is per cent of the value, allowed in a doubt of any dimension.
var shareUnit = newUnit("%", product("1/100"))

// needsUnit is the fault of a bare number at s[i:end].
func (p *parser) needsUnit(i, end int, number string) *Error {
	e := fault(p.s, i, end, quote(number)+" needs a unit", "e.g. "+number+" "+words[p.d].example)
	e.Number = number
	return e
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
	end := f.end
	if whole := p.wholeUnit(f); p.d == Time && measures(whole) != "" { // "4 m3/h" is no sum of times
		name, end = whole, f.unitAt+len(whole)
	}
	msg, better := explainUnit(name, p.d)
	switch {
	case better != "":
		return fault(p.s, f.unitAt, end, msg, "write "+number+" "+strings.ReplaceAll(better, " or ", " or "+number+" "))
	case strings.HasPrefix(msg, "unknown"):
		return fault(p.s, f.unitAt, end, msg, "units of "+words[p.d].noun+": "+known(p.d))
	}
	return fault(p.s, f.unitAt, end, msg, "e.g. "+exampleOf(p.d)).example()
}

// wholeUnit is a figure's unit up to the next blank.
func (p *parser) wholeUnit(f *figure) string {
	name, _, _ := strings.Cut(p.s[f.unitAt:], " ")
	return name
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
	msg, hint := quote(rest)+" is not understood here", "write "+strings.TrimSpace(p.s[:i])
	switch op, _ := scanOperator(p.s, i); {
	case op != noOperator:
		msg, hint = "one doubt is enough", "e.g. 0.62 ± 0.04, or 0.58 to 0.66"
	case rest[0] == '-' || rest[0] == '+':
		msg, hint = "sums are not read", "write the result, or ± for a doubt"
	case isDigit(rest[0]) && p.d != Time:
		msg, hint = "only durations are written in parts", "e.g. "+exampleOf(p.d)
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
	if what := measures(short); what != "" && what != words[d].noun {
		return fmt.Sprintf("%s measures %s; %s is needed", name, what, words[d].noun), ""
	}
	if name == "%" {
		return "per cent is not understood here; " + words[d].noun + " is needed", ""
	}
	return "unknown unit " + quote(name), nearest(short, d, false)
}

// measures says what a unit measures, with its article; "" for what is no unit.
func measures(name string) string {
	for d := Length; d < numDims; d++ {
		if tables[d].find(name) != nil {
			return words[d].noun
		}
	}
	return foreign[name]
}

// known lists the first few units of d.
func known(d Dim) string {
	names := Units(d)
	if len(names) > 12 {
		names = append(names[:12:12], "…")
	}
	return strings.Join(names, " ")
}
