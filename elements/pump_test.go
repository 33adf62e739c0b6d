package elements_test

import (
	"math"
	"testing"

	"headfall/elements"
	"headfall/elements/elementtest"
)

const curveSample = "{tag: P-1, curve: [[0 m3/h, 14 m], [20 m3/h, 11 m], [32 m3/h, 6 m]], mode: on, when_stopped: passes}"

func TestPumpMeetsItsCurve(t *testing.T) {
	p := build[elements.Part](t, elements.Parts, "pump", curveSample)
	at := water1000()
	for _, row := range [][2]float64{{0, 14}, {20, 11}, {32, 6}} {
		dp, slope := p.Drop(row[0]/3600, at)
		if math.Abs(-dp/(1000*g)-row[1]) > 1e-12 || slope <= 0 {
			t.Errorf("at %g m³/h: %g m, slope %g", row[0], -dp/(1000*g), slope)
		}
	}
	at.Strength = 0.5
	if dp, _ := p.Drop(0, at); math.Abs(-dp/(1000*g)-7) > 1e-12 {
		t.Errorf("with half its head left: %g m", -dp/(1000*g))
	}
}

func TestStoppedPump(t *testing.T) {
	p := build[elements.Part](t, elements.Parts, "pump", curveSample)
	at := water1000()
	at.Opening = 0
	if p.(elements.Shuts).Shut(at) {
		t.Error("passes, yet shut")
	}
	dp, _ := p.Drop(20.0/3600, at)
	back, _ := p.Drop(-20.0/3600, at)
	if math.Abs(dp/(1000*g)-3) > 1e-12 || back != -dp {
		t.Errorf("stopped at 20 m³/h: loses %g m, back %g m; its curve falls by 3 m", dp/(1000*g), back/(1000*g))
	}
	shut := build[elements.Part](t, elements.Parts, "pump", "{tag: P-1, rate: 15 m3/h, mode: on}")
	if !shut.(elements.Shuts).Shut(at) {
		t.Error("a pump given by its rate is shut when stopped")
	}
}

func TestPumpRate(t *testing.T) {
	p := build[elements.Part](t, elements.Parts, "pump", "{tag: P-1, rate: 15 m3/h, mode: on}")
	at := water1000()
	for _, head := range []float64{0, 10, 30} { // Q = rate·(1 − 10⁻⁵·H)
		dp, _ := p.Drop(15.0/3600*(1-1e-5*head), at)
		if math.Abs(-dp/(1000*g)-head) > 1e-9*1e5 {
			t.Errorf("%g m: %g m", head, -dp/(1000*g))
		}
	}
}

func TestPumpModes(t *testing.T) {
	for sample, want := range map[string]elements.Mode{
		"{tag: P-1, rate: 15 m3/h}": elements.Off,
		"{tag: P-1, rate: 15 m3/h, starts: {level: S, above: 1.2 m}, stops: {level: S, below: 0.4 m}}":         elements.Auto,
		"{tag: P-1, rate: 15 m3/h, mode: standby, standby_for: P-2}":                                           elements.Standby,
		"{tag: P-1, rate: 15 m3/h, mode: on, starts: {level: S, above: 1.2 m}, stops: {level: S, below: 1 m}}": elements.On,
	} {
		if d := build[elements.Pumps](t, elements.Parts, "pump", sample).Drive(); d.Mode != want {
			t.Errorf("%s: mode %s", sample, d.Mode)
		}
	}
}

// What can not be built must be refused, and say why.
func TestFaultsOfParts(t *testing.T) {
	for _, one := range [][2]string{
		{"pump", "{tag: P-1}"},
		{"pump", "{tag: P-1, rate: 1 m3/h, curve: [[0 m3/h, 2 m], [1 m3/h, 1 m]]}"},
		{"pump", "{tag: P-1, curve: [[0 m3/h, 2 m]]}"},
		{"pump", "{tag: P-1, curve: [[0 m3/h, 2 m], [1 m3/h, 2.1 m], [2 m3/h, 1 m]]}"},
		{"pump", "{tag: P-1, rate: 1 m3/h, when_stopped: passes}"},
		{"pump", "{tag: P-1, rate: 1 m3/h, mode: auto}"},
		{"pump", "{tag: P-1, rate: 1 m3/h, starts: {level: S, above: 0.4 m}, stops: {level: S, below: 1.2 m}}"},
		{"pump", "{tag: P-1, rate: 1 m3/h, starts: {level: S, above: 0.4 m}, stops: {level: S, above: 1.2 m}}"},
		{"pipe", "{length: 1 m, bore: 10 mm}"},
		{"pipe", "{length: 1 m, bore: 10 mm, roughness: 1 mm, friction: 0.02}"},
		{"pipe", "{length: 1 m, bore: 10 mm, roughness: 2 mm}"},
		{"pipe", "{length: 0 m, bore: 10 mm, roughness: 0 mm}"},
		{"fittings", "{elbow_90: 2}"},
		{"fittings", "{bore: 80 mm, elbow_90: -1}"},
		{"orifice", "{cd: 0.6}"},
		{"orifice", "{diameter: 10 mm, area: 1 cm2, cd: 0.6}"},
		{"orifice", "{width: 10 mm, cd: 0.6}"},
		{"orifice", "{diameter: 10 mm, cd: 1.1}"},
		{"nozzle", "{diameter: 10 mm}"},
		{"nozzle", "{diameter: 10 mm, cd: 0.6, type: sharp}"},
		{"valve", "{tag: V-1}"},
		{"valve", "{tag: V-1, kv: 0}"},
		{"valve", "{tag: V-1, kv: 10, cv: 10}"},
		{"valve", "{tag: V-1, k: 10}"},
		{"valve", "{tag: V-1, kv: 10, open: 120 %}"},
		{"check_valve", "{kv: 0}"},
		{"resistance", "{}"},
		{"resistance", "{linear: 1 s/m2, rows: [[1 m3/h, 1 m]]}"},
		{"resistance", "{rows: [[1 m3/h, 1 m], [2 m3/h, 0.5 m]]}"},
	} {
		if _, err := elementtest.Build(elements.Parts, one[0], one[1]); err == nil || err.Error() == "" {
			t.Errorf("%s %s: taken", one[0], one[1])
		}
	}
}
