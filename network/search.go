package network

import "math"

// bisect returns where f crosses zero between a and b; rising tells which way.
func bisect(a, b float64, rising bool, f func(float64) float64) float64 {
	for range 60 {
		m := a + (b-a)/2
		if m <= a || m >= b {
			break
		}
		if (f(m) < 0) == rising {
			a = m
		} else {
			b = m
		}
	}
	return b
}

// turning returns where a smooth f, of values fa and fb of opposite signs at a and b, crosses zero between them, to a share near of b − a: the rule of
// false position with the Illinois halving (Dowell and Jarratt, BIT 11, 1971).
func turning(a, b, fa, fb, near float64, f func(float64) float64) float64 {
	near *= b - a
	last := math.Inf(1)
	for range 60 {
		x := b - fb*(b-a)/(fb-fa)
		if !(x > a && x < b) || math.Abs(x-last) < near {
			return math.Min(math.Max(x, a), b)
		}
		last = x
		v := f(x)
		if v == 0 {
			return x
		}
		if (v > 0) == (fb > 0) {
			b, fb = x, v
			fa /= 2
		} else {
			a, fa = x, v
			fb /= 2
		}
	}
	return b
}

// summit returns the highest point of f between a and b, whose middle value vm is above va and vb: successive parabolas, each through the
// highest point seen and its neighbours.
func summit(a, b, va, vm, vb float64, f func(float64) float64) (t, v float64) {
	m := a + (b-a)/2
	for range 12 {
		d1, d2 := (m-a)*(vm-vb), (m-b)*(vm-va)
		den := d1 - d2
		if den == 0 {
			break
		}
		x := m - ((m-a)*d1-(m-b)*d2)/(2*den)
		if !(x > a && x < b) || math.Abs(x-m) < 1e-7*(b-a) {
			break
		}
		vx := f(x)
		switch {
		case vx > vm && x > m:
			a, va, m, vm = m, vm, x, vx
		case vx > vm:
			b, vb, m, vm = m, vm, x, vx
		case x > m:
			b, vb = x, vx
		default:
			a, va = x, vx
		}
	}
	return m, vm
}
