package network

import "headfall/elements"

// above is how far, m, a level may stand over a rim while liquid runs over it; no plant spills deeper.
const above = 0.5

// still refuses a step that waits for what cannot change, and for a level that no vessel of this plant comes to.
func (c *checker) still(s *Step) {
	w := s.When
	if w == nil {
		return
	}
	for _, tag := range w.Of {
		if w.Subject == Difference && (c.p.changes(s, w.Subject, w.Of[0]) || c.p.changes(s, w.Subject, w.Of[1])) {
			continue
		}
		if !c.p.changes(s, w.Subject, tag) {
			c.fault(w.Place, c.p.stillHint(w.Subject), "step %s waits for what cannot change: %s of %s", s.ID, w.Subject, tag)
			return
		}
	}
	if v := c.p.vessel(w.Of[0]); v != nil && w.Subject == Level {
		switch top := v.RimLevel(); {
		case w.Above && w.Bound > top+above:
			c.fault(w.Place, "levels are above the vessel's base", "step %s waits for a level that %s never comes to: %s, its rim is at %.4g m", s.ID, v.Tag, w.Text, top)
		case !w.Above && w.Bound <= 0:
			c.fault(w.Place, "levels are above the vessel's base", "step %s waits for a level under the base of %s", s.ID, v.Tag)
		}
	}
}

// idle warns of a limit on a level that no run can break: most often a slip of the unit.
func (c *checker) idle(l *Limit) {
	if l.Must.Subject != Level || l.Permitted {
		return
	}
	v := c.p.vessel(l.Must.Of[0])
	switch {
	case v == nil:
	case !l.Must.Above && l.Must.Bound > v.RimLevel()+above:
		c.warn(l.Place, "", "the limit on the level of %s cannot fail: %s is above its rim at %.4g m", v.Tag, l.Must.Text, v.RimLevel())
	case l.Must.Above && l.Must.Bound < 0:
		c.warn(l.Place, "", "the limit on the level of %s cannot fail: it is never under the base", v.Tag)
	}
}

func (p *Plant) stillHint(is Subject) string {
	switch is {
	case Opening:
		return "no other step moves it and no alarm is answered with it"
	case Starts:
		return "the pump has no start level and no other step switches it"
	}
	return "no line meets it and nothing comes in"
}

// changes reports whether the plan holds anything, but the step that waits, by which a subject of a thing could change.
func (p *Plant) changes(waits *Step, is Subject, tag string) bool {
	if is == Opening || is == Starts {
		return p.acted(waits, tag) || p.drives(tag)
	}
	if v := p.vessel(tag); v != nil && is != Pressure {
		return p.filled(v)
	}
	if p.line(tag) == nil {
		return len(p.meets[tag]) > 0
	}
	return true
}

// filled reports whether anything comes into a vessel or leaves it.
func (p *Plant) filled(v *Vessel) bool {
	if len(p.meets[v.Tag]) > 0 || len(v.Inflow) > 0 || len(v.Batches) > 0 {
		return true
	}
	for _, s := range p.Steps {
		if s.Action == SetInflow && s.Target == v.Tag && s.Hold == "" {
			return true
		}
	}
	for _, o := range p.Vessels {
		if o.SpillsTo == v.Tag {
			return true
		}
	}
	return false
}

// acted reports whether a step, an alarm's answer or an upset moves a valve or switches a pump.
func (p *Plant) acted(waits *Step, tag string) bool {
	for _, s := range p.Steps {
		if s != waits && s.Target == tag {
			return true
		}
	}
	for _, v := range p.Vessels {
		for _, a := range v.Alarms {
			if a.Response != nil && (a.Response.Valve == tag || a.Response.Pump == tag) {
				return true
			}
		}
	}
	for _, u := range p.Upsets {
		if u.Target == tag {
			return true
		}
	}
	return false
}

// drives reports whether a pump switches by itself.
func (p *Plant) drives(tag string) bool {
	for _, l := range p.Lines {
		for _, f := range l.Parts {
			if d, ok := f.Part.(elements.Pumps); ok && d.Drive().Tag == tag {
				return d.Drive().Mode == elements.Auto || d.Drive().Mode == elements.Standby
			}
		}
	}
	return false
}

// met refuses a tee that no line meets, and warns of one that liquid cannot pass.
func (c *checker) met(t *Tee) {
	switch n := len(c.p.meets[t.Tag]); n {
	case 0:
		c.fault(t.Place, "take it out, or write it as from or to of a line", "no line meets at %s", t.Tag)
	case 1:
		c.warn(t.Place, "", "only one line meets at %s: nothing can pass it", t.Tag)
	}
}
