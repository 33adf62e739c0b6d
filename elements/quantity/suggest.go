package quantity

import "strings"

// commonly maps names in use that are not read, because they are said in more
// than one way or mean more than one thing, to what is.
var commonly = map[string]string{
	"gpm": "gpm(US) or gpm(UK)", "gal": "gal(US) or gal(UK)", "gallon": "gal(US) or gal(UK)", "gallons": "gal(US) or gal(UK)",
	"metre": "m", "metres": "m", "meter": "m", "meters": "m", "inch": "in", "inches": "in", `"`: "in", "″": "in",
	"foot": "ft", "feet": "ft", "'": "ft", "′": "ft", "sqm": "m2", "cbm": "m3", "cum": "m3",
	"litre": "L", "litres": "L", "liter": "L", "liters": "L", "ltr": "L", "cc": "cm3", "barrel": "bbl", "barrels": "bbl",
	"lpm": "L/min", "lps": "L/s", "m3h": "m3/h", "m3/hr": "m3/h", "cmh": "m3/h", "cfm": "ft3/min", "cfs": "ft3/s",
	"sec": "s", "secs": "s", "second": "s", "seconds": "s", "m": "min", "mins": "min", "minute": "min", "minutes": "min",
	"hr": "h", "hrs": "h", "hour": "h", "hours": "h", "day": "d", "days": "d",
	"mWC": "mH2O", "mWS": "mH2O", "mwc": "mH2O", "mmWC": "mmH2O", "mmWS": "mmH2O", "torr": "mmHg", "Torr": "mmHg",
	"mPas": "mPa.s", "Pas": "Pa.s", "centipoise": "cP", "cps": "cP", "centistokes": "cSt",
	"degrees": "deg", "degree": "deg", "Celsius": "°C", "celsius": "°C", "Fahrenheit": "°F",
	"percent": "%", "pct": "%", "‰": "%", "fps": "ft/s", "kph": "km/h",
}

// foreign maps units of what no plant file states to what they measure.
var foreign = map[string]string{
	"kg": "a mass", "g": "a mass", "mg": "a mass", "t": "a mass", "lb": "a mass", "lbs": "a mass", "ton": "a mass", "tonnes": "a mass",
	"kg/h": "a mass flow", "kg/s": "a mass flow", "kg/min": "a mass flow", "t/h": "a mass flow", "lb/h": "a mass flow",
	"N": "a force", "kN": "a force", "lbf": "a force", "W": "a power", "kW": "a power", "hp": "a power", "J": "an energy", "kJ": "an energy", "kWh": "an energy",
	"V": "a voltage", "A": "a current", "Hz": "a frequency", "rpm": "a speed of rotation", "1/min": "a speed of rotation",
}

// meant returns the unit of d that a common name stands for.
func meant(name string, d Dim) string {
	to, ok := commonly[name]
	if !ok {
		to, ok = commonly[strings.ToLower(name)]
	}
	first, _, _ := strings.Cut(to, " or ")
	if !ok || tables[d].byName[first] == nil {
		return ""
	}
	return to
}

// nearest returns the unit of d spelled most like name, the first of equals;
// with caseOnly set only one that differs in nothing but capitals. Names that have
// nothing in common get "".
func nearest(name string, d Dim, caseOnly bool) string {
	best, least := "", 1+2*max(1, min(2, len(name)/2))
	if caseOnly {
		least = len(name) + 1
	}
	if len(name) > 24 {
		return "" // longer than any unit
	}
	for _, u := range tables[d].list {
		if u.name == "" {
			continue
		}
		if n := distance(name, u.name); n < least && (!caseOnly || strings.EqualFold(name, u.name)) {
			best, least = u.name, n
		}
	}
	return best
}

// distance counts the changes from a to b: a letter more, less or other counts
// two, only its case one.
func distance(a, b string) int {
	x, y := []rune(a), []rune(b)
	row := make([]int, len(y)+1)
	for j := range row {
		row[j] = 2 * j
	}
	for i := range x {
		diagonal := row[0]
		row[0] += 2
		for j := range y {
			cost := 2
			if x[i] == y[j] {
				cost = 0
			} else if strings.EqualFold(string(x[i]), string(y[j])) {
				cost = 1
			}
			cost = min(diagonal+cost, row[j]+2, row[j+1]+2)
			diagonal, row[j+1] = row[j+1], cost
		}
	}
	return row[len(y)]
}
