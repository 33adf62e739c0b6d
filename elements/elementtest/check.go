package elementtest

import (
	"math"
	"strings"
	"testing"

	"headfall/elements"
)

// Check holds one kind to the promises of its room.
func Check(t *testing.T, room elements.Room, name string) {
	t.Helper()
	k := elements.Lookup(room, name)
	if k == nil {
		t.Fatalf("no %s %q", room, name)
	}
	documented(t, k)
	CheckSpecimen(t, room, name, k.Sample)
}

// CheckSpecimen holds one specimen of a kind, given by its parameters in braces, to the promises of its room.
func CheckSpecimen(t *testing.T, room elements.Room, name, sample string) {
	t.Helper()
	e, err := Build(room, name, sample)
	if err != nil {
		t.Fatal(err)
	}
	if err := e.Ready(); err != nil {
		t.Errorf("Ready a second time: %v", err)
	}
	switch e := e.(type) {
	case elements.Part:
		part(t, e)
	case elements.Vent:
		vent(t, e)
	case elements.Trim:
		trim(t, e)
	case elements.Liquid:
		liquid(t, e)
	case elements.Shaped:
		shaped(t, e)
	case elements.Header:
		if h, err := e.Head(2, 0.08); err != nil || h == nil {
			t.Errorf("head of 2 m: %v", err)
		}
	case elements.Outsider:
		if e.Outside() == nil {
			t.Error("no outside")
		}
	default:
		t.Errorf("%T is nothing that its room knows", e)
	}
}

func documented(t *testing.T, k *elements.Kind) {
	t.Helper()
	for what, text := range map[string]string{"Doc": k.Doc, "Law": k.Law, "Valid": k.Valid, "Source": k.Source, "Symbol": k.Symbol, "Sample": k.Sample} {
		if strings.TrimSpace(text) == "" {
			t.Errorf("%s is empty", what)
		}
	}
	if !strings.HasSuffix(k.Doc, ".") {
		t.Errorf("Doc is no sentence: %q", k.Doc)
	}
	p := &elements.Params{}
	k.New().Bind(p)
	seen := map[string]bool{}
	for _, q := range p.List {
		if q.Help == "" || seen[q.Key] {
			t.Errorf("parameter %q: no help, or declared twice", q.Key)
		}
		seen[q.Key] = true
	}
}

// near tells whether two numbers agree within a share rel of the larger, or within abs.
func near(a, b, rel, abs float64) bool {
	return math.Abs(a-b) <= abs+rel*math.Max(math.Abs(a), math.Abs(b))
}

func finite(all ...float64) bool {
	for _, v := range all {
		if math.IsNaN(v) || math.IsInf(v, 0) {
			return false
		}
	}
	return true
}

func liquid(t *testing.T, e elements.Liquid) {
	f := e.Fluid()
	if !finite(f.Density, f.Dynamic, f.Vapour, f.Surface) || f.Density <= 0 || f.Dynamic <= 0 || f.Name == "" {
		t.Errorf("no liquid: %+v", f)
	}
}

func shaped(t *testing.T, e elements.Shaped) {
	s, err := e.Shape(0.08)
	if err != nil {
		t.Fatal(err)
	}
	for i := range 11 {
		h := s.Height() * float64(i) / 10
		v, area := s.Volume(h)
		back, slope := s.Level(v)
		if !near(back, h, 1e-9, 1e-9) || !near(slope*area, 1, 1e-6, 0) {
			t.Errorf("level %g, volume %g, level %g; %g·%g is not 1", h, v, back, slope, area)
		}
	}
}

func trim(t *testing.T, e elements.Trim) {
	if phi, _ := e.Share(1); !near(phi, 1, 1e-12, 0) {
		t.Errorf("share of Kv at full travel is %g", phi)
	}
	last := -1.0
	for i := range 101 {
		x := float64(i) / 100
		phi, slope := e.Share(x)
		if phi < last || slope < 0 || phi < 0 || phi > 1+1e-12 {
			t.Errorf("at travel %g: share %g, slope %g", x, phi, slope)
		}
		last = phi
		if i > 0 && i < 100 {
			const h = 1e-6
			a, _ := e.Share(x - h)
			b, _ := e.Share(x + h)
			if !near((b-a)/(2*h), slope, 1e-6, 1e-8) {
				t.Errorf("at travel %g: slope %g, by differences %g", x, slope, (b-a)/(2*h))
			}
		}
	}
	if fl, source := e.LiquidRecovery(); fl <= 0 || fl > 1 || source == "" {
		t.Errorf("liquid recovery %g, source %q", fl, source)
	}
}

func vent(t *testing.T, e elements.Vent) {
	const p0, T = 101325.0, 288.15
	at := &elements.Local{Opening: 1}
	last := math.Inf(1)
	for _, p := range pressures(p0) {
		m, byP := e.Flow(p, p0, T, at)
		if !finite(m, byP) || m > last*(1+1e-12) && m > last+1e-15 {
			t.Errorf("at %g Pa over atmosphere: flow %g, slope %g, not falling", p-p0, m, byP)
		}
		last = m
		h := 1e-3
		a, _ := e.Flow(p-h, p0, T, at)
		b, _ := e.Flow(p+h, p0, T, at)
		if !near((b-a)/(2*h), byP, 2e-3, 1e-9) {
			t.Errorf("at %g Pa over atmosphere: slope %g, by differences %g", p-p0, byP, (b-a)/(2*h))
		}
	}
	if n := testing.AllocsPerRun(20, func() { e.Flow(p0-7, p0, T, at) }); n != 0 {
		t.Errorf("%g allocations", n)
	}
}

// pressures are inside pressures around p0, rising.
func pressures(p0 float64) (all []float64) {
	for _, d := range []float64{-1e5, -6e4, -4.7e4, -1e4, -1000, -215, -205, -100, -10, -2, -0.9, -0.3, -0.01, 0, 0.02, 0.5, 0.8, 3, 30, 300, 1530, 1620, 1900, 2100, 5000, 2e4, 9e4, 1e5, 3e5} {
		all = append(all, p0+d)
	}
	return all
}
