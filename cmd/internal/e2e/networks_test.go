package e2e

import (
	"fmt"
	"math"
	"testing"
)

// churchill is the friction factor of S. W. Churchill, Chemical Engineering 84(24), 91–92, 1977, written anew.
func churchill(re, rough float64) float64 {
	a := math.Pow(-2.457*math.Log(math.Pow(7/re, 0.9)+0.27*rough), 16)
	b := math.Pow(37530/re, 16)
	return 8 * math.Pow(math.Pow(8/re, 12)+1/math.Pow(a+b, 1.5), 1.0/12)
}

// tube is a pipe with a sum of other losses for each direction.
type tube struct{ length, bore, fwd, back float64 }

// carries is the flow, m³/s, under a head, m, found by repeated substitution of the friction factor: ρ = 1000 kg/m³, μ = 1 mPa·s, ε = 0.05 mm.
func (p *tube) carries(head float64) float64 {
	k := p.fwd
	if head < 0 {
		k = p.back
	}
	h := math.Abs(head)
	if h < 1e-12 {
		return 0
	}
	v, f := 1.0, 0.02
	for range 9 {
		v = math.Sqrt(2 * g0 * h / (f*p.length/p.bore + k))
		f = churchill(v*p.bore/1e-6, 0.00005/p.bore)
	}
	return math.Copysign(v*circle(p.bore), head)
}

// meet is the head of a tee from the balance of what it gets at that head, which falls with it.
func meet(lo, hi float64, balance func(head float64) float64) float64 {
	for range 40 {
		m := (lo + hi) / 2
		if balance(m) > 0 {
			lo = m
		} else {
			hi = m
		}
	}
	return (lo + hi) / 2
}

const water1000 = "liquid: {stated: {name: water, density: 1000 kg/m3, viscosity: 1 mPa.s}}"

// A shared header: a high vessel drives water back into a lower one through the tee at first, then both drain into a third, whose weir overflows. With a check
// valve in the lower one's line it waits instead.
func TestHeaderAgainstReference(t *testing.T) {
	const kCheck = 1.6e9 * 0.05 * 0.05 * 0.05 * 0.05 / (60 * 60) // of the bore, by definition of Kv with 1 bar and 1000 kg/m³
	for _, check := range []bool{false, true} {
		t.Run(fmt.Sprint("check valve ", check), func(t *testing.T) {
			part := ""
			b := tube{8, 0.05, 0.5, 1.0}
			if check {
				part = ", {check_valve: {kv: 60}}"
				b.fwd += kCheck
			}
			a, c := tube{12, 0.05, 0.5, 1.0}, tube{20, 0.06, 1.0, 0.5}
			ends := func(h []float64) (qa, qb, qc, over float64) {
				za, zb, zc := 3+h[0], 1.5+h[1], h[2]
				flowB := func(head float64) float64 {
					q := b.carries(zb - head)
					if check && q < 0 {
						return 0
					}
					return q
				}
				head := meet(-1, 7, func(x float64) float64 { return a.carries(za-x) + flowB(x) - c.carries(x-zc) })
				if d := h[2] - 0.8; d > 0 {
					over = 1.7 * 0.3 * math.Pow(d, 1.5)
				}
				return a.carries(za - head), flowB(head), c.carries(head - zc), over
			}
			rates := func(_ float64, h, f []float64) {
				qa, qb, qc, over := ends(h)
				f[0], f[1], f[2] = -qa/2, -qb/1.5, (qc-over)/1
			}
			r := run(t, plant("900 s", water1000, "report_every: 100 s", `
vessels:
  A: {shape: {box: {length: 2 m, width: 1 m, height: 4 m}}, base: 3 m, level: 3 m}
  B: {shape: {box: {length: 1.5 m, width: 1 m, height: 4 m}}, base: 1.5 m, level: 0.5 m}
  C: {shape: {box: {length: 1 m, width: 1 m, height: 4 m}}, base: 0 m, level: 0.4 m}
tees:
  T: {}
outside:
  G: {gully: {elevation: 0 m, capacity: 100 L/s}}
lines:
  LA: {from: A, to: T, parts: [{pipe: {length: 12 m, bore: 50 mm, roughness: 0.05 mm}}]}
  LB: {from: B, to: T, parts: [{pipe: {length: 8 m, bore: 50 mm, roughness: 0.05 mm}}`+part+`]}
  LC: {from: T, to: C, parts: [{pipe: {length: 20 m, bore: 60 mm, roughness: 0.05 mm}}]}
  W: {from: C, to: G, leaves: {crest: 0.8 m}, parts: [{weir: {rectangular: {width: 0.3 m, c: 1.7}}}]}`), how{})
			qa, qb, qc, _ := ends([]float64{3, 0.5, 0.4})
			within(t, "LA at the start", r.Series.Flow["LA"][0], qa, 1e-3)
			within(t, "LC at the start", r.Series.Flow["LC"][0], qc, 1e-3)
			near(t, "LB at the start", r.Series.Flow["LB"][0], qb, 1e-3*math.Abs(qa))
			if (r.Series.Flow["LB"][0] < -1e-9) == check {
				t.Errorf("LB carries %g m3/s at the start", r.Series.Flow["LB"][0])
			}
			h := []float64{3, 0.5, 0.4}
			for s := 100.0; s <= 900; s += 100 {
				h = reference(rates, h, s-100, s, 25)
				for i, tag := range []string{"A", "B", "C"} {
					near(t, fmt.Sprintf("%s at %g s", tag, s), at(t, r, r.Series.Level[tag], s), h[i], 0.005*math.Max(h[i], 0.2))
				}
			}
		})
	}
}

// A cascade with a pump by levels, a rim that spills into a bund, and an inflow: levels against the reference, which switches at its own steps.
func TestCascadeAgainstReference(t *testing.T) {
	p := tube{10, 0.06, 1.5, 1.5}
	running := false
	rates := func(s float64, h, f []float64) {
		q := p.carries(h[0] + 2 - 1.2) // to a free end at 1.2 m over the sump's floor
		spill := 0.0
		if d := h[0] - 1.5; d > 0 {
			spill = 1.7 * 2 * math.Pow(d, 1.5)
		}
		pump := 0.0
		if running {
			pump = 0.012
		}
		in := 0.02
		if s >= 600 {
			in = 0
		}
		f[0], f[1], f[2] = (in-q-spill)/1, (q-pump)/2, spill/3
	}
	r := run(t, plant("1200 s", water1000, "report_every: 100 s", `
vessels:
  A: {shape: {box: {length: 1 m, width: 1 m, height: 3 m}}, base: 2 m, level: 1 m, rim: 1.5 m, rim_length: 2 m, spills_to: BUND, inflow: [[0 s, 20 L/s], [600 s, 20 L/s], [600 s, 0 L/s]]}
  S: {shape: {box: {length: 2 m, width: 1 m, height: 3 m}}, base: 0 m, level: 0.5 m}
  BUND: {shape: {box: {length: 3 m, width: 1 m, height: 3 m}}, base: 0 m, level: 0 m}
outside:
  OUT: {free_fall: {elevation: 0 m}}
lines:
  L: {from: A, to: S, enters: {centre: 1.2 m}, parts: [{pipe: {length: 10 m, bore: 60 mm, roughness: 0.05 mm}}]}
  P: {from: S, to: OUT, inlet: full, parts: [{pump: {tag: P-1, rate: 12 L/s, mode: auto, starts: {level: S, above: 1 m}, stops: {level: S, below: 0.4 m}}}]}`), how{})
	h := []float64{1, 0.5, 0}
	for s := 1; s <= 600; s++ {
		for range 20 {
			h = reference(rates, h, float64(s-1), float64(s-1)+0.05, 1)
			if h[1] >= 1 {
				running = true
			} else if h[1] <= 0.4 {
				running = false
			}
		}
		if s%100 == 0 {
			for i, tag := range []string{"A", "S", "BUND"} {
				near(t, fmt.Sprintf("%s at %d s", tag, s), at(t, r, r.Series.Level[tag], float64(s)), h[i], 0.005*math.Max(h[i], 0.5))
			}
		}
	}
	if r.Vessels["A"].Spilled < 0.5 {
		t.Errorf("only %g m3 over the rim", r.Vessels["A"].Spilled)
	}
	near(t, "what spilled is in the bund", r.Vessels["BUND"].EndVolume, r.Vessels["A"].Spilled, 1e-9)
}

// Two tees that are joined to each other only: nothing flows, their head is not defined, and the rest of the plant does not mind.
func TestFloatingTees(t *testing.T) {
	for _, method := range []string{"", "bdf"} {
		r := run(t, plant("1 h", "liquid: {water: 15 °C}", `
vessels:
  A: {shape: {box: {length: 2 m, width: 1 m, height: 2 m}}, base: 0 m, level: 1 m}
tees: {T: {}, U: {}}
outside:
  X: {free_fall: {elevation: 0 m}}
lines:
  L: {from: A, to: X, parts: [{pipe: {length: 3 m, bore: 25 mm, roughness: 0.05 mm}}]}
  M: {from: T, to: U, parts: [{pipe: {length: 3 m, bore: 25 mm, roughness: 0.05 mm}}]}
  N: {from: U, to: T, parts: [{pipe: {length: 3 m, bore: 25 mm, roughness: 0.05 mm}}]}`), how{method: method})
		if r.Lines["M"].Forward+r.Lines["M"].Backward+r.Lines["N"].Forward > 0 || r.Vessels["A"].EndLevel > 0.05 {
			t.Errorf("%+v %+v", r.Lines["M"], r.Vessels["A"])
		}
		for _, h := range r.Series.TeeHead["T"] {
			if h != nil {
				t.Fatalf("a head of %g m", *h)
			}
		}
	}
}
