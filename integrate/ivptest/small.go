package ivptest

import "math"

// ProtheroRobinson is y' = λ(y − φ(t)) + φ'(t) with φ = sin(t) + t and the solution φ (Prothero and Robinson, Math. Comp. 28:145, 1974). For large −λh
// a method shows its order for stiff systems instead of its classical one.
func ProtheroRobinson(lambda float64) *Problem {
	return &Problem{
		Name: "Prothero–Robinson", T0: 0, T1: 2, Y0: []float64{0},
		F: func(t float64, y, f, _ []float64) {
			f[0] = lambda*(y[0]-math.Sin(t)-t) + math.Cos(t) + 1
		},
		D: func(t float64, _ []float64, fy, _ [][]float64, ft, _ []float64) {
			fy[0][0] = lambda
			ft[0] = -lambda*(math.Cos(t)+1) - math.Sin(t)
		},
		Exact: func(t float64, y []float64) { y[0] = math.Sin(t) + t },
	}
}

// Oscillator is x' = v, v' = −ln z, 0 = z − exp x with the solution x = cos t, z = exp(cos t).
func Oscillator() *Problem {
	return &Problem{
		Name: "oscillator", T0: 0, T1: 3, Y0: []float64{1, 0, math.E}, Algebraic: []bool{false, false, true},
		F: func(_ float64, y, f, _ []float64) {
			f[0], f[1], f[2] = y[1], -math.Log(y[2]), y[2]-math.Exp(y[0])
		},
		D: func(_ float64, y []float64, fy, _ [][]float64, _, _ []float64) {
			fy[0][1] = 1
			fy[1][2] = -1 / y[2]
			fy[2][0], fy[2][2] = -math.Exp(y[0]), 1
		},
		Exact: func(t float64, y []float64) {
			s, c := math.Sincos(t)
			y[0], y[1], y[2] = c, -s, math.Exp(c)
		},
	}
}

// Swing is y' = y z, 0 = z + z³/3 − cos t − cos³t/3 with the solution y = exp(sin t), z = cos t: time moves the algebraic equation.
func Swing() *Problem {
	return &Problem{
		Name: "swing", T0: 0, T1: 2, Y0: []float64{1, 1}, Algebraic: []bool{false, true},
		F: func(t float64, y, f, _ []float64) {
			c := math.Cos(t)
			f[0], f[1] = y[0]*y[1], y[1]+y[1]*y[1]*y[1]/3-c-c*c*c/3
		},
		D: func(t float64, y []float64, fy, _ [][]float64, ft, _ []float64) {
			s, c := math.Sincos(t)
			fy[0][0], fy[0][1], fy[1][1] = y[1], y[0], 1+y[1]*y[1]
			ft[1] = s + c*c*s
		},
		Exact: func(t float64, y []float64) {
			y[0], y[1] = math.Exp(math.Sin(t)), math.Cos(t)
		},
	}
}

// VanDerPol is y' = v, v' = μ(1−y²)v − y from (2, 0) with μ = 1000 to t = 2000. The Test Set for IVP Solvers gives 1.706167732170483 and
// −8.928097010247975e-4 for the end (from memory); the values here were computed for this project and are within 1e-13 of them.
func VanDerPol() *Problem {
	const mu = 1000
	return &Problem{
		Name: "van der Pol", T0: 0, T1: 2000, Y0: []float64{2, 0}, Absolute: 1e-3,
		F: func(_ float64, y, f, _ []float64) {
			f[0], f[1] = y[1], mu*(1-y[0]*y[0])*y[1]-y[0]
		},
		D: func(_ float64, y []float64, fy, _ [][]float64, _, _ []float64) {
			fy[0][1] = 1
			fy[1][0], fy[1][1] = -2*mu*y[0]*y[1]-1, mu*(1-y[0]*y[0])
		},
		End: []float64{1.7061677321705342, -8.928097010247443e-4},
	}
}
