package quantity

import "math/big"

// dynamicUnits: Pa·s in one; exact. The poise is 0.1 Pa·s (SP 811, B.8).
var dynamicUnits = []def{
	{"Pa.s", "1"},
	{"mPa.s", "0.001"},
	{"cP", "0.001"},
	{"P", "0.1"},
	{"µPa.s uPa.s", "0.000001"},
}

// kinematicUnits: m²/s in one; exact. The stokes is 1 cm²/s (SP 811, B.8).
var kinematicUnits = []def{
	{"m2/s", "1"},
	{"mm2/s", "0.000001"},
	{"cSt", "0.000001"},
	{"St", "0.0001"},
	{"cm2/s", "0.0001"},
}

// densityUnits: kg/m³ in one; exact. The pound is 0.45359237 kg (SP 811, B.8).
var densityUnits = []def{
	{"kg/m3", "1"},
	{"g/cm3", "1000"},
	{"lb/ft3", "0.45359237/0.3048/0.3048/0.3048"},
	{"kg/L kg/l", "1000"},
	{"g/L g/l", "1"},
	{"g/mL g/ml", "1000"},
	{"t/m3", "1000"},
}

// tensionUnits: N/m in one; exact. The dyne is 10⁻⁵ N (SP 811, B.8).
var tensionUnits = []def{
	{"N/m", "1"},
	{"mN/m", "0.001"},
	{"dyn/cm", "0.00001/0.01"},
}

// linearUnits and quadraticUnits: s/m² and s²/m⁵ in one; exact.
var (
	linearUnits    = []def{{"s/m2", "1"}, {"min/m2", "60"}, {"h/m2", "3600"}}
	quadraticUnits = []def{{"s2/m5", "1"}, {"min2/m5", "60*60"}, {"h2/m5", "3600*3600"}}
)

// addTemperatures enters the scales: K = °C + 273.15 = (°F + 459.67) × 5/9, exact
// (SP 811, B.8).
func addTemperatures(t *unitTable) {
	scale := func(names, factor string, centi int64) {
		u := t.add(def{names, factor}, "")
		if centi != 0 {
			u.centi = centi
			u.offset = big.NewRat(centi, 100)
			u.shift = float64(centi) / 100
		}
	}
	scale("°C C ℃ degC", "1", 27315)
	scale("°F F ℉ degF", "5/9", 45967)
	scale("K", "1", 0)
	t.si = t.byName["K"]
}
