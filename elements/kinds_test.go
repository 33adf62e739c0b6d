package elements_test

import (
	"testing"

	"headfall/elements"
	"headfall/elements/elementtest"
)

func TestEveryKind(t *testing.T) {
	n := 0
	for _, room := range elements.Rooms() {
		for _, k := range elements.Kinds(room) {
			n++
			t.Run(string(room)+"/"+k.Name, func(t *testing.T) { elementtest.Check(t, room, k.Name) })
		}
	}
	if n < 36 {
		t.Errorf("only %d kinds are registered", n)
	}
}

// Specimens that the samples do not show are held to the same promises.
func TestOtherSpecimens(t *testing.T) {
	for _, one := range []struct {
		room         elements.Room
		kind, sample string
	}{
		{elements.Parts, "pipe", "{length: 2 m, bore: 25 mm, friction: 0.02, inertia: yes}"},
		{elements.Parts, "pipe", "{length: 400 m, bore: 8 mm, roughness: 0 mm}"},
		{elements.Parts, "orifice", "{area: 3 cm2, cd: 0.6, blocked: 20 %}"},
		{elements.Parts, "orifice", "{width: 50 mm, height: 20 mm, cd: 1}"},
		{elements.Parts, "nozzle", "{diameter: 10 mm, cd: 0.7}"},
		{elements.Parts, "nozzle", "{diameter: 10 mm, type: sharp}"},
		{elements.Parts, "valve", "{tag: V-1, cv: 3}"},
		{elements.Parts, "valve", "{tag: V-1, k: 0.05, bore: 80 mm, trim: ball}"},
		{elements.Parts, "valve", "{tag: V-1, kv: 400, bore: 100 mm, trim: butterfly, leaks: 0.1 %}"},
		{elements.Parts, "valve", "{tag: V-1, kv: 1, bore: 80 mm, trim: {equal_percentage: {rangeability: 30}}, closes: inherent}"},
		{elements.Parts, "valve", "{tag: V-1, kv: 40, trim: quick_opening, fl: 0.8}"},
		{elements.Parts, "check_valve", "{kv: 60, cracks_at: 20 mbar, leaks: 0.5 %}"},
		{elements.Parts, "fittings", "{bore: 50 mm, strainer: 1, reducer: 2}"},
		{elements.Parts, "resistance", "{linear: 40 s/m2}"},
		{elements.Parts, "resistance", "{linear: 40 s/m2, quadratic: 300 s2/m5}"},
		{elements.Parts, "resistance", "{rows: [[1 m3/h, 0.1 m], [2 m3/h, 0.5 m], [5 m3/h, 4 m]]}"},
		{elements.Parts, "pump", "{tag: P-1, rate: 15 m3/h, mode: auto, starts: {level: S, above: 1.2 m}, stops: {level: S, below: 0.4 m}}"},
		{elements.Parts, "pump", "{tag: P-1, curve: [[0 m3/h, 10 m], [5 m3/h, 9.99 m], [20 m3/h, 2 m]], mode: on, when_stopped: passes}"},
		{elements.Parts, "weir", "{rectangular: {width: 0.5 m, channel_width: 1 m, crest_height: 0.4 m}, blocked: 30 %}"},
		{elements.Parts, "weir", "{rectangular: {width: 0.5 m, cd: 0.62}}"},
		{elements.Parts, "weir", "{v_notch: {angle: 90 deg}}"},
		{elements.Parts, "weir", "{v_notch: {angle: 30 deg, cd: 0.6}}"},
		{elements.Parts, "weir", "{broad_crested: {width: 2 m}}"},
		{elements.Shapes, "upright_cylinder", "{diameter: 2 m, straight: 3 m, bottom: torispherical, top: hemispherical}"},
		{elements.Shapes, "frustum", "{bottom: {area: 0.2 m2}, top: {length: 2 m, width: 1 m}, height: 2 m}"},
		{elements.Heads, "torispherical", "{crown_radius: 2 m, knuckle_radius: 0.2 m}"},
		{elements.Heads, "cone", "{angle: 60 deg, outlet: 100 mm}"},
		{elements.Vents, "pad", "{pressure: 1.04 bar(a), capacity: 60 m3/h}"},
		{elements.Liquids, "stated", "{name: oil, density: 900 kg/m3, viscosity: 40 cSt, vapour_pressure: 10 Pa(a)}"},
		{elements.Liquids, "stated", "{name: oil, at: 15 °C, table: [[10 °C, 900 kg/m3, 40 mPa.s], [20 °C, 890 kg/m3, 20 mPa.s]]}"},
		{elements.Beyond, "water", "{surface: [[0 h, 2.4 m], [6 h, 3.9 m]]}"},
	} {
		t.Run(one.kind+one.sample, func(t *testing.T) { elementtest.CheckSpecimen(t, one.room, one.kind, one.sample) })
	}
}
