package shape

// Flat returns a flat head for diameter, m.
//
//	depth 0, volume 0
func Flat(diameter float64) (Head, error) {
	var f faults
	checkHead(&f, diameter, 0)
	if err := f.err("flat"); err != nil {
		return nil, err
	}
	return flat{headBase{"flat", diameter}}, nil
}

type flat struct{ headBase }

func (flat) Depth() float64  { return 0 }
func (flat) Volume() float64 { return 0 }
func (flat) bottom() []slice { return nil }
func (flat) top() []slice    { return nil }
func (flat) ends() endPair   { return nil }
