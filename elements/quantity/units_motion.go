package quantity

// timeUnits: seconds in one; exact (SI Brochure, table 8).
var timeUnits = []def{
	{"s", "1"},
	{"min", "60"},
	{"h", "3600"},
	{"d", "86400"},
	{"ms", "0.001"},
}

// accelerationUnits: m/s² in one; exact. The cm/s² is the gal of gravity surveys.
var accelerationUnits = []def{
	{"m/s2", "1"},
	{"cm/s2", "0.01"},
	{"ft/s2", "0.3048"},
}

// flowFirst and velocityFirst are the units in daily use, shown first in help.
var (
	flowFirst     = []string{"m3/h", "L/s", "L/min", "m3/s", "m3/d", "hL/h", "gpm(US)", "gpm(UK)", "ft3/s", "cm3/s"}
	velocityFirst = []string{"m/s", "ft/s", "mm/min", "m/d", "m/h", "mm/s", "cm/s"}
)

// gallonsPerMinute are the two flows with a name of their own: m³/s in one, exact.
var gallonsPerMinute = map[string]def{
	"gpm(US)": {"gpm(US) usgpm USgpm", "231*0.0254*0.0254*0.0254/60"},
	"gpm(UK)": {"gpm(UK) igpm", "0.00454609/60"},
}

// addComposites enters flows (any volume over any time) and velocities (any
// length over any time).
func addComposites(t *[numDims]unitTable) {
	perTime(&t[Flow], volumeUnits, flowFirst)
	perTime(&t[Velocity], lengthUnits, velocityFirst)
}

func perTime(t *unitTable, tops []def, first []string) {
	all := map[string]def{}
	var order []string
	for _, top := range tops {
		for _, under := range timeUnits {
			d := def{overEach(top.names, under.names), top.factor + "/" + under.factor}
			name := canonical(d)
			all[name] = d
			if under.names != "ms" {
				order = append(order, name)
			}
		}
	}
	for _, name := range append(append([]string(nil), first...), order...) {
		if d, ok := all[name]; ok {
			t.add(d, "")
		} else {
			t.add(gallonsPerMinute[name], "")
		}
	}
	for i, u := range t.list {
		if u.float == 1 {
			t.si = t.list[i]
		}
	}
}
