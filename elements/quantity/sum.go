package quantity

// sum reads the further terms of a duration behind its first: "1 h 20 min 5 s".
// Each unit must be smaller than the one before it, so that a slip is seen.
func (p *parser) sum(f *figure) *Error {
	last := f.unit
	for {
		i := p.skip(f.end)
		if i == len(p.s) || !isDigit(p.s[i]) {
			return nil
		}
		n, end := scanNumber(p.s, i)
		if err := p.wellFormed(&n, i, end); err != nil {
			return err
		}
		at := p.skip(end)
		stop := p.unitEnd(at)
		name := p.s[at:stop]
		if name == "" {
			return p.needsUnit(i, end, n.plain())
		}
		u := p.tab.find(name)
		if u == nil {
			return p.badUnit(&figure{num: n, at: i, unitAt: at, end: stop}, name)
		}
		if u.float >= last.float {
			return fault(p.s, i, stop, "a sum of times goes from large to small units", "e.g. 1 h 20 min")
		}
		f.more = append(f.more, term{n, u})
		f.end, last = stop, u
	}
}

// seconds adds up the terms; the sign of the first holds for all.
func (f *figure) seconds() (float64, bool) {
	total, ok := toSI(&f.num, f.unit, false)
	for i := range f.more {
		n := f.more[i].num
		n.neg = f.num.neg
		s, fits := toSI(&n, f.more[i].unit, false)
		total += s
		ok = ok && fits
	}
	return total, ok
}
