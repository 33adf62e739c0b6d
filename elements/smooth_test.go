package elements

import (
	"math"
	"math/rand/v2"
	"testing"
)

// slopeOf compares a slope with the central difference.
func slopeOf(t *testing.T, what string, f func(float64) (float64, float64), x, scale float64) {
	t.Helper()
	h := 1e-6 * scale
	a, _ := f(x - h)
	b, _ := f(x + h)
	_, s := f(x)
	if d := (b - a) / (2 * h); math.Abs(s-d) > 1e-4*(math.Abs(d)+math.Abs(s))+2e-6+1e-14*math.Abs(b)/h {
		t.Errorf("%s at %g: slope %g, by differences %g", what, x, s, d)
	}
}

func TestQuadratic(t *testing.T) {
	const c, band = 4e5, 2.0
	edge := math.Sqrt(band / c)
	for _, u := range []float64{-3, -1.01, -0.99, -0.4, 0, 0.2, 0.7, 1.001, 5} {
		q := u * edge
		slopeOf(t, "Quadratic", func(q float64) (float64, float64) { return Quadratic(c, q, band) }, q, edge)
		slopeOf(t, "QuadraticByC", func(c float64) (float64, float64) {
			v, _ := Quadratic(c, q, band)
			return v, QuadraticByC(c, q, band)
		}, c, c)
		dp, _ := Quadratic(c, q, band)
		if want := c * q * math.Abs(q); math.Abs(u) > 1 && dp != want {
			t.Errorf("outside the band: %g, wanted %g", dp, want)
		}
		at, slope := band, 2*c*edge
		if in, _ := Within(q, edge, at, slope); math.Abs(u) < 1 && math.Abs(in-dp) > 1e-15 {
			t.Errorf("Within differs from Quadratic: %g, %g", in, dp)
		}
	}
}

func TestTwoWay(t *testing.T) {
	r := rand.New(rand.NewPCG(3, 4))
	for range 2000 {
		f, b, band := math.Exp(3*r.NormFloat64()), math.Exp(3*r.NormFloat64()), math.Exp(r.NormFloat64())
		edge := math.Sqrt(band / min(f, b))
		law := func(q float64) (float64, float64) { return TwoWay(f, b, q, band) }
		last := math.Inf(-1)
		for u := -3.0; u <= 3; u += 0.05 {
			dp, s := law(u * edge)
			if dp <= last || s <= 0 {
				t.Fatalf("forward %g, back %g, band %g, u %g: %g after %g, slope %g", f, b, band, u, dp, last, s)
			}
			last = dp
		}
		_, left := law(-1e-15 * edge)
		_, right := law(1e-15 * edge)
		if math.Abs(left/right-1) > 1e-6 {
			t.Fatalf("two slopes at zero: %g, %g", left, right)
		}
		if dp, _ := law(2 * edge); math.Abs(dp/(f*4*edge*edge)-1) > 1e-14 && f > 1e-6*b {
			t.Fatalf("outside the band: %g", dp)
		}
		slopeOf(t, "TwoWay", law, edge*r.NormFloat64(), edge)
	}
}

func TestMin(t *testing.T) {
	for _, a := range []float64{-1, 0.5, 0.899, 0.901, 0.95, 1, 1.02, 1.099, 1.101, 3} {
		slopeOf(t, "Min by a", func(a float64) (float64, float64) { v, s, _ := Min(a, 1); return v, s }, a, 1)
		slopeOf(t, "Min by b", func(b float64) (float64, float64) { v, _, s := Min(a, b); return v, s }, 1, 1)
		v, _, _ := Min(a, 1)
		if v > min(a, 1) || (a < 0.9 && v != a) || (a > 1.1 && v != 1) || v < min(a, 1)-0.0250001 {
			t.Errorf("Min(%g, 1) = %g", a, v)
		}
	}
	if v, _, _ := Min(1, 1); math.Abs(v-0.975) > 1e-15 {
		t.Errorf("Min(1, 1) = %g, by its formula 0.975", v)
	}
}

func TestJoinAndStep(t *testing.T) {
	for _, x := range []float64{-1, 0, 0.1, 0.7, 1.999, 2.001, 5} {
		slopeOf(t, "Join", func(x float64) (float64, float64) { return Join(x, 2) }, x, 1)
		slopeOf(t, "Step", Step, x, 1)
	}
	if v, s := Join(2, 2); v != 2 || s != 1 {
		t.Errorf("Join at its end: %g, %g", v, s)
	}
}

func TestMonotone(t *testing.T) {
	r := rand.New(rand.NewPCG(5, 6))
	for range 300 {
		x, y := []float64{0}, []float64{10}
		for range 2 + r.IntN(5) {
			n := len(x) - 1
			x, y = append(x, x[n]+math.Exp(2*r.NormFloat64())), append(y, y[n]-math.Exp(2*r.NormFloat64()))
		}
		m := newMonotone(x, y)
		end := x[len(x)-1]
		for u := -0.5; u < 1.5; u += 0.01 {
			if _, s := m.at(u * end); s >= 0 {
				t.Fatalf("%v %v turns at %g: slope %g", x, y, u*end, s)
			}
			slopeOf(t, "monotone", m.at, u*end, end*0.1)
		}
		for i := range x {
			if v, _ := m.at(x[i]); math.Abs(v-y[i]) > 1e-9 {
				t.Fatalf("row %d is %g, not %g", i, v, y[i])
			}
		}
	}
}
