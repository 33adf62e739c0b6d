package shape

import "math"

// bends is the number of straight strokes that draw one curved slice.
const bends = 24

// Outline returns the front elevation as a closed polygon, counter-clockwise from the bottom.
func (b *body) Outline() []Point {
	right := make([]Point, 0, 2*len(b.slices))
	add := func(p Point) {
		if n := len(right); n == 0 || right[n-1] != p {
			right = append(right, p)
		}
	}
	for i := range b.slices {
		s := &b.slices[i]
		n := 1
		if s.bent {
			n = bends
		}
		for k := 0; k <= n; k++ {
			// Cosine spacing draws the steep ends of a curve as well as its middle.
			z := s.h * (1 - math.Cos(math.Pi*float64(k)/float64(n))) / 2
			add(Point{s.halfWidth(z), s.z + z})
		}
	}
	outline := right
	for i := len(right) - 1; i >= 0; i-- {
		outline = append(outline, Point{-right[i].X, right[i].Y})
	}
	return outline
}

func (s *slice) halfWidth(z float64) float64 {
	if s.half != nil {
		return s.half(z)
	}
	_, a := s.at(z)
	return math.Sqrt(a / math.Pi)
}

func (s *slice) perimeter(z float64) float64 {
	if s.rim != nil {
		return s.rim(z)
	}
	_, a := s.at(z)
	return round(a)
}

// Perimeter returns the length of the rim, m, at level h, m; that of the top above it.
func (b *body) Perimeter(h float64) float64 {
	h = math.Min(math.Max(h, 0), b.height)
	s := b.sliceAt(h)
	return s.perimeter(h - s.z)
}

// always returns a function that returns x.
func always(x float64) func(float64) float64 { return func(float64) float64 { return x } }
