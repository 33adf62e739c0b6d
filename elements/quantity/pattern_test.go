package quantity

import (
	"regexp"
	"testing"

	"pgregory.net/rapid"
)

// What is read fits its pattern, whatever it looks like.
func TestPatternTakesWhatIsRead(t *testing.T) {
	var patterns [numDims]*regexp.Regexp
	for d := range patterns {
		patterns[d] = regexp.MustCompile(Pattern(Dim(d)))
	}
	rapid.Check(t, func(t *rapid.T) {
		d := Dim(rapid.IntRange(0, int(numDims)-1).Draw(t, "dimension"))
		name := ""
		if units := Units(d); len(units) > 0 && !(d.Bare() && rapid.Bool().Draw(t, "bare")) {
			name = rapid.SampledFrom(units).Draw(t, "unit")
		}
		blank := rapid.SampledFrom([]string{"", " ", "\u00a0", "\u2009", "  "}).Draw(t, "blank")
		number := rapid.SampledFrom([]string{"4.2", "-5", "−5", ".5", "5e-3", "0.05", "1E3", "+7"}).Draw(t, "number")
		doubt := rapid.SampledFrom([]string{"", " ± 5 %", "±0.1", " +- 0.1", " to 9000", " ×÷ 2", " */ 2"}).Draw(t, "doubt")
		text := number + blank + name + doubt
		if _, err := Parse(text, d); err == nil && !patterns[d].MatchString(text) {
			t.Fatalf("%q is read as %v and does not fit %s", text, d, patterns[d])
		}
	})
}

// A missing unit, one of another dimension, and what is no number do not fit.
func TestPatternRefuses(t *testing.T) {
	for _, c := range []struct {
		text string
		d    Dim
	}{
		{"4.2", Length}, {"4.2 kg", Length}, {"4.2 m3", Length}, {"4.2 m³", Length}, {"4.2 m/s", Length}, {"full", Length}, {"inf m", Length}, {"4.2 MM", Length},
		{"12", Flow}, {"12 m3", Flow}, {"12 gpm", Flow}, {"4 m3/h", Time}, {"4 m", Time}, {"12 bar", Temperature}, {"5 m", Pressure}, {"± 0.1 m", Length},
		{"95 m3/h", Kv}, {"full", Ratio}, {"140 m", Ratio}, {"3 pieces", Count}, {"95 %", Kv}, {"", Length}, {"", Number}, {"0x20", Number}, {"1,5", Number},
	} {
		if regexp.MustCompile(Pattern(c.d)).MatchString(c.text) {
			t.Errorf("%q fits %v", c.text, c.d)
		}
		if v, err := Parse(c.text, c.d); err == nil {
			t.Errorf("%q is read as %v: %v", c.text, c.d, v)
		}
	}
}
