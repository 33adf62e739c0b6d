package shape

import "math"

// gauss integrates smooth functions by the Gauss–Legendre rule of a number of points.
type gauss struct{ x, w []float64 } // on (−1, 1)

// newGauss returns the rule of n points; its points are the roots of the Legendre polynomial P_n, by Newton's method.
func newGauss(n int) gauss {
	g := gauss{make([]float64, n), make([]float64, n)}
	for i := range n {
		x := math.Cos(math.Pi * (float64(i) + 0.75) / (float64(n) + 0.5))
		var slope float64
		for range 8 {
			before, p := 1.0, x
			for k := 2; k <= n; k++ {
				before, p = p, (float64(2*k-1)*x*p-float64(k-1)*before)/float64(k)
			}
			slope = float64(n) * (x*p - before) / (x*x - 1)
			x -= p / slope
		}
		g.x[i], g.w[i] = x, 2/((1-x*x)*slope*slope)
	}
	return g
}
