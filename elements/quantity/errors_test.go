package quantity

import (
	"strings"
	"testing"
)

// mistakes are what people type, and exactly what they are told.
var mistakes = []struct {
	text           string
	d              Dim
	want           string
	offset, length int
}{
	{"4.2", Length, `"4.2" needs a unit, e.g. 4.2 m`, 0, 3},
	{"0", Length, `"0" needs a unit, e.g. 0 m`, 0, 1},
	{"4.20 ± 0.05", Length, `"4.20" needs a unit, e.g. 4.20 m`, 0, 4},
	{"12", Flow, `"12" needs a unit, e.g. 12 m3/h`, 0, 2},
	{"1 h 20", Time, `"20" needs a unit, e.g. 20 min`, 4, 2},
	{"", Length, `a value is missing, e.g. 4.2 m`, 0, 0},
	{"   ", Flow, `a value is missing, e.g. 2 m3/h`, 2, 1},
	{"about 4 m", Length, `"about 4 m" is not a number, e.g. 4.2 m`, 0, 9},
	{"4 m ±", Length, `a number is missing behind "4 m ±", e.g. 4.2 m`, 4, 1},

	{"4,2 m", Length, `decimals are parted by a point, write 4.2 m`, 0, 3},
	{"4.2 m ± 0,05 m", Length, `decimals are parted by a point, write 4.2 m ± 0.05 m`, 8, 4},
	{"1,5 to 2,5 m", Length, `decimals are parted by a point, write 1.5 to 2.5 m`, 0, 3},
	{"0,125 m", Length, `decimals are parted by a point, write 0.125 m`, 0, 5},
	{"1,000 m3", Volume, `"1,000" can be read two ways, write 1000 m3 or 1.000 m3`, 0, 5},
	{"1,234,567 m3", Volume, `a number has no thousands separators, write 1234567 m3`, 0, 9},
	{"1,000.5 m3", Volume, `a number has no thousands separators, write 1000.5 m3`, 0, 7},
	{"1.000,5 m3", Volume, `a number has no thousands separators, write 1000.5 m3`, 0, 7},
	{"1.000.000 m3", Volume, `"1.000.000" is not a number, write 1000000 m3`, 0, 9},
	{"1'000 m3", Volume, `a number has no thousands separators, write 1000 m3`, 0, 5},
	{"1’000 m3", Volume, `a number has no thousands separators, write 1000 m3`, 0, 5},
	{"1_000 m3", Volume, `a number has no thousands separators, write 1000 m3`, 0, 5},
	{"1\u202f000 m3", Volume, `a number has no blanks inside, write 1000 m3`, 0, 5},
	{"1 000 000 m3", Volume, `a number has no blanks inside, write 1000000 m3`, 0, 9},
	{"007", Number, `a number has no leading noughts, write 7`, 0, 3},
	{"00.5", Number, `a number has no leading noughts, write 0.5`, 0, 4},
	{"5. m", Length, `"5." is not a number, write 5 m`, 0, 2},
	{"nan", Number, `"nan" is not a number, e.g. 0.62`, 0, 3},
	{".inf", Number, `".inf" is not a number, e.g. 0.62`, 0, 4},
	{"Infinity m", Length, `"Infinity m" is not a number, e.g. 4.2 m`, 0, 10},
	{"0x10 m", Length, `hexadecimal numbers are not read, write the decimal number`, 0, 6},
	{"10³ m", Length, `powers are not read, write the number out, or as in 1e3`, 0, 5},
	{"1/2 in", Length, `fractions are not read, write the decimal, e.g. 0.5`, 0, 3},
	{"1e400 m", Length, `"1e400 m" is beyond what can be reckoned with, e.g. 4.2 m`, 0, 7},
	{"1e-400 m", Length, `"1e-400 m" is beyond what can be reckoned with, e.g. 4.2 m`, 0, 8},
	{"<5 m", Length, `write the number alone, e.g. 4.2 m`, 0, 4},

	{"4.2 m3", Length, `m3 measures a volume; a length is needed, e.g. 4.2 m`, 4, 2},
	{"4.2 m", Volume, `m measures a length; a volume is needed, e.g. 2 m3`, 4, 1},
	{"12 °C", Pressure, `°C measures a temperature; a pressure is needed, e.g. 5 mbar(g)`, 3, 2},
	{"4.2 kg", Length, `kg measures a mass; a length is needed, e.g. 4.2 m`, 4, 2},
	{"4 m3/h", Time, `m3/h measures a flow; a duration is needed, e.g. 20 min`, 2, 4},
	{"62 %", Length, `per cent is not understood here; a length is needed, e.g. 4.2 m`, 3, 1},
	{"4.2 M", Length, `unknown unit "M", write 4.2 m`, 4, 1},
	{"4.2 metres", Length, `unknown unit "metres", write 4.2 m`, 4, 6},
	{"20 m", Time, `unknown unit "m", write 20 min`, 3, 1},
	{"2 hours", Time, `unknown unit "hours", write 2 h`, 2, 5},
	{"12 gpm", Flow, `unknown unit "gpm", write 12 gpm(US) or 12 gpm(UK)`, 3, 3},
	{"2 m3/hr", Flow, `unknown unit "m3/hr", write 2 m3/h`, 2, 5},
	{"2 M3/H", Flow, `unknown unit "M3/H", write 2 m3/h`, 2, 4},
	{"1.2 mpas", Viscosity, `unknown unit "mpas", write 1.2 mPa.s`, 4, 4},
	{"2 Bar(g)", Pressure, `unknown unit "Bar(g)", write 2 bar(g)`, 2, 6},
	{"0.4 mpa", Pressure, `unknown unit "mpa", write 0.4 MPa`, 4, 3},
	{"3 mWS", Pressure, `unknown unit "mWS", write 3 mH2O`, 2, 3},
	{"4 furlong", Length, `unknown unit "furlong", units of a length: m mm cm km µm in ft`, 2, 7},
	{"4 m ± 5 furlong", Length, `unknown unit "furlong", units of a length: m mm cm km µm in ft`, 8, 7},

	{"95 m3/h", Kv, `kv is a bare number: by definition m3/h of water at 1 bar, write 95`, 3, 4},
	{"110 gpm", Cv, `cv is a bare number: by definition US gal/min of water at 1 psi, write 110`, 4, 3},
	{"0.62 m", Number, `this is a bare number, without a unit, write 0.62`, 5, 1},
	{"62 %", Number, `this is a bare number, without a unit, write 0.62`, 3, 1},
	{"3.5", Count, `a whole number is needed, e.g. 3`, 0, 3},
	{"3 ± 1", Count, `a count carries no doubt, e.g. 3`, 2, 3},

	{"0.66 to 0.58", Number, `the lower end comes first, write 0.58 to 0.66`, 0, 12},
	{"4-5 m", Length, `a range is written with "to", write 4 to 5 m`, 0, 5},
	{"4–5 m", Length, `a range is written with "to", write 4 to 5 m`, 0, 5},
	{"4..5 m", Length, `a range is written with "to", write 4 to 5 m`, 0, 6},
	{"3 m + 4 m", Length, `sums are not read, write the result, or ± for a doubt`, 4, 5},
	{"3 m 20 cm", Length, `only durations are written in parts, e.g. 4.2 m`, 4, 5},
	{"20 min 1 h", Time, `a sum of times goes from large to small units, e.g. 1 h 20 min`, 7, 3},
	{"4 m about", Length, `"about" is not understood here, write 4 m`, 4, 5},
	{"1 m to 2 m ± 1 cm", Length, `one doubt is enough, e.g. 0.62 ± 0.04, or 0.58 to 0.66`, 11, 6},
	{"4 m ± -1 m", Length, `a doubt has no minus, leave the minus out`, 6, 4},
	{"12 °C ± 5 %", Temperature, `per cent of a temperature is not clear, write the doubt in °C`, 8, 3},
	{"1 bar to 2 bar(g)", Pressure, `both must be gauge or both absolute, write (g) or (a) behind both`, 0, 17},
	{"1 cSt ± 1 cP", Viscosity, `dynamic and kinematic viscosity do not mix, write it in cSt`, 10, 2},
	{"0.05 mm ×÷ 0.5", Length, `a factor of doubt is 1 or more, e.g. ×÷ 2`, 11, 3},
	{"0.05 mm ×÷ 2 mm", Length, `a factor of doubt is a bare number, write ×÷ 2`, 13, 2},
	{"06:30", Time, `this is a time of day; a duration is needed, e.g. 6 h 30 min`, 0, 5},
	{"06:30", Length, `this is a time of day; a length is needed, e.g. 4.2 m`, 0, 5},
	{strings.Repeat("9", 401), Number, `this is too long for a value, e.g. 0.62`, 0, 401},
}

func TestMistakes(t *testing.T) {
	for _, c := range mistakes {
		v, err := Parse(c.text, c.d)
		e, ok := err.(*Error)
		if !ok {
			t.Errorf("%q as %v was read as %v", c.text, c.d, v.SI)
			continue
		}
		if e.Error() != c.want {
			t.Errorf("%q as %v:\n got %s\nwant %s", c.text, c.d, e, c.want)
		}
		if e.Offset != c.offset || e.Length != c.length {
			t.Errorf("%q as %v: marked %d+%d, want %d+%d", c.text, c.d, e.Offset, e.Length, c.offset, c.length)
		}
	}
}

// What a hint says to write is read, whenever it is a whole value.
func TestHintsAreRight(t *testing.T) {
	for _, c := range mistakes {
		_, err := Parse(c.text, c.d)
		e, ok := err.(*Error)
		if !ok {
			continue
		}
		for _, verb := range []string{"write ", "e.g. "} {
			text, is := strings.CutPrefix(e.Hint, verb)
			if !is || strings.ContainsAny(text, ",") || strings.HasPrefix(text, "×") || strings.HasPrefix(text, "the ") ||
				strings.HasPrefix(text, "it ") || strings.HasPrefix(text, "(g)") {
				continue
			}
			for one := range strings.SplitSeq(text, " or ") {
				if _, err := Parse(one, c.d); err != nil {
					t.Errorf("%q: the hint %q is refused: %v", c.text, one, err)
				}
			}
		}
	}
}

func TestUnitAlone(t *testing.T) {
	for _, c := range []struct {
		unit, want string
		d          Dim
	}{
		{"MM", `unknown unit "MM", write mm`, Length},
		{"m3/h", `m3/h measures a flow; a length is needed, one of: m mm cm km µm in ft`, Length},
		{"gpm", `unknown unit "gpm", write gpm(US) or gpm(UK)`, Flow},
	} {
		if _, err := Convert(1, c.d, c.unit); err == nil || err.Error() != c.want {
			t.Errorf("%q: %v, want %s", c.unit, err, c.want)
		}
	}
	if name, ok := CanonicalUnit(Flow, " m³/h "); name != "m3/h" || !ok {
		t.Error(name, ok)
	}
}
