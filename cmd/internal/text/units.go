package text

import (
	"math"
	"strings"

	"headfall/elements/quantity"
	"headfall/network"
)

// Units writes numbers in the plan's display units.
type Units struct{ Level, Flow, Volume, Pressure string }

// UnitsOf takes what the plan asks for, with the usual ones for the rest.
func UnitsOf(s network.Show) Units {
	or := func(a, b string) string {
		if a == "" {
			return b
		}
		return a
	}
	return Units{Level: or(s.Level, "m"), Flow: or(s.Flow, "m3/h"), Volume: or(s.Volume, "m3"), Pressure: or(s.Pressure, "mbar")}
}

const reading = 0.010 // m: a level is not read finer than this

// LevelOf writes a level or a height to what can be read off a gauge.
func (u Units) LevelOf(m float64, dir Dir) string {
	if unknowable(m) {
		return "-"
	}
	return u.number(m, dir) + " " + u.Level
}

func (u Units) number(m float64, dir Dir) string {
	one, err := quantity.Convert(1, quantity.Length, u.Level)
	if err != nil {
		one = 1
	}
	step := math.Pow(10, math.Floor(math.Log10(reading*one)+hair))
	return inSteps(m*one, step, dir)
}

// FlowOf writes a volume flow.
func (u Units) FlowOf(m3s float64, dir Dir) string { return inUnit(m3s, quantity.Flow, u.Flow, dir) }

// VolumeOf writes a volume.
func (u Units) VolumeOf(m3 float64, dir Dir) string {
	return inUnit(m3, quantity.Volume, u.Volume, dir)
}

// PressureOf writes a pressure over the atmosphere.
func (u Units) PressureOf(pa float64, dir Dir) string { return u.PressureBy(pa, dir) + "(g)" }

// PressureBy writes a difference of pressures.
func (u Units) PressureBy(pa float64, dir Dir) string {
	bare := strings.TrimSuffix(strings.TrimSuffix(u.Pressure, "(g)"), "(a)")
	return inUnit(pa, quantity.Pressure, bare, dir)
}

// inUnit writes three figures, not finer than a thousandth of the unit.
func inUnit(si float64, dim quantity.Dim, unit string, dir Dir) string {
	if unknowable(si) {
		return "-"
	}
	x, err := quantity.Convert(si, dim, unit)
	if err != nil {
		x, unit = si, quantity.SIUnit(dim)
	}
	return figures(x, 3, 0.001, dir) + " " + unit
}
