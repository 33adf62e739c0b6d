package text_test

import (
	"testing"

	"headfall/cmd/internal/text"
	"headfall/network"
)

// Levels are read to 10 mm; what is left is rounded down and what is reached up, so that a fail never becomes a pass.
func TestUnits(t *testing.T) {
	metric := text.UnitsOf(network.Show{})
	small := text.UnitsOf(network.Show{Level: "mm", Flow: "L/s", Volume: "L", Pressure: "kPa"})
	feet := text.UnitsOf(network.Show{Level: "ft", Flow: "gpm(US)"})
	for _, c := range []struct{ got, want string }{
		{metric.LevelOf(0.2766, text.Down), "0.27 m"},
		{metric.LevelOf(-0.002, text.Down), "-0.01 m"},
		{metric.LevelOf(0.002, text.Down), "0.00 m"},
		{metric.LevelOf(1.6234, text.Up), "1.63 m"},
		{metric.LevelOf(0.29, text.Down), "0.29 m"}, // 0.29 is not a multiple of 0.01 in binary
		{small.LevelOf(0.2766, text.Down), "270 mm"},
		{feet.LevelOf(1, text.Near), "3.28 ft"},
		{metric.FlowOf(0.0051, text.Up), "18.4 m3/h"},
		{small.FlowOf(0.0051, text.Near), "5.10 L/s"},
		{metric.VolumeOf(3.4567, text.Up), "3.46 m3"},
		{metric.VolumeOf(1234.5, text.Down), "1230 m3"},
		{metric.VolumeOf(1e-9, text.Up), "0.001 m3"},
		{metric.VolumeOf(0, text.Up), "0 m3"},
		{metric.PressureOf(-512.4, text.Down), "-5.13 mbar(g)"},
		{small.PressureBy(1512, text.Down), "1.51 kPa"},
	} {
		if c.got != c.want {
			t.Errorf("got %q, want %q", c.got, c.want)
		}
	}
}
