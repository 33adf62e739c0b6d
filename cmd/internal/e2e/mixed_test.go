package e2e

import (
	"context"
	"fmt"
	"math"
	"math/rand/v2"
	"strings"
	"testing"

	"headfall/network"
	"headfall/scenarios"
)

// mixed is a works under the pen: houses of ten vessels on terraces, no two lines alike.
type mixed struct {
	r                                            *rand.Rand
	vessels, tees, outside, lines, steps, limits strings.Builder
	moves                                        int
}

// mixedOf is a works of n vessels, n a multiple of ten, as plants are rather than as solvers like them: every line has its own bore, length, roughness, fittings and
// elevations, most have valves that people move by the clock in rounds; there are closed vessels that breathe by small holes, siphons, pumps between levels,
// headers, overflows, and a yard main that gathers the streets of five houses. The same n gives the same text.
func mixedOf(n int) string {
	m := &mixed{r: rand.New(rand.NewPCG(7, uint64(n)))}
	houses := n / 10
	for h := range houses {
		m.house(h, houses)
	}
	m.yard((houses + 4) / 5)
	head := "headfall: 1\ntitle: Works of many houses\nrun_for: 8 h\nreport_every: 10 min\nassume: {doubts: none}\n" +
		"liquid: {stated: {name: rinse, density: 1004 kg/m3, viscosity: 1.2 mPa.s, vapour_pressure: 1.9 kPa(a)}}\n"
	return head + "vessels:\n" + m.vessels.String() + "tees:\n" + m.tees.String() + "outside:\n" + m.outside.String() + "lines:\n" + m.lines.String() +
		"steps:\n" + m.steps.String() + "limits:\n" + m.limits.String()
}

// num draws a number to so many decimals.
func (m *mixed) num(lo, hi float64, decimals int) float64 {
	p := math.Pow(10, float64(decimals))
	return math.Round(p*(lo+(hi-lo)*m.r.Float64())) / p
}

func (m *mixed) of(all ...string) string { return all[m.r.IntN(len(all))] }

// vessel writes one; more is what stands after its level.
func (m *mixed) vessel(tag, shape string, base, level float64, more string) {
	fmt.Fprintf(&m.vessels, "  %s: {shape: {%s}, base: %.2f m, level: %.2f m%s}\n", tag, shape, base, level, more)
}

// line writes one; ends is what stands of its ends, last a part behind its pipes.
func (m *mixed) line(tag, from, to, ends string, parts ...string) {
	fmt.Fprintf(&m.lines, "  %s: {from: %s, to: %s%s, parts: [%s]}\n", tag, from, to, ends, strings.Join(parts, ", "))
}

// pipe is a pipe with its fittings.
func (m *mixed) pipe(lo, hi, bore float64) string {
	return fmt.Sprintf("{pipe: {length: %g m, bore: %g mm, roughness: %g mm}}, {fittings: {elbow_90: %d, elbow_45: %d, k: %g}}",
		m.num(lo, hi, 1), m.num(0.92*bore, 1.08*bore, 1), m.num(0.03, 0.15, 3), 1+m.r.IntN(4), m.r.IntN(3), m.num(0.1, 0.9, 2))
}

func (m *mixed) valve(tag string, kv float64, open int) string {
	return fmt.Sprintf("{valve: {tag: %s, kv: %g, trim: %s, open: %d %%, normally: %d %%, stroke: %d s}}",
		tag, m.num(0.9*kv, 1.1*kv, 0), m.of("ball", "butterfly", "equal_percentage", "linear"), open, open, 4+m.r.IntN(50))
}

// move orders a valve at some five minutes between two hours.
func (m *mixed) move(tag string, lo, hi float64, to int) {
	m.moves++
	fmt.Fprintf(&m.steps, "  - {id: m%d, at: %d min, who: crew, valve: %s, to: %d %%}\n", m.moves, 5*m.r.IntN(int(12*(hi-lo)))+int(60*lo), tag, to)
}

// house writes ten vessels: three tanks and two closed ones on two headers, a siphon, a head tank, two basins, and a sump with its pump.
func (m *mixed) house(h, houses int) {
	tag := func(name string) string { return fmt.Sprintf("%s-%d", name, h) }
	z := float64(10 - 2*(h%5)) // terraces
	for i := range 3 {
		t := fmt.Sprintf("TK%d-%d", i, h)
		shape := fmt.Sprintf("upright_cylinder: {diameter: %g m, straight: %g m, bottom: %s}", m.num(1.8, 3, 1), m.num(2.4, 3.2, 1), m.of("{cone: {angle: 90 deg}}", "torispherical", "ellipsoidal", "flat"))
		m.vessel(t, shape, z+m.num(6, 8, 2), m.num(1.4, 2.3, 2), "")
		m.line("L"+t, t, tag("HA"), "", m.pipe(4, 18, 66), m.valve("V"+t, 80, 0))
		m.move("V"+t, 0, 4, 20+5*m.r.IntN(12))
		m.move("V"+t, 4, 7, 5*m.r.IntN(3))
	}
	m.vessel(tag("DM"), fmt.Sprintf("lying_cylinder: {diameter: %g m, length: %g m, ends: ellipsoidal}", m.num(1.6, 2.2, 1), m.num(3, 6, 1)), z+m.num(5, 6, 2), m.num(1, 1.5, 2),
		fmt.Sprintf(", cover: {vents: {%s: {hole: {bore: %g mm}}}}", tag("VH"), m.num(5, 30, 0)))
	m.vessel(tag("CL"), fmt.Sprintf("upright_cylinder: {diameter: %g m, height: %g m}", m.num(1.6, 2.6, 1), m.num(2.4, 3, 1)), z+m.num(5, 6, 2), m.num(1.2, 2.2, 2),
		fmt.Sprintf(", cover: {vents: {%s: {breather: {opens_in: %g mbar, opens_out: %g mbar, bore: %g mm}}}}", tag("VB"), m.num(3, 8, 1), m.num(10, 25, 1), m.num(15, 50, 0)))
	for _, t := range []string{tag("DM"), tag("CL")} {
		m.line("L"+t, t, tag("HB"), "", m.pipe(4, 18, 78), m.valve("V"+t, 100, 0))
		m.move("V"+t, 0, 5, 20+5*m.r.IntN(12))
	}
	m.vessel(tag("SP"), m.of("sphere: {diameter: 2.4 m}", "frustum: {bottom: {diameter: 1 m}, top: {diameter: 2.4 m}, height: 2.6 m}"), z+m.num(4, 5, 2), m.num(1.3, 2, 2), "")
	m.line("L"+tag("SP"), tag("SP"), tag("RA"), ", enters: {centre: 2.3 m}", m.pipe(2, 6, 53),
		fmt.Sprintf("{high_point: {elevation: %.2f m}}", z+m.num(5, 5.6, 2)), m.pipe(4, 9, 53), m.valve("V"+tag("SP"), 50, 0))
	m.move("V"+tag("SP"), 0, 5, 20+5*m.r.IntN(12))
	m.vessel(tag("HT"), fmt.Sprintf("box: {length: %g m, width: %g m, height: 2 m}", m.num(1, 3, 1), m.num(1, 2, 1)), z+m.num(7, 8, 2), m.num(0.8, 1.5, 2),
		fmt.Sprintf(", inflow: [[0 h, %g m3/h], [4 h, %g m3/h], [8 h, 0 m3/h]]", m.num(0.5, 2, 1), m.num(0.5, 3, 1)))
	m.line("L"+tag("HT"), tag("HT"), tag("RB"), ", enters: {centre: 2.3 m}", m.pipe(6, 14, 41), fmt.Sprintf("{orifice: {diameter: %g mm, cd: 0.61}}", m.num(16, 24, 1)))

	for _, t := range []string{tag("RA"), tag("RB")} {
		m.vessel(t, fmt.Sprintf("box: {length: %g m, width: %g m, height: 2.5 m}", m.num(3, 5, 1), m.num(2, 3.5, 1)), z+m.num(1, 1.4, 2), m.num(0.3, 0.9, 2), "")
	}
	for _, t := range [][2]string{{"HA", "RA"}, {"HB", "RB"}} {
		fmt.Fprintf(&m.tees, "  %s: {elevation: %.2f m}\n", tag(t[0]), z+4.2)
		m.line("L"+tag(t[0]), tag(t[0]), tag(t[1]), ", enters: {centre: 2.3 m}", m.pipe(8, 30, 108))
	}
	m.line("LH"+tag("E"), tag("HA"), tag("HB"), "", m.pipe(3, 9, 78), m.valve("VE"+tag("H"), 110, 0))
	m.move("VE"+tag("H"), 1, 6, 100)
	m.line("L"+tag("EQ"), tag("RA"), tag("RB"), "", m.pipe(3, 8, 154))
	fmt.Fprintf(&m.outside, "  %s: {gully: {elevation: %.2f m, capacity: 10 L/s}}\n", tag("GY"), z+2.5)
	m.line("O"+tag("RA"), tag("RA"), tag("GY"), fmt.Sprintf(", leaves: {crest: %.2f m}", m.num(2, 2.2, 2)), "{weir: {rectangular: {width: 0.6 m, c: 1.7}}}")
	fmt.Fprintf(&m.limits, "  - {level: %s, below: 2.4 m}\n", tag("RA"))

	m.vessel(tag("SU"), fmt.Sprintf("box: {length: %g m, width: 2.5 m, height: 2.4 m}", m.num(2.5, 4, 1)), z-m.num(1.4, 1.8, 2), m.num(0.4, 0.8, 2), "")
	m.line("L"+tag("RB"), tag("RB"), tag("SU"), ", enters: {centre: 2 m}", m.pipe(6, 16, 90), m.valve("V"+tag("RB"), 120, 40))
	m.move("V"+tag("RB"), 1, 7, 40+5*m.r.IntN(12))
	if h%5 != 4 && h+1 < houses { // the pump lifts to the next house's head tank; that house stands lower
		m.pumped(h, fmt.Sprintf("RA-%d", h+1), ", enters: {centre: 2.3 m}")
		m.line("L"+tag("RA"), tag("RA"), fmt.Sprintf("RA-%d", h+1), ", enters: {centre: 2.3 m}", m.pipe(20, 60, 78), m.valve("V"+tag("RA"), 90, 0))
	} else {
		fmt.Fprintf(&m.outside, "  %s: {free_fall: {elevation: %.2f m}}\n", tag("SW"), z+1)
		m.pumped(h, tag("SW"), "")
		m.line("L"+tag("RA"), tag("RA"), fmt.Sprintf("Y%d", h/5), "", m.pipe(15, 40, 90), m.valve("V"+tag("RA"), 110, 0), "{check_valve: {kv: 150}}")
	}
	m.move("V"+tag("RA"), 0, 6, 20+5*m.r.IntN(9))
}

// pumped writes the pump of a sump with its rising main.
func (m *mixed) pumped(h int, to, ends string) {
	su, p := fmt.Sprintf("SU-%d", h), fmt.Sprintf("P-%d", h)
	m.line("R"+p, su, to, ends,
		fmt.Sprintf("{pump: {tag: %s, curve: [[0 m3/h, %g m], [20 m3/h, 8 m], [45 m3/h, 4 m]], mode: auto, starts: {level: %s, above: %.2f m}, stops: {level: %s, below: %.2f m}}}",
			p, m.num(9, 11, 1), su, m.num(0.9, 1.3, 2), su, m.num(0.3, 0.5, 2)),
		"{check_valve: {kv: 110}}", m.pipe(10, 40, 90))
}

// yard writes the main that gathers the streets and ends in the river.
func (m *mixed) yard(streets int) {
	fmt.Fprintf(&m.outside, "  RIVER: {water: {surface: [[0 h, 0.4 m], [6 h, 1.6 m], [8 h, 1.1 m]]}}\n")
	for i := range streets {
		to := "RIVER"
		if i+1 < streets {
			to = fmt.Sprintf("Y%d", i+1)
		}
		fmt.Fprintf(&m.tees, "  Y%d: {elevation: 0.5 m}\n", i)
		m.line(fmt.Sprintf("Y%d-M", i), fmt.Sprintf("Y%d", i), to, "", m.pipe(20, 50, 300))
	}
}

// TestMixedPlants holds the drawn works to what is asked of a plant: no fault, a run to the end, closed books, and work that is much the same at every size.
func TestMixedPlants(t *testing.T) {
	for _, n := range []int{10, 100} {
		text := mixedOf(n)
		if text != mixedOf(n) {
			t.Errorf("%d vessels are not drawn the same way twice", n)
		}
		p, err := scenarios.Load("plant.yaml", []byte(text), scenarios.Options{})
		if err != nil {
			t.Fatal(err)
		}
		if len(p.Vessels) != n {
			t.Errorf("%d vessels instead of %d", len(p.Vessels), n)
		}
		r, err := compile(t, text, how{}).Run(context.Background(), network.RunOptions{})
		if err != nil || !r.Complete || r.Balance.Relative > 1e-12 {
			t.Errorf("%d vessels: %v, %+v", n, err, r.Balance)
		}
		t.Logf("%d: %+v", n, r.Work)
	}
}

// TestTightTolerance: headers whose lines take up flow at their lips once kept a run at a tolerance of 1e-9 from ever coming to its end.
func TestTightTolerance(t *testing.T) {
	text := mixedOf(10)
	usual, tight := run(t, text, how{}), run(t, text, how{tolerance: 1e-9})
	if tight.Work.Steps > 5*usual.Work.Steps {
		t.Errorf("%d steps, %d at the usual tolerance", tight.Work.Steps, usual.Work.Steps)
	}
	for tag, v := range usual.Vessels {
		near(t, "end of "+tag, v.EndLevel, tight.Vessels[tag].EndLevel, 1e-4)
	}
}
