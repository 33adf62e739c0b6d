package network

import (
	"fmt"
	"math"
	"math/rand/v2"
	"strings"
	"testing"

	"headfall/elements"
	"headfall/elements/elementtest"
	"headfall/integrate"
)

// made builds an element written as "kind {parameters}".
func made[E any](t testing.TB, room elements.Room, text string) E {
	t.Helper()
	kind, rest, _ := strings.Cut(text, " ")
	e, err := elementtest.Build(room, kind, rest)
	if err != nil {
		t.Fatal(err)
	}
	v, ok := e.(E)
	if !ok {
		t.Fatalf("%s is a %T", text, e)
	}
	return v
}

// sketch is a plant under construction.
type sketch struct {
	t testing.TB
	p *Plant
}

func newSketch(t testing.TB, liquid string) *sketch {
	return &sketch{t, &Plant{Gravity: 9.80665, Atmosphere: 101325, RunFor: 1e4, ReportEvery: 100, Liquid: made[elements.Liquid](t, elements.Liquids, liquid)}}
}

func (s *sketch) vessel(tag, shape string, base, level float64) *Vessel {
	kind, _, _ := strings.Cut(shape, " ")
	v := &Vessel{Tag: tag, Kind: kind, Element: made[elements.Shaped](s.t, elements.Shapes, shape), Base: base, Level: level,
		Contents: math.NaN(), Rim: math.NaN(), RimLength: math.NaN(), EmptyAt: math.NaN()}
	s.p.Vessels = append(s.p.Vessels, v)
	return v
}

func (s *sketch) cover(v *Vessel, gauge float64, vents ...string) {
	v.Cover = &Cover{Pressure: 101325 + gauge, Temperature: 288.15, Vacuum: math.NaN(), Overpress: math.NaN()}
	for i, text := range vents {
		kind, _, _ := strings.Cut(text, " ")
		v.Cover.Vents = append(v.Cover.Vents, &VesselVent{Tag: fmt.Sprintf("%s-v%d", v.Tag, i), Kind: kind, Vent: made[elements.Vent](s.t, elements.Vents, text)})
	}
}

func (s *sketch) tee(tag string) { s.p.Tees = append(s.p.Tees, &Tee{Tag: tag, Elevation: math.NaN()}) }

func (s *sketch) outside(tag, text string) *Outside {
	kind, _, _ := strings.Cut(text, " ")
	o := &Outside{Tag: tag, Kind: kind, Element: made[elements.Outsider](s.t, elements.Beyond, text)}
	s.p.Outside = append(s.p.Outside, o)
	return o
}

func (s *sketch) line(from, to string, parts ...string) *Line {
	l := &Line{Tag: fmt.Sprintf("L%d", len(s.p.Lines)), From: from, To: to, Entry: math.NaN(), Exit: math.NaN()}
	for i, text := range parts {
		kind, _, _ := strings.Cut(text, " ")
		l.Parts = append(l.Parts, &Fitted{Kind: elements.Lookup(elements.Parts, kind), Part: made[elements.Part](s.t, elements.Parts, text), Name: fmt.Sprintf("%s.%d", l.Tag, i)})
	}
	s.p.Lines = append(s.p.Lines, l)
	return l
}

// ready compiles the plant and puts a run at its start.
func (s *sketch) ready(method string) (*Model, *simulation) {
	s.t.Helper()
	if err := s.p.Refresh(); err != nil {
		s.t.Fatal(err)
	}
	if faults, _ := s.p.Validate(); len(faults) > 0 {
		s.t.Fatal(faults)
	}
	m, err := Compile(s.p, Options{Method: method})
	if err != nil {
		s.t.Fatal(err)
	}
	sim, err := m.simulation()
	if err != nil {
		s.t.Fatal(err)
	}
	if err := sim.begin(&RunOptions{}, false); err != nil {
		s.t.Fatal(err)
	}
	sim.sys.freeze(sim)
	return m, sim
}

// slopes compares every partial derivative at (t, y) with central differences of several widths; one of them must agree. Laws that are once
// differentiable have corners in their slopes: a difference across one is half-way, which the narrower ones avoid.
func slopes(t *testing.T, what string, s *system, at float64, y []float64) {
	t.Helper()
	n, m := s.Dim()
	f, g := make([]float64, n), make([]float64, m)
	ptr, cols := s.IntegralPattern()
	lin := &integrate.Linear{DfDy: make([]float64, len(s.Pattern().Row)), DgDy: make([]float64, len(cols)), DfDt: make([]float64, n), DgDt: make([]float64, m)}
	s.Linearise(at, y, f, g, lin)
	f2, g2 := make([]float64, n), make([]float64, m)
	s.Rates(at, y, f2, g2)
	size := make([]float64, n)
	for i := range f {
		if d := math.Abs(f[i] - f2[i]); !(d <= 1e-12*math.Abs(f[i])+1e-15) {
			t.Errorf("%s: f of %s is %g from Linearise, %g from Rates", what, s.unknownName(i), f[i], f2[i])
		}
		size[i] = math.Abs(f[i])
	}
	J := make([][]float64, n+m) // rows f then g, columns y then t
	for i := range J {
		J[i] = make([]float64, n+1)
	}
	pat := s.Pattern()
	for c := range n {
		for k := pat.Ptr[c]; k < pat.Ptr[c+1]; k++ {
			J[pat.Row[k]][c] += lin.DfDy[k]
		}
	}
	for r := range m {
		for k := ptr[r]; k < ptr[r+1]; k++ {
			J[n+r][cols[k]] += lin.DgDy[k]
		}
	}
	for i := range n {
		J[i][n] = lin.DfDt[i]
	}
	for i := range m {
		J[n+i][n] = lin.DgDt[i]
	}
	up, dn := make([]float64, n+m), make([]float64, n+m)
	z := append([]float64(nil), y...)
	ok := make([]bool, n+m)
	best := make([]float64, n+m)
	for c := range n + 1 {
		for i := range ok {
			ok[i], best[i] = false, math.NaN()
		}
		// Forward and backward differences that agree with each other show that no corner is near.
		for _, w := range []float64{1e-3, 1e-4, 1e-5, 1e-6, 1e-7, 1e-9} {
			tt, e := at, 0.0
			move := func(by float64, into []float64) {
				copy(z, y)
				tt = at
				if c == n {
					tt += by
				} else {
					z[c] += by
				}
				s.Rates(tt, z, into[:n], into[n:])
			}
			switch {
			case c == n:
				e = w * 10
			case c < len(s.stations):
				e = w * s.stations[c].full * 0.1
			case c >= s.teeRow && c < s.flowRow:
				e = w * 1e4
			default:
				e = w * math.Max(math.Abs(y[c]), 1e-3)
			}
			move(e, up)
			move(-e, dn)
			for i := range up {
				d := (up[i] - dn[i]) / (2 * e)
				floor := 4e-16 * (math.Abs(up[i]) + math.Abs(dn[i])) / e * 40
				if i < n && i >= s.teeRow && i < s.flowRow || i >= n || c >= s.teeRow && c < s.flowRow {
					floor += 5e-12
				}
				if c < len(s.stations) && len(s.tees) > 0 { // what keeps a tee without an open path solvable is in the slopes only
					_, byV := s.stations[c].shape.Level(y[c])
					floor += 3 * teeStiffness * (s.gamma*byV + math.Abs(s.stations[c].gasV))
				}
				if c == n || i < n {
					floor += 1e-9 * math.Abs(J[i][c])
				}
				if math.Abs(d-J[i][c]) <= 1e-4*math.Max(math.Abs(d), math.Abs(J[i][c]))+floor {
					ok[i] = true
				}
				if !(math.Abs(best[i]-J[i][c]) <= math.Abs(d-J[i][c])) {
					best[i] = d
				}
			}
		}
		for i := range ok {
			if !ok[i] {
				row, col := fmt.Sprint("g", i-n), "t"
				if i < n {
					row = s.unknownName(i)
				}
				if c < n {
					col = s.unknownName(c)
				}
				t.Errorf("%s: ∂%s/∂%s is %.8g, differences say %.8g", what, row, col, J[i][c], best[i])
			}
		}
	}
}

// bench is a plant with what is to be looked at, and states besides the random ones.
type bench struct {
	name   string
	liquid string
	build  func(s *sketch)
	move   map[string][2]float64 // actuator → from, to, over 100 s
	set    func(sim *simulation, y []float64)
	sets   []func(sim *simulation, y []float64)
}

func benches() []bench {
	const water = "water {temperature: 12 °C}"
	const box = "box {length: 2 m, width: 1 m, height: 3 m}"
	level := func(i int, h float64) func(*simulation, []float64) {
		return func(sim *simulation, y []float64) { y[i], _ = sim.sys.stations[i].shape.Volume(h) }
	}
	tees := func(pa float64) func(*simulation, []float64) {
		return func(sim *simulation, y []float64) {
			for i := sim.sys.teeRow; i < sim.sys.flowRow; i++ {
				y[i] = 101325 + pa
			}
		}
	}
	flows := func(q float64) func(*simulation, []float64) {
		return func(sim *simulation, y []float64) {
			for _, k := range sim.sys.inertial {
				if !sim.sys.lines[k].shut {
					y[sim.sys.lines[k].row] = q
				}
			}
		}
	}
	return []bench{
		{name: "pipe to a free fall", liquid: water, build: func(s *sketch) {
			s.vessel("A", "upright_cylinder {diameter: 1 m, height: 2 m, bottom: {cone: {depth: 0.4 m, outlet: 60 mm}}}", 1, 1)
			s.outside("X", "free_fall {elevation: 0 m}")
			s.line("A", "X", "pipe {length: 5 m, bore: 60 mm, roughness: 0.05 mm}", "fittings {elbow_90: 2, k: 1.2, bore: 60 mm}")
		}, sets: []func(*simulation, []float64){level(0, 0.001), level(0, 0.01), level(0, 0.03), level(0, 0.06), level(0, 1e-4)}},
		{name: "two vessels", liquid: water, build: func(s *sketch) {
			s.vessel("A", box, 0, 1)
			s.vessel("B", "sphere {diameter: 2 m}", 0.3, 1)
			s.line("A", "B", "pipe {length: 5 m, bore: 60 mm, roughness: 0.05 mm}", "pipe {length: 5 m, bore: 100 mm, roughness: 0.05 mm}")
		}, sets: []func(*simulation, []float64){level(0, 1.3), level(0, 1.30001), level(0, 1.2999), level(1, 0.01), level(0, 0)}},
		{name: "side mouths that uncover", liquid: water, build: func(s *sketch) {
			s.vessel("A", box, 0, 1)
			s.vessel("B", box, 0.2, 1)
			l := s.line("A", "B", "pipe {length: 5 m, bore: 100 mm, roughness: 0.05 mm}")
			l.Leaves, l.Enters = Port{Form: Centre, Height: 0.5, Given: true}, Port{Form: Invert, Height: 0.8, Given: true}
			l = s.line("A", "B", "orifice {width: 300 mm, height: 200 mm, cd: 0.6}")
			l.Leaves, l.Enters = Port{Form: Centre, Height: 0.7, Given: true}, Port{Form: Centre, Height: 0.4, Given: true}
			l = s.line("A", "B", "orifice {diameter: 80 mm, cd: 0.6}")
			l.Leaves = Port{Form: Dip, Height: 0.3, Given: true}
			l.InletFull = true
		}, sets: []func(*simulation, []float64){level(0, 0.5), level(0, 0.53), level(0, 0.46), level(0, 0.7), level(0, 0.75), level(1, 0.85), level(0, 0.302), level(0, 0.29)}},
		{name: "tall openings in a wall", liquid: water, build: func(s *sketch) {
			s.vessel("A", box, 0, 1)
			s.cover(s.vessel("B", box, 0.2, 1), 300, "hole {bore: 20 mm}")
			s.vessel("C", box, 0.1, 1)
			s.outside("X", "free_fall {elevation: 0.7 m}")
			s.outside("R", "water {surface: [[0 s, 0.5 m], [100 s, 1.5 m]]}")
			for _, part := range []string{"orifice {width: 300 mm, height: 400 mm, cd: 0.6}", "orifice {diameter: 400 mm, cd: 0.6}"} {
				l := s.line("A", "B", part)
				l.Leaves, l.Enters = Port{Form: Centre, Height: 0.7, Given: true}, Port{Form: Centre, Height: 0.5, Given: true}
				l = s.line("C", "A", part)
				l.Leaves, l.Enters = Port{Form: Centre, Height: 0.6, Given: true}, Port{Form: Centre, Height: 0.7, Given: true}
				s.line("A", "X", part).Leaves = Port{Form: Centre, Height: 0.7, Given: true}
				s.line("R", "C", part).Enters = Port{Form: Centre, Height: 0.6, Given: true}
			}
		}, sets: []func(*simulation, []float64){level(0, 0.51), level(0, 0.53), level(0, 0.9), level(0, 0.95), level(0, 1.29), level(0, 1.31), level(1, 0.4), level(2, 0.9001), level(2, 0.8), level(0, 0.49)}},
		{name: "valve that moves", liquid: water, build: func(s *sketch) {
			s.vessel("A", box, 1, 2)
			s.vessel("B", box, 0, 1)
			s.line("A", "B", "pipe {length: 5 m, bore: 60 mm, roughness: 0.05 mm}", "valve {tag: V-1, kv: 40, trim: equal_percentage, stroke: 100 s}")
			s.line("A", "B", "valve {tag: V-2, kv: 40, trim: butterfly, stroke: 100 s}", "pipe {length: 5 m, bore: 60 mm, roughness: 0.05 mm}")
			s.line("A", "B", "pipe {length: 5 m, bore: 60 mm, roughness: 0.05 mm}", "valve {tag: V-3, kv: 40, trim: ball, leaks: 1 %}", "valve {tag: V-4, k: 2, bore: 60 mm, trim: quick_opening}")
		}, move: map[string][2]float64{"V-1": {0.2, 0.9}, "V-2": {0.9, 0.1}, "V-3": {0, 1}, "V-4": {0.02, 0.03}},
			sets: []func(*simulation, []float64){level(0, 0.001), level(0, 1e-5), level(1, 2.9)}},
		{name: "thick liquid through a moving valve", liquid: "stated {name: syrup, density: 1300 kg/m3, viscosity: 800 mPa.s}", build: func(s *sketch) {
			s.vessel("A", box, 1, 2)
			s.outside("X", "free_fall {elevation: 0 m}")
			s.line("A", "X", "pipe {length: 5 m, bore: 60 mm, roughness: 0.05 mm}", "valve {tag: V-1, kv: 40, trim: linear}")
			s.line("A", "X", "orifice {diameter: 30 mm, cd: 0.6}")
		}, move: map[string][2]float64{"V-1": {0.2, 0.9}}},
		{name: "choked valve", liquid: "water {temperature: 90 °C}", build: func(s *sketch) {
			s.vessel("A", box, 1, 2)
			s.outside("M", "tie_in {elevation: 0 m, pressure: 6 bar(g)}")
			s.line("M", "A", "valve {tag: V-1, kv: 30, trim: ball, fl: 0.6}", "pipe {length: 2 m, bore: 80 mm, roughness: 0.05 mm}")
		}, move: map[string][2]float64{"V-1": {0.5, 0.9}}},
		{name: "check valves and pumps", liquid: water, build: func(s *sketch) {
			s.vessel("A", box, 0, 1)
			s.vessel("B", box, 0.5, 1)
			s.vessel("C", box, 3, 1)
			s.line("A", "B", "check_valve {tag: N-1, kv: 60}", "pipe {length: 5 m, bore: 60 mm, roughness: 0.05 mm}")
			s.line("B", "A", "check_valve {tag: N-2, kv: 60, cracks_at: 20 mbar}", "pipe {length: 5 m, bore: 60 mm, roughness: 0.05 mm}")
			s.line("B", "A", "check_valve {tag: N-3, kv: 60, leaks: 2 %}", "pipe {length: 5 m, bore: 60 mm, roughness: 0.05 mm}")
			s.line("A", "C", "pump {tag: P-1, curve: [[0 m3/h, 14 m], [20 m3/h, 11 m], [32 m3/h, 6 m]], mode: on}", "check_valve {tag: N-4, kv: 60}")
			s.line("A", "C", "pump {tag: P-2, rate: 15 m3/h, mode: on}")
			s.line("B", "C", "pump {tag: P-3, curve: [[0 m3/h, 14 m], [20 m3/h, 11 m]], when_stopped: passes}", "resistance {quadratic: 1500 s2/m5}")
		}, sets: []func(*simulation, []float64){level(0, 1.50002), level(0, 1.49998), level(0, 1.2), level(0, 1.7)}},
		{name: "weirs and rims", liquid: water, build: func(s *sketch) {
			a, b := s.vessel("A", box, 0, 2), s.vessel("B", box, 0, 1)
			a.Rim, a.SpillsTo = 2.5, "B"
			b.Rim = 2.6
			s.outside("X", "gully {elevation: 0 m, capacity: 6 L/s}")
			for _, w := range []string{"weir {rectangular: {width: 0.5 m, c: 1.7}}", "weir {v_notch: {angle: 90 deg}}", "weir {broad_crested: {width: 0.4 m}}",
				"weir {rectangular: {width: 0.5 m, channel_width: 1 m, crest_height: 0.5 m}}"} {
				s.line("A", "B", w).Leaves = Port{Form: Crest, Height: 1.6, Given: true}
			}
			s.line("A", "X", "weir {rectangular: {width: 0.5 m, c: 1.7}}", "pipe {length: 5 m, bore: 60 mm, roughness: 0.05 mm}").Leaves = Port{Form: Crest, Height: 1.8, Given: true}
			s.line("A", "X", "weir {rectangular: {width: 0.5 m, c: 1.7}}", "valve {tag: V-1, kv: 20}").Leaves = Port{Form: Crest, Height: 1.7, Given: true}
			s.line("B", "A", "weir {rectangular: {width: 0.5 m, cd: 0.6}}", "pipe {length: 5 m, bore: 100 mm, roughness: 0.05 mm}").Leaves = Port{Form: Crest, Height: 0.9, Given: true}
		}, move: map[string][2]float64{"V-1": {0.2, 0.9}}, sets: []func(*simulation, []float64){level(0, 2.7), level(1, 1.8), level(1, 2.0), level(1, 2.7), level(0, 1.605), level(0, 1.9), level(0, 1.0)}},
		{name: "tee of three with one way ends", liquid: water, build: func(s *sketch) {
			s.vessel("A", box, 1, 2)
			s.vessel("B", box, 0.5, 1)
			s.outside("X", "free_fall {elevation: 0.2 m}")
			s.tee("T")
			s.line("A", "T", "pipe {length: 5 m, bore: 60 mm, roughness: 0.05 mm}", "valve {tag: V-1, kv: 40, open: 0 %}")
			s.line("B", "T", "pipe {length: 5 m, bore: 60 mm, roughness: 0.05 mm}", "check_valve {tag: N, kv: 50}")
			s.line("T", "X", "pipe {length: 5 m, bore: 60 mm, roughness: 0.05 mm}")
			s.line("T", "A", "orifice {diameter: 20 mm, cd: 0.6}").Enters = Port{Form: Centre, Height: 0.5, Given: true}
		}, move: map[string][2]float64{"V-1": {0.3, 0.7}}, sets: []func(*simulation, []float64){tees(0), tees(3000), tees(20000), tees(-5000), level(1, 0.02), level(1, 0)}},
		{name: "chain of tees, shut", liquid: water, build: func(s *sketch) {
			s.vessel("A", box, 1, 2)
			s.vessel("B", box, 0.5, 1)
			s.tee("T")
			s.tee("U")
			s.line("A", "T", "valve {tag: V-1, kv: 40, open: 0 %}")
			s.line("T", "U", "pipe {length: 5 m, bore: 60 mm, roughness: 0.05 mm}")
			s.line("U", "B", "valve {tag: V-2, kv: 40, open: 0 %}")
		}, sets: []func(*simulation, []float64){tees(0), tees(3000)}},
		{name: "mass of the liquid", liquid: water, build: func(s *sketch) {
			s.vessel("A", box, 1, 2)
			s.vessel("B", box, 0.5, 1)
			s.outside("X", "free_fall {elevation: 0.2 m}")
			s.line("A", "B", "pipe {length: 50 m, bore: 100 mm, roughness: 0.05 mm, inertia: yes}", "valve {tag: V-1, kv: 100}")
			s.line("A", "X", "pipe {length: 50 m, bore: 100 mm, roughness: 0.05 mm, inertia: yes}")
			s.line("B", "A", "pipe {length: 50 m, bore: 100 mm, roughness: 0.05 mm, inertia: yes}", "check_valve {tag: N, kv: 50}")
			s.line("A", "B", "pipe {length: 50 m, bore: 100 mm, roughness: 0.05 mm, inertia: yes}", "valve {tag: V-2, kv: 100, open: 0 %}")
		}, move: map[string][2]float64{"V-1": {0.3, 0.9}}, sets: []func(*simulation, []float64){level(0, 0.05), level(1, 0.02), flows(1e-9), flows(-1e-9), flows(3e-8), flows(-3e-8), flows(-1e-4), flows(1e-6)}},
		{name: "tee of inertial lines", liquid: water, build: func(s *sketch) {
			s.vessel("A", box, 1, 2)
			s.vessel("B", box, 0.5, 1)
			s.vessel("C", box, 0, 1)
			s.tee("T")
			for _, tag := range []string{"A", "B", "C"} {
				s.line(tag, "T", "pipe {length: 50 m, bore: 100 mm, roughness: 0.05 mm, inertia: yes}", "valve {tag: V-"+tag+", kv: 100, open: 50 %}")
			}
		}, move: map[string][2]float64{"V-A": {0.3, 0.9}}},
		{name: "tee of inertial and other lines", liquid: water, build: func(s *sketch) {
			s.vessel("A", box, 1, 2)
			s.vessel("B", box, 0.5, 1)
			s.tee("T")
			s.line("A", "T", "pipe {length: 50 m, bore: 100 mm, roughness: 0.05 mm, inertia: yes}")
			s.line("B", "T", "pipe {length: 50 m, bore: 100 mm, roughness: 0.05 mm, inertia: yes}")
			s.line("T", "A", "pipe {length: 50 m, bore: 100 mm, roughness: 0.05 mm}")
		}},
		{name: "gas", liquid: water, build: func(s *sketch) {
			a := s.vessel("A", box, 1, 2)
			s.cover(a, 500, "hole {bore: 20 mm}", "breather {opens_in: 2 mbar, opens_out: 15 mbar, bore: 30 mm}")
			b := s.vessel("B", box, 0.5, 1)
			s.cover(b, -2000)
			c := s.vessel("C", box, 0, 1)
			s.cover(c, 0, "pad {pressure: 20 mbar(g), capacity: 60 m3/h}")
			s.line("A", "B", "pipe {length: 5 m, bore: 60 mm, roughness: 0.05 mm}")
			s.line("B", "C", "pipe {length: 5 m, bore: 60 mm, roughness: 0.05 mm}").Enters = Port{Form: Centre, Height: 0.9, Given: true}
			s.tee("T")
			for _, tag := range []string{"A", "B", "C"} {
				s.line(tag, "T", "pipe {length: 5 m, bore: 60 mm, roughness: 0.05 mm}")
			}
			s.line("A", "B", "weir {rectangular: {width: 0.5 m, c: 1.7}}").Leaves = Port{Form: Crest, Height: 1.8, Given: true}
		}, sets: []func(*simulation, []float64){level(0, 2.99), level(1, 2.9)}},
		{name: "air paths at balance", liquid: water, build: func(s *sketch) {
			s.cover(s.vessel("A", box, 1, 0.5), 0)
			s.cover(s.vessel("B", box, 1, 0.001), 0)
			s.cover(s.vessel("C", box, 1, 0.001), 0)
			s.vessel("D", box, 1.2, 0.5)
			s.line("A", "D", "weir {rectangular: {width: 0.2 m, c: 1.7}}").Leaves = Port{Form: Crest, Height: 1.6, Given: true}
			s.line("D", "B", "weir {rectangular: {width: 0.2 m, c: 1.7}}", "pipe {length: 3 m, bore: 60 mm, roughness: 0.05 mm}").Leaves = Port{Form: Crest, Height: 0.9, Given: true}
			s.outside("X", "free_fall {elevation: 0 m}")
			s.line("A", "X", "weir {rectangular: {width: 0.3 m, c: 1.7}}").Leaves = Port{Form: Crest, Height: 1.2, Given: true}
			s.line("B", "X", "pipe {length: 3 m, bore: 60 mm, roughness: 0.05 mm}")
			s.line("C", "X", "weir {v_notch: {angle: 90 deg}}", "pipe {length: 3 m, bore: 60 mm, roughness: 0.05 mm}").Leaves = Port{Form: Crest, Height: 1.4, Given: true}
		}, sets: []func(*simulation, []float64){level(0, 1.3), level(2, 1.5), level(1, 0.02), level(3, 1.5), level(3, 1.3)}},
		{name: "weirs under gas, and full vessels", liquid: water, build: func(s *sketch) {
			s.cover(s.vessel("A", box, 0, 2), 800)
			s.cover(s.vessel("B", box, 0.1, 1), -300, "hole {bore: 20 mm}")
			c := s.vessel("C", box, 0, 1)
			c.Rim = 2.9
			s.outside("X", "gully {elevation: 0 m, capacity: 6 L/s}")
			for _, ends := range [][2]string{{"A", "B"}, {"B", "C"}, {"C", "A"}, {"A", "X"}} {
				s.line(ends[0], ends[1], "weir {rectangular: {width: 0.5 m, c: 1.7}}").Leaves = Port{Form: Crest, Height: 1.6, Given: true}
			}
			s.line("A", "X", "weir {rectangular: {width: 0.5 m, c: 1.7}}", "pipe {length: 5 m, bore: 60 mm, roughness: 0.05 mm}").Leaves = Port{Form: Crest, Height: 1.8, Given: true}
		}, sets: []func(*simulation, []float64){level(0, 2.999), level(0, 3.001), level(1, 2.9985), level(1, 1.8), level(0, 1.605), level(1, 1.75), level(2, 2.2)}},
		{name: "high points", liquid: water, build: func(s *sketch) {
			s.vessel("A", box, 0, 2)
			s.vessel("B", box, -12, 1)
			s.line("A", "B", "pipe {length: 5 m, bore: 60 mm, roughness: 0.05 mm}", "high_point {elevation: 3 m, primed: yes}", "pipe {length: 5 m, bore: 60 mm, roughness: 0.05 mm}")
			s.line("A", "B", "pipe {length: 5 m, bore: 60 mm, roughness: 0.05 mm}", "high_point {elevation: 1.5 m, vent: {tag: AV, open: yes}}", "pipe {length: 5 m, bore: 60 mm, roughness: 0.05 mm}")
			s.line("B", "A", "pipe {length: 5 m, bore: 60 mm, roughness: 0.05 mm}", "high_point {elevation: 1.0 m, primed: no}", "pipe {length: 5 m, bore: 60 mm, roughness: 0.05 mm}")
		}, sets: []func(*simulation, []float64){level(0, 1.50002), level(0, 1.00003), level(0, 0.1)}},
		{name: "a tide", liquid: water, build: func(s *sketch) {
			s.vessel("A", box, 0, 2)
			s.outside("R", "water {surface: [[0 s, 1 m], [100 s, 3 m]]}")
			s.outside("M", "tie_in {elevation: 0 m, pressure: 0.3 bar(g)}")
			s.tee("T")
			s.line("A", "T", "pipe {length: 5 m, bore: 60 mm, roughness: 0.05 mm}")
			s.line("R", "T", "pipe {length: 5 m, bore: 60 mm, roughness: 0.05 mm}")
			s.line("M", "T", "pipe {length: 5 m, bore: 60 mm, roughness: 0.05 mm}")
			s.line("A", "R", "pipe {length: 5 m, bore: 60 mm, roughness: 0.05 mm, inertia: yes}")
			s.p.Vessels[0].Inflow = Rows{{0, 0.001}, {100, 0.004}}
		}},
		{name: "alike lines on one table", liquid: water, build: func(s *sketch) {
			for i := range 10 {
				s.vessel(fmt.Sprintf("A%d", i), box, float64(i%3)/3, 1)
			}
			for i := range 9 {
				s.line(fmt.Sprintf("A%d", i), fmt.Sprintf("A%d", i+1), "pipe {length: 5 m, bore: 60 mm, roughness: 0.05 mm}")
			}
		}},
	}
}

// TestJacobian holds ∂f/∂y, ∂g/∂y, ∂f/∂t and ∂g/∂t of whole plants to central differences, at the start, in states that were chosen, and in many at random.
func TestJacobian(t *testing.T) {
	for _, b := range benches() {
		t.Run(b.name, func(t *testing.T) {
			s := newSketch(t, b.liquid)
			b.build(s)
			_, sim := s.ready("")
			for tag, m := range b.move {
				a := &sim.sys.actuators[sim.sys.actuatorAt[tag]]
				a.from, a.to, a.t0, a.t1 = m[0], m[1], 0, 100
			}
			sim.sys.freeze(sim)
			start := append([]float64(nil), sim.y...)
			for i, k := range sim.sys.inertial {
				if !sim.sys.lines[k].shut {
					start[sim.sys.lines[k].row] = 0.003 * float64(1+i)
				}
			}
			slopes(t, "at the start", sim.sys, 40, start)
			for i, set := range b.sets {
				y := append([]float64(nil), start...)
				set(sim, y)
				slopes(t, fmt.Sprint("state ", i), sim.sys, 40, y)
			}
			r := rand.New(rand.NewPCG(1, 2))
			for i := range 60 {
				y := append([]float64(nil), start...)
				for k := range y {
					switch {
					case k < len(sim.sys.stations):
						y[k] = sim.sys.stations[k].full * r.Float64() * 0.98
						if r.IntN(5) == 0 {
							y[k] *= 0.01
						}
					case k < sim.sys.teeRow:
						y[k] *= 0.5 + r.Float64()
					case k < sim.sys.flowRow:
						y[k] = 101325 + 5e4*(r.Float64()-0.3)
					default:
						y[k] = 0.02 * r.NormFloat64()
					}
				}
				slopes(t, fmt.Sprint("random ", i), sim.sys, 20+0.7*float64(i), y)
			}
		})
	}
}
