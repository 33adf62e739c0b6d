package quantity

import "math"

// evaluate turns the parts of a text into SI numbers.
func (p *parser) evaluate(q *parts) (v Value, err *Error) {
	switch q.op {
	case plusMinus:
		return p.plusMinus(q)
	case upTo:
		return p.upTo(q)
	case timesOver:
		return p.timesOver(q)
	}
	return p.single(&q.first)
}

// single gives the value of one figure, without doubt.
func (p *parser) single(f *figure) (v Value, err *Error) {
	if f.unit == nil {
		return v, p.needsUnit(f.at, f.end, f.num.plain())
	}
	if f.unit == shareUnit {
		return v, p.badUnit(f, "%")
	}
	v = Value{Dim: p.d, Unit: f.unit.name, Gauge: f.unit.gauge, Kinematic: f.unit.kinematic}
	if v.SI, err = p.si(f, false); err != nil {
		return v, err
	}
	if p.d == Count && v.SI != math.Trunc(v.SI) {
		return v, fault(p.s, f.at, f.end, "a whole number is needed", "e.g. "+exampleOf(Count))
	}
	return v, nil
}

// si converts one figure; a difference leaves the zero of a scale out.
func (p *parser) si(f *figure, difference bool) (float64, *Error) {
	var si float64
	var ok bool
	if f.more != nil {
		si, ok = f.seconds()
	} else {
		si, ok = toSI(&f.num, f.unit, difference)
	}
	if !ok || math.IsInf(si, 0) {
		return 0, fault(p.s, f.at, f.end, quote(p.s[f.at:f.end])+" is beyond what can be reckoned with", "e.g. "+exampleOf(p.d)).example()
	}
	return si, nil
}

// plusMinus reads "4.20 m ± 5 cm", "0.62 ± 0.04", "95 ± 5 %", "35 % ± 5".
func (p *parser) plusMinus(q *parts) (v Value, err *Error) {
	a, b := &q.first, &q.second
	if b.num.neg {
		return v, fault(p.s, b.at, b.end, "a doubt has no minus", "leave the minus out")
	}
	percent := b.unit == shareUnit || b.unit != nil && b.unit.name == "%" && a.unit != nil && a.unit.name == ""
	if a.unit == nil && !percent {
		a.unit = b.unit // "4.2 ± 0.1 m": the unit counts for both
	}
	if v, err = p.single(a); err != nil {
		return v, err
	}
	if p.d == Count {
		return v, fault(p.s, q.opAt, b.end, "a count carries no doubt", "e.g. "+exampleOf(Count))
	}
	if percent {
		v.Doubt.Half, err = p.share(a, b, v.SI)
	} else {
		if b.unitless {
			b.unit = a.unit
		}
		if err = p.agree(a, b); err == nil {
			v.Doubt.Half, err = p.si(b, true)
		}
	}
	if err == nil && v.Doubt.Half > 0 {
		v.Doubt.Kind = Normal95
	}
	return v, err
}

// share is a doubt in per cent of the value.
func (p *parser) share(a, b *figure, value float64) (float64, *Error) {
	if a.unit.offset != nil {
		return 0, fault(p.s, b.at, b.end, "per cent of a temperature is not clear", "write the doubt in "+a.unit.name)
	}
	part, ok := toSI(&b.num, shareUnit, false)
	half := math.Abs(value) * part
	if !ok || math.IsInf(half, 0) {
		return 0, fault(p.s, b.at, b.end, quote(p.s[b.at:b.end])+" is beyond what can be reckoned with", "e.g. ± 5 %")
	}
	return half, nil
}

// upTo reads "0.58 to 0.66": a unit written once counts for both ends.
func (p *parser) upTo(q *parts) (v Value, err *Error) {
	a, b := &q.first, &q.second
	if a.unitless && !b.unitless {
		a.unit = b.unit
	} else if b.unitless {
		b.unit = a.unit
	}
	if v, err = p.single(a); err != nil {
		return v, err
	}
	high, err := p.single(b)
	if err != nil {
		return v, err
	}
	if p.d == Count {
		return v, fault(p.s, a.at, b.end, "a count carries no doubt", "e.g. "+exampleOf(Count))
	}
	if err := p.agree(a, b); err != nil {
		return v, err
	}
	low := v.SI
	if low > high.SI {
		return v, fault(p.s, a.at, b.end, "the lower end comes first", "write "+b.write()+" to "+a.write())
	}
	if low < high.SI {
		v.Doubt = Doubt{Kind: Uniform, Low: low, High: high.SI}
		v.SI = middle(low, high.SI)
	}
	return v, nil
}

// middle is (a+b)/2 without overflow.
func middle(a, b float64) float64 {
	if m := (a + b) / 2; !math.IsInf(m, 0) {
		return m
	}
	return a/2 + b/2
}

// timesOver reads "0.05 mm ×÷ 2": the value times or divided by a factor.
func (p *parser) timesOver(q *parts) (v Value, err *Error) {
	b := &q.second
	if v, err = p.single(&q.first); err != nil {
		return v, err
	}
	if p.d == Count || q.first.unit.offset != nil {
		return v, fault(p.s, q.opAt, b.end, words[p.d].noun+" carries no factor of doubt", "a doubt is written with ±")
	}
	if !b.unitless {
		return v, fault(p.s, b.unitAt, b.end, "a factor of doubt is a bare number", "write ×÷ "+b.num.plain())
	}
	f, ok := toSI(&b.num, tables[Number].si, false)
	if !ok || f < 1 {
		return v, fault(p.s, b.at, b.end, "a factor of doubt is 1 or more", "e.g. ×÷ 2")
	}
	if f > 1 {
		v.Doubt = Doubt{Kind: Factor, Factor: f}
	}
	return v, nil
}

// agree sees that the units of value and doubt measure the same.
func (p *parser) agree(a, b *figure) *Error {
	if a.unit.kinematic != b.unit.kinematic {
		return fault(p.s, b.unitAt, b.end, "dynamic and kinematic viscosity do not mix", "write it in "+a.unit.name)
	}
	if a.unit.gauge == b.unit.gauge {
		return nil
	}
	if b.unit.gauge == None && scanIsDoubt(p.s, a, b) {
		return nil // "2 bar(g) ± 0.1 bar": a difference needs no reference
	}
	return fault(p.s, a.at, b.end, "both must be gauge or both absolute", "write (g) or (a) behind both")
}

// scanIsDoubt reports whether b is a ± behind a, rather than the other end of a range.
func scanIsDoubt(s string, a, b *figure) bool {
	for i := a.end; i < b.at; i++ {
		if op, _ := scanOperator(s, i); op != noOperator {
			return op == plusMinus
		}
	}
	return false
}
