package quantity

import (
	"math"
	"strings"
)

// Echo returns a text in plain typography that reads back to the same value and
// doubt: the author's own figures where there are any, else the shortest ones.
func (v Value) Echo() string {
	if v.Text != "" {
		if w, q, err := parse(v.Text, v.Dim); err == nil && same(v, w) {
			return q.write()
		}
	}
	u := v.unit()
	value := shortest(v.SI, v.Dim, u, false)
	switch v.Doubt.Kind {
	case Normal95:
		return value + plusMinus.spelling() + shortest(v.Doubt.Half, v.Dim, u, true)
	case Uniform:
		return shortest(v.Doubt.Low, v.Dim, u, false) + upTo.spelling() + shortest(v.Doubt.High, v.Dim, u, false)
	case Factor:
		return value + timesOver.spelling() + exactText(v.Doubt.Factor, Number, tables[Number].si, false)
	}
	return value
}

// unit finds the unit a value is to be written in: its own, or the SI unit, with the
// reference of a pressure where it is known.
func (v Value) unit() *unit {
	t := &tables[v.Dim]
	u := t.find(v.Unit)
	switch {
	case u == nil && v.Kinematic, u != nil && v.Kinematic && !u.kinematic:
		return t.find("m2/s")
	case u == nil, u.kinematic && !v.Kinematic:
		u = t.si
	}
	if v.Gauge != u.gauge {
		if with := t.find(strings.TrimSuffix(u.name, u.gauge.String()) + v.Gauge.String()); with != nil {
			return with
		}
	}
	return u
}

// shortest is exactText, but for durations a sum where that reads better.
func shortest(si float64, d Dim, u *unit, difference bool) string {
	text := exactText(si, d, u, difference)
	if d == Time {
		if sum := FormatDuration(si); len(sum) < len(text) {
			if w, err := Parse(sum, Time); err == nil && w.SI == si {
				return sum
			}
		}
	}
	return text
}

// String is Echo.
func (v Value) String() string { return v.Echo() }

// same compares what counts, bit for bit.
func same(a, b Value) bool {
	return math.Float64bits(a.SI) == math.Float64bits(b.SI) && a.Doubt == b.Doubt &&
		a.Gauge == b.Gauge && a.Kinematic == b.Kinematic && a.Unit == b.Unit
}

// write puts the parts together again with canonical units.
func (q *parts) write() string {
	if q.op == noOperator {
		return q.first.write()
	}
	return q.first.write() + q.op.spelling() + q.second.write()
}

func (f *figure) write() string {
	s := withUnit(f.num.plain(), f.unit)
	for i := range f.more {
		s += " " + withUnit(f.more[i].num.plain(), f.more[i].unit)
	}
	return s
}

func withUnit(number string, u *unit) string {
	if u == nil || u.name == "" {
		return number
	}
	return number + " " + u.name
}
