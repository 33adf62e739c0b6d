package friction

import "math"

// RectangularSide returns the flow, m³/s, through a rectangular opening in a vertical wall, a discharge coefficient of 1 assumed, for its width b, m, and
// its edges at depths top < bottom below the surface, m, gravity g, m/s²; edges above the surface count as at it:
//
//	Q = ⅔·b·√(2g)·(bottom^1.5 − top^1.5)
//
// Source: textbook formula of the large orifice.
func RectangularSide(width, top, bottom, g float64) float64 {
	a, b := max(top, 0), max(bottom, 0)
	return 2.0 / 3 * width * math.Sqrt(2*g) * (b*math.Sqrt(b) - a*math.Sqrt(a))
}

// CircularSide returns Q/(Cd·√(2g)·D^2.5), −, and its derivative by h/D, of a round opening of diameter D, m, in a vertical wall, for the depth h over its
// invert as h/D; part covered below 1. Strips of the opening each discharge under their own depth:
//
//	∫ chord(y)·√(h − y) dy,  y over the invert.
//
// At h = D it is 8/15. Computed by 24-point Gauss quadrature, good to 1e-9. Source: ideal strip integration, circular-weir literature.
func CircularSide(ratio float64) (q, slope float64) {
	if ratio <= 0 {
		return 0, 0
	}
	// y = (1 − cos θ)/2, chord = sin θ, dy = sin θ/2 dθ; covered up to θ₁.
	end := math.Pi
	if ratio < 1 {
		end = math.Acos(1 - 2*ratio)
	}
	// θ = θ₁·(1 − (1−u)²)… takes the root's singular slope off the end where the surface is in the opening.
	for i := range gaussX {
		for _, side := range [2]float64{-1, 1} {
			u := (1 + side*gaussX[i]) / 2
			theta := end * u * (2 - u)
			s, c := math.Sincos(theta)
			w := gaussW[i] / 2 * end * 2 * (1 - u) * s * s / 2
			d := math.Sqrt(max(ratio-(1-c)/2, 1e-300))
			q += w * d
			slope += w / (2 * d)
		}
	}
	return q, slope
}

// CentreLine returns the ratio (−) of a round side opening's flow to Cd·A·√(2g·depth of its centre) at h/D ≥ 1 over the invert: 0.96 when the surface
// touches the top, towards 1 when deep.
func CentreLine(ratio float64) float64 {
	q, _ := CircularSide(ratio)
	return q / (math.Pi / 4 * math.Sqrt(ratio-0.5))
}

// RoundStrips returns ∫ chord(y)·√(top − y) dy, −, of a round opening of diameter 1 between the heights lo and hi over its invert, under a head that reaches
// to top ≥ hi, and its derivative by top. Computed by 24-point Gauss quadrature.
func RoundStrips(top, lo, hi float64) (q, byTop float64) {
	from := math.Acos(1 - 2*max(0, min(1, lo)))
	span := math.Acos(1-2*max(0, min(1, hi))) - from
	for i := range gaussX {
		for _, side := range [2]float64{-1, 1} {
			u := (1 + side*gaussX[i]) / 2
			s, c := math.Sincos(from + span*u*(2-u))
			w := gaussW[i] / 2 * span * 2 * (1 - u) * s * s / 2
			d := math.Sqrt(max(top-(1-c)/2, 1e-300))
			q += w * d
			byTop += w / (2 * d)
		}
	}
	return q, byTop
}

// RoundSideDeep returns the ratio (−) of the strips of a round opening, fully covered, to area·√(head of its centre), for that head in diameters, ≥ 1.5, and its
// derivative:
//
//	1 − x/128 − 5x²/16384 − 105x³/4194304 − 3003x⁴/2³⁰,  x = (D/h)²,
//
// good to 1e-7 there. Source: binomial series of the strips with the even moments of the disc.
func RoundSideDeep(h float64) (ratio, slope float64) {
	x := 1 / (h * h)
	const a, b, c, d = 1.0 / 128, 5.0 / 16384, 105.0 / 4194304, 3003.0 / (1 << 30)
	return 1 - x*(a+x*(b+x*(c+x*d))), 2 * x / h * (a + x*(2*b+x*(3*c+x*4*d)))
}

// Nodes and weights of Gauss–Legendre quadrature over −1..1, 24 points, the positive half. Source: roots of P₂₄.
var gaussX, gaussW = gauss(24)

// gauss finds nodes and weights by Newton's method on the Legendre polynomial.
func gauss(n int) (x, w []float64) {
	for i := range n / 2 {
		z := math.Cos(math.Pi * (float64(i) + 0.75) / (float64(n) + 0.5))
		var d float64
		for range 10 {
			p, before := 1.0, 0.0
			for k := 1; k <= n; k++ {
				p, before = ((2*float64(k)-1)*z*p-(float64(k)-1)*before)/float64(k), p
			}
			d = float64(n) * (z*p - before) / (z*z - 1)
			z -= p / d
		}
		x, w = append(x, z), append(w, 2/((1-z*z)*d*d))
	}
	return x, w
}
