package shape

// Stack returns shapes piled from the bottom up; of tanks that widen, narrow or change form on the way.
//
//	V(h) = ΣV_j(H_j) of the sections below + V_i(h − z_i)
//
// A joint where the area jumps by more than 1 % is a corner, a smaller one between straight sides is rounded over ±0.5 mm. Range: one section or more,
// all made by this package.
func Stack(sections ...Shape) (Shape, error) {
	var f faults
	if len(sections) == 0 {
		f.add("sections are missing: give shapes from the bottom up")
	}
	var slices []slice
	for i, s := range sections {
		b, ours := s.(*body)
		if !ours {
			f.add("section %d can not be stacked", i+1)
			continue
		}
		slices = append(slices, b.slices...)
	}
	if err := f.err("stack"); err != nil {
		return nil, err
	}
	return pile(soften(slices)), nil
}
