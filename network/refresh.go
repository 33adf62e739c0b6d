package network

import (
	"fmt"
	"math"

	"headfall/elements"
	"headfall/elements/shape"
)

// Refresh makes every element ready for its present numbers and builds the vessels' shapes. It is called once after reading and again whenever
// a Number was changed.
func (p *Plant) Refresh() error {
	p.index()
	if p.Liquid != nil {
		if err := p.Liquid.Ready(); err != nil {
			return fmt.Errorf("liquid: %w", err)
		}
	}
	for _, l := range p.Lines {
		if err := l.refresh(p); err != nil {
			return err
		}
	}
	for _, o := range p.Outside {
		if err := o.Element.Ready(); err != nil {
			return fmt.Errorf("%s: %w", o.Tag, err)
		}
	}
	for _, v := range p.Vessels {
		if err := v.refresh(p.outletBore(v.Tag)); err != nil {
			return fmt.Errorf("%s: %w", v.Tag, err)
		}
	}
	p.listOwners()
	return nil
}

// refresh tells the parts their places and makes them ready.
func (l *Line) refresh(p *Plant) error {
	var room [16]elements.Place
	told := room[:0]
	for i, f := range l.Parts {
		told = append(told, l.place(p, i))
		if w, ok := f.Part.(elements.Placed); ok {
			w.SetPlace(told[i])
		}
		if err := f.Part.Ready(); err != nil {
			return fmt.Errorf("%s: %w", f.Name, err)
		}
	}
	// Fittings before the first bore take it from behind; a second pass lets them see what was not ready in the first.
	for i, f := range l.Parts {
		if w, ok := f.Part.(elements.Placed); ok && l.place(p, i) != told[i] {
			w.SetPlace(l.place(p, i))
			if err := f.Part.Ready(); err != nil {
				return fmt.Errorf("%s: %w", f.Name, err)
			}
		}
	}
	return nil
}

// place tells where part i stands.
func (l *Line) place(p *Plant, i int) elements.Place {
	pl := elements.Place{First: i == 0, Last: i == len(l.Parts)-1}
	for k := i - 1; k >= 0 && pl.BoreBefore == 0; k-- {
		pl.BoreBefore = boreOf(l.Parts[k].Part)
	}
	for k := i + 1; k < len(l.Parts) && pl.BoreAfter == 0; k++ {
		pl.BoreAfter = boreOf(l.Parts[k].Part)
	}
	pl.FromWall = pl.First && p.tee(l.From) == nil
	pl.ToWall = pl.Last && p.tee(l.To) == nil
	return pl
}

func boreOf(part elements.Part) float64 {
	if b, ok := part.(elements.Bored); ok {
		return b.Bore()
	}
	return 0
}

// endBore returns the bore, m, at the `from` end (or the `to` end) of the line: of the part nearest to it that has one; 0 for none.
func (l *Line) endBore(to bool) float64 {
	for i := range l.Parts {
		k := i
		if to {
			k = len(l.Parts) - 1 - i
		}
		if m, ok := l.Parts[k].Part.(elements.Mouthed); ok && i == 0 {
			return m.Mouth().Diameter
		}
		if b := boreOf(l.Parts[k].Part); b > 0 {
			return b
		}
	}
	return 0
}

// endPart returns the part at an end, or nil.
func (l *Line) endPart(to bool) elements.Part {
	if len(l.Parts) == 0 {
		return nil
	}
	if to {
		return l.Parts[len(l.Parts)-1].Part
	}
	return l.Parts[0].Part
}

// outletBore returns the bore of the first line that meets the vessel's bottom; 0 for none.
func (p *Plant) outletBore(tag string) float64 {
	for _, l := range p.meets[tag] {
		if l.From == tag && l.Leaves.Form == Bottom {
			if b := l.endBore(false); b > 0 {
				return b
			}
		}
		if l.To == tag && l.Enters.Form == Bottom {
			if b := l.endBore(true); b > 0 {
				return b
			}
		}
	}
	return 0
}

func (v *Vessel) refresh(outlet float64) (err error) {
	if err := v.Element.Ready(); err != nil {
		return err
	}
	if v.Shape, err = v.Element.Shape(outlet); err != nil {
		return err
	}
	if len(v.Inside) > 0 {
		var in []shape.Internal
		for _, i := range v.Inside {
			in = append(in, shape.Internal{From: i.From, To: i.To, Voids: i.Voids, Displaces: i.Displaces})
		}
		if v.Shape, err = shape.Inside(v.Shape, in...); err != nil {
			return err
		}
	}
	if v.Cover != nil {
		for _, w := range v.Cover.Vents {
			if err := w.Vent.Ready(); err != nil {
				return fmt.Errorf("%s: %w", w.Tag, err)
			}
		}
	}
	return nil
}

// StartLevel returns the level at the start, m above base.
func (v *Vessel) StartLevel() float64 {
	if !math.IsNaN(v.Level) {
		return v.Level
	}
	h, _ := v.Shape.Level(v.Contents)
	return h
}

// StartVolume returns the volume at the start, m³.
func (v *Vessel) StartVolume() float64 {
	if math.IsNaN(v.Level) {
		return v.Contents
	}
	q, _ := v.Shape.Volume(v.Level)
	return q
}

// RimLevel returns where the vessel overtops, m above base.
func (v *Vessel) RimLevel() float64 {
	if !math.IsNaN(v.Rim) {
		return v.Rim
	}
	return v.Shape.Height()
}

// EmptyLevel returns the level, m above base, at which the vessel counts as drained, and why; NaN when no line leaves it. The default is the
// lowest outlet's invert plus the depth that holds 1 % of the start volume, or 0.4 bore if that is less, 10 mm at least.
func (p *Plant) EmptyLevel(v *Vessel) (level float64, why string) {
	if !math.IsNaN(v.EmptyAt) {
		return v.EmptyAt, "as stated"
	}
	invert, bore := p.lowestOutlet(v.Tag)
	if math.IsInf(invert, 1) {
		return math.NaN(), ""
	}
	at, _ := v.Shape.Volume(invert)
	h, _ := v.Shape.Level(at + 0.01*v.StartVolume())
	depth, why := h-invert, "1 % of the start volume over the lowest outlet"
	if bore > 0 && 0.4*bore < depth {
		depth, why = 0.4*bore, "0.4 bore over the lowest outlet"
	}
	if depth < 0.010 {
		depth, why = 0.010, "10 mm over the lowest outlet"
	}
	return invert + depth, why
}

// lowestOutlet returns the invert, m above base, of the lowest mouth through which the vessel can empty, and its bore.
func (p *Plant) lowestOutlet(tag string) (invert, bore float64) {
	invert = math.Inf(1)
	for pass := 0; pass < 2 && math.IsInf(invert, 1); pass++ { // lines that leave it; failing that, lines that enter it
		for _, l := range p.meets[tag] {
			port, b, mine := l.Leaves, l.endBore(false), l.From == tag
			if pass == 1 {
				port, b, mine = l.Enters, l.endBore(true), l.To == tag
			}
			if !mine || port.Form == Crest {
				continue
			}
			if z := port.invert(b); z < invert {
				invert, bore = z, b
			}
		}
	}
	return invert, bore
}

// invert returns the lowest point of a mouth of bore b, m above base.
func (o Port) invert(b float64) float64 {
	if o.Form == Centre {
		return o.Height - b/2
	}
	return o.Height
}

// centre returns the middle of a mouth of bore b, m above base.
func (o Port) centre(b float64) float64 {
	if o.Form == Invert {
		return o.Height + b/2
	}
	return o.Height
}

// index makes the plant's look-ups by tag.
func (p *Plant) index() {
	p.byTag = make(map[string]any, len(p.Vessels)+len(p.Tees)+len(p.Outside)+len(p.Lines))
	p.meets = make(map[string][]*Line, len(p.Vessels)+len(p.Tees))
	for _, v := range p.Vessels {
		p.byTag[v.Tag] = v
	}
	for _, t := range p.Tees {
		p.byTag[t.Tag] = t
	}
	for _, o := range p.Outside {
		p.byTag[o.Tag] = o
	}
	for _, l := range p.Lines {
		p.byTag[l.Tag] = l
		p.meets[l.From] = append(p.meets[l.From], l)
		if l.To != l.From {
			p.meets[l.To] = append(p.meets[l.To], l)
		}
	}
}

func (p *Plant) vessel(tag string) *Vessel  { v, _ := p.byTag[tag].(*Vessel); return v }
func (p *Plant) tee(tag string) *Tee        { t, _ := p.byTag[tag].(*Tee); return t }
func (p *Plant) line(tag string) *Line      { l, _ := p.byTag[tag].(*Line); return l }
func (p *Plant) beyond(tag string) *Outside { o, _ := p.byTag[tag].(*Outside); return o }
