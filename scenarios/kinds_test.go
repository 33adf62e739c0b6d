package scenarios

import (
	"testing"

	"headfall/elements"
	"headfall/network"
)

// Every kind's specimen is read as it stands in the help.
func TestSpecimens(t *testing.T) {
	for _, room := range elements.Rooms() {
		for _, k := range elements.Kinds(room) {
			d := newDecoder(&source{name: k.Name, text: "{" + k.Name + ": " + braced(k.Sample) + "}"})
			d.plant.Atmosphere = standardAtmosphere
			n := d.tree()
			if n == nil {
				t.Errorf("%s %s: %v", room, k.Name, d.fail(nil))
				continue
			}
			c, ok := d.element(room, n, string(room), func(string, *node) string { return "X" })
			if !ok {
				t.Errorf("%s %s: %v", room, k.Name, d.fail(nil))
				continue
			}
			if p, placed := c.element.(elements.Placed); placed {
				p.SetPlace(elements.Place{BoreBefore: 0.1, BoreAfter: 0.1})
			}
			if !d.ready(c, n) {
				t.Errorf("%s %s: %v", room, k.Name, d.fail(nil))
			}
		}
	}
}

func TestShorthand(t *testing.T) {
	text := `headfall: 1
run_for: 1 h
vessels:
  T-1: {shape: {table: [[0 m, 0 m3], [2 m, 3 m3]]}, base: 0 m, contents: 1 m3, cover: {vents: none}}
  T-2: {shape: {stack: [{box: {length: 1 m, width: 1 m, height: 1 m}}, {box: {length: 2 m, width: 1 m, height: 1 m}}]}, base: 0 m, level: 1 m}
`
	p := mustLoad(t, "p.yaml", []byte(text), Options{})
	if p.Vessels[0].Kind != "table" || p.Vessels[1].Kind != "stack" || p.Liquid == nil || p.Gravity != standardGravity {
		t.Errorf("%+v", p)
	}
	want := []string{"site.gravity: 9.80665 m/s2", "site.atmosphere: 1013.25 mbar", "liquid: water, 15 °C", "T-1.shape.between: straight", "report_every: 5 s"}
	for i, w := range want {
		if i >= len(p.Defaults) || p.Defaults[i] != w {
			t.Fatalf("defaults %q, want %q", p.Defaults, want)
		}
	}
}

func TestMoments(t *testing.T) {
	for text, want := range map[string]float64{
		`"06:20"`: 1200, "06:20": 1200, `"06:00"`: 0, `"05:00"`: 23 * 3600, `"+1d 06:30"`: 86400 + 1800, "1 h 20 min": 4800, `"2027-10-09 07:00"`: 3600, "06:20:30": 1230,
	} {
		d := newDecoder(&source{text: "x: " + text})
		d.plant.Start = mustLoad(t, "p.yaml", []byte(plan), Options{}).Start
		m, ok := d.moment(d.tree().items[0], "at")
		if !ok || m.S != want || !m.Given {
			t.Errorf("%s: %+v, %v", text, m, d.probs)
		}
	}
}

func TestDefaultSpacing(t *testing.T) {
	for run, want := range map[float64]float64{18 * 3600: 120, 4 * 3600: 30, 3600: 5, 500: 1, 60: 0.1, 86400: 180, 30 * 86400: 3600} {
		if got := defaultSpacing(run); want != got && !(run == 86400 && (got == 120 || got == 300)) {
			t.Errorf("%g s: %g, want %g", run, got, want)
		}
	}
}

func TestFind(t *testing.T) {
	p := mustLoad(t, "p.yaml", []byte(withTwoPipes), Options{})
	if n, err := Find(p, "T-1.height"); err != nil || n.Name != "T-1.shape.height" {
		t.Errorf("%v, %v", n, err)
	}
	if _, err := Find(p, "L-1.length"); err == nil {
		t.Error("an ambiguous name was taken")
	}
}

func TestLocate(t *testing.T) {
	p := mustLoad(t, "p.yaml", []byte(plan), Options{})
	got := Locate(p, []network.Problem{{At: p.Lines[0].Place, Says: "nothing flows"}}).Error()
	want := "p.yaml:13:3: nothing flows\n  13 |   L-1: {from: T-1, to: HDR, parts: [{pipe: {length: 5 m, bore: 80 mm, roughness: 0.05 mm}}, {valve: {tag: V-1, kv: 60}}]}\n     |   ^^^"
	if got != want {
		t.Errorf("%s", got)
	}
}
