package shape

// UprightCylinder returns a standing cylinder of diameter, m, and height over all, m, or length of the straight side, m (the other 0), closed by
// bottom and top (nil: flat).
//
//	V(h) = V_bottom + π·D²/4·(h − depth)   on the straight side
//
// Source: solid geometry; the heads' are with them. Range: the heads must fit into the height over all.
func UprightCylinder(diameter, height, straight float64, bottom, top Head) (Shape, error) {
	var f faults
	checkHead(&f, diameter, 0)
	checkFit(&f, "bottom", bottom, diameter)
	checkFit(&f, "top", top, diameter)
	switch {
	case height == 0 && straight == 0:
		f.add("give its height over all or its straight side")
	case height != 0 && straight != 0:
		f.add("give its height over all or its straight side, not both")
	case height != 0:
		f.positive("height", height)
	default:
		f.positive("straight", straight)
	}
	if err := f.err("upright_cylinder"); err != nil {
		return nil, err
	}
	var low, high []slice
	if bottom != nil {
		low = bottom.bottom()
	}
	if top != nil {
		high = flipAll(top.top())
	}
	heads := heightOf(low) + heightOf(high)
	if height != 0 {
		straight = height - heads
		if straight < -1e-9*height {
			f.add("height %s is over all and less than its bottom and top take, %s", metres(height), metres(heads))
			return nil, f.err("upright_cylinder")
		}
	}
	slices := append(low, slice{piece: prismOf(circle(diameter)), h: straight})
	return pile(append(slices, high...)), nil
}
