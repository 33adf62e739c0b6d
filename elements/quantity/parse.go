package quantity

import "strings"

// figure is a number with its unit, or a sum of durations: "4.2 m", "1 h 20 min".
type figure struct {
	num      number
	unit     *unit  // nil when no unit is written and the dimension wants one
	more     []term // further terms of a sum
	at, end  int    // bytes it spans
	unitAt   int    // where the unit begins, == end of the number when none
	unitless bool   // no unit is written, whether or not one is needed
}

// term is one further part of a sum of durations.
type term struct {
	num  number
	unit *unit
}

// parts is a text taken apart: figure, or figure operator figure.
type parts struct {
	first, second figure
	op            operator
	opAt          int
}

// parser walks over one text, already in plain typography.
type parser struct {
	s   string
	d   Dim
	tab *unitTable
}

// Parse reads a value of dimension d. The error is an *Error. Whether a value is
// in a sensible range is for the caller to judge.
func Parse(s string, d Dim) (Value, error) {
	v, _, err := parse(s, d)
	if err != nil {
		return Value{}, err
	}
	return v, nil
}

// ParseTime reads a duration, also a sum such as "1 h 20 min"; SI is seconds.
func ParseTime(s string) (Value, error) { return Parse(s, Time) }

func parse(s string, d Dim) (Value, parts, *Error) {
	p := parser{s: plain(s), d: d, tab: &tables[d]}
	if len(s) > maxText {
		return Value{}, parts{}, fault(p.s, 0, len(p.s), "this is too long for a value", "e.g. "+exampleOf(d)).example()
	}
	q, err := p.split()
	if err != nil {
		return Value{}, q, err
	}
	v, err := p.evaluate(&q)
	if err != nil {
		return Value{}, q, err
	}
	v.Text = s
	return v, q, nil
}

// split takes the text apart and sees that nothing is left over.
func (p *parser) split() (q parts, err *Error) {
	if q.first, err = p.figure(p.skip(0)); err != nil {
		return q, err
	}
	i := p.skip(q.first.end)
	op, after := scanOperator(p.s, i)
	if op == noOperator {
		return q, p.leftover(i)
	}
	q.op, q.opAt = op, i
	if q.second, err = p.figure(p.skip(after)); err != nil {
		return q, err
	}
	return q, p.leftover(p.skip(q.second.end))
}

// figure reads [sign] number [unit] and, for durations, further terms.
func (p *parser) figure(i int) (f figure, err *Error) {
	f.at = i
	neg := false
	if i < len(p.s) && (p.s[i] == '-' || p.s[i] == '+') {
		neg = p.s[i] == '-'
		i = p.skip(i + 1)
	}
	n, end := scanNumber(p.s, i)
	n.neg = neg
	if err := p.wellFormed(&n, i, end); err != nil {
		return f, err
	}
	f.num = n
	f.unitAt = p.skip(end)
	f.end = p.unitEnd(f.unitAt)
	if f.end == f.unitAt {
		f.end, f.unitAt = end, end
	}
	name := p.s[f.unitAt:f.end]
	f.unitless = name == ""
	f.unit = p.tab.find(name)
	if f.unit == nil && !f.unitless {
		if name != "%" {
			return f, p.badUnit(&f, name)
		}
		f.unit = shareUnit // a doubt may be a share of the value
	}
	if p.d == Time && !f.unitless {
		err = p.sum(&f)
	}
	return f, err
}

// unitEnd returns where the unit that begins at i ends: before an operator, or
// before a blank that is followed by something that is no unit.
func (p *parser) unitEnd(i int) int {
	s := p.s
	if op, _ := scanOperator(s, i); op != noOperator {
		return i
	}
	for j := i; ; j++ {
		if j == len(s) {
			return j
		}
		c := s[j]
		switch {
		case 'a' <= c|0x20 && c|0x20 <= 'z' || c == '/':
		case isDigit(c):
			if j == i || p.d == Time && s[j-1] != ' ' { // "1h20min"
				return j
			}
		case c == ' ':
			k := p.skip(j)
			if op, _ := scanOperator(s, k); k == len(s) || op != noOperator || s[k] == '+' || s[k] == '-' || startsNumber(s[k:]) {
				return j
			}
		case j == i && !unitStart(c):
			return j
		default:
			if op, _ := scanOperator(s, j); c == '+' || op != noOperator {
				return j
			}
		}
	}
}

// unitStart reports whether a unit can begin with c, which is no letter; what
// follows is looked up as it is.
func unitStart(c byte) bool {
	return c >= 0x80 || c == '%' || c == '"' || c == '\'' || c == '('
}

// startsNumber reports whether s begins with a number, signed or not.
func startsNumber(s string) bool {
	s = strings.TrimLeft(s, "+-")
	return s != "" && (isDigit(s[0]) || s[0] == '.' && len(s) > 1 && isDigit(s[1]))
}

// skip returns the place of the first non-blank at or behind i.
func (p *parser) skip(i int) int {
	for i < len(p.s) && p.s[i] == ' ' {
		i++
	}
	return i
}
