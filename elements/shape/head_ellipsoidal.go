package shape

// Ellipsoidal returns half an ellipsoid for diameter D, m, of a depth, m (0: D/4, the 2:1 head), with an outlet, m, in its pole (0: 50 mm, or a quarter of
// the diameter).
//
//	A(z) = π·(D/2)²/depth²·(2·depth·z − z²), not under the outlet's area; V = π·D²·depth/6
//
// z is the height over the pole. Source: solid geometry; 2:1: π·D³/24. Range: depth > 0.
func Ellipsoidal(diameter, depth, outlet float64) (Head, error) {
	return ellipsoid("ellipsoidal", diameter, depth, outlet)
}

// Hemispherical returns half a sphere for diameter D, m, with an outlet, m, in its pole.
//
//	A(z) = π·(D·z − z²), not under the outlet's area; V = π·D³/12
//
// Source: solid geometry.
func Hemispherical(diameter, outlet float64) (Head, error) {
	return ellipsoid("hemispherical", diameter, diameter/2, outlet)
}

func ellipsoid(kind string, diameter, depth, outlet float64) (Head, error) {
	var f faults
	checkHead(&f, diameter, outlet)
	f.notNegative("depth", depth)
	if err := f.err(kind); err != nil {
		return nil, err
	}
	if depth == 0 {
		depth = diameter / 4
	}
	return &ellipsoidal{headBase{kind, diameter}, depth, tipArea(outletOr(outlet, diameter))}, nil
}

type ellipsoidal struct {
	headBase
	depth, tip float64 // m, m²
}

func (e *ellipsoidal) Depth() float64  { return e.depth }
func (e *ellipsoidal) Volume() float64 { return volumeOf(e.bottom()) }
func (e *ellipsoidal) bottom() []slice { return capOf(e.diameter/2, e.depth, e.depth, e.tip) }
func (e *ellipsoidal) top() []slice    { return e.bottom() }
