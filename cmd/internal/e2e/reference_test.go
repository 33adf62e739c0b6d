package e2e

// reference integrates y' = f(t, y) from t0 to t1 by the classical Runge–Kutta method of order 4 in n even steps: nothing in common with the program.
func reference(f func(t float64, y, dy []float64), y0 []float64, t0, t1 float64, n int) []float64 {
	m := len(y0)
	y := append([]float64(nil), y0...)
	k1, k2, k3, k4, w := make([]float64, m), make([]float64, m), make([]float64, m), make([]float64, m), make([]float64, m)
	h := (t1 - t0) / float64(n)
	move := func(k []float64, by float64) []float64 {
		for i := range w {
			w[i] = y[i] + by*k[i]
		}
		return w
	}
	for s := range n {
		t := t0 + h*float64(s)
		f(t, y, k1)
		f(t+h/2, move(k1, h/2), k2)
		f(t+h/2, move(k2, h/2), k3)
		f(t+h, move(k3, h), k4)
		for i := range y {
			y[i] += h / 6 * (k1[i] + 2*k2[i] + 2*k3[i] + k4[i])
		}
	}
	return y
}
