package elements_test

import (
	"math"
	"testing"

	"headfall/elements"
	"headfall/elements/elementtest"
)

func TestStatedLiquids(t *testing.T) {
	one := build[elements.Liquid](t, elements.Liquids, "stated", "{name: oil, density: 900 kg/m3, viscosity: 40 cSt}").Fluid()
	if math.Abs(one.Dynamic-0.036) > 1e-12 || one.Checked || !math.IsNaN(one.Celsius) {
		t.Errorf("a kinematic viscosity of 40 cSt at 900 kg/m³: %+v", one)
	}
	table := build[elements.Liquid](t, elements.Liquids, "stated",
		"{name: oil, at: 15 °C, vapour_pressure: 2 kPa(a), table: [[10 °C, 900 kg/m3, 40 mPa.s], [20 °C, 890 kg/m3, 10 mPa.s]]}").Fluid()
	if math.Abs(table.Density-895) > 1e-9 || math.Abs(table.Dynamic-0.02) > 1e-12 || math.Abs(table.Celsius-15) > 1e-9 || !table.Checked {
		t.Errorf("half way, density straight and viscosity straight in its logarithm: %+v", table)
	}
	for _, s := range []string{
		"{name: oil}", "{name: oil, density: 900 kg/m3}", "{name: oil, at: 15 °C}",
		"{name: oil, at: 25 °C, table: [[10 °C, 900 kg/m3, 40 mPa.s], [20 °C, 890 kg/m3, 10 mPa.s]]}",
		"{name: oil, at: 15 °C, table: [[20 °C, 900 kg/m3, 40 mPa.s], [10 °C, 890 kg/m3, 10 mPa.s]]}",
		"{name: oil, density: 900 kg/m3, viscosity: 1 mPa.s, vapour_pressure: 20 mbar(g)}",
	} {
		if _, err := elementtest.Build(elements.Liquids, "stated", s); err == nil {
			t.Errorf("%s: taken", s)
		}
	}
	if _, err := elementtest.Build(elements.Liquids, "water", "{temperature: 120 °C}"); err == nil {
		t.Error("water of 120 °C: taken")
	}
}

func TestOutside(t *testing.T) {
	outside := func(kind, sample string) *elements.Outside {
		return build[elements.Outsider](t, elements.Beyond, kind, sample).Outside()
	}
	if o := outside("free_fall", "{elevation: 5.1 m}"); !o.FreeFall || o.Elevation != 5.1 || o.Capacity != 0 {
		t.Errorf("%+v", o)
	}
	if o := outside("gully", "{elevation: 5 m, capacity: 6 L/s}"); !o.FreeFall || math.Abs(o.Capacity-0.006) > 1e-15 {
		t.Errorf("%+v", o)
	}
	if o := outside("water", "{surface: [[0 h, 2.4 m], [6 h, 3.9 m]]}"); o.FreeFall || len(o.Surface) != 2 || o.Surface[1][0] != 21600 || o.Elevation != 2.4 {
		t.Errorf("%+v", o)
	}
	if o := outside("tie_in", "{elevation: 4 m, pressure: 2.5 bar(g)}"); !o.Pressed || !o.Gauge || math.Abs(o.Pressure-2.5e5) > 1e-6 {
		t.Errorf("%+v", o)
	}
	if o := outside("tie_in", "{elevation: 4 m, pressure: 2.5 bar(a)}"); o.Gauge {
		t.Errorf("%+v", o)
	}
	if _, err := elementtest.Build(elements.Beyond, "tie_in", "{elevation: 4 m, pressure: 2.5 bar}"); err == nil {
		t.Error("a pressure without (g) or (a): taken")
	}
}
