package e2e

import (
	"math"
	"strconv"
	"testing"

	"headfall/network"
)

// Covered vessels filled to the roof. Laws: ideal gas, isothermal (p·V constant); the rim law of physics.md; conservation of volume.

// filledBy is a covered box of 2 m³ that something fills for an hour.
func filledBy(cover, more string) string {
	return plant("1 h", "liquid: {water: 12 °C}", `
vessels:
  V: {shape: {box: {length: 1 m, width: 1 m, height: 2 m}}, base: 0 m, level: 1.5 m, cover: {gas: {pressure: 0 mbar(g), temperature: 15 °C}`+cover+`}`+more)
}

func TestFilledAndSealed(t *testing.T) {
	for name, text := range map[string]string{
		"inflow":    filledBy("", ", inflow: 10 m3/h}"),
		"rate pump": filledBy("", "}\n  S: {shape: {box: {length: 9 m, width: 1 m, height: 2 m}}, base: 0 m, level: 1.9 m}\nlines:\n  L: {from: S, to: V, parts: [{pump: {tag: P, rate: 10 m3/h, mode: \"on\"}}, {pipe: {length: 5 m, bore: 80 mm, roughness: 0.05 mm}}]}"),
		"weir":      filledBy("", "}\n  S: {shape: {box: {length: 9 m, width: 1 m, height: 2 m}}, base: 0.3 m, level: 1 m, inflow: 10 m3/h}\nlines:\n  L: {from: S, to: V, leaves: {crest: 1 m}, parts: [{weir: {rectangular: {width: 0.3 m, c: 1.7}}}, {pipe: {length: 2 m, bore: 200 mm, roughness: 0.05 mm}}]}"), // its mouth is under liquid: no way for air
	} {
		for _, method := range []string{"", "bdf"} {
			t.Run(name+method, func(t *testing.T) {
				r := run(t, text, how{method: method})
				v := r.Vessels["V"]
				if name == "weir" { // S overtops instead: a weir has no more head than the surface behind it
					if v.Spilled != 0 || v.Gas.High > 0.2e5 || r.Vessels["S"].Spilled == 0 {
						t.Errorf("%+v %+v", v, v.Gas)
					}
					return
				}
				if flagged(r, "pressure_rating", "V") != 1 || flagged(r, "overtopped", "V") != 0 || r.Verdict != network.DoNotRun {
					t.Errorf("verdict %s, flags %+v", r.Verdict, r.Flags)
				}
				if v.Gas.High > 101325*0.5/(0.0005*2)*1.001 || v.PeakLevel > 2.05 || math.IsNaN(v.Gas.High) {
					t.Errorf("%+v %+v", v, v.Gas)
				}
				fails := false
				for _, l := range r.Limits {
					fails = fails || l.Why == "full and sealed" && l.Of[0] == "V" && l.Verdict == network.Fails
				}
				if !fails {
					t.Error("the limit on a full and sealed vessel does not fail")
				}
				within(t, "spilled", v.Spilled, v.In-(v.EndVolume-1.5), 1e-9)
				if !(v.In > 8.5) { // a rate gives way by 10⁻⁵ a metre
					t.Errorf("%g m3 came in", v.In)
				}
			})
		}
	}
}

// A source with a head of its own is brought to a stand by the gas: p·V = p₀·V₀ against the shut-off head of a pump, the pressure of a connection.
func TestFilledAgainstAHead(t *testing.T) {
	rho := 999.5
	for name, c := range map[string]struct {
		text string
		head func(level float64) float64 // Pa(g) at the gas
	}{
		"curve pump": {filledBy("", "}\n  S: {shape: {box: {length: 90 m, width: 1 m, height: 2 m}}, base: 0 m, level: 1.9 m}\nlines:\n  L: {from: S, to: V, parts: [{pump: {tag: P, curve: [[0 m3/h, 40 m], [20 m3/h, 10 m]], mode: \"on\", when_stopped: shut}}, {pipe: {length: 5 m, bore: 80 mm, roughness: 0.05 mm}}]}"),
			func(l float64) float64 { return rho * g0 * (40 + 1.9 - l) }},
		"tie-in": {filledBy("", "}\noutside:\n  M: {tie_in: {elevation: 0 m, pressure: 3 bar(g)}}\nlines:\n  L: {from: M, to: V, parts: [{pipe: {length: 5 m, bore: 30 mm, roughness: 0.05 mm}}]}"),
			func(l float64) float64 { return 3e5 - rho*g0*l }},
	} {
		t.Run(name, func(t *testing.T) {
			r := run(t, c.text, how{})
			v := r.Vessels["V"]
			gas := 101325*0.5/(2-v.EndLevel) - 101325
			within(t, "pressure", gas, c.head(v.EndLevel), 5e-3)
			if v.Spilled != 0 || r.Verdict != network.Run {
				t.Errorf("%s %+v", r.Verdict, v)
			}
		})
	}
}

// With a vent the gas leaves and the liquid spills over the rim: it overtops, under no pressure but that of the spill.
func TestFilledAndVented(t *testing.T) {
	for _, method := range []string{"", "bdf"} {
		r := run(t, filledBy(", vents: {VN: {hole: {bore: 50 mm}}}", ", inflow: 10 m3/h}"), how{method: method})
		v := r.Vessels["V"]
		if flagged(r, "overtopped", "V") != 1 || flagged(r, "pressure_rating", "V") != 0 || v.Gas.High > 50 {
			t.Errorf("%+v %+v %+v", r.Flags, v, v.Gas)
		}
		near(t, "spill head", v.EndLevel, 2+math.Pow(10/3600.0/(1.7*4), 2.0/3), 1e-4)
	}
}

// A weir feels the gas on both sides. Rectangular weir, strips under the same extra head δ: Q = c·b·((h+δ)^1.5 − δ^1.5); from an empty vessel nothing.
func TestWeirUnderGas(t *testing.T) {
	text := func(level, mbar float64) string {
		return plant("1 s", thin, `
vessels:
  V: {shape: {box: {length: 50 m, width: 10 m, height: 2 m}}, base: 0 m, level: `+num(level)+` m, cover: {gas: {pressure: `+num(mbar)+` mbar(g), temperature: 15 °C}}}
outside:
  AIR: {free_fall: {elevation: -1 m}}
lines:
  L: {from: V, to: AIR, leaves: {crest: 1 m}, parts: [{weir: {rectangular: {width: 0.5 m, c: 1.7}}}]}`)
	}
	d := 1000.0 / (1000 * g0) // 10 mbar
	for _, c := range []struct{ level, mbar, want float64 }{
		{1.2, 0, 1.7 * 0.5 * math.Pow(0.2, 1.5)},
		{1.2, 10, 1.7 * 0.5 * (math.Pow(0.2+d, 1.5) - math.Pow(d, 1.5))},
		{1.2, -10, 1.7 * 0.5 * math.Pow(0.2-d, 1.5)},
		{0.9, 10, 0},
		{1.05, -10, 0},
	} {
		near(t, "flow", run(t, text(c.level, c.mbar), how{}).Series.Flow["L"][0], c.want, 1e-9+1e-6*c.want)
	}
}

// num writes a number for a file.
func num(v float64) string { return strconv.FormatFloat(v, 'g', -1, 64) }
