package network

import (
	"fmt"
	"strings"

	"headfall/elements"
)

// Touch makes the plant ready for the numbers that were changed, where Refresh would make all of it ready: only parts, vessels, vents and outside
// points that own one of them are done again. The plant is then as Refresh would leave it.
func (p *Plant) Touch(changed []*Number) error {
	done := map[any]bool{}
	for _, n := range changed {
		o := p.ownerOf(n.Name)
		if o == nil {
			return p.Refresh()
		}
		if done[o] {
			continue
		}
		again, err := p.touch(o, n)
		if err != nil {
			return fmt.Errorf("%s: %w", n.Name, err)
		}
		done[o] = again
	}
	return nil
}

// touch readies the owner of a number; it says whether other numbers of that owner are served by it too.
func (p *Plant) touch(owner any, n *Number) (whole bool, err error) {
	switch o := owner.(type) {
	case *fitting:
		return true, p.touchPart(o)
	case *Vessel:
		if !strings.HasPrefix(n.Name, o.Tag+".shape.") && !strings.HasPrefix(n.Name, o.Tag+".inside") {
			return false, nil // levels, heights and pressures are read at the start of a run
		}
		return true, o.refresh(p.outletBore(o.Tag))
	case *VesselVent:
		return true, o.Vent.Ready()
	case *Outside:
		return true, o.Element.Ready()
	case elements.Liquid:
		return true, o.Ready()
	case *Line, *Step, *Batch, plain:
		return false, nil
	}
	return true, p.Refresh()
}

// touchPart readies one part; where the bores that others go by changed with it, its whole line and the vessels that it empties.
func (p *Plant) touchPart(f *fitting) error {
	if err := f.Part.Ready(); err != nil {
		return err
	}
	now := f.bores()
	if now == f.told {
		return nil
	}
	f.told = now
	if err := f.line.refresh(p); err != nil {
		return err
	}
	for _, tag := range []string{f.line.From, f.line.To} {
		if v := p.vessel(tag); v != nil {
			if err := v.refresh(p.outletBore(tag)); err != nil {
				return err
			}
		}
	}
	return nil
}

// fitting is a part with the line that it is in, and the bores that others were told of.
type fitting struct {
	*Fitted
	line *Line
	told [3]float64
}

// bores returns the part's own bore and those of its line's ends, m.
func (f *fitting) bores() [3]float64 {
	return [3]float64{boreOf(f.Part), f.line.endBore(false), f.line.endBore(true)}
}

// plain owns numbers that nothing is worked out from before a run.
type plain struct{}

// ownerOf returns what the number of this name belongs to, or nil when only Refresh knows.
func (p *Plant) ownerOf(name string) any {
	for i := len(name); i > 0; i = strings.LastIndexByte(name[:i], '.') {
		if o, ok := p.owners[name[:i]]; ok {
			return o
		}
	}
	return nil
}

// listOwners notes what owns numbers; Refresh calls it when everything is ready.
func (p *Plant) listOwners() {
	p.owners = map[string]any{"site": plain{}, "liquid": p.Liquid}
	for _, l := range p.Lines {
		p.owners[l.Tag] = l
		for _, f := range l.Parts {
			own := &fitting{Fitted: f, line: l}
			own.told = own.bores()
			p.owners[f.Name] = own
		}
	}
	for _, o := range p.Outside {
		p.owners[o.Tag] = o
	}
	for _, s := range p.Steps {
		p.owners[s.ID] = s
	}
	for _, v := range p.Vessels {
		p.owners[v.Tag] = v
		for _, b := range v.Batches {
			p.owners[b.ID] = b
		}
		if v.Cover != nil {
			for _, w := range v.Cover.Vents {
				p.owners[w.Tag] = w
			}
		}
	}
}
