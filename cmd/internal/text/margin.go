package text

// margin writes the smallest margin with its band, whatever the verdict.
func (p *page) margin() {
	l := p.res.Tightest()
	if l == nil {
		return
	}
	said := keep(p.value(l, *l.Margin, true, Down)) + " in hand"
	if *l.Margin < 0 {
		said = keep(p.value(l, -*l.Margin, true, Up)) + " short"
	}
	if l.MarginLow != nil && l.MarginHigh != nil {
		if low, high := p.value(l, *l.MarginLow, true, Down), p.value(l, *l.MarginHigh, true, Down); low != high {
			said += ", band " + keep(low+" to "+high)
		}
	}
	when := ""
	if l.WorstAt != nil {
		when = stamp(p.clock.When(*l.WorstAt, Near))
	}
	p.put("Least margin", "%s%s: %s", when, p.named(l), said)
}
