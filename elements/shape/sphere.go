package shape

// Sphere returns a sphere of diameter D, m, with an outlet, m, in its pole (0: 50 mm, or a quarter of the diameter); the pole above is like the one below.
//
//	A(h) = π·(D·h − h²), not under the outlet's area; V(h) = π·h²·(3·D/2 − h)/3
//
// Source: spherical cap, solid geometry.
func Sphere(diameter, outlet float64) (Shape, error) {
	var f faults
	checkHead(&f, diameter, outlet)
	if err := f.err("sphere"); err != nil {
		return nil, err
	}
	r := diameter / 2
	half := capOf(r, r, r, tipArea(outletOr(outlet, diameter)))
	return pile(append(half, flipAll(half)...)), nil
}
