package quantity

// Value is a quantity as the program uses it and as its author wrote it.
type Value struct {
	SI        float64 // in the SI unit of Dim; for a gauge pressure still gauge
	Doubt     Doubt   // how well it is known, absolute, in the same SI unit
	Text      string  // as written; empty for a value made by the program
	Unit      string  // canonical unit of the text, "mm", "bar(g)"; "" when bare
	Dim       Dim     // what was asked for
	Gauge     Ref     // for pressures: what the text said it is measured from
	Kinematic bool    // for viscosities: SI is m²/s, not Pa·s
}

// Ref tells what a pressure is measured from.
type Ref uint8

const (
	None     Ref = iota // not stated, or not a pressure
	Gauge               // above the site's atmosphere: "(g)"
	Absolute            // above vacuum: "(a)"
)

// String returns "", "(g)" or "(a)", as written behind a unit.
func (r Ref) String() string { return [...]string{"", "(g)", "(a)"}[r] }

// DoubtKind is the shape of a doubt.
type DoubtKind uint8

const (
	Certain  DoubtKind = iota // nothing stated
	Normal95                  // normal; SI ± Half holds 95 %
	Uniform                   // anywhere from Low to High, all alike; SI is the middle
	Factor                    // SI times or divided by Factor
)

// Doubt says how well a value is known. Half, Low and High are absolute, in the
// SI unit of the value (for temperatures Half is a difference in K).
type Doubt struct {
	Kind   DoubtKind
	Half   float64 // half-width of the 95 % interval, > 0; Normal95
	Low    float64 // lower end; Uniform
	High   float64 // upper end, > Low; Uniform
	Factor float64 // greater than 1; Factor
}

// Stated reports whether there is any doubt at all.
func (d Doubt) Stated() bool { return d.Kind != Certain }

// Bounds returns the ends of the doubt around the value v: the 95 % interval,
// the uniform range, or v ÷ and × the factor; v twice when nothing is stated.
func (d Doubt) Bounds(v float64) (low, high float64) {
	switch d.Kind {
	case Normal95:
		return v - d.Half, v + d.Half
	case Uniform:
		return d.Low, d.High
	case Factor:
		return min(v/d.Factor, v*d.Factor), max(v/d.Factor, v*d.Factor)
	}
	return v, v
}
