package viz

import (
	"reflect"
	"sort"
	"strconv"
	"strings"

	"headfall/elements"
	"headfall/elements/quantity"
	"headfall/network"
)

// numberRow is one number of the plant as it was understood.
type numberRow struct {
	Name, Value, Doubt, From string
	Default                  bool
}

// kindRow is one kind of thing in the plant with its law.
type kindRow struct{ Name, Room, Doc, Law, Valid, Source string }

// inputsView is what the program understood.
type inputsView struct {
	Site     [][2]string
	Vessels  [][]string
	Lines    [][]string
	Numbers  []numberRow
	Defaults []string
	Warnings []string
	Assumed  []network.Assumption
	Upsets   []string
	Kinds    []kindRow
}

func inputs(plant *network.Plant, r *network.Result, u units, c clock) inputsView {
	v := inputsView{Defaults: plant.Defaults, Assumed: r.Assumptions, Kinds: kinds(plant)}
	site := func(k, t string) { v.Site = append(v.Site, [2]string{k, t}) }
	if plant.Liquid != nil {
		f := plant.Liquid.Fluid()
		text := f.Name + ", " + digits(f.Density, 5) + " kg/m³, " + digits(f.Dynamic*1000, 4) + " mPa·s"
		if finite(f.Celsius) {
			text += ", " + digits(f.Celsius, 4) + " °C"
		}
		site("Liquid", text)
		if !f.Checked {
			site("Vapour pressure", "not stated: not checked")
		} else {
			site("Vapour pressure", digits(f.Vapour/100, 4)+" mbar(a)")
		}
	}
	site("Gravity", digits(plant.Gravity, 6)+" m/s²")
	site("Atmosphere", digits(plant.Atmosphere/100, 6)+" mbar(a)")
	if c.Known() {
		site("Start", plant.Start.Format("Mon 2 Jan 2006 15:04"))
	}
	site("Run for", c.Span(plant.RunFor, later))
	if plant.Case != "" {
		site("Case", plant.Case)
	}
	site("Doubts", orNone(plant.Assume.Doubts))
	if plant.Assume.CheckLeak > 0 {
		site("Check valves leak", places(100*plant.Assume.CheckLeak, 2)+" % of Kv")
	}
	for _, x := range plant.Vessels {
		v.Vessels = append(v.Vessels, vesselInputs(x, u))
	}
	for _, l := range plant.Lines {
		v.Lines = append(v.Lines, lineInputs(l, r, u))
	}
	for _, n := range plant.Numbers {
		v.Numbers = append(v.Numbers, numberInputs(n))
	}
	for _, p := range plant.Warnings {
		v.Warnings = append(v.Warnings, strings.TrimSpace(p.Says+" "+p.Hint))
	}
	for _, x := range plant.Upsets {
		v.Upsets = append(v.Upsets, upsetWords(x, c))
	}
	return v
}

func vesselInputs(x *network.Vessel, u units) []string {
	height, volume := none, none
	if x.Shape != nil {
		height = u.Level.With(x.Shape.Height())
		full, _ := x.Shape.Volume(x.Shape.Height())
		volume = u.Volume.With(full)
	}
	start := u.Level.With(x.Level)
	if !finite(x.Level) {
		start = u.Volume.With(x.Contents)
	}
	gas := "open"
	if x.Cover != nil {
		gas = "covered, sealed"
		var vents []string
		for _, vent := range x.Cover.Vents {
			s := vent.Tag + " " + plainKind(vent.Kind)
			if vent.Blocked > 0 {
				s += " " + places(100*vent.Blocked, 0) + " % blocked"
			}
			vents = append(vents, s)
		}
		if len(vents) > 0 {
			gas = "covered, vents " + strings.Join(vents, ", ")
		}
	}
	spills := "floor"
	if x.SpillsTo != "" {
		spills = x.SpillsTo
	}
	return []string{x.Tag, plainKind(x.Kind), elevationText(x.Base), height, volume, start, u.Level.With(rimOf(x)), gas, spills}
}

// elevationText writes an elevation to 10 mm, finer where it is given finer.
func elevationText(z float64) string {
	s := strconv.FormatFloat(round6(z), 'f', -1, 64)
	if _, decimals, _ := strings.Cut(s, "."); len(decimals) < 2 {
		s = strconv.FormatFloat(z, 'f', 2, 64)
	}
	return minus(s) + "\u00a0m"
}

func lineInputs(l *network.Line, r *network.Result, u units) []string {
	var parts []string
	for _, f := range l.Parts {
		name := f.Name
		if f.Kind != nil {
			name = plainKind(f.Kind.Name)
			if t, ok := f.Part.(elements.Tagged); ok && t.Tag() != "" {
				name += " " + t.Tag()
			}
		}
		parts = append(parts, name)
	}
	holds := none
	if q := r.Lines[l.Tag]; q != nil {
		holds = u.Volume.With(q.Holds)
	}
	return []string{l.Tag, l.From + portWords(l.Leaves, u), l.To + portWords(l.Enters, u), strings.Join(parts, ", "), holds}
}

func portWords(p network.Port, u units) string {
	name := map[network.PortForm]string{network.Centre: "centre", network.Invert: "invert", network.Dip: "dip", network.Crest: "crest"}[p.Form]
	if name == "" {
		return ""
	}
	return ", " + name + " " + u.Level.With(p.Height)
}

func numberInputs(n *network.Number) numberRow {
	row := numberRow{Name: n.Name, Value: n.Value.Text, Default: n.Default, From: "file"}
	if n.Default {
		row.From = "default"
	}
	if row.Value == "" && n.At != nil && finite(*n.At) {
		row.Value = quantity.Format(*n.At, n.Dim, n.Value.Unit, 6)
	}
	if d := n.Value.Doubt; d.Stated() {
		low, high := d.Bounds(n.Value.SI)
		row.Doubt = quantity.Format(low, n.Dim, n.Value.Unit, 4) + " to " + quantity.Format(high, n.Dim, n.Value.Unit, 4)
		if n.Assumed {
			row.Doubt += ", assumed"
		}
	}
	return row
}

func upsetWords(x *network.Upset, c clock) string {
	switch x.Kind {
	case network.PumpFails:
		return "Pump " + x.Target + " fails at " + c.At(x.At.S, earlier)
	case network.ValveSticks:
		return "Valve " + x.Target + " stands at " + position(x.Value) + " whatever is ordered"
	case network.ValveStops:
		return "Valve " + x.Target + " stops when a move passes " + position(x.Value)
	case network.VentBlocked:
		return "Vent " + x.Target + " is blocked by " + places(100*x.Value, 0) + " %"
	}
	return "Line " + x.Target + " gets an extra loss coefficient of " + digits(x.Value, 3) + " after " + digits(x.After, 3) + " m³ have passed"
}

// kinds lists the kinds that occur in the plant, by room and name.
func kinds(plant *network.Plant) []kindRow {
	seen := map[*elements.Kind]bool{}
	add := func(k *elements.Kind) {
		if k != nil {
			seen[k] = true
		}
	}
	for _, v := range plant.Vessels {
		add(elements.Lookup(elements.Shapes, v.Kind))
		if v.Cover != nil {
			for _, vent := range v.Cover.Vents {
				add(elements.Lookup(elements.Vents, vent.Kind))
			}
		}
	}
	for _, o := range plant.Outside {
		add(elements.Lookup(elements.Beyond, o.Kind))
	}
	for _, l := range plant.Lines {
		for _, f := range l.Parts {
			add(f.Kind)
		}
	}
	for _, k := range elements.Kinds(elements.Liquids) {
		if plant.Liquid != nil && reflect.TypeOf(k.New()) == reflect.TypeOf(plant.Liquid) {
			add(k)
		}
	}
	var out []kindRow
	for k := range seen {
		out = append(out, kindRow{plainKind(k.Name), string(k.Room), k.Doc, k.Law, k.Valid, k.Source})
	}
	sort.Slice(out, func(a, b int) bool {
		return out[a].Room < out[b].Room || out[a].Room == out[b].Room && out[a].Name < out[b].Name
	})
	return out
}

// outsideModel is what no run of this program tells anything about.
var outsideModel = []string{
	"surge (water hammer)", "part-full channel flow", "foam and settling solids", "boiling and flashing", "two-phase siphons",
	"strength of vessels, walls and pipes, uplift", "vacuum by cooling, steam or absorption", "mixing and chemistry",
	"electrical and confined-space matters",
}

// work lists method and counters; never the wall time, so that the same input gives the same page.
func work(r *network.Result) [][2]string {
	w := r.Work
	n := strconv.Itoa
	return [][2]string{{"Method", w.Method}, {"Steps", n(w.Steps)}, {"Rejected", n(w.Rejected)}, {"Factorisations", n(w.Factorisations)},
		{"Evaluations", n(w.Evaluations)}, {"Events", n(w.Events)}}
}
