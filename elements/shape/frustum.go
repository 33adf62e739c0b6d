package shape

import "math"

// Section is the section of a frustum at its bottom or top: a diameter, or length and width, m, or an area, m².
type Section struct{ Diameter, Length, Width, Area float64 }

// Frustum returns a vessel with straight sides between two sections, height h apart, m:
//
//	both rectangles: A(z) = l(z)·w(z), length and width each straight between bottom and top (a hopper, prismatoid)
//	else:            √A straight between bottom and top (truncated cone; of other forms, all sections alike)
//
//	V = h·(A₀ + √(A₀·A₁) + A₁)/3 for the second
//
// Source: solid geometry. Range: both sections 1 cm² or more; a cone that ends in a point is given by its outlet.
func Frustum(bottom, top Section, height float64) (Shape, error) {
	var f faults
	a0, a1 := bottom.check(&f, "bottom"), top.check(&f, "top")
	f.positive("height", height)
	if err := f.err("frustum"); err != nil {
		return nil, err
	}
	if bottom.Length > 0 && top.Length > 0 {
		return pile([]slice{hopper(bottom, top, height)}), nil
	}
	s := tapered(a0, a1, height)
	if bottom.Diameter == 0 || top.Diameter == 0 {
		s.rim = always(round(math.Max(a0, a1)))
		s.half = func(z float64) float64 { return bottom.half() + (top.half()-bottom.half())*z/height }
	}
	return pile([]slice{s}), nil
}

// hopper is the slice between two rectangles.
func hopper(bottom, top Section, h float64) slice {
	l, w := (top.Length-bottom.Length)/h, (top.Width-bottom.Width)/h
	long := func(z float64) float64 { return bottom.Length + l*z }
	wide := func(z float64) float64 { return bottom.Width + w*z }
	s := quadratic(bottom.Length*bottom.Width, bottom.Length*w+bottom.Width*l, l*w, h)
	if l <= 0 && w <= 0 && (l < 0 || w < 0) {
		// Narrowing: counted from its narrow end, where the table is finest.
		s = flip(quadratic(top.Length*top.Width, -(top.Length*w + top.Width*l), l*w, h))
	}
	s.half = func(z float64) float64 { return long(z) / 2 }
	s.rim = func(z float64) float64 { return 2 * (long(z) + wide(z)) }
	return s
}

// half is half the width in the front elevation, m.
func (s Section) half() float64 {
	switch {
	case s.Diameter > 0:
		return s.Diameter / 2
	case s.Length > 0:
		return s.Length / 2
	}
	return math.Sqrt(s.Area / math.Pi)
}

// check returns the area, m².
func (s Section) check(f *faults, place string) (area float64) {
	box := s.Length != 0 || s.Width != 0
	given := 0
	for _, is := range []bool{s.Diameter != 0, box, s.Area != 0} {
		if is {
			given++
		}
	}
	ok := true
	switch {
	case given != 1:
		f.add("%s: give a diameter, or length and width, or an area", place)
		return 0
	case s.Diameter != 0:
		area, ok = circle(s.Diameter), f.positive(place+": diameter", s.Diameter)
	case box:
		l, w := f.positive(place+": length", s.Length), f.positive(place+": width", s.Width)
		area, ok = s.Length*s.Width, l && w
	default:
		area = s.Area
	}
	if ok {
		f.section(place, area)
	}
	return area
}
