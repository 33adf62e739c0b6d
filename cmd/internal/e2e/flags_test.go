package e2e

import (
	"strings"
	"testing"

	"headfall/network"
)

// flagCase raises one kind of flag at one place; its neighbour, changed in the one respect that matters, does not.
type flagCase struct {
	kind, where string
	text        string
	old, new    string // what makes the neighbour
}

// piped is a tank of 2 m² by 3 m on 5 m of pipe to X.
func piped(level, x, parts, more string) string {
	return plant("1 h", "liquid: {water: 20 °C}", `
vessels:
  A: {shape: {box: {length: 2 m, width: 1 m, height: 3 m}}, base: 0 m, level: `+level+`}
outside: {X: {`+x+`}}
lines:
  L: {from: A, to: X, parts: [`+parts+`]}
`+more)
}

// covered is a covered tank that drains, or fills.
func covered(vent, inflow string) string {
	return plant("10 min", "liquid: {water: 20 °C}", `
vessels:
  A: {shape: {box: {length: 2 m, width: 1 m, height: 3 m}}, base: 0 m, level: 2 m, inflow: `+inflow+`, cover: {gas: {pressure: 0 mbar(g), temperature: 15 °C}, vents: {VN: {hole: {bore: `+vent+`}}}, withstands: {vacuum: 5 mbar, pressure: 5 mbar}}}
outside: {X: {free_fall: {elevation: -1 m}}}
lines:
  L: {from: A, to: X, parts: [{pipe: {length: 5 m, bore: 80 mm, roughness: 0.05 mm}}, {valve: {tag: V, kv: 90, open: 100 %}}]}`)
}

func TestFlags(t *testing.T) {
	const pipe = "{pipe: {length: 5 m, bore: 50 mm, roughness: 0.05 mm}}"
	const pump = "{pump: {tag: P, curve: [[0 m3/h, 10 m], [10 m3/h, 8 m]], mode: \"on\", when_stopped: shut}}"
	for _, c := range []flagCase{
		{"overtopped", "A", strings.Replace(piped("2.9 m", "free_fall: {elevation: 0 m}", "{pipe: {length: 5 m, bore: 20 mm, roughness: 0.05 mm}}", ""), "level: 2.9 m", "level: 2.9 m, inflow: 9 m3/h", 1), "9 m3/h", "1 m3/h"},
		{"over_gully_capacity", "X", piped("2 m", "gully: {elevation: 0 m, capacity: 2 L/s}", pipe, ""), "capacity: 2 L/s", "capacity: 20 L/s"},
		{"air_drawn_in", "L", piped("1 m", "free_fall: {elevation: -1 m}", pipe, ""), "run_for: 1 h", "run_for: 1 min"},
		{"air_drawn_in", "L", strings.Replace(piped("0.6 m", "free_fall: {elevation: 1 m}", pump+", {pipe: {length: 5 m, bore: 50 mm, roughness: 0.05 mm}}", "steps: [{id: s1, when: {level: A, below: 0.5 m}, pump: P, to: \"off\"}]"), "run_for: 1 h", "run_for: 3 min", 1), "level: 0.6 m", "level: 2.9 m"},
		{"air_enters", "L2", plant("1 h", "liquid: {water: 20 °C}", `
vessels:
  A: {shape: {box: {length: 2 m, width: 1 m, height: 3 m}}, base: 0 m, level: 2 m}
tees: {T: {elevation: 0 m}}
outside: {X: {free_fall: {elevation: -4 m}}, Y: {free_fall: {elevation: 1 m}}}
lines:
  L: {from: A, to: T, parts: [{pipe: {length: 5 m, bore: 30 mm, roughness: 0.05 mm}}]}
  L1: {from: T, to: X, parts: [{pipe: {length: 5 m, bore: 80 mm, roughness: 0.05 mm}}]}
  L2: {from: T, to: Y, parts: [{pipe: {length: 5 m, bore: 30 mm, roughness: 0.05 mm}}]}`), "elevation: 1 m}", "elevation: -5 m}"},
		{"ran_backwards", "L", piped("1 m", "water: {surface: 2 m}", pipe, ""), "surface: 2 m", "surface: 0.5 m"},
		{"part_full", "L", strings.Replace(piped("2 m", "free_fall: {elevation: -1 m}", "{orifice: {diameter: 20 mm, cd: 0.6}}, {pipe: {length: 5 m, bore: 100 mm, roughness: 0.05 mm}}", ""), "run_for: 1 h", "run_for: 1 min", 1), "diameter: 20 mm", "diameter: 95 mm"},
		{"siphon_primed", "S", hump("2 m", "{high_point: {elevation: 1.2 m, primed: no}}", ""), "primed: no", "vent: {tag: AV, open: yes}"},
		{"siphon_broken", "S", hump("2 m", "{high_point: {elevation: 1.2 m}}", ""), "run_for: 4 h", "run_for: 2 min"},
		{"held_at_vapour_pressure", "S", strings.Replace(hump("2 m", "{high_point: {elevation: 5 m, primed: yes}}", ""), "elevation: -1 m", "elevation: -12 m", 1), "elevation: -12 m", "elevation: -2 m"},
		{"valve_choked", "L", strings.Replace(piped("1 m", "tie_in: {elevation: 0 m, pressure: 6 bar(g)}", "{valve: {tag: V, kv: 10, fl: 0.6, open: 100 %}}", ""), "from: A, to: X", "from: X, to: A", 1), "6 bar(g)", "0.2 bar(g)"},
		{"velocity", "L", piped("2 m", "free_fall: {elevation: -1 m}", pipe, "limits: [{velocity: L, below: 1 m/s}]"), "below: 1 m/s", "below: 10 m/s"},
		{"vacuum_rating", "A", covered("5 mm", "0 m3/h"), "bore: 5 mm", "bore: 80 mm"},
		{"pressure_rating", "A", covered("5 mm", "120 m3/h"), "bore: 5 mm", "bore: 150 mm"},
		{"fast_closure", "V", piped("2 m", "free_fall: {elevation: -1 m}", "{pipe: {length: 600 m, bore: 150 mm, roughness: 0.05 mm}}, {valve: {tag: V, kv: 300, open: 100 %, stroke: 0.5 s}}", "steps: [{id: s1, at: 1 min, valve: V, to: 0 %}]"), "stroke: 0.5 s", "stroke: 60 s"},
		{"pump_dry", "P", piped("1 m", "free_fall: {elevation: 2 m}", pump+", "+pipe, ""), "run_for: 1 h", "run_for: 1 min"},
		{"pump_off_curve", "L", piped("2 m", "free_fall: {elevation: -9 m}", pump+", {pipe: {length: 5 m, bore: 80 mm, roughness: 0.05 mm}}", ""), "elevation: -9 m", "elevation: 10 m"},
		{"step_never_reached", "s1", piped("2 m", "free_fall: {elevation: 0 m}", pipe+", {valve: {tag: V, kv: 50, open: 100 %}}", "steps: [{id: s1, when: {level: A, above: 2.5 m}, valve: V, to: 0 %}]"), "above: 2.5 m", "below: 1.5 m"},
		{"chatter", "P", strings.Replace(piped("1 m", "free_fall: {elevation: 1 m}", "{pump: {tag: P, rate: 30 m3/h, mode: auto, starts: {level: A, above: 1 m}, stops: {level: A, below: 0.9999 m}}}, "+pipe, ""), "level: 1 m}", "level: 1 m, inflow: 15 m3/h}", 1), "below: 0.9999 m", "below: 0.5 m"},
		{"outside_range", "L", piped("2 m", "free_fall: {elevation: 0 m}", pipe+", {orifice: {diameter: 45 mm, cd: 0.6}}, "+pipe, ""), "diameter: 45 mm", "diameter: 30 mm"},
		{"outside_range", "L", piped("2 m", "free_fall: {elevation: 0 m}", pipe, ""), "", ""},
	} {
		if c.old == "" { // a pipe as rough as stones
			c.text = strings.Replace(c.text, "roughness: 0.05 mm", "roughness: 4 mm", 1)
			c.old, c.new = "roughness: 4 mm", "roughness: 1 mm"
		}
		t.Run(c.kind+" "+c.where, func(t *testing.T) {
			if !strings.Contains(c.text, c.old) {
				t.Fatalf("no %q in\n%s", c.old, c.text)
			}
			r := run(t, c.text, how{})
			if flagged(r, c.kind, c.where) == 0 {
				t.Errorf("not raised; there are %s", kinds(r))
			}
			for _, f := range r.Flags {
				if f.Says == "" || f.Do == "" || f.To < f.From {
					t.Errorf("%+v", f)
				}
			}
			r = run(t, strings.Replace(c.text, c.old, c.new, 1), how{})
			if flagged(r, c.kind, c.where) > 0 {
				t.Errorf("the neighbour raises it as well: %s", kinds(r))
			}
		})
	}
}

// kinds lists the flags of a run.
func kinds(r *network.Result) string {
	var all []string
	for _, f := range r.Flags {
		all = append(all, f.Kind+" "+f.Where)
	}
	return strings.Join(all, ", ")
}
