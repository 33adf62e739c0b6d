package e2e

import (
	"fmt"
	"math"
	"strings"
	"testing"
)

// oscillation is two vessels joined by a pipe whose liquid has mass.
func oscillation(runFor string, d, areaA, areaB, high, length float64, friction string, extra ...string) string {
	return plant(runFor, append([]string{thin, fmt.Sprintf(`
vessels:
  A: {shape: {box: {length: %.17g m, width: 1 m, height: 4 m}}, base: 0 m, level: %.17g m}
  B: {shape: {box: {length: %.17g m, width: 1 m, height: 4 m}}, base: 0 m, level: %.17g m}
lines:
  L-1: {from: A, to: B, inlet: full, entry: 0, exit: 0, parts: [{pipe: {length: %g m, bore: %g m, friction: %s, inertia: yes}}]}`,
		areaA, 2+high, areaB, 2-high*areaA/areaB, length, d, friction)}, extra...)...)
}

// turns returns when a column turns, with parabolas through three samples, and what it is there.
func turns(time, v []float64) (at, peak []float64) {
	for i := 1; i+1 < len(v); i++ {
		if (v[i]-v[i-1])*(v[i+1]-v[i]) >= 0 || time[i] == time[i-1] || time[i+1] == time[i] {
			continue
		}
		h1, h2 := time[i]-time[i-1], time[i+1]-time[i]
		s1, s2 := (v[i]-v[i-1])/h1, (v[i+1]-v[i])/h2
		c := (s2 - s1) / (h1 + h2)
		b := s1 + c*h1 // slope at i
		at = append(at, time[i]-b/(2*c))
		peak = append(peak, v[i]-b*b/(4*c))
	}
	return at, peak
}

// D30 and D31: frictionless oscillations.
func TestOscillations(t *testing.T) {
	book := checks(t)
	for _, c := range []struct {
		id           string
		d, a, b, len float64
		runFor       string
		every        string
	}{
		{"D30", 0.5, circle(0.5), circle(0.5), 3, "14 s", "0.01 s"},
		{"D31", 0.3, 10, 20, 200, "1500 s", "1 s"},
	} {
		t.Run(c.id, func(t *testing.T) {
			period := 2 * math.Pi * math.Sqrt(c.len/(g0*circle(c.d)*(1/c.a+1/c.b)))
			book.HoldOne(t, c.id, 0, period)
			for _, h := range []how{{tolerance: 1e-9}, {}, {method: "bdf"}} {
				r := run(t, oscillation(c.runFor, c.d, c.a, c.b, 0.4, c.len, "1e-9", "report_every: "+c.every), h)
				at, peak := turns(r.Series.Time, r.Series.Level["A"])
				n := len(at) &^ 1
				if n < 8 {
					t.Fatalf("%d turns", n)
				}
				within(t, "period", (at[n-1]-at[1])/float64((n-2)/2), period, 1e-3)
				near(t, "amplitude at the end", math.Abs(peak[n-1]-2), 0.4, 0.4*0.003)
			}
		})
	}
}

// D32: a U-tube damped by a constant friction factor, swing after swing. The column is the pipe; the vessels are the tube's own bore.
func TestDampedTube(t *testing.T) {
	book := checks(t)
	text := oscillation("8 s", 0.05, circle(0.05), circle(0.05), 0.8, 6, "0.03", "report_every: 0.005 s")
	r := run(t, text, how{tolerance: 1e-9})
	_, peak := turns(r.Series.Time, r.Series.Level["A"])
	if len(peak) < 3 {
		t.Fatalf("%d swings", len(peak))
	}
	for i := range 3 {
		book.HoldOne(t, "D32", i, math.Abs(peak[i]-2))
	}
}

// D37: two vessels in series with linear outlets.
func TestLinearCascade(t *testing.T) {
	book := checks(t)
	r := run(t, plant("1500 s", thin, "report_every: 100 s", `
vessels:
  UP: {shape: {box: {length: 1 m, width: 1 m, height: 3 m}}, base: 5 m, level: 2 m}
  LOW: {shape: {box: {length: 1 m, width: 1 m, height: 3 m}}, base: 0 m, level: 0 m}
outside:
  AIR: {free_fall: {elevation: 0 m}}
lines:
  L-1: {from: UP, to: LOW, enters: {centre: 5 m}, inlet: full, parts: [{resistance: {linear: 600 s/m2}}]}
  L-2: {from: LOW, to: AIR, inlet: full, parts: [{resistance: {linear: 600 s/m2}}]}`), how{})
	v := r.Vessels["LOW"]
	book.HoldOne(t, "D37", 0, v.PeakLevel)
	book.HoldOne(t, "D37", 1, v.PeakAt)
	book.HoldOne(t, "D37", 2, at(t, r, r.Series.Level["LOW"], 1200))
	near(t, "peak level, exact", v.PeakLevel, 2/math.E, 1e-5)
	near(t, "time of the peak, exact", v.PeakAt, 600, 1)
}

// D39: two equal vessels in cascade with square-root outlets.
func TestSquareRootCascade(t *testing.T) {
	book := checks(t)
	k := 0.62 * circle(0.05) * math.Sqrt(2*g0)
	T := 2 * math.Sqrt(2) / k
	// The lower one runs dry to first order along √h; 11 mm to dry takes 2√h/k, and the last of the upper one is long through by then.
	text := plant(fmt.Sprintf("%.0f s", 1.4*T), thin, `
vessels:
  UP: {shape: {box: {length: 1 m, width: 1 m, height: 3 m}}, base: 5 m, level: 2 m}
  LOW: {shape: {box: {length: 1 m, width: 1 m, height: 3 m}}, base: 0 m, level: 0 m}
outside:
  AIR: {free_fall: {elevation: 0 m}}
lines:
  L-1: {from: UP, to: LOW, enters: {centre: 5 m}, inlet: full, parts: [{orifice: {diameter: 50 mm, cd: 0.62}}]}
  L-2: {from: LOW, to: AIR, inlet: full, parts: [{orifice: {diameter: 50 mm, cd: 0.62}}]}
milestones:
  - {name: upper, level: UP, below: 0.005 m}
steps:
  - {id: note, when: {level: UP, below: 0.005 m}, inflow: UP, to: 0 m3/h}
  - {id: low, after: note, when: {level: LOW, below: 0.011 m}, inflow: LOW, to: 0 m3/h}`)
	r := run(t, text, how{tolerance: 1e-9})
	v := r.Vessels["LOW"]
	book.HoldOne(t, "D39", 0, v.PeakLevel/2)
	book.HoldOne(t, "D39", 1, v.PeakAt/T)
	dry := milestone(t, r, "upper") + 2*math.Sqrt(0.005)/k // by its own closed form
	within(t, "upper dry", dry, T, 1e-6)
	s := step(t, r, "note")
	// from 5 mm in the upper one to dry there, by the exact course of the pair
	h2 := s.Levels["LOW"]
	u, w := math.Sqrt(0.005/2), math.Sqrt(h2/2)
	n := 2000 // v·dv/du = v − u, from u to 0
	x, y := u, w
	for i := range n {
		d := -u / float64(n)
		f := func(x, y float64) float64 { return (y - x) / y }
		k1 := f(x, y)
		k2 := f(x+d/2, y+d/2*k1)
		k3 := f(x+d/2, y+d/2*k2)
		k4 := f(x+d, y+d*k3)
		y += d / 6 * (k1 + 2*k2 + 2*k3 + k4)
		x = u + d*float64(i+1)
	}
	book.HoldOne(t, "D39", 2, y*y)
	book.HoldOne(t, "D39", 3, (done(t, r, "low")+2*math.Sqrt(0.011)/k)/T)
}

// Johansson's quadruple tank: parameters of X01, tanks 1 to 4.
var quad = struct{ area, out, split [4]float64 }{
	[4]float64{28, 32, 28, 32}, [4]float64{0.071, 0.057, 0.071, 0.057}, [4]float64{0.7 * 3.33 * 3, 0.6 * 3.35 * 3, 0.4 * 3.35 * 3, 0.3 * 3.33 * 3},
}

func quadruple(runFor string, level, inflow [4]float64, extra ...string) string {
	var b strings.Builder
	b.WriteString("vessels:\n")
	base := []float64{0, 0, 1, 1}
	for i := range 4 {
		fmt.Fprintf(&b, "  T%d: {shape: {box: {length: %g cm, width: 1 cm, height: 30 cm}}, base: %g m, level: %.17g cm, inflow: %s}\n", i+1, quad.area[i], base[i], level[i], rows(inflow[i]))
	}
	b.WriteString("outside:\n  PAN: {free_fall: {elevation: 0 m}}\nlines:\n")
	to := []string{"PAN", "PAN", "T1, enters: {centre: 1 m}", "T2, enters: {centre: 1 m}"}
	for i := range 4 {
		fmt.Fprintf(&b, "  L%d: {from: T%d, to: %s, inlet: full, parts: [{orifice: {area: %g cm2, cd: 1}}]}\n", i+1, i+1, to[i], quad.out[i])
	}
	return plant(runFor, append([]string{thin, "site: {gravity: 981 cm/s2}", b.String()}, extra...)...)
}

func rows(q float64) string { return fmt.Sprintf("%.17g cm3/s", q) }

// X01: steady levels at the minimum-phase point, reached from far away.
func TestQuadrupleTank(t *testing.T) {
	book := checks(t)
	r := run(t, quadruple("2 h", [4]float64{3, 20, 8, 0.2}, quad.split), how{})
	for i, tag := range []string{"T1", "T2", "T3", "T4"} {
		book.HoldOne(t, "X01", i, 100*r.Vessels[tag].EndLevel)
	}
	// The course there, against the reference integrator.
	ref := reference(func(_ float64, h, f []float64) {
		q := func(i int) float64 { return quad.out[i] * math.Sqrt(2*981*math.Max(h[i], 0)) }
		f[0] = (quad.split[0] + q(2) - q(0)) / quad.area[0]
		f[1] = (quad.split[1] + q(3) - q(1)) / quad.area[1]
		f[2] = (quad.split[2] - q(2)) / quad.area[2]
		f[3] = (quad.split[3] - q(3)) / quad.area[3]
	}, []float64{3, 20, 8, 0.2}, 0, 120, 24000)
	r = run(t, quadruple("120 s", [4]float64{3, 20, 8, 0.2}, quad.split), how{})
	for i, tag := range []string{"T1", "T2", "T3", "T4"} {
		near(t, tag+" at 120 s", 100*r.Vessels[tag].EndLevel, ref[i], 0.002)
	}
}

// X02: the time constants, from the answer of each tank alone to a small step of its inflow.
func TestQuadrupleTankTimeConstants(t *testing.T) {
	book := checks(t)
	for n, level := range []float64{12.4, 12.7, 1.8, 1.4, 12.6, 13.0, 4.8, 4.9} {
		i := n % 4
		q := quad.out[i] * math.Sqrt(2*981*level)
		const more = 0.002
		end := level * (1 + more) * (1 + more)
		text := plant("20 min", thin, "site: {gravity: 981 cm/s2}", fmt.Sprintf(`
vessels:
  T: {shape: {box: {length: %g cm, width: 1 cm, height: 30 cm}}, base: 0 m, level: %.17g cm, inflow: [[0 s, %.17g cm3/s], [100 s, %.17g cm3/s], [100 s, %.17g cm3/s]]}
outside:
  PAN: {free_fall: {elevation: 0 m}}
lines:
  L: {from: T, to: PAN, inlet: full, parts: [{orifice: {area: %g cm2, cd: 1}}]}
milestones:
  - {name: before, level: T, above: %.17g cm}
  - {name: most, level: T, above: %.17g cm}`, quad.area[i], level, q, q, q*(1+more), quad.out[i], level*1.00001, level+(end-level)*(1-math.Exp(-1))))
		r := run(t, text, how{tolerance: 1e-9})
		book.HoldOne(t, "X02", n, milestone(t, r, "most")-100)
		if m := milestone(t, r, "before"); m < 100 {
			t.Errorf("it moves before its inflow does, at %g s", m)
		}
	}
}

// X07 and X08: the three-tank benchmark, flows at the operating point, and the matrix of its linear model from flows a little off it.
func TestThreeTanks(t *testing.T) {
	book := checks(t)
	flows := func(h1, h2, h3 float64) [3]float64 {
		r := run(t, plant("10 s", thin, "site: {gravity: 981 cm/s2}", fmt.Sprintf(`
vessels:
  T1: {shape: {box: {length: 154 cm, width: 1 cm, height: 62 cm}}, base: 0 m, level: %.17g cm}
  T2: {shape: {box: {length: 154 cm, width: 1 cm, height: 62 cm}}, base: 0 m, level: %.17g cm}
  T3: {shape: {box: {length: 154 cm, width: 1 cm, height: 62 cm}}, base: 0 m, level: %.17g cm}
outside:
  PAN: {free_fall: {elevation: 0 m}}
lines:
  L13: {from: T1, to: T3, inlet: full, parts: [{orifice: {area: 0.5 cm2, cd: 0.46}}]}
  L32: {from: T3, to: T2, inlet: full, parts: [{orifice: {area: 0.5 cm2, cd: 0.45}}]}
  L20: {from: T2, to: PAN, inlet: full, parts: [{orifice: {area: 0.5 cm2, cd: 0.60}}]}`, h1, h2, h3)), how{})
		return [3]float64{1e6 * r.Series.Flow["L13"][0], 1e6 * r.Series.Flow["L32"][0], 1e6 * r.Series.Flow["L20"][0]}
	}
	q := flows(45, 15, 30)
	for i := range q {
		book.HoldOne(t, "X07", i, q[i])
	}
	const d, area = 0.01, 154.0
	var by [3][3]float64 // by[j] = ∂q/∂h_j
	for j := range by {
		h := [3]float64{45, 15, 30}
		h[j] += d
		up := flows(h[0], h[1], h[2])
		h[j] -= 2 * d
		dn := flows(h[0], h[1], h[2])
		for i := range by[j] {
			by[j][i] = (up[i] - dn[i]) / (2 * d)
		}
	}
	a11, a13 := -by[0][0]/area, -by[2][0]/area
	a22, a23 := (by[1][1]-by[1][2])/area, by[2][1]/area
	a33 := (by[2][0] - by[2][1]) / area
	for i, v := range []float64{a11, a13, a22, a23, a33} {
		book.HoldOne(t, "X08", i, v)
	}
}
