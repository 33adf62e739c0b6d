package quantity

import (
	"math"
	"math/big"
	"testing"

	"pgregory.net/rapid"
)

// anyFloat draws finite numbers of all sizes, most of them of daily ones.
func anyFloat(t *rapid.T) float64 {
	if rapid.Bool().Draw(t, "daily") {
		return rapid.Float64Range(-1e6, 1e6).Draw(t, "si")
	}
	return rapid.Float64Range(-1e300, 1e300).Draw(t, "si")
}

func anyUnit(t *rapid.T) (Dim, *unit) {
	d := Dim(rapid.IntRange(0, int(numDims)-1).Draw(t, "dim"))
	if d == Count {
		d = Number
	}
	return d, rapid.SampledFrom(tables[d].list).Draw(t, "unit")
}

// Every float64 can be written in every unit and reads back to its bits.
func TestExactRoundTrip(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		d, u := anyUnit(t)
		si := anyFloat(t)
		text := FormatExact(si, d, u.name)
		v, err := Parse(text, d)
		if err != nil || v.SI != si {
			t.Fatalf("%v in %q: wrote %q, read %v, %v", si, u.name, text, v.SI, err)
		}
	})
}

// A decimal with a unit is the float64 nearest to the exact product, whichever way
// it was worked out.
func TestNearest(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		d, u := anyUnit(t)
		text := rapid.StringMatching(`-?(0|[1-9][0-9]{0,17})(\.[0-9]{1,18})?(e-?[0-9]{1,2})?`).Draw(t, "number")
		r, ok := new(big.Rat).SetString(text)
		if !ok {
			t.Fatalf("%q is no number", text)
		}
		if u.offset != nil {
			r.Add(r, u.offset)
		}
		want, _ := r.Mul(r, u.factor).Float64()
		v, err := Parse(text+" "+u.name, d)
		if err != nil || v.SI != want {
			t.Fatalf("%s %s: %v, %v; nearest is %v", text, u.name, v.SI, err, want)
		}
	})
}

// A value with a doubt, without its text, echoes to the same numbers.
func TestEchoRoundTrip(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		d, u := anyUnit(t)
		v := Value{SI: anyFloat(t), Dim: d, Unit: u.name, Gauge: u.gauge, Kinematic: u.kinematic}
		switch kind := DoubtKind(rapid.IntRange(0, 3).Draw(t, "kind")); kind {
		case Normal95:
			v.Doubt = Doubt{Kind: kind, Half: rapid.Float64Range(1e-9, 1e9).Draw(t, "half")}
		case Uniform:
			high := rapid.Float64Range(-1e9, 1e9).Draw(t, "high")
			low := rapid.Float64Range(-1e9, 1e9).Draw(t, "low")
			if low < high {
				v.Doubt = Doubt{Kind: kind, Low: low, High: high}
				v.SI = middle(low, high)
			}
		case Factor:
			if u.offset == nil {
				v.Doubt = Doubt{Kind: kind, Factor: rapid.Float64Range(1.001, 100).Draw(t, "factor")}
			}
		}
		text := v.Echo()
		w, err := Parse(text, d)
		if err != nil || w.SI != v.SI || w.Doubt != v.Doubt || w.Gauge != v.Gauge || w.Kinematic != v.Kinematic {
			t.Fatalf("%+v: wrote %q, read %+v, %v", v, text, w, err)
		}
	})
}

// Convert undoes the unit to within two roundings.
func TestConvertInverts(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		d, u := anyUnit(t)
		x := rapid.Float64Range(1e-6, 1e6).Draw(t, "x")
		v, err := Parse(FormatExact(x, Number, "")+" "+u.name, d)
		if err != nil {
			t.Fatal(err)
		}
		back, err := Convert(v.SI, d, u.name)
		if err != nil || math.Abs(back-x) > 4e-16*(x+2*u.shift) {
			t.Fatalf("%v %s: back %v, %v", x, u.name, back, err)
		}
	})
}

func TestClockRoundTrip(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		c := Clock{rapid.IntRange(0, 99999).Draw(t, "day"), float64(rapid.IntRange(0, 86399).Draw(t, "second"))}
		if got, err := ParseClock(c.String()); err != nil || got != c {
			t.Fatalf("%+v: %q, %+v, %v", c, c, got, err)
		}
	})
}
