package quantity

import (
	"regexp"
	"testing"
)

func TestParse(t *testing.T) {
	for _, c := range []struct {
		text string
		d    Dim
		want Value // Text and Dim are filled in below
		echo string
	}{
		{"4.2 m", Length, Value{SI: 4.2, Unit: "m"}, "4.2 m"},
		{"80 mm", Length, Value{SI: 0.08, Unit: "mm"}, "80 mm"},
		{"80mm", Length, Value{SI: 0.08, Unit: "mm"}, "80 mm"},
		{"  82.50  mm ", Length, Value{SI: 0.0825, Unit: "mm"}, "82.50 mm"},
		{"+5 m", Length, Value{SI: 5, Unit: "m"}, "5 m"},
		{".5 m", Length, Value{SI: 0.5, Unit: "m"}, "0.5 m"},
		{"5E-3 m", Length, Value{SI: 0.005, Unit: "m"}, "5e-3 m"},
		{"-0 m", Length, Value{SI: 0, Unit: "m"}, "0 m"},
		{"5 m³/h", Flow, Value{SI: 5. / 3600, Unit: "m3/h"}, "5 m3/h"},
		{"5 m^3 / h", Flow, Value{SI: 5. / 3600, Unit: "m3/h"}, "5 m3/h"},
		{"7 l/s", Flow, Value{SI: 0.007, Unit: "L/s"}, "7 L/s"},
		{"4 m²", Area, Value{SI: 4, Unit: "m2"}, "4 m2"},
		{"45 μm", Length, Value{SI: 45e-6, Unit: "µm"}, "45 µm"},
		{"12 º C", Temperature, Value{SI: 285.15, Unit: "°C"}, "12 °C"},
		{"12˚C", Temperature, Value{SI: 285.15, Unit: "°C"}, "12 °C"},
		{"90°", Angle, Value{SI: 1.5707963267948966, Unit: "deg"}, "90 deg"},
		{"−5 mbar(g)", Pressure, Value{SI: -500, Unit: "mbar(g)", Gauge: Gauge}, "-5 mbar(g)"},
		{"–5 mbar(g)", Pressure, Value{SI: -500, Unit: "mbar(g)", Gauge: Gauge}, "-5 mbar(g)"},
		{"2 bar ( g )", Pressure, Value{SI: 2e5, Unit: "bar(g)", Gauge: Gauge}, "2 bar(g)"},
		{"2 bara", Pressure, Value{SI: 2e5, Unit: "bar(a)", Gauge: Absolute}, "2 bar(a)"},
		{"1013.25 mbar", Pressure, Value{SI: 101325, Unit: "mbar"}, "1013.25 mbar"},
		{"5 psig", Pressure, Value{SI: 34473.786465841804, Unit: "psi(g)", Gauge: Gauge}, "5 psi(g)"},
		{"1.2 mPa·s", Viscosity, Value{SI: 0.0012, Unit: "mPa.s"}, "1.2 mPa.s"},
		{"1.2 mPa s", Viscosity, Value{SI: 0.0012, Unit: "mPa.s"}, "1.2 mPa.s"},
		{"1 cSt", Viscosity, Value{SI: 1e-6, Unit: "cSt", Kinematic: true}, "1 cSt"},
		{"50%", Ratio, Value{SI: 0.5, Unit: "%"}, "50 %"},
		{"62\u202f%", Ratio, Value{SI: 0.62, Unit: "%"}, "62 %"},
		{"4.2\u00a0m", Length, Value{SI: 4.2, Unit: "m"}, "4.2 m"},
		{"0.5", Ratio, Value{SI: 0.5}, "0.5"},
		{"95", Kv, Value{SI: 95}, "95"},
		{"3", Count, Value{SI: 3}, "3"},
		{"1 h 20 min", Time, Value{SI: 4800, Unit: "h"}, "1 h 20 min"},
		{"1h20min", Time, Value{SI: 4800, Unit: "h"}, "1 h 20 min"},
		{"-1 h 20 min", Time, Value{SI: -4800, Unit: "h"}, "-1 h 20 min"},
		{"1 d 2 h 3 min 4.5 s", Time, Value{SI: 93784.5, Unit: "d"}, "1 d 2 h 3 min 4.5 s"},
		{"0.1234567890123456789012345 m", Length, Value{SI: 0.1234567890123456789012345, Unit: "m"}, "0.1234567890123456789012345 m"},

		{"4.20 m ± 5 cm", Length, Value{SI: 4.2, Unit: "m", Doubt: Doubt{Kind: Normal95, Half: 0.05}}, "4.20 m ± 5 cm"},
		{"4.20 m +/- 0.05", Length, Value{SI: 4.2, Unit: "m", Doubt: Doubt{Kind: Normal95, Half: 0.05}}, "4.20 m ± 0.05 m"},
		{"4.20 ± 0.05 m", Length, Value{SI: 4.2, Unit: "m", Doubt: Doubt{Kind: Normal95, Half: 0.05}}, "4.20 m ± 0.05 m"},
		{"10 m+-5%", Length, Value{SI: 10, Unit: "m", Doubt: Doubt{Kind: Normal95, Half: 0.5}}, "10 m ± 5 %"},
		{"0.62±0.04", Number, Value{SI: 0.62, Doubt: Doubt{Kind: Normal95, Half: 0.04}}, "0.62 ± 0.04"},
		{"95 ± 15 %", Kv, Value{SI: 95, Doubt: Doubt{Kind: Normal95, Half: 14.25}}, "95 ± 15 %"},
		{"-5 mbar(g) ± 10 %", Pressure, Value{SI: -500, Unit: "mbar(g)", Gauge: Gauge, Doubt: Doubt{Kind: Normal95, Half: 50}}, "-5 mbar(g) ± 10 %"},
		{"2 bar(g) ± 0.1 bar", Pressure, Value{SI: 2e5, Unit: "bar(g)", Gauge: Gauge, Doubt: Doubt{Kind: Normal95, Half: 1e4}}, "2 bar(g) ± 0.1 bar"},
		{"35 % ± 5 %", Ratio, Value{SI: 0.35, Unit: "%", Doubt: Doubt{Kind: Normal95, Half: 0.05}}, "35 % ± 5 %"},
		{"35 % ± 5", Ratio, Value{SI: 0.35, Unit: "%", Doubt: Doubt{Kind: Normal95, Half: 0.05}}, "35 % ± 5 %"},
		{"0.5 ± 10 %", Ratio, Value{SI: 0.5, Doubt: Doubt{Kind: Normal95, Half: 0.05}}, "0.5 ± 10 %"},
		{"12 °C ± 1 °C", Temperature, Value{SI: 285.15, Unit: "°C", Doubt: Doubt{Kind: Normal95, Half: 1}}, "12 °C ± 1 °C"},
		{"50 °F ± 9 °F", Temperature, Value{SI: 283.15, Unit: "°F", Doubt: Doubt{Kind: Normal95, Half: 5}}, "50 °F ± 9 °F"},
		{"2 h ± 10 min", Time, Value{SI: 7200, Unit: "h", Doubt: Doubt{Kind: Normal95, Half: 600}}, "2 h ± 10 min"},
		{"4 m ± 0 m", Length, Value{SI: 4, Unit: "m"}, "4 m ± 0 m"},
		{"0.5 to 0.75", Number, Value{SI: 0.625, Doubt: Doubt{Kind: Uniform, Low: 0.5, High: 0.75}}, "0.5 to 0.75"},
		{"0.58 to 0.66", Ratio, Value{SI: 0.62, Doubt: Doubt{Kind: Uniform, Low: 0.58, High: 0.66}}, "0.58 to 0.66"},
		{"50 to 75 %", Ratio, Value{SI: 0.625, Unit: "%", Doubt: Doubt{Kind: Uniform, Low: 0.5, High: 0.75}}, "50 % to 75 %"},
		{"4 to 5 m", Length, Value{SI: 4.5, Unit: "m", Doubt: Doubt{Kind: Uniform, Low: 4, High: 5}}, "4 m to 5 m"},
		{"50 cm to 1 m", Length, Value{SI: 0.75, Unit: "cm", Doubt: Doubt{Kind: Uniform, Low: 0.5, High: 1}}, "50 cm to 1 m"},
		{"1 h 20 min to 2 h", Time, Value{SI: 6000, Unit: "h", Doubt: Doubt{Kind: Uniform, Low: 4800, High: 7200}}, "1 h 20 min to 2 h"},
		{"0.05 mm ×÷ 2", Length, Value{SI: 5e-5, Unit: "mm", Doubt: Doubt{Kind: Factor, Factor: 2}}, "0.05 mm ×÷ 2"},
		{"0.05 mm */ 2", Length, Value{SI: 5e-5, Unit: "mm", Doubt: Doubt{Kind: Factor, Factor: 2}}, "0.05 mm ×÷ 2"},
	} {
		got, err := Parse(c.text, c.d)
		c.want.Text, c.want.Dim = c.text, c.d
		if err != nil {
			t.Errorf("%q: %v", c.text, err)
			continue
		}
		if !regexp.MustCompile(Pattern(c.d)).MatchString(c.text) {
			t.Errorf("%q does not fit the pattern of a %v", c.text, c.d)
		}
		if got != c.want {
			t.Errorf("%q:\n got %+v\nwant %+v", c.text, got, c.want)
		}
		if got.Echo() != c.echo {
			t.Errorf("%q echoes as %q, want %q", c.text, got.Echo(), c.echo)
		}
	}
}

func TestBounds(t *testing.T) {
	for _, c := range []struct {
		text      string
		low, high float64
	}{{"4 m", 4, 4}, {"4 m ± 1 m", 3, 5}, {"3 m to 5 m", 3, 5}, {"4 m ×÷ 2", 2, 8}, {"-4 m ×÷ 2", -8, -2}} {
		v, err := Parse(c.text, Length)
		if err != nil {
			t.Fatal(err)
		}
		if low, high := v.Doubt.Bounds(v.SI); low != c.low || high != c.high {
			t.Errorf("%s: %v to %v", c.text, low, high)
		}
	}
}

// Without a text the value is written from its numbers, and reads back the same.
func TestEchoWithoutText(t *testing.T) {
	for _, c := range []struct {
		v    Value
		want string
	}{
		{Value{SI: 4.2, Dim: Length, Unit: "m"}, "4.2 m"},
		{Value{SI: 4.2, Dim: Length}, "4.2 m"},
		{Value{SI: 4.2, Dim: Length, Text: "7 m", Unit: "mm"}, "4200 mm"}, // changed since it was read
		{Value{SI: 0.08, Dim: Length, Unit: "mm", Doubt: Doubt{Kind: Normal95, Half: 0.02}}, "80 mm ± 20 mm"},
		{Value{SI: 0.35, Dim: Ratio, Unit: "%", Doubt: Doubt{Kind: Normal95, Half: 0.05}}, "35 % ± 5 %"},
		{Value{SI: 5e-5, Dim: Length, Unit: "mm", Doubt: Doubt{Kind: Factor, Factor: 2}}, "0.05 mm ×÷ 2"},
		{Value{SI: 4800, Dim: Time, Unit: "h"}, "1 h 20 min"},
		{Value{SI: 5400, Dim: Time, Unit: "h"}, "1.5 h"},
		{Value{SI: 1e-6, Dim: Viscosity, Kinematic: true}, "0.000001 m2/s"},
		{Value{SI: 2e5, Dim: Pressure, Unit: "bar(g)", Gauge: Gauge}, "2 bar(g)"},
		{Value{SI: -500, Dim: Pressure, Gauge: Gauge}, "-500 Pa(g)"},
		{Value{SI: 101325, Dim: Pressure, Unit: "mbar", Gauge: Absolute}, "1013.25 mbar(a)"},
		{Value{SI: 283.15, Dim: Temperature, Unit: "°F", Doubt: Doubt{Kind: Normal95, Half: 5}}, "50 °F ± 9 °F"},
	} {
		if got := c.v.Echo(); got != c.want {
			t.Errorf("%+v: %q, want %q", c.v, got, c.want)
		}
	}
}
