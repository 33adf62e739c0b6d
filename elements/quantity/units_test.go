package quantity

import (
	"math"
	"testing"
)

// published holds conversion factors as printed, with how many significant digits
// were printed (0: the factor is exact).
//
// Sources: "SP" is NIST SP 811 (2008), appendix B.8; "SI" is the SI Brochure, 9th
// edition, table 8; "def" follows from the units' names alone.
var published = []struct {
	d      Dim
	unit   string
	factor float64
	digits int
	source string
}{
	{Length, "mm", 1e-3, 0, "def"}, {Length, "cm", 1e-2, 0, "def"}, {Length, "km", 1e3, 0, "def"}, {Length, "m", 1, 0, "def"},
	{Length, "µm", 1e-6, 0, "def"}, {Length, "in", 2.54e-2, 0, "SP"}, {Length, "ft", 3.048e-1, 0, "SP"},
	{Head, "m", 1, 0, "def"}, {Head, "ft", 3.048e-1, 0, "SP"},
	{Area, "m2", 1, 0, "def"}, {Area, "cm2", 1e-4, 0, "def"}, {Area, "mm2", 1e-6, 0, "def"},
	{Area, "in2", 6.4516e-4, 0, "SP"}, {Area, "ft2", 9.290304e-2, 0, "SP"},
	{Volume, "m3", 1, 0, "def"}, {Volume, "L", 1e-3, 0, "SI"}, {Volume, "mL", 1e-6, 0, "SI"}, {Volume, "hL", 1e-1, 0, "SI"},
	{Volume, "cm3", 1e-6, 0, "def"}, {Volume, "mm3", 1e-9, 0, "def"}, {Volume, "dm3", 1e-3, 0, "def"},
	{Volume, "in3", 1.638706e-5, 7, "SP"}, {Volume, "ft3", 2.831685e-2, 7, "SP"},
	{Volume, "gal(US)", 3.785412e-3, 7, "SP"}, {Volume, "gal(UK)", 4.54609e-3, 0, "SP"}, {Volume, "bbl", 1.589873e-1, 7, "SP"},
	{Flow, "m3/s", 1, 0, "def"}, {Flow, "m3/h", 1. / 3600, 0, "SI"}, {Flow, "m3/d", 1. / 86400, 0, "SI"}, {Flow, "m3/min", 1. / 60, 0, "SI"},
	{Flow, "L/s", 1e-3, 0, "SI"}, {Flow, "L/min", 1. / 60000, 0, "SI"}, {Flow, "hL/h", 1. / 36000, 0, "SI"}, {Flow, "cm3/s", 1e-6, 0, "def"},
	{Flow, "ft3/s", 2.831685e-2, 7, "SP"}, {Flow, "ft3/min", 4.719474e-4, 7, "SP"},
	{Flow, "gpm(US)", 6.309020e-5, 7, "SP"}, {Flow, "gal(US)/d", 4.381264e-8, 7, "SP"}, {Flow, "gpm(UK)", 7.576817e-5, 7, "worked from the exact gallon"},
	{Time, "s", 1, 0, "SI"}, {Time, "min", 60, 0, "SI"}, {Time, "h", 3600, 0, "SI"}, {Time, "d", 86400, 0, "SI"}, {Time, "ms", 1e-3, 0, "def"},
	{Pressure, "Pa", 1, 0, "def"}, {Pressure, "kPa", 1e3, 0, "def"}, {Pressure, "MPa", 1e6, 0, "def"}, {Pressure, "hPa", 1e2, 0, "def"},
	{Pressure, "bar", 1e5, 0, "SP"}, {Pressure, "mbar", 1e2, 0, "SP"}, {Pressure, "psi", 6.894757e3, 7, "SP"}, {Pressure, "atm", 1.01325e5, 0, "SP"},
	{Pressure, "mH2O", 9.80665e3, 0, "SP, from cmH2O"}, {Pressure, "cmH2O", 9.80665e1, 0, "SP"}, {Pressure, "mmH2O", 9.80665, 0, "SP"},
	{Pressure, "ftH2O", 2.989067e3, 7, "SP"}, {Pressure, "inH2O", 2.490889e2, 7, "SP"},
	{Pressure, "mmHg", 1.333224e2, 7, "SP"}, {Pressure, "inHg", 3.386389e3, 7, "SP"},
	{Viscosity, "Pa.s", 1, 0, "def"}, {Viscosity, "mPa.s", 1e-3, 0, "def"}, {Viscosity, "cP", 1e-3, 0, "SP"}, {Viscosity, "P", 1e-1, 0, "SP"}, {Viscosity, "µPa.s", 1e-6, 0, "def"},
	{Viscosity, "m2/s", 1, 0, "def"}, {Viscosity, "mm2/s", 1e-6, 0, "def"}, {Viscosity, "cm2/s", 1e-4, 0, "def"}, {Viscosity, "cSt", 1e-6, 0, "SP"}, {Viscosity, "St", 1e-4, 0, "SP"},
	{Density, "kg/m3", 1, 0, "def"}, {Density, "g/cm3", 1e3, 0, "SP"}, {Density, "g/mL", 1e3, 0, "SI"}, {Density, "kg/L", 1e3, 0, "SI"}, {Density, "g/L", 1, 0, "SI"}, {Density, "t/m3", 1e3, 0, "SI"},
	{Density, "lb/ft3", 1.601846e1, 7, "SP"},
	{Velocity, "m/s", 1, 0, "def"}, {Velocity, "ft/s", 3.048e-1, 0, "SP"}, {Velocity, "ft/min", 5.08e-3, 0, "SP"}, {Velocity, "km/h", 2.777778e-1, 7, "SP"},
	{Velocity, "mm/min", 1e-3 / 60, 0, "SI"}, {Velocity, "m/d", 1. / 86400, 0, "SI"}, {Velocity, "m/h", 1. / 3600, 0, "SI"}, {Velocity, "mm/s", 1e-3, 0, "def"}, {Velocity, "in/s", 2.54e-2, 0, "SP"},
	{Acceleration, "m/s2", 1, 0, "def"}, {Acceleration, "cm/s2", 1e-2, 0, "SP"}, {Acceleration, "ft/s2", 3.048e-1, 0, "SP"},
	{Angle, "rad", 1, 0, "def"}, {Angle, "deg", math.Pi / 180, 0, "SI"},
	{ResistanceLinear, "s/m2", 1, 0, "def"}, {ResistanceLinear, "min/m2", 60, 0, "SI"}, {ResistanceLinear, "h/m2", 3600, 0, "SI"},
	{ResistanceQuadratic, "s2/m5", 1, 0, "def"}, {ResistanceQuadratic, "min2/m5", 3600, 0, "SI"}, {ResistanceQuadratic, "h2/m5", 1.296e7, 0, "SI"},
	{SurfaceTension, "N/m", 1, 0, "def"}, {SurfaceTension, "mN/m", 1e-3, 0, "def"}, {SurfaceTension, "dyn/cm", 1e-3, 0, "SP"},
	{Ratio, "%", 1e-2, 0, "def"},
}

func TestPublishedFactors(t *testing.T) {
	for _, c := range published {
		v, err := Parse("1 "+c.unit, c.d)
		if err != nil {
			t.Errorf("1 %s: %v", c.unit, err)
			continue
		}
		off := math.Abs(v.SI/c.factor - 1)
		allowed := 3e-16 // one rounding of the factor in this file
		if c.digits > 0 {
			lead := c.factor / math.Pow(10, math.Floor(math.Log10(c.factor)))
			allowed = 0.5001 * math.Pow(10, float64(1-c.digits)) / lead
		}
		if off > allowed {
			t.Errorf("1 %s is %.10g, published %.10g (%s)", c.unit, v.SI, c.factor, c.source)
		}
		if back, err := Convert(v.SI, c.d, c.unit); err != nil || math.Abs(back-1) > 4e-16 {
			t.Errorf("%s back: %v %v", c.unit, back, err)
		}
	}
}

// Temperatures of defining and well-known points (from memory).
func TestTemperatureScales(t *testing.T) {
	for _, c := range []struct {
		text   string
		kelvin float64
	}{
		{"0 °C", 273.15}, {"32 °F", 273.15}, {"100 C", 373.15}, {"212 F", 373.15}, {"-40 °C", 233.15}, {"-40 °F", 233.15},
		{"273.15 K", 273.15}, {"-273.15 °C", 0}, {"-459.67 °F", 0}, {"12 ℃", 285.15},
	} {
		v, err := Parse(c.text, Temperature)
		if err != nil || v.SI != c.kelvin {
			t.Errorf("%s = %v K, %v; want %v", c.text, v.SI, err, c.kelvin)
		}
		if back, _ := Convert(v.SI, Temperature, v.Unit); withUnit(FormatExact(v.SI, Temperature, v.Unit), nil) != v.Echo() || math.IsNaN(back) {
			t.Errorf("%s echoes as %s and %s", c.text, FormatExact(v.SI, Temperature, v.Unit), v.Echo())
		}
	}
}

// Every unit the program shows is read, under its own name and with every alias, and
// a figure in it survives a round trip.
func TestEveryUnitBothWays(t *testing.T) {
	for d := range numDims {
		for name, u := range tables[d].byName {
			if name == "" {
				continue
			}
			for _, figure := range []string{"1", "-2.5", "0.1", "123456.789", "7e-9"} {
				if d == Count {
					continue
				}
				v, err := Parse(figure+" "+name, d)
				if err != nil {
					t.Errorf("%s %s as %v: %v", figure, name, d, err)
					continue
				}
				if v.Unit != u.name || v.Gauge != u.gauge || v.Kinematic != u.kinematic {
					t.Errorf("%s %s: got unit %q %v %v", figure, name, v.Unit, v.Gauge, v.Kinematic)
				}
				back, err := Parse(FormatExact(v.SI, d, v.Unit), d)
				if err != nil || back.SI != v.SI {
					t.Errorf("%s %s: wrote %q, read %v %v", figure, name, FormatExact(v.SI, d, v.Unit), back.SI, err)
				}
			}
		}
	}
}

// The units named in the scenario format, each in its dimension.
func TestUnitsOfTheFormat(t *testing.T) {
	for d, names := range map[Dim][]string{
		Length:           {"m", "mm", "cm", "km", "in", "ft"},
		Area:             {"m2", "cm2", "mm2", "in2", "ft2"},
		Volume:           {"m3", "L", "mL", "cm3", "hL", "in3", "ft3", "gal(US)", "gal(UK)", "bbl"},
		Flow:             {"m3/h", "L/s", "L/min", "hL/h", "gpm(US)", "ft3/s", "cm3/s", "bbl/d", "gal(UK)/h"},
		Time:             {"s", "min", "h", "d"},
		Pressure:         {"Pa", "kPa", "MPa", "bar", "mbar", "psi", "mH2O", "mmH2O", "mmHg", "ftH2O", "bar(g)", "mmHg(a)", "psig", "psia", "barg", "mbara"},
		Temperature:      {"°C", "C", "°F", "F", "K"},
		Viscosity:        {"Pa.s", "mPa.s", "cP", "m2/s", "mm2/s", "cSt"},
		Density:          {"kg/m3", "g/cm3", "lb/ft3"},
		Velocity:         {"m/s", "ft/s", "mm/min", "m/d"},
		Acceleration:     {"m/s2", "cm/s2", "ft/s2"},
		Angle:            {"deg", "rad"},
		ResistanceLinear: {"s/m2"}, ResistanceQuadratic: {"s2/m5"}, Ratio: {"%"},
	} {
		for _, name := range names {
			if _, err := Parse("1 "+name, d); err != nil {
				t.Errorf("%s: %v", name, err)
			}
		}
	}
}

// One SI unit of every dimension is 1.
func TestSIUnits(t *testing.T) {
	for d := range numDims {
		v, err := Parse("1 "+SIUnit(d), d)
		if err != nil || v.SI != 1 {
			t.Errorf("%v: 1 %q is %v, %v", d, SIUnit(d), v.SI, err)
		}
	}
}
