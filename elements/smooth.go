package elements

import "math"

// Quadratic returns the drop c·q·|q|, Pa, and its slope, Pa·s/m³, at flow q, m³/s, for c > 0 in Pa·s²/m⁶. Below the drop band, Pa, which is reached at
// Q_l = √(band/c), it is the odd cubic c/2·(Q_l·q + q³/Q_l): exact outside, linear through zero, C¹, increasing.
func Quadratic(c, q, band float64) (dp, slope float64) {
	a := math.Abs(q)
	if x := c * a; x*a >= band {
		return x * q, 2 * x
	}
	if c <= 0 {
		return 0, 0
	}
	s := math.Sqrt(c * band) // c·Q_l
	r := c / s * q           // q/Q_l
	return s / 2 * q * (1 + r*r), s / 2 * (1 + 3*r*r)
}

// beyondBand is the flow, m³/s, from which c·q|q| is out of the band; 0 where nothing is lost.
func beyondBand(c float64, at *Local) float64 {
	if c <= 0 {
		return 0
	}
	return math.Sqrt(at.Band/c) * (1 + 1e-15)
}

// QuadraticByC returns the derivative of Quadratic by c.
func QuadraticByC(c, q, band float64) float64 {
	a := math.Abs(q)
	if c*a*a >= band {
		return q * a
	}
	s := math.Sqrt(band / c) // Q_l
	r := q / s
	return s / 4 * q * (1 + 3*r*r)
}

// Within continues an odd law to zero from (edge, at), where it has the given slope: the odd cubic s·u + b·u³, u = q/edge, that meets value and slope there.
// It is increasing where the law's exponent m = slope·edge/at lies between 1 and 3; for m = 1 it is straight. q and edge in m³/s, at in Pa.
func Within(q, edge, at, slope float64) (dp, d float64) {
	t := slope * edge
	s, b := (3*at-t)/2, (t-at)/2
	u := q / edge
	return u * (s + b*u*u), (s + 3*b*u*u) / edge
}

// TwoWay is a quadratic loss with another coefficient each way, forward for q ≥ 0 and back for q < 0, both in Pa·s²/m⁶: end losses, changes of bore, a
// check valve that leaks. It is exact outside the band of either side; inside it is a cubic, and both sides have one slope at zero, that of the
// smaller coefficient's odd cubic, so that both are increasing. A coefficient under a millionth of the other is taken as that.
func TwoWay(forward, back, q, band float64) (dp, slope float64) {
	big := max(forward, back)
	least := max(min(forward, back), 1e-6*big)
	c := forward
	if q < 0 {
		c = back
	}
	c = max(c, least)
	a := math.Abs(q)
	if x := c * a; x*a >= band {
		return x * q, 2 * x
	}
	if c <= 0 {
		return 0, 0
	}
	edge := math.Sqrt(band / c)
	s := band / 2 * math.Sqrt(least/c) // the common slope, times the edge; between 0 and band/2, where the cubic rises
	u := a / edge
	dp = u * (s + u*(band-2*s+u*s))
	return math.Copysign(dp, q), (s + u*(2*(band-2*s)+3*u*s)) / edge
}

// Min returns the compact minimum of a and b > 0 with its partial derivatives,
//
//	min(a, b) − max(0, δ − |a−b|)²/(4δ),  δ = 0.1·b:
//
// exactly the smaller one where they differ by more than a tenth of b, 2.5 % of b below where they meet, C¹.
func Min(a, b float64) (v, byA, byB float64) { return MinWithin(a, b, 0.1) }

// MinWithin is Min with δ = share·b.
func MinWithin(a, b, share float64) (v, byA, byB float64) {
	d := share * b
	diff := a - b
	if diff >= d {
		return b, 0, 1
	}
	if diff <= -d {
		return a, 1, 0
	}
	// Both branches of |a−b| give one parabola: (a+b)/2 − (d² + (a−b)²)/(4d).
	v = (a+b)/2 - (d*d+diff*diff)/(4*d)
	byA = 0.5 - diff/(2*d)
	byB = 0.5 + diff/(2*d) - share/4 + share*diff*diff/(4*d*d)
	return v, byA, byB
}

// Join returns 0 below x = 0, x beyond x = δ, and δ·(2u² − u³), u = x/δ, between: C¹. It opens a one-way path.
func Join(x, delta float64) (v, slope float64) {
	if x <= 0 {
		return 0, 0
	}
	if x >= delta {
		return x, 1
	}
	u := x / delta
	return delta * u * u * (2 - u), u * (4 - 3*u)
}

// Step returns 0 below u = 0, 1 beyond u = 1 and u²(3 − 2u) between, with its derivative: C¹.
func Step(u float64) (v, slope float64) {
	if u <= 0 {
		return 0, 0
	}
	if u >= 1 {
		return 1, 0
	}
	return u * u * (3 - 2*u), 6 * u * (1 - u)
}
