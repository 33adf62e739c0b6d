package shape

import "math"

// smoothSlices returns the slices of a monotone cubic through rows {level, m; volume, m³}:
//
//	V(h) = V_i + Hermite cubic of (Δh, ΔV, d_i, d_{i+1}),  α² + β² ≤ 9 with α = d_i/δ_i, β = d_{i+1}/δ_i, δ_i = ΔV/Δh
//
// d are the areas at the rows, m². Source: F. N. Fritsch, R. E. Carlson, Monotone piecewise cubic interpolation, SIAM J. Numer. Anal. 17 (1980) 238–246.
// The slopes are drawn on towards the secants where the area would fall under 1 cm².
func smoothSlices(rows [][2]float64) []slice {
	secant, area := rowAreas(rows)
	var slices []slice
	for i, delta := range secant {
		h := rows[i+1][0] - rows[i][0]
		// A = a + b·z + c·z² with the end areas and the mean area delta.
		a, c := area[i], 3*(area[i]+area[i+1]-2*delta)
		slices = append(slices, quadratic(a, (area[i+1]-a-c)/h, c/h/h, h))
	}
	return slices
}

// rowAreas returns the mean area between rows and the limited area at each, m².
func rowAreas(rows [][2]float64) (secant, area []float64) {
	n := len(rows)
	secant, area = make([]float64, n-1), make([]float64, n)
	width := func(i int) float64 { return rows[i+1][0] - rows[i][0] }
	for i := range secant {
		secant[i] = (rows[i+1][1] - rows[i][1]) / width(i)
	}
	area[0], area[n-1] = secant[0], secant[n-2]
	for i := 1; i < n-1; i++ {
		// The parabola through three rows: second order also where they are not evenly spaced.
		area[i] = (secant[i-1]*width(i) + secant[i]*width(i-1)) / (width(i-1) + width(i))
	}
	if n > 2 {
		area[0] = math.Max(2*secant[0]-area[1], 0)
		area[n-1] = math.Max(2*secant[n-2]-area[n-2], 0)
	}
	for i := range area {
		area[i] = math.Max(area[i], minArea)
	}
	for i, delta := range secant {
		if s := math.Hypot(area[i], area[i+1]) / delta; s > 3 {
			area[i] *= 3 / s
			area[i+1] *= 3 / s
		}
	}
	keepOpen(secant, area)
	return secant, area
}

// keepOpen lowers slopes to the smaller secant beside them until no section is under 1 cm². With both at or under the secant the smallest
// area of a cubic is that of its ends, or over it.
func keepOpen(secant, area []float64) {
	for i := range area {
		area[i] = math.Max(area[i], minArea)
	}
	for range secant {
		lowered := false
		for i, delta := range secant {
			c := 3 * (area[i] + area[i+1] - 2*delta)
			b := area[i+1] - area[i] - c
			t := -b / (2 * c)
			if c > 0 && t > 0 && t < 1 && area[i]-b*b/(4*c) < minArea {
				area[i], area[i+1] = math.Min(area[i], delta), math.Min(area[i+1], delta)
				lowered = true
			}
		}
		if !lowered {
			return
		}
	}
}
