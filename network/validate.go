package network

import (
	"fmt"
	"math"

	"headfall/elements"
)

// Validate checks the plant as a whole and returns every problem: faults, which stop a run, and warnings. The plant must have been refreshed.
func (p *Plant) Validate() (faults, warnings []Problem) {
	c := &checker{p: p}
	for _, v := range p.Vessels {
		c.vessel(v)
	}
	for _, l := range p.Lines {
		c.line(l)
	}
	for _, t := range p.Tees {
		c.met(t)
	}
	c.conditions()
	return c.faults, c.warnings
}

type checker struct {
	p                *Plant
	faults, warnings []Problem
}

func (c *checker) fault(at Place, hint, format string, a ...any) {
	c.faults = append(c.faults, Problem{At: at, Says: fmt.Sprintf(format, a...), Hint: hint})
}

func (c *checker) warn(at Place, hint, format string, a ...any) {
	c.warnings = append(c.warnings, Problem{At: at, Says: fmt.Sprintf(format, a...), Hint: hint})
}

func (c *checker) vessel(v *Vessel) {
	h, top := v.StartLevel(), v.Shape.Height()
	if h > v.RimLevel()+1e-9 {
		c.fault(v.Place, "lower the level, or state the rim", "%s starts %.4g m high, above its rim at %.4g m", v.Tag, h, v.RimLevel())
	}
	if h < 0 {
		c.fault(v.Place, "a level is measured up from the base", "%s starts under its base", v.Tag)
	}
	if v.RimLevel() > top+1e-9 {
		c.fault(v.Place, "the rim is at the top of the shape or below it", "the rim of %s, %.4g m, is above the top of its shape, %.4g m", v.Tag, v.RimLevel(), top)
	}
	if s := c.p.Sill(v); s > v.RimLevel() {
		c.warn(v.Place, "", "the overflow of %s, at %.4g m, is above its rim at %.4g m: it overtops first", v.Tag, s, v.RimLevel())
	}
	c.spillsUp(v)
	if v.Cover != nil && v.StartLevel() > top-1e-9 && len(v.Cover.Vents) == 0 {
		c.fault(v.Place, "leave some gas, or give it a vent", "%s starts full and sealed", v.Tag)
	}
	if v.Cover != nil && v.SpillsTo != "" && len(v.Cover.Vents) == 0 {
		c.warn(v.Place, "", "%s is sealed: it cannot spill", v.Tag)
	}
	if g := v.Gauge; g != nil && g.Zero+g.Span < v.RimLevel()-0.02*v.RimLevel() {
		c.warn(v.Place, "read it as metres near the top", "the gauge of %s ends at %.4g m, below the rim at %.4g m: 100 %% on the panel is not full, and above it the level is not seen", v.Tag, g.Zero+g.Span, v.RimLevel())
	}
}

func (c *checker) line(l *Line) {
	if len(l.Parts) == 0 {
		c.fault(l.Place, "give it a pipe, an orifice, or a resistance", "%s has no parts: nothing limits its flow", l.Tag)
		return
	}
	c.resists(l)
	c.uphill(l)
	for _, to := range []bool{false, true} {
		tag, port := l.From, l.Leaves
		if to {
			tag, port = l.To, l.Enters
		}
		v := c.p.vessel(tag)
		if v == nil {
			if port.Given && c.p.tee(tag) != nil {
				c.fault(l.Place, "take it out", "%s meets the tee %s, which has no heights", l.Tag, tag)
			}
			continue
		}
		b := l.endBore(to)
		if z := port.invert(b); z < -1e-9 {
			c.fault(l.Place, fmt.Sprintf("the lowest for this bore is {centre: %.4g m}", b/2), "the mouth of %s in %s reaches %.4g m under the base", l.Tag, tag, -z)
		}
		if port.Height > v.Shape.Height()+1e-9 && !to {
			c.fault(l.Place, "heights in a vessel are above its base", "%s leaves %s at %.4g m, above the top of its shape at %.4g m", l.Tag, tag, port.Height, v.Shape.Height())
		}
	}
	for i, f := range l.Parts {
		if _, ok := f.Part.(elements.Crest); ok {
			if i > 0 {
				c.fault(f.Place, "write it first, or put a vessel between", "the weir in %s must be the first part of its line", l.Tag)
			}
			if l.Leaves.Form != Crest || c.p.vessel(l.From) == nil {
				c.fault(l.Place, "write leaves: {crest: height}", "the weir in %s needs the height of its crest in the vessel that it leaves", l.Tag)
			}
		}
		if d, ok := f.Part.(elements.Pumps); ok {
			c.pump(l, f, d.Drive())
		}
	}
}

// resists finds lines without any loss at all.
func (c *checker) resists(l *Line) {
	for _, f := range l.Parts {
		if _, hump := f.Part.(elements.Humps); !hump {
			return
		}
	}
	c.fault(l.Place, "give it a pipe, an orifice, or a resistance", "%s has nothing that resists flow", l.Tag)
}

func (c *checker) pump(l *Line, f *Fitted, d *elements.Drive) {
	if d.Curved && !d.Stated {
		check := false
		for _, g := range l.Parts {
			_, one := g.Part.(elements.OneWay)
			check = check || one
		}
		if !check {
			c.fault(f.Place, "write when_stopped: shut or when_stopped: passes", "%s has a curve and no check valve in its line: it must be said what it does when stopped", d.Tag)
		}
	}
}

// conditions checks that what is looked at is there.
func (c *checker) conditions() {
	see := func(w *Condition, what string) {
		if w == nil {
			return
		}
		for _, tag := range w.Of {
			c.subject(w, tag, what)
		}
	}
	for _, s := range c.p.Steps {
		see(s.When, "step "+s.ID)
		see(s.StopIf, "step "+s.ID)
		c.still(s)
	}
	for _, m := range c.p.Milestones {
		see(&m.When, "milestone "+m.Name)
	}
	for _, l := range c.p.Limits {
		see(&l.Must, "limit")
		c.idle(l)
		see(l.Since.When, "limit")
		see(l.Until.When, "limit")
	}
}

func (c *checker) subject(w *Condition, tag, what string) {
	switch w.Subject {
	case Pressure:
		if v := c.p.vessel(tag); v != nil && v.Cover == nil {
			c.fault(w.Place, "give it a cover, or take the condition out", "%s: %s is open, its pressure is that of the air", what, tag)
		}
	case CrestHead:
		l := c.p.line(tag)
		if l == nil {
			return
		}
		for _, f := range l.Parts {
			if _, ok := f.Part.(elements.Humps); ok {
				return
			}
		}
		c.fault(w.Place, "give it a high_point", "%s: %s has no high point", what, tag)
	case Emptied:
		if v := c.p.vessel(tag); v != nil {
			if e, _ := c.p.EmptyLevel(v); math.IsNaN(e) {
				c.fault(w.Place, "state empty_at", "%s: no line leaves %s, so it is not known when it is empty", what, tag)
			}
		}
	case Velocity:
		if l := c.p.line(tag); l != nil && l.endBore(false) == 0 {
			c.fault(w.Place, "limit its flow instead", "%s: %s has no bore, so it has no velocity", what, tag)
		}
	}
}
