package quantity

// pressureUnits: pascals in one, all exact.
//
// psi is one pound-force over a square inch: pound 0.45359237 kg, standard gravity
// 9.80665 m/s². Columns of water and mercury are the conventional ones of SP 811,
// B.8: water of 1000 kg/m³, mercury of 13 595.1 kg/m³, standard gravity, whatever
// the site's gravity and the liquid's temperature are. atm: SP 811, B.8.
var pressureUnits = []def{
	{"Pa", "1"},
	{"kPa", "1000"},
	{"MPa", "1000000"},
	{"bar", "100000"},
	{"mbar", "100"},
	{"psi", "0.45359237*9.80665/0.0254/0.0254"},
	{"mH2O", "9806.65"},
	{"mmH2O", "9.80665"},
	{"mmHg", "13.5951*9.80665"},
	{"ftH2O", "0.3048*9806.65"},
	{"hPa", "100"},
	{"cmH2O", "98.0665"},
	{"inH2O", "0.0254*9806.65"},
	{"inHg", "25.4*13.5951*9.80665"},
	{"atm", "101325"},
}

// addPressures enters every unit plain, with (g) and with (a); "psig", "bara" and
// the like are read too.
func addPressures(t *unitTable) {
	for _, ref := range []Ref{None, Gauge, Absolute} {
		for _, d := range pressureUnits {
			u := t.add(d, ref.String())
			u.gauge = ref
			if ref == None {
				continue
			}
			t.alias(d.names+ref.String()[1:2], u) // psig, bara
		}
	}
}
