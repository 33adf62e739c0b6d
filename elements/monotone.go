package elements

import (
	"math"
	"sort"
)

// monotone is a C¹ curve through points that rise (or fall) in both coordinates: cubic Hermite with the slopes of Fritsch and Butland, straight
// beyond both ends. It never turns between points.
//
// Source: F. N. Fritsch, J. Butland, A method for constructing local monotone piecewise cubic interpolants, SIAM J. Sci. Stat. Comput. 5, 300–304, 1984.
type monotone struct{ x, y, d []float64 }

// newMonotone takes at least two points with rising x and strictly monotone y.
func newMonotone(x, y []float64) monotone {
	n := len(x)
	d := make([]float64, n)
	secant := func(i int) float64 { return (y[i+1] - y[i]) / (x[i+1] - x[i]) }
	for i := 1; i < n-1; i++ {
		h0, h1 := x[i]-x[i-1], x[i+1]-x[i]
		a := (h0 + 2*h1) / (3 * (h0 + h1))
		s0, s1 := secant(i-1), secant(i)
		d[i] = s0 * s1 / (a*s1 + (1-a)*s0)
	}
	d[0], d[n-1] = secant(0), secant(n-2)
	if n > 2 {
		d[0] = endSlope(secant(0), d[1])
		d[n-1] = endSlope(secant(n-2), d[n-2])
	}
	return monotone{x, y, d}
}

// endSlope is the parabola's slope at an end, from the last secant and the slope at the next point, kept between a fifth of the secant and three of it.
func endSlope(secant, next float64) float64 {
	return secant * min(max(2-next/secant, 0.2), 3)
}

// at returns value and slope at x.
func (m *monotone) at(x float64) (y, slope float64) {
	n := len(m.x)
	if x <= m.x[0] {
		return m.y[0] + (x-m.x[0])*m.d[0], m.d[0]
	}
	if x >= m.x[n-1] {
		return m.y[n-1] + (x-m.x[n-1])*m.d[n-1], m.d[n-1]
	}
	i := sort.Search(n-2, func(i int) bool { return m.x[i+1] > x })
	w := m.x[i+1] - m.x[i]
	u := (x - m.x[i]) / w
	m0, m1, rise := m.d[i]*w, m.d[i+1]*w, m.y[i+1]-m.y[i]
	b, c := 3*rise-2*m0-m1, m0+m1-2*rise
	return m.y[i] + u*(m0+u*(b+u*c)), (m0 + u*(2*b+u*3*c)) / w
}

// odd returns the curve mirrored through the origin, for a curve that starts there.
func (m *monotone) odd(x float64) (y, slope float64) {
	y, slope = m.at(math.Abs(x))
	return math.Copysign(y, x), slope
}
