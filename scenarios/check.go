package scenarios

import (
	"fmt"
	"math"
	"strings"

	"headfall/elements"
	"headfall/elements/shape"
	"headfall/network"
)

// circles finds steps that wait for each other.
func (d *decoder) circles() {
	byID := make(map[string]*network.Step, len(d.plant.Steps))
	for _, s := range d.plant.Steps {
		byID[s.ID] = s
	}
	clear := map[string]bool{} // steps known not to lead into a circle
	for _, s := range d.plant.Steps {
		seen := map[string]bool{}
		path := []string{}
		at := s
		for at != nil && at.After != "" && !clear[at.ID] && !seen[at.ID] {
			seen[at.ID] = true
			path = append(path, at.ID)
			at = byID[at.After]
		}
		if at != nil && at == s && seen[at.ID] {
			n := d.things[s.ID].at
			d.problem(n, fmt.Sprintf("after goes round in a circle: %s", strings.Join(append(path, s.ID), " waits for ")), "give one of them another trigger")
		}
		for _, id := range path {
			clear[id] = true
		}
	}
}

// whole checks what shows only when elements and shapes are ready.
func (d *decoder) whole(root *node) {
	d.lineParts()
	var err error
	if len(d.probs) == 0 {
		if err = d.plant.Refresh(); err == nil {
			for _, v := range d.plant.Vessels {
				d.startOf(d.things[v.Tag].body, v, v.Shape)
			}
			d.plantWide()
			return
		}
	}
	for _, v := range d.plant.Vessels { // one by one, so that each one's faults are told
		n := d.things[v.Tag].body
		s, fault := v.Element.Shape(0)
		if fault != nil {
			for _, one := range split(fault) {
				d.badShape(n, one.Error())
			}
			continue
		}
		d.startOf(n, v, s)
	}
	if len(d.probs) == 0 {
		d.refreshFault(root, err)
	}
}

// plantWide takes over what the plant itself finds wrong with the whole.
func (d *decoder) plantWide() {
	if len(d.probs) > 0 {
		return
	}
	faults, warnings := d.plant.Validate()
	for _, f := range faults {
		line := d.src.line(f.At.Line)
		d.probs = append(d.probs, Problem{File: d.src.name, At: f.At, Says: f.Says, Hint: f.Hint, Source: line, Width: wordAt(line, f.At.Column)})
	}
	d.plant.Warnings = append(d.plant.Warnings, warnings...)
}

// lineParts makes the parts of every line ready in their places, so that each one's faults are told where it stands.
func (d *decoder) lineParts() {
	for _, l := range d.lines {
		parts := d.parts[l]
		bored := hasBore(l)
		for pass := range 2 { // parts without a bore take their neighbour's, which may stand behind them
			for i, f := range l.Parts {
				p, placed := f.Part.(elements.Placed)
				if placed && !bored && len(parts) < d.wrote[l] {
					continue // the part that has the bore has a fault of its own
				}
				if placed {
					p.SetPlace(d.placeOf(l, i))
				}
				err := f.Part.Ready()
				if err == nil || pass == 0 {
					continue
				}
				for _, says := range strings.Split(err.Error(), "; ") {
					body := parts[i]
					if body.form == mapping && len(body.items) == 1 {
						body = body.items[0]
					}
					d.unready(chosen{kind: f.Kind.Name, is: f.Kind, body: body}, parts[i], says)
				}
			}
		}
	}
}

func hasBore(l *network.Line) bool {
	for _, f := range l.Parts {
		if b, ok := f.Part.(elements.Bored); ok && b.Bore() > 0 {
			return true
		}
	}
	return false
}

// placeOf tells where a part stands.
func (d *decoder) placeOf(l *network.Line, i int) elements.Place {
	bore := func(k int) float64 {
		if b, ok := l.Parts[k].Part.(elements.Bored); ok {
			return b.Bore()
		}
		return 0
	}
	at := elements.Place{First: i == 0, Last: i == len(l.Parts)-1}
	for k := i - 1; k >= 0 && at.BoreBefore == 0; k-- {
		at.BoreBefore = bore(k)
	}
	for k := i + 1; k < len(l.Parts) && at.BoreAfter == 0; k++ {
		at.BoreAfter = bore(k)
	}
	from, to := d.things[l.From], d.things[l.To]
	at.FromWall = at.First && from != nil && from.class != aTee
	at.ToWall = at.Last && to != nil && to.class != aTee
	return at
}

// refreshFault notes a fault that a plant found when it was made ready; it begins with the name of what has it.
func (d *decoder) refreshFault(root *node, err error) {
	n := root
	if name, rest, ok := strings.Cut(err.Error(), ":"); ok {
		tag, _, _ := strings.Cut(name, ".")
		if t := d.things[tag]; t != nil && t.vessel != nil && t.class == aVessel {
			d.badShape(t.body, strings.TrimSpace(rest))
			return
		} else if t != nil {
			n = t.at
		}
	}
	d.problem(n, err.Error(), "look at what belongs to it")
}

// badShape notes what is wrong with the shape of a vessel as a whole.
func (d *decoder) badShape(n *node, says string) {
	shape := first(n.get("shape"), n)
	if strings.HasPrefix(says, "inside: ") {
		d.problem(first(n.get("inside"), shape), says, "media and internals leave some of the space at every level: voids: 42 %, or a smaller displaces")
		return
	}
	body := shape
	if len(shape.items) == 1 {
		body = shape.items[0]
	}
	c := chosen{body: body, kind: "shape"}
	if len(shape.keys) == 1 {
		c.kind, c.is = shape.keys[0].text, elements.Lookup(elements.Shapes, shape.keys[0].text)
	}
	d.unready(c, shape, says)
}

// startOf checks what is in a vessel at the start against its shape.
func (d *decoder) startOf(n *node, v *network.Vessel, s shape.Shape) {
	top := s.Height()
	place := func(key string) *node { return first(d.sets[v.Tag+"."+key], first(n.get(key), n)) }
	if !math.IsNaN(v.Rim) {
		if v.Rim > top*(1+1e-9) {
			d.problem(place("rim"), fmt.Sprintf("the rim is above the top of the shape, %s", metres(top)), "heights in a vessel are above its base")
			return
		}
		top = v.Rim
	}
	if v.Level > top*(1+1e-9) {
		d.problem(place("level"), fmt.Sprintf("the start level, %s, is above the rim, %s", metres(v.Level), metres(top)), "levels are above the vessel's base")
	}
	if most, _ := s.Volume(top); v.Contents > most*(1+1e-9) {
		d.problem(place("contents"), fmt.Sprintf("the start contents are more than the vessel holds to its rim, %s", fmt.Sprintf("%.4g m3", most)), "write what is in it, or a level")
	}
	if v.EmptyAt > top {
		d.problem(place("empty_at"), fmt.Sprintf("empty_at is above the rim, %s", metres(top)), "e.g. empty_at: 80 mm")
	}
	if v.SpillsTo == v.Tag {
		d.problem(place("spills_to"), v.Tag+" cannot spill into itself", "name another vessel or an outside point, or leave spills_to out: then it goes to the floor")
	}
}

func metres(x float64) string { return fmt.Sprintf("%.4g m", x) }
