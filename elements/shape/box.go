package shape

// Box returns a rectangular tank of length, width and height, m; the front elevation shows the length.
//
//	V(h) = l·w·h
//
// Source: solid geometry.
func Box(length, width, height float64) (Shape, error) {
	var f faults
	l, w := f.positive("length", length), f.positive("width", width)
	f.positive("height", height)
	if l && w {
		f.section("length times width", length*width)
	}
	if err := f.err("box"); err != nil {
		return nil, err
	}
	return pile([]slice{{
		piece: prismOf(length * width), h: height,
		half: always(length / 2), rim: always(2 * (length + width)),
	}}), nil
}
