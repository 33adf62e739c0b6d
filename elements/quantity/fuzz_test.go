package quantity

import (
	"testing"
	"unicode/utf8"
)

// FuzzParse: nothing panics; a fault lies within the text; what is accepted is
// finite, echoes to the same bits, and its echo is its own echo.
func FuzzParse(f *testing.F) {
	for _, s := range []string{"4.2 m", "80 mm", "1 h 20 min", "2 bar(g) ± 0.1 bar", "0.58 to 0.66", "35 % ± 5", "12 º C ± 5 %", "1,000.5 m³",
		"0.05 mm ×÷ 2", "1'000 m", "06:30", "10³ m", "-.5e-3 psig", "7 gpm", "4–5 m", "1e999 m", "\xff m", "9 m ± 1 cm to"} {
		for d := range 6 {
			f.Add(s, d*3)
		}
	}
	for _, c := range mistakes {
		f.Add(c.text, int(c.d))
	}
	f.Fuzz(func(t *testing.T, s string, dim int) {
		d := Dim(uint(dim) % uint(numDims))
		v, err := Parse(s, d)
		if err != nil {
			e := err.(*Error)
			if runes := utf8.RuneCountInString(s); e.Offset < 0 || e.Length < 0 || e.Offset+e.Length > runes || e.Msg == "" || runes > 0 && e.Length == 0 {
				t.Fatalf("%q as %v: %+v in %d runes", s, d, e, runes)
			}
			return
		}
		if v.SI-v.SI != 0 || v.Doubt.Half < 0 || v.Doubt.Low > v.Doubt.High {
			t.Fatalf("%q as %v: %+v", s, d, v)
		}
		echo := v.Echo()
		w, err := Parse(echo, d)
		if err != nil || !same(v, w) || w.Echo() != echo {
			t.Fatalf("%q as %v: %+v, echo %q: %+v, %v", s, d, v, echo, w, err)
		}
		v.Text = ""
		w, err = Parse(v.Echo(), d)
		if err != nil || w.SI != v.SI || w.Doubt != v.Doubt || w.Gauge != v.Gauge {
			t.Fatalf("%q as %v: %+v, from numbers %q: %+v, %v", s, d, v, v.Echo(), w, err)
		}
	})
}

// FuzzClock: nothing panics; what is accepted is on the clock.
func FuzzClock(f *testing.F) {
	for _, s := range []string{"06:30", "+1d 06:30:15.5", "24:00", "6:30 pm", "6h30", "2027-10-09 06:00", "09.10.2027 06:00"} {
		f.Add(s)
	}
	f.Fuzz(func(t *testing.T, s string) {
		LooksLikeClock(s)
		ParseDateTime(s)
		if c, err := ParseClock(s); err == nil && (c.Day < 0 || c.Seconds < 0 || c.Seconds >= 86400) {
			t.Fatalf("%q: %+v", s, c)
		}
	})
}
