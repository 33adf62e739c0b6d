package viz

import (
	"fmt"
	"math"

	"headfall/elements"
)

// item is something to be drawn on a line: a part's symbol, its arrow or its tag.
type item struct {
	kind string // part, arrow, tag
	rank int    // the least is left out first
	part int
	sym  string
	tag  string
}

// drawWay draws a line on its way.
func (k *canvas) drawWay(d *drawing, n int, rt *route) {
	line := k.plant.Lines[rt.line]
	id := fmt.Sprintf("l%d", n)
	d.open("g", "class", "line", "id", id)
	d.title(k.lineWords(rt.line))
	path := "M" + dots(rt.points)
	d.el("path", "d", path, "class", "halo")
	d.el("path", "d", path, "class", "pipe")
	d.el("path", "d", path, "class", "flow", "id", id+"-flow")
	for _, p := range rt.crests {
		d.el("path", "d", fmt.Sprintf("M%s %s l-5 -9 h10 z", px(p[0]), px(p[1])), "class", "crest")
	}
	if line.Leaves.Form == 3 && len(rt.points) > 0 {
		d.el("circle", "cx", rt.points[0][0], "cy", rt.points[0][1], "r", 3, "class", "mouth")
	}
	d.end("g")
}

// drawParts draws the symbols of a line's parts, its tag and its arrow; all lines are there by then, so that none covers them.
func (k *canvas) drawParts(d *drawing, n int, rt *route, l *live) {
	line := k.plant.Lines[rt.line]
	id := fmt.Sprintf("l%d", n)
	peak := 0.0
	if q := k.result.Lines[line.Tag]; q != nil {
		peak = math.Max(math.Abs(q.PeakFlow), math.Abs(q.LowFlow))
	}
	live := liveLine{ID: id, Tag: line.Tag, Key: "flow/" + line.Tag, Peak: peak}
	items := k.items(rt.line)
	slots := k.slots(rt)
	items, slots = fit(items, slots)
	for _, arrows := range []bool{true, false} { // the words of a part stand over an arrow that is near
		for i, it := range items {
			if (it.kind == "arrow") == arrows {
				k.drawItem(d, id, it, slots[i], l, &live)
			}
		}
	}
	l.Lines = append(l.Lines, live)
}

// plainPipe is the symbol of a part that looks like the line itself.
const plainPipe = "M0 12H24"

// items lists what a line carries, in its order.
func (k *canvas) items(line int) []item {
	l := k.plant.Lines[line]
	all := []item{{kind: "tag", rank: 6, tag: l.Tag}}
	for i, f := range l.Parts {
		if f.Kind == nil || f.Kind.Symbol == "" || f.Kind.Symbol == plainPipe {
			continue
		}
		it := item{kind: "part", rank: fittingRank(f.Part), part: i, sym: f.Kind.Symbol}
		if a, ok := f.Part.(elements.Actuated); ok && a.Actuator() != nil {
			it.rank, it.tag = 8, a.Actuator().Tag
		} else if p, ok := f.Part.(elements.Pumps); ok && p.Drive() != nil {
			it.rank, it.tag = 8, p.Drive().Tag
		} else if t, ok := f.Part.(elements.Tagged); ok && t.Tag() != "" {
			it.rank = 5
		}
		if _, ok := f.Part.(elements.Humps); ok {
			continue // drawn where it stands
		}
		all = append(all, it)
	}
	return append(all, item{kind: "arrow", rank: 7})
}

// fittingRank is 1 for a loss that has neither a bore of its own nor anything to be moved.
func fittingRank(p elements.Part) int {
	if _, ok := p.(elements.OwnEnd); ok {
		return 3
	}
	return 1
}

// fit leaves out what has no room and shares the places out; places where other lines pass are taken last.
func fit(items []item, all []slot) ([]item, []slot) {
	slots := apart(all, len(items))
	if len(slots) < len(items)+4 { // what is only a fitting is drawn where there is room to spare
		kept := items[:0:0]
		for _, it := range items {
			if it.rank > 1 {
				kept = append(kept, it)
			}
		}
		items = kept
	}
	for len(items) > len(slots) {
		least := 0
		for i, it := range items {
			if it.rank < items[least].rank {
				least = i
			}
		}
		items = append(items[:least:least], items[least+1:]...)
	}
	out := make([]slot, len(items))
	for i := range items {
		out[i] = slots[(2*i+1)*len(slots)/(2*len(items))]
	}
	return items, out
}

// apart picks places that do not touch: all that are free, and as many of the busy ones as are needed, in the order of the line.
func apart(all []slot, want int) []slot {
	taken := make([]bool, len(all))
	n := 0
	for _, busy := range []bool{false, true} {
		for i, s := range all {
			if s.busy != busy || busy && n >= want {
				continue
			}
			ok := true
			for j, o := range all {
				ok = ok && !(taken[j] && o.leg == s.leg && math.Hypot(o.x-s.x, o.y-s.y) < slotPitch-0.01)
			}
			if ok {
				taken[i] = true
				n++
			}
		}
	}
	var out []slot
	for i, s := range all {
		if taken[i] {
			out = append(out, s)
		}
	}
	return out
}

func (k *canvas) drawItem(d *drawing, id string, it item, at slot, l *live, line *liveLine) {
	upright := math.Abs(math.Mod(at.dir+360, 180)-90) < 45 // the line stands
	switch it.kind {
	case "tag":
		if upright {
			d.text(at.x+5, at.y+3, "linetag", short(it.tag, 12))
		} else {
			d.text(at.x, at.y-5, "linetag mid", short(it.tag, 12))
		}
	case "arrow":
		d.open("g", "transform", fmt.Sprintf("translate(%s %s) rotate(%s)", px(at.x), px(at.y), px(at.dir)))
		d.el("path", "d", "M-6 -5.5 L7 0 L-6 5.5 Z", "class", "arrow", "id", id+"-arrow")
		d.end("g")
	default:
		f := k.plant.Lines[line0(k, line.Tag)].Parts[it.part]
		pid := fmt.Sprintf("%s-p%d", id, it.part)
		d.open("g", "class", "part", "id", pid)
		d.title(f.Name + ": " + plainKind(f.Kind.Name) + ". " + f.Kind.Doc)
		d.open("g", "transform", fmt.Sprintf("translate(%s %s) rotate(%s) scale(0.84) translate(-12 -12)", px(at.x), px(at.y), px(at.dir)))
		d.el("rect", "x", 0, "y", 2, "width", 24, "height", 20, "class", "under")
		d.el("path", "d", it.sym, "class", "symbol")
		d.end("g")
		if it.tag != "" {
			x, y, class := at.x, at.y-12, "parttag mid"
			if upright {
				x, y, class = at.x+11, at.y-1, "parttag"
			}
			d.text(x, y, class, short(it.tag, 12))
			if upright {
				d.text(x, y+10, "partread", "", "id", pid+"-text")
			} else {
				d.text(at.x, at.y+19, "partread mid", "", "id", pid+"-text")
			}
			k.moves(pid, f.Part, l)
		}
		d.end("g")
	}
}

func line0(k *canvas, tag string) int {
	for i, l := range k.plant.Lines {
		if l.Tag == tag {
			return i
		}
	}
	return 0
}

// moves tells playback which series moves a symbol.
func (k *canvas) moves(pid string, p elements.Part, l *live) {
	if a, ok := p.(elements.Actuated); ok && a.Actuator() != nil {
		l.Parts = append(l.Parts, livePart{ID: pid, Tag: a.Actuator().Tag, Key: "opening/" + a.Actuator().Tag, First: a.Actuator().Open})
	} else if q, ok := p.(elements.Pumps); ok && q.Drive() != nil {
		l.Parts = append(l.Parts, livePart{ID: pid, Tag: q.Drive().Tag, Key: "running/" + q.Drive().Tag, Pump: true})
	}
}

func (k *canvas) lineWords(line int) string {
	l := k.plant.Lines[line]
	words := l.Tag + ": from " + l.From + " to " + l.To
	if q := k.result.Lines[l.Tag]; q != nil {
		words += "; peak " + k.u.Flow.With(q.PeakFlow) + " at " + k.c.At(q.PeakFlowAt, near) + ", passed " + k.u.Volume.With(q.Forward)
		if q.Backward > 0 {
			words += ", ran back " + k.u.Volume.With(q.Backward)
		}
	}
	return words
}
