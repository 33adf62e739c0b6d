package e2e

import (
	"fmt"
	"math"
	"strings"

	"pgregory.net/rapid"
)

// drawn is a plant under the pen: what wild has written so far.
type drawn struct {
	t                         *rapid.T
	b                         strings.Builder
	vessels, tees, outs       []string
	free                      []string        // outside points in the open air
	covered                   map[string]bool // has gas over its liquid
	valves, pumps, air, vents []string        // pumps, vents of high points, vents of covers
	lines, batches            []string
	line                      int
	minutes                   int
}

func (d *drawn) num(name string, lo, hi float64) float64 {
	return math.Round(1e4*rapid.Float64Range(lo, hi).Draw(d.t, name)) / 1e4
}
func (d *drawn) of(name string, all ...string) string { return rapid.SampledFrom(all).Draw(d.t, name) }
func (d *drawn) whole(name string, lo, hi int) int    { return rapid.IntRange(lo, hi).Draw(d.t, name) }
func (d *drawn) chance(name string, percent int) bool { return d.whole(name, 1, 100) <= percent }
func (d *drawn) say(format string, a ...any)          { fmt.Fprintf(&d.b, format, a...) }

// wild draws plants of every kind of shape, part, vent, outside point and action, joined as trees, chains, rings, grids,
// shared headers and by no plan at all.
func wild(t *rapid.T) string {
	d := &drawn{t: t, covered: map[string]bool{}}
	d.minutes = []int{20, 60, 180}[d.whole("run for", 0, 2)]
	d.say("headfall: 1\ntitle: random\nrun_for: %d min\nassume: {doubts: none", d.minutes)
	if d.chance("leaking checks", 10) {
		d.say(", check_valves_leak: 1 %%")
	}
	d.say("}\nliquid: %s\nvessels:\n", d.of("liquid", "{water: 15 °C}", "{water: 15 °C}", "{water: 60 °C}",
		"{stated: {name: syrup, density: 1250 kg/m3, viscosity: 80 mPa.s}}", "{stated: {name: oil, density: 870 kg/m3, viscosity: 12 mPa.s, vapour_pressure: 1 kPa(a)}}"))
	for i := range d.whole("vessels", 1, 6) {
		d.vessel(fmt.Sprintf("V%d", i))
	}
	if n := d.whole("tees", 0, 3); n > 0 {
		d.say("tees:\n")
		for i := range n {
			tag := fmt.Sprintf("T%d", i)
			d.tees = append(d.tees, tag)
			d.say("  %s: {%s}\n", tag, []string{"", fmt.Sprintf("elevation: %g m", d.num("tee", -1, 3))}[d.whole("known", 0, 1)])
		}
	}
	d.say("outside:\n")
	for i := range d.whole("outside", 1, 2) {
		d.beyond(fmt.Sprintf("X%d", i))
	}
	d.say("lines:\n")
	d.join()
	d.weirs()
	d.plan()
	return d.b.String()
}

// vessel draws one of any shape, open, covered or sealed.
func (d *drawn) vessel(tag string) {
	end := func() string {
		return d.of("end", "flat", "ellipsoidal", "torispherical", "hemispherical", "{cone: {depth: 0.4 m, outlet: 60 mm}}", "{torispherical: {form: din_28011}}")
	}
	var shape string
	switch d.whole("shape", 0, 8) {
	case 0:
		shape = fmt.Sprintf("upright_cylinder: {diameter: %g m, straight: 1.6 m, bottom: %s, top: %s}", d.num("diameter", 0.4, 3), end(), d.of("top", "flat", "ellipsoidal"))
	case 1:
		shape = fmt.Sprintf("upright_cylinder: {diameter: %g m, height: 2 m}", d.num("diameter", 0.4, 3))
	case 2:
		shape = fmt.Sprintf("lying_cylinder: {diameter: 1.6 m, length: %g m, ends: %s}", d.num("length", 1, 5), d.of("ends", "flat", "ellipsoidal", "torispherical", "hemispherical"))
	case 3:
		shape = "sphere: {diameter: 2 m}"
	case 4:
		shape = fmt.Sprintf("box: {length: %g m, width: 1 m, height: 2 m}", d.num("length", 0.3, 4))
	case 5:
		shape = "frustum: {bottom: {diameter: 0.5 m}, top: {diameter: 2 m}, height: 2 m}"
	case 6:
		shape = "table: {rows: [[0 m, 0 m3], [0.5 m, 0.4 m3], [1.0 m, 1.4 m3], [2.0 m, 2.8 m3]]}"
	case 7:
		shape = "stack: [{frustum: {bottom: {diameter: 0.3 m}, top: {diameter: 1.2 m}, height: 0.7 m}}, {upright_cylinder: {diameter: 1.2 m, height: 1.3 m}}]"
	default:
		shape = "box: {length: 1 m, width: 1 m, height: 2 m}"
	}
	d.vessels = append(d.vessels, tag)
	d.say("  %s:\n    shape: {%s}\n    base: %g m\n    level: %g m\n", tag, shape, d.num("base", 0, 4), d.num("level", 0, 1.5))
	if d.chance("inside", 8) {
		d.say("    inside: [{from: 0.1 m, to: 0.6 m, voids: 45 %%}]\n")
	}
	switch {
	case d.chance("cover", 25):
		d.covered[tag] = true
		vent := tag + "-v"
		d.vents = append(d.vents, vent)
		kind := d.of("vent", fmt.Sprintf("hole: {bore: %g mm}", d.num("hole", 5, 60)), "breather: {opens_in: 5 mbar, opens_out: 20 mbar, bore: 50 mm}", "pad: {pressure: 20 mbar(g), capacity: 30 m3/h}")
		more := ""
		if d.chance("second vent", 15) {
			more = fmt.Sprintf(", %s2: {hole: {bore: 10 mm}}", vent)
		}
		d.say("    cover: {vents: {%s: {%s}%s}, withstands: {vacuum: 20 mbar, pressure: 50 mbar}}\n", vent, kind, more)
	case d.chance("sealed", 6):
		d.covered[tag] = true
		d.say("    cover: {gas: {pressure: 20 mbar(g), temperature: 15 °C}}\n")
	case d.chance("rim", 40):
		d.say("    rim: %g m\n", d.num("rim", 1.55, 1.6))
		if len(d.vessels) > 1 && d.chance("spills to", 40) {
			d.say("    spills_to: %s\n", d.vessels[0])
		}
	}
	if !d.covered[tag] && d.chance("inflow", 30) {
		d.say("    inflow: [[0 s, %g m3/h], [20 min, %g m3/h], [20 min, %g m3/h], [40 min, 0 m3/h]]\n", d.num("q1", 0, 10), d.num("q2", 0, 10), d.num("q3", 0, 30))
	}
	if !d.covered[tag] && d.chance("batch", 10) {
		id := "b-" + tag
		d.batches = append(d.batches, id)
		d.say("    batches: [{id: %s, at: %d min, volume: %g m3, over: %d min}]\n", id, d.whole("batch at", 0, 15), d.num("batch", 0.05, 1), d.whole("over", 1, 10))
	}
}

// beyond draws an outside point.
func (d *drawn) beyond(tag string) {
	d.outs = append(d.outs, tag)
	z := d.num("elevation", -2, 2)
	kind := d.of("beyond", "free_fall", "gully", "water", "tie_in")
	switch kind {
	case "free_fall":
		d.free = append(d.free, tag)
		d.say("  %s: {free_fall: {elevation: %g m}}\n", tag, z)
	case "gully":
		d.free = append(d.free, tag)
		d.say("  %s: {gully: {elevation: %g m, capacity: 2 L/s}}\n", tag, z)
	case "water":
		d.say("  %s: {water: {surface: [[0 min, %g m], [%d min, %g m]]}}\n", tag, z, d.minutes, z+d.num("tide", -1, 1))
	default:
		d.say("  %s: {tie_in: {elevation: %g m, pressure: %g bar(g)}}\n", tag, z, d.num("tie-in", 0, 0.4))
	}
}

// join draws the lines: a way of joining first, then some more between anything.
func (d *drawn) join() {
	v, all := d.vessels, append(append(append([]string{}, d.vessels...), d.tees...), d.outs...)
	pick := func(name string, from []string) string { return from[d.whole(name, 0, len(from)-1)] }
	for i, tee := range d.tees { // a tee that liquid cannot reach has no pressure
		d.draw(pick("feeds", v), tee)
		if i > 0 && d.chance("header", 60) {
			d.draw(d.tees[i-1], tee)
		}
	}
	switch d.of("how", "chain", "ring", "tree", "header", "grid", "any") {
	case "chain":
		for i := 1; i < len(v); i++ {
			d.draw(v[i-1], v[i])
		}
	case "ring":
		for i := range v {
			if len(v) > 2 || i > 0 {
				d.draw(v[i], v[(i+1)%len(v)])
			}
		}
	case "tree":
		for i := 1; i < len(v); i++ {
			d.draw(v[i], v[d.whole("parent", 0, i-1)])
		}
	case "header":
		for i := range v {
			if len(d.tees) > 0 {
				d.draw(v[i], d.tees[d.whole("tee", 0, len(d.tees)-1)])
			}
		}
	case "grid":
		for i := range v {
			if i%2 == 0 && i+1 < len(v) {
				d.draw(v[i], v[i+1])
			}
			if i+2 < len(v) {
				d.draw(v[i], v[i+2])
			}
		}
	}
	d.draw(pick("drained", append(append([]string{}, v...), d.tees...)), pick("drain", d.outs))
	for range d.whole("more", 0, len(v)) {
		if a, b := pick("from", all), pick("to", all); a != b && !(a[0] == 'X' && b[0] == 'X') {
			d.draw(a, b)
		}
	}
}

func (d *drawn) pipe() string {
	inertia := ""
	if d.chance("inertia", 12) {
		inertia = ", inertia: yes"
	}
	return fmt.Sprintf("{pipe: {length: %g m, bore: %g mm, %s%s}}", d.num("length", 1, 60), d.num("bore", 20, 150), d.of("wall", "roughness: 0.05 mm", "roughness: 0.5 mm", "friction: 0.02"), inertia)
}

func (d *drawn) valve() string {
	tag := fmt.Sprintf("VA-%d", len(d.valves))
	d.valves = append(d.valves, tag)
	more := ""
	if d.chance("closes", 15) {
		more = ", closes: inherent"
	}
	if d.chance("leaks", 10) {
		more += ", leaks: 0.1 %"
	}
	return fmt.Sprintf("{valve: {tag: %s, kv: %g, trim: %s, open: %d %%, stroke: %g s%s}}", tag, d.num("kv", 5, 100), d.of("trim", "linear", "equal_percentage", "butterfly", "ball", "quick_opening"),
		d.whole("open", 0, 2)*50, d.num("stroke", 0, 40), more)
}

// draw writes a line between two things.
func (d *drawn) draw(from, to string) {
	if from[0] == 'X' && contains(d.free, from) { // a free fall only receives
		from, to = to, from
	}
	if from[0] == 'X' && contains(d.free, from) {
		return
	}
	ports, bore := "", true
	if from[0] == 'V' {
		switch d.whole("leaves", 0, 9) {
		case 0, 1:
			ports += fmt.Sprintf("leaves: {centre: %g m}, ", d.num("centre", 0.1, 0.6))
		case 2:
			ports += fmt.Sprintf("leaves: {dip: %g m}, ", d.num("dip", 0.02, 0.6))
		case 3:
			ports += fmt.Sprintf("leaves: {invert: %g m}, ", d.num("invert", 0.02, 0.6))
		}
	}
	if to[0] == 'V' {
		switch d.whole("enters", 0, 5) {
		case 0, 1:
			ports += fmt.Sprintf("enters: {centre: %g m}, ", d.num("enters at", 0.1, 1.45))
		case 2:
			ports += fmt.Sprintf("enters: {dip: %g m}, ", d.num("enters dip", 0.05, 0.5))
		}
	}
	if d.chance("full", 20) {
		ports += "inlet: full, "
	}
	if d.chance("entry", 10) {
		ports += fmt.Sprintf("entry: %g, ", d.num("k entry", 0, 1))
	}
	var parts []string
	switch {
	case from[0] == 'V' && !d.covered[to] && d.chance("pump", 10):
		parts = []string{d.pump(from, to), d.pipe()}
		if d.chance("with check", 50) {
			parts = append(parts, "{check_valve: {kv: 60}}")
		}
	case from[0] == 'V' && d.chance("wall", 8):
		bore = false
		parts = []string{d.of("opening", "{orifice: {diameter: 30 mm, cd: 0.62}}", "{nozzle: {diameter: 25 mm, type: rounded}}", "{resistance: {quadratic: 40000 s2/m5}}", "{resistance: {linear: 200 s/m2}}")}
	default:
		parts = []string{d.pipe()}
	}
	if bore {
		if d.chance("valve", 55) {
			parts = append(parts, d.valve())
		}
		if d.chance("check", 12) {
			parts = append(parts, d.of("check kind", "{check_valve: {kv: 60}}", "{check_valve: {kv: 25, cracks_at: 20 mbar}}"))
		}
		if d.chance("fittings", 25) {
			parts = append(parts, fmt.Sprintf("{fittings: {elbow_90: %d, k: %g}}", d.whole("elbows", 0, 4), d.num("k", 0, 5)))
		}
		if d.chance("plate", 8) {
			parts = append(parts, "{orifice: {diameter: 18 mm, cd: 0.62}}")
		}
		if len(d.lines) < 12 && d.chance("high point", 10) {
			vent := ""
			if d.chance("vented", 50) {
				tag := fmt.Sprintf("AV-%d", len(d.air))
				d.air = append(d.air, tag)
				vent = fmt.Sprintf(", vent: {tag: %s, open: %s}", tag, d.of("av open", "yes", "no"))
			}
			parts = append(parts, fmt.Sprintf("{high_point: {elevation: %g m%s}}", d.num("crest", 1, 6), vent), d.pipe())
		}
	}
	d.write(from, to, ports, parts...)
}

func contains(all []string, one string) bool {
	for _, s := range all {
		if s == one {
			return true
		}
	}
	return false
}

func (d *drawn) pump(from, to string) string {
	tag := fmt.Sprintf("P-%d", len(d.pumps))
	d.pumps = append(d.pumps, tag)
	mode := d.of("mode", fmt.Sprintf("mode: auto, starts: {level: %s, above: 0.8 m}, stops: {level: %s, below: 0.3 m}", from, from), "mode: on", "mode: off")
	if to[0] != 'T' && d.chance("rate", 40) { // a pump of a steady rate into a tee with all paths shut is a burst pipe
		return fmt.Sprintf("{pump: {tag: %s, rate: 6 m3/h, %s}}", tag, mode)
	}
	return fmt.Sprintf("{pump: {tag: %s, curve: [[0 m3/h, 9 m], [10 m3/h, 6 m], [20 m3/h, 2 m]], when_stopped: %s, %s}}", tag, d.of("stopped", "shut", "passes"), mode)
}

func (d *drawn) write(from, to, ports string, parts ...string) {
	tag := fmt.Sprintf("L%d", d.line)
	d.lines = append(d.lines, tag)
	d.say("  %s: {from: %s, to: %s, %sparts: [%s]}\n", tag, from, to, ports, strings.Join(parts, ", "))
	d.line++
}

// weirs draws overflows into the open and from vessel to vessel.
func (d *drawn) weirs() {
	kinds := []string{"{weir: {rectangular: {width: 0.3 m, c: 1.7}}}", "{weir: {v_notch: {angle: 90 deg}}}", "{weir: {broad_crested: {width: 0.3 m}}}"}
	for _, v := range d.vessels {
		if d.covered[v] || !d.chance("weir", 20) {
			continue
		}
		to := ""
		if len(d.free) > 0 && d.chance("out", 60) {
			to = d.free[0]
		} else if w := d.vessels[0]; w != v && !d.covered[w] {
			to = w
		}
		if to == "" {
			continue
		}
		parts := []string{d.of("weir kind", kinds...)}
		if d.chance("overflow pipe", 30) {
			parts = append(parts, "{pipe: {length: 4 m, bore: 80 mm, roughness: 0.05 mm}}")
		}
		d.write(v, to, fmt.Sprintf("leaves: {crest: %g m}, ", d.num("sill", 0.5, 1.5)), parts...)
	}
}

// plan draws what people do, and what goes wrong.
func (d *drawn) plan() {
	at := func() int { return d.whole("at", 0, 60*d.minutes) }
	var steps []string
	step := func(format string, a ...any) {
		steps = append(steps, fmt.Sprintf("{id: s%d, ", len(steps))+fmt.Sprintf(format, a...)+"}")
	}
	for _, v := range d.valves {
		travel := d.whole("travel", 0, 10) * 10
		switch d.whole("trigger", 0, 5) {
		case 0:
			step("when: {level: %s, %s: %g m}, valve: %s, to: %d %%, optional: yes", d.vessels[0], d.of("side", "above", "below"), d.num("bound", 0.2, 1.4), v, travel)
		case 1:
			if len(steps) > 0 {
				step("after: s%d, wait: %d min, valve: %s, to: %d %%, optional: yes", len(steps)-1, d.whole("wait", 0, 10), v, travel)
			}
		case 2:
			step("at: %d s, valve: %s, to: %d %%, over: %d s", at(), v, travel, d.whole("over", 1, 300))
		default:
			step("at: %d s, valve: %s, to: %d %%", at(), v, travel)
		}
	}
	for _, p := range d.pumps {
		if d.chance("pump step", 40) {
			step("at: %d s, pump: %s, to: %s", at(), p, d.of("pump to", "on", "off"))
		}
	}
	for _, a := range d.air {
		if d.chance("vent step", 50) {
			step("at: %d s, vent: %s, to: %s", at(), a, d.of("vent to", "open", "shut"))
		}
	}
	for _, b := range d.batches {
		if d.chance("cancel", 30) {
			step("at: %d s, cancel: %s", d.whole("cancel at", 0, 600), b)
		}
	}
	if !d.covered[d.vessels[0]] && d.chance("inflow step", 20) {
		step("at: %d s, inflow: %s, to: %g m3/h", at(), d.vessels[0], d.num("inflow to", 0, 8))
	}
	if len(steps) > 0 {
		d.say("steps:\n")
		for _, s := range steps {
			d.say("  - %s\n", s)
		}
	}
	var upsets []string
	upset := func(format string, a ...any) { upsets = append(upsets, fmt.Sprintf(format, a...)) }
	for _, p := range d.pumps {
		if d.chance("fails", 15) {
			upset("{pump: %s, fails_at: %d s}", p, at())
		}
	}
	for _, v := range d.valves {
		if d.chance("sticks", 5) {
			upset("{valve: %s, sticks_at: %d %%}", v, d.whole("stuck", 0, 10)*10)
		}
	}
	for _, v := range d.vents {
		if d.chance("blocked", 10) {
			upset("{vent: %s, blocked: %d %%}", v, d.whole("share", 5, 10)*10)
		}
	}
	if d.chance("fouls", 10) {
		upset("{line: L0, extra_k: 8, after_passing: %g m3}", d.num("passes", 0, 1))
	}
	if len(upsets) > 0 {
		d.say("upsets:\n")
		for _, u := range upsets {
			d.say("  - %s\n", u)
		}
	}
}
