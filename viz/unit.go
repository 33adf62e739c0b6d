package viz

import (
	"math"
	"strings"

	"headfall/elements/quantity"
	"headfall/network"
)

// unit is a display unit: numbers stay SI until they are printed.
type unit struct {
	Name string  // as printed: m³/h
	K    float64 // display units in one SI unit
	Dec  int     // decimals of a number read off an instrument; -1: three significant digits

	Least float64 // in display units: what is less is written 0; of volumes in a balance
}

// units are those that a plant shows.
type units struct{ Level, Flow, Volume, Pressure, Rate, Speed, Share unit }

func newUnits(s network.Show) units {
	u := units{
		Level:    pick(quantity.Length, s.Level, "m"),
		Flow:     pick(quantity.Flow, s.Flow, "m3/h"),
		Volume:   pick(quantity.Volume, s.Volume, "m3"),
		Pressure: pick(quantity.Pressure, s.Pressure, "mbar"),
		Rate:     pick(quantity.Velocity, "mm/min", "mm/min"),
		Speed:    pick(quantity.Velocity, "m/s", "m/s"),
		Share:    unit{Name: "%", K: 100},
	}
	u.Rate.Dec, u.Speed.Dec = 1, 2
	return u
}

// decimals is to how many places a level is read in a unit: about 10 mm in metres, 1 mm in millimetres.
var decimals = map[string]int{"m": 2, "mm": 0, "cm": 1, "ft": 2, "in": 1, "km": 5}

// dust is what rounding leaves of nothing, in any unit that a plant is shown in.
const dust = 1e-9

func pick(dim quantity.Dim, name, fallback string) unit {
	if name == "" {
		name = fallback
	}
	one, err := quantity.Convert(1, dim, name)
	if err != nil {
		name = fallback
		one, _ = quantity.Convert(1, dim, name)
	}
	nought, _ := quantity.Convert(0, dim, name)
	u := unit{Name: pretty(name), K: one - nought, Dec: -1}
	if dim == quantity.Length {
		u.Dec = decimals[name]
	}
	return u
}

var raised = strings.NewReplacer("m2", "m²", "m3", "m³", "ft2", "ft²", "ft3", "ft³", "in2", "in²", "in3", "in³", "(g)", "")

// pretty writes the unit as print does.
func pretty(name string) string { return raised.Replace(name) }

// Text writes an SI number in the unit, without its name.
func (u unit) Text(si float64) string {
	if u.Dec < 0 {
		if math.Abs(si*u.K) < max(dust, u.Least) {
			return "0"
		}
		return digits(si*u.K, 3)
	}
	return places(si*u.K, u.Dec)
}

// With writes an SI number in the unit, with its name.
func (u unit) With(si float64) string {
	t := u.Text(si)
	if t == none {
		return t
	}
	return t + "\u00a0" + u.Name
}

// Toward writes a number rounded to one side: peaks up, headroom and margins down, so that no fail is rounded into a pass.
func (u unit) Toward(si float64, to side) string {
	x := si * u.K
	if !finite(x) {
		return none
	}
	if x == 0 || u.Dec < 0 && math.Abs(x) < dust {
		return "0\u00a0" + u.Name
	}
	dec := u.Dec
	if dec < 0 {
		dec = 2 - int(math.Floor(math.Log10(math.Abs(x))+1e-9))
	}
	step, n := math.Pow10(-dec), 0.0
	switch to {
	case earlier:
		n = math.Floor(x/step + 1e-9)
	case later:
		n = math.Ceil(x/step - 1e-9)
	default:
		n = math.Round(x / step)
	}
	return strings.TrimRight(places(n*step, max(dec, 0))+"\u00a0"+u.Name, "\u00a0")
}

// Opt writes a headroom that may be missing, rounded down.
func (u unit) Opt(si *float64) string {
	if si == nil {
		return none
	}
	return u.Toward(*si, earlier)
}

// bySI finds the display unit of a number by its SI unit and what it measures.
func (u units) bySI(si, subject string) (unit, bool) {
	switch si {
	case "m":
		return u.Level, true
	case "m3/s", "m³/s":
		return u.Flow, true
	case "m3", "m³":
		return u.Volume, true
	case "Pa":
		return u.Pressure, true
	case "m/s":
		if subject == "velocity" {
			return u.Speed, true
		}
		return u.Rate, true
	case "1", "":
		if subject == "opening" {
			return u.Share, true
		}
		return unit{K: 1}, true
	}
	return unit{Name: si, K: 1, Dec: -1}, false
}

func finite(x float64) bool { return !math.IsNaN(x) && !math.IsInf(x, 0) }
