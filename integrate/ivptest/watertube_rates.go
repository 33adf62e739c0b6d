package ivptest

import "math"

// external returns the inflow into a node from outside with its first and second time derivatives.
func external(node int, t float64) (q, q1, q2 float64) {
	const hour = 3600.0
	h := t / hour
	switch node + 1 {
	case 1, 13:
		share := 1.0 / 200
		if node+1 == 13 {
			share = 1.0 / 80
		}
		e := math.Exp(-h)
		s, c := math.Sincos(e - 1)
		return share * (1 - c), -share * s * e / hour, share * (c*e*e + s*e) / (hour * hour)
	case 10:
		q = -h * h * (3*h*h - 92*h + 720) / 1e6
		q1 = -h * (12*h*h - 276*h + 1440) / 1e6 / hour
		return q, q1, -(36*h*h - 552*h + 1440) / 1e6 / (hour * hour)
	}
	return 0, 0, 0
}

// resistance returns the pressure lost in a pipe and its partial derivatives by flow and friction factor.
func (w *WaterTube) resistance(k int, phi, lambda float64) (r, byPhi, byLambda float64) {
	if !w.Turbulent[k] {
		return tubeLaminar * phi, tubeLaminar, 0
	}
	const c = tubeRho * tubeLength / (tubeA * tubeA * tubeD)
	return c * lambda * phi * phi, 2 * c * lambda * phi, c * phi * phi
}

// friction returns the residual of the friction equation 1/√λ = 1.74 − 2 lg(2k/d + 18.7/(Re √λ)) and its partial derivatives.
func (w *WaterTube) friction(k int, phi, lambda float64) (r, byPhi, byLambda float64) {
	re, dre := tubeCritical, 0.0
	if w.Turbulent[k] {
		re, dre = math.Abs(phi)*tubeRe, math.Copysign(tubeRe, phi)
	}
	root := math.Sqrt(lambda)
	s := 18.7 / (re * root)
	arg := 2*tubeRough/tubeD + s
	slope := 2 / (math.Ln10 * arg)
	return 1/root - 1.74 + 2*math.Log10(arg), -slope * s / re * dre, -0.5/(lambda*root) - 0.5*slope*s/lambda
}

func (w *WaterTube) f(t float64, y, f, _ []float64) {
	phi, lambda, p := y[:tubePipes], y[tubePipes:2*tubePipes], y[2*tubePipes:]
	node := f[2*tubePipes:]
	for i := range node {
		q, q1, _ := external(i, t)
		if node[i] = q1; w.storage[i] {
			node[i] = q / tubeC
		}
	}
	for k, e := range w.pipes {
		a, b := e[0], e[1]
		r, _, _ := w.resistance(k, phi[k], lambda[k])
		f[k] = (p[a] - p[b] - r) / tubeInertia
		f[tubePipes+k], _, _ = w.friction(k, phi[k], lambda[k])
		for _, end := range []struct {
			node int
			sign float64
		}{{a, -1}, {b, 1}} {
			if w.storage[end.node] {
				node[end.node] += end.sign * phi[k] / tubeC
			} else {
				node[end.node] += end.sign * f[k]
			}
		}
	}
}

func (w *WaterTube) d(t float64, y []float64, fy, _ [][]float64, ft, _ []float64) {
	phi, lambda := y[:tubePipes], y[tubePipes:2*tubePipes]
	const pressures = 2 * tubePipes
	for i := range tubeNodes {
		_, q1, q2 := external(i, t)
		if ft[pressures+i] = q2; w.storage[i] {
			ft[pressures+i] = q1 / tubeC
		}
	}
	for k, e := range w.pipes {
		a, b := pressures+e[0], pressures+e[1]
		_, byPhi, byLambda := w.resistance(k, phi[k], lambda[k])
		row := fy[k]
		row[a], row[b] = 1/tubeInertia, -1/tubeInertia
		row[k], row[tubePipes+k] = -byPhi/tubeInertia, -byLambda/tubeInertia
		_, fy[tubePipes+k][k], fy[tubePipes+k][tubePipes+k] = w.friction(k, phi[k], lambda[k])
		for _, end := range []struct {
			at   int
			sign float64
		}{{a, -1}, {b, 1}} {
			if w.storage[end.at-pressures] {
				fy[end.at][k] += end.sign / tubeC
				continue
			}
			for _, j := range []int{a, b, k, tubePipes + k} {
				fy[end.at][j] += end.sign * row[j]
			}
		}
	}
}
