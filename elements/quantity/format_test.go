package quantity

import (
	"math"
	"testing"
)

func TestFormat(t *testing.T) {
	for _, c := range []struct {
		si   float64
		d    Dim
		unit string
		sig  int
		want string
	}{
		{4.2, Length, "m", 3, "4.20 m"},
		{4.2, Length, "mm", 3, "4200 mm"},
		{-4.2, Length, "m", 2, "-4.2 m"},
		{0, Length, "m", 3, "0 m"},
		{-1e-320, Length, "m", 1, "-1e-320 m"},
		{0.0000123, Length, "m", 2, "0.000012 m"},
		{12345.6, Volume, "m3", 3, "12300 m3"},
		{99.96, Volume, "m3", 3, "100 m3"},
		{1e14, Volume, "m3", 3, "100000000000000 m3"},
		{1e15, Volume, "m3", 3, "1.00e15 m3"},
		{15. / 3600, Flow, "m3/h", 3, "15.0 m3/h"},
		{15. / 3600, Flow, "m³/h", 3, "15.0 m3/h"},
		{285.15, Temperature, "°C", 2, "12 °C"},
		{-500, Pressure, "mbar(g)", 2, "-5.0 mbar(g)"},
		{0.35, Ratio, "%", 2, "35 %"},
		{0.35, Ratio, "", 2, "0.35"},
		{95, Kv, "", 2, "95"},
		{4.2, Length, "furlong", 2, "4.2 m"},
		{4.2, Length, "m", 0, "4 m"},
		{math.NaN(), Length, "m", 3, "n/a"},
		{math.Inf(1), Length, "m", 3, "n/a"},
	} {
		if got := Format(c.si, c.d, c.unit, c.sig); got != c.want {
			t.Errorf("%v in %s: %q, want %q", c.si, c.unit, got, c.want)
		}
	}
}

func TestFormatExact(t *testing.T) {
	for _, c := range []struct {
		si   float64
		d    Dim
		unit string
		want string
	}{
		{0.08, Length, "mm", "80 mm"},
		{0.30000000000000004, Length, "m", "0.30000000000000004 m"},
		{math.Copysign(0, -1), Length, "m", "0 m"},
		{math.SmallestNonzeroFloat64, Length, "m", "5e-324 m"},
		{math.MaxFloat64, Length, "m", "1.7976931348623157e308 m"},
		{1e-60, Temperature, "°C", "1e-60 K"}, // no sensible text in °C
		{math.Pi / 2, Angle, "deg", "90 deg"},
	} {
		if got := FormatExact(c.si, c.d, c.unit); got != c.want {
			t.Errorf("%v in %s: %q, want %q", c.si, c.unit, got, c.want)
		}
	}
}

func TestFormatDuration(t *testing.T) {
	for seconds, want := range map[float64]string{
		0: "0 s", 0.04: "0 s", 12.54: "12.5 s", 45: "45 s", 59.96: "1 min", 60: "1 min", 4800: "1 h 20 min", 4815.4: "1 h 20 min 15 s",
		86400: "1 d", 183600: "2 d 3 h", -90: "-1 min 30 s",
	} {
		if got := FormatDuration(seconds); got != want {
			t.Errorf("%v: %q, want %q", seconds, got, want)
		}
		if v, err := ParseTime(want); err != nil || math.Abs(v.SI-seconds) > 0.5 {
			t.Errorf("%s reads as %v, %v", want, v.SI, err)
		}
	}
}
