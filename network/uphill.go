package network

import "headfall/elements"

// uphill warns of a line without a pump whose end stands above the rim of the open vessel that it leaves: a wrong datum is half of all wrong answers.
func (c *checker) uphill(l *Line) {
	v := c.p.vessel(l.From)
	if v == nil || v.Cover != nil {
		return
	}
	for _, f := range l.Parts {
		if _, ok := f.Part.(elements.Pumps); ok {
			return
		}
	}
	if w := c.p.vessel(l.To); w != nil && l.Leaves.Form == Crest && w.Base > v.Base+l.Leaves.Height {
		c.warn(l.Place, "are both heights over one datum?", "%s cannot spill from %s to %s: its crest is at elevation %.4g m, the base of %s at %.4g m", l.Tag, l.From, w.Tag, v.Base+l.Leaves.Height, w.Tag, w.Base)
		return
	}
	end, to := 0.0, ""
	if w := c.p.vessel(l.To); w != nil && l.Enters.Form != Bottom {
		end, to = w.Base+l.Enters.centre(l.endBore(true)), w.Tag
	} else if o := c.p.beyond(l.To); o != nil && o.Element.Outside().FreeFall {
		end, to = o.Element.Outside().Elevation, o.Tag
	}
	if to == "" {
		return
	}
	if top := v.Base + v.RimLevel(); end > top {
		c.warn(l.Place, "are both heights over one datum?", "%s cannot run from %s to %s: it ends at elevation %.4g m, above the rim of %s at %.4g m", l.Tag, l.From, to, end, v.Tag, top)
	}
}

// spillsUp warns of a rim under the base of the vessel that it spills to.
func (c *checker) spillsUp(v *Vessel) {
	if w := c.p.vessel(v.SpillsTo); w != nil && w.Base > v.Base+v.RimLevel() {
		c.warn(v.Place, "are both heights over one datum?", "%s cannot spill to %s: its rim is at elevation %.4g m, the base of %s at %.4g m", v.Tag, w.Tag, v.Base+v.RimLevel(), w.Tag, w.Base)
	}
}
