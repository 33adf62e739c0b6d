package scenarios

import (
	"strings"

	"headfall/elements"
	"headfall/elements/quantity"
)

// usual is how values of a key are mostly written, so that a hint shows something likely.
type usual struct {
	example  string
	from, to float64  // SI; what is likely
	units    []string // the commonest first
}

var (
	elevations = usual{"5 m", -500, 5000, []string{"m"}}
	heights    = usual{"1.2 m", 0.01, 60, []string{"m", "mm", "cm", "in"}}
	openings   = usual{"40 mm", 0.002, 0.8, []string{"mm", "m", "in"}}
	bores      = usual{"82.5 mm", 0.008, 1.5, []string{"mm", "m", "in"}}
	ratings    = usual{"5 mbar", 10, 2e5, []string{"mbar", "bar", "Pa"}}
	walks      = usual{"90 s", 15, 3600, []string{"s", "min"}}
	minutes    = usual{"20 min", 60, 86400, []string{"min", "h", "s"}}
	strokes    = usual{"15 s", 1, 900, []string{"s", "min"}}
	runs       = usual{"6 h", 600, 4 * day, []string{"h", "min", "d"}}
	changes    = usual{"20 mm/min", 1e-6, 0.02, []string{"mm/min", "m/h", "m/s"}}
)

// usuals are found by "what.key", by what the value belongs to, by the key, and by the dimension.
var usuals = map[string]usual{
	"bore": bores, "roughness": {"0.05 mm", 5e-7, 0.005, []string{"mm", "m", "µm"}}, "outlet": openings,
	"orifice.diameter": openings, "orifice.width": openings, "orifice.height": openings, "nozzle.diameter": openings,
	"diameter": {"3.2 m", 0.2, 120, []string{"m", "mm", "ft"}}, "pipe.length": {"24 m", 0.05, 1e5, []string{"m", "mm", "ft"}},
	"base": elevations, "elevation": elevations, "surface": elevations, "empty_at": {"80 mm", 0.001, 2, []string{"m", "mm"}},
	"level": heights, "difference": {"8 m", 0.01, 500, []string{"m", "mm"}}, "crest": {"-6 m", -10, 100, []string{"m"}},
	"run_for": runs, "within": runs, "in_any": runs, "report_every": {"10 s", 0.5, 3600, []string{"s", "min"}},
	"stroke": strokes, "detect": strokes, "step.over": {"40 s", 5, 3600, []string{"s", "min"}}, "walk": walks, "up_to": minutes, "wait": minutes,
	"capacity": {"6 L/s", 1e-4, 2, []string{"L/s", "m3/h", "L/min"}},
	"rising":   changes, "falling": changes,
	"withstands.vacuum": ratings, "withstands.pressure": ratings, "opens_in": ratings, "opens_out": ratings,
	"tie_in.pressure": {"2.5 bar(g)", -1e5, 2e7, []string{"bar(g)", "mbar(g)"}}, "vapour_pressure": {"14 mbar(a)", 0, 2e5, []string{"mbar(a)", "bar(a)", "Pa(a)"}},
	"atmosphere": {"1013.25 mbar", 4e4, 1.1e5, []string{"mbar", "bar", "kPa", "Pa"}},
	"gravity":    {"9.80665 m/s2", 9, 10, []string{"m/s2"}},
	"to":         {"40 %", 0, 1, []string{"%"}}, "cd": {"0.62", 0, 1, nil}, "k": {"0.5", 0, 100, nil}, "friction": {"0.02", 0, 1, nil},
	"at": {"20 min", 60, 2 * day, []string{"min", "h"}}, "sticks_at": {"40 %", 0, 1, []string{"%"}}, "voids": {"42 %", 0, 1, []string{"%"}},
}

var usualOf = map[quantity.Dim]usual{
	quantity.Length: {"1.2 m", 0.01, 1000, []string{"m", "mm"}}, quantity.Head: {"11 m", 0.01, 500, []string{"m"}}, quantity.Area: {"4 m2", 1e-6, 1e4, []string{"m2", "mm2"}},
	quantity.Volume: {"6 m3", 0.001, 2e5, []string{"m3", "L"}}, quantity.Flow: {"12 m3/h", 1e-6, 3, []string{"m3/h", "L/s", "L/min"}},
	quantity.Time: minutes, quantity.Pressure: {"5 mbar(g)", -1e5, 1e7, []string{"mbar(g)", "bar(g)"}}, quantity.Temperature: {"12 °C", 200, 500, []string{"°C", "K"}},
	quantity.Viscosity: {"1.2 mPa.s", 1e-5, 100, []string{"mPa.s", "Pa.s"}}, quantity.Density: {"1000 kg/m3", 300, 2e4, []string{"kg/m3", "g/cm3"}},
	quantity.Velocity: {"3 m/s", 1e-3, 30, []string{"m/s"}}, quantity.Acceleration: {"9.80665 m/s2", 9, 10, []string{"m/s2"}}, quantity.Angle: {"90 deg", 0.01, 7, []string{"deg", "rad"}},
	quantity.ResistanceLinear: {"2 s/m2", 0, 1e12, []string{"s/m2"}}, quantity.ResistanceQuadratic: {"2 s2/m5", 0, 1e12, []string{"s2/m5"}}, quantity.SurfaceTension: {"72 mN/m", 0, 1, []string{"mN/m"}},
	quantity.Kv: {"95", 0, 1e5, nil}, quantity.Cv: {"110", 0, 1e5, nil}, quantity.Count: {"3", 0, 100, nil}, quantity.Ratio: {"40 %", 0, 1, []string{"%"}}, quantity.Number: {"0.5", 0, 100, nil},
}

// usually finds how a key of what is being read is mostly written.
func (d *decoder) usually(key string, dim quantity.Dim) usual {
	for _, name := range []string{d.what + "." + key, d.what, key} {
		if u, ok := usuals[name]; ok && u.measures(dim) {
			return u
		}
	}
	return usualOf[dim]
}

// measures reports whether a way of writing fits a dimension: "to" is a travel, and the flow of an inflow.
func (u usual) measures(dim quantity.Dim) bool {
	_, err := quantity.Parse(u.example, dim)
	return err == nil
}

// unit is the unit in which a bare number is likeliest to be meant.
func (u usual) unit(number string, dim quantity.Dim) string {
	for _, unit := range u.units {
		if v, err := quantity.Parse(number+" "+unit, dim); err == nil && v.SI >= u.from && v.SI <= u.to {
			return unit
		}
	}
	if len(u.units) > 0 {
		return u.units[0]
	}
	return ""
}

// sample shows how a field is written: "bore: 82.5 mm".
func (d *decoder) sample(f *field) string { return f.key + ": " + d.sampleOf(f.key, f.written) }

func (d *decoder) sampleOf(key string, w *writing) string {
	switch w.style {
	case aQuantity:
		return d.usually(key, w.dim).example
	case aMoment:
		return "20 min"
	case aDate:
		return `"2027-10-09 06:00"`
	case aWord:
		return w.words[0]
	case aYesNo:
		return "yes"
	case aTag:
		return sampleTag(key)
	case aKind:
		if kinds := elements.Kinds(w.room); len(kinds) > 0 {
			k := kinds[len(kinds)-1]
			return "{" + k.Name + ": " + braced(k.Sample) + "}"
		}
	case aTable:
		return tableSample(w.cols)
	case aCondition:
		return "{level: T-1, below: 1.2 m}"
	case anObject, aMap:
		return "{…}"
	case aList:
		return "[…]"
	}
	return "…"
}

func sampleTag(key string) string {
	if tag := map[string]string{"id": "s1", "tag": "V-1", "valve": "V-1", "pump": "P-1", "line": "L-1", "after": "s1"}[key]; tag != "" {
		return tag
	}
	return "T-1"
}

// tableSample shows two rows of a table.
func tableSample(cols []quantity.Dim) string {
	rows := [2][]string{}
	for _, c := range cols {
		unit, most := usualOf[c].unit("1", c), "1 "
		switch c {
		case quantity.Time:
			unit = "h"
		case quantity.Ratio:
			most = "100 "
		case quantity.Temperature, quantity.Density, quantity.Viscosity:
			rows[0] = append(rows[0], usualOf[c].example)
			continue
		}
		rows[0], rows[1] = append(rows[0], "0 "+unit), append(rows[1], most+unit)
	}
	if len(rows[1]) < len(cols) {
		return "[[" + strings.Join(rows[0], ", ") + "], …]"
	}
	return "[[" + strings.Join(rows[0], ", ") + "], [" + strings.Join(rows[1], ", ") + "]]"
}
