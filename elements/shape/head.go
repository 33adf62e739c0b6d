package shape

import "math"

// Head closes an upright cylinder below or above, or a lying one at its ends. It is made for one diameter by Flat, Cone, Ellipsoidal, Torispherical,
// TorisphericalForm or Hemispherical. A nil Head is flat.
type Head interface {
	Diameter() float64 // m, of the cylinder it fits
	// Depth returns the depth, m, from the tangent line to the lowest inside point, as a bottom.
	Depth() float64
	// Volume returns the volume, m³, below the tangent line, as a bottom.
	Volume() float64

	bottom() []slice // from its lowest point to the tangent line
	top() []slice    // the same for a head seen from inside the roof, still from its pole; to be flipped
	ends() endPair   // two of them on a lying cylinder; nil: flat
	name() string
}

// outletOr returns the bore, m, of the opening in a tip: as given, else 50 mm or a quarter of the diameter, whichever is less.
func outletOr(outlet, diameter float64) float64 {
	if outlet > 0 {
		return outlet
	}
	return math.Min(defaultOutlet, diameter/4)
}

// tipArea returns the least area, m², near a pole with an opening of that bore, m.
func tipArea(outlet float64) float64 { return math.Max(circle(outlet), minArea) }

// headBase is what all heads have.
type headBase struct {
	kind     string
	diameter float64 // m
}

func (h headBase) Diameter() float64 { return h.diameter }
func (h headBase) name() string      { return h.kind }

// checkHead collects the faults that all heads can have.
func checkHead(f *faults, diameter, outlet float64) {
	if f.positive("diameter", diameter) {
		f.section("the section of the diameter", circle(diameter))
	}
	if f.notNegative("outlet", outlet) && diameter > 0 && outlet >= diameter {
		f.add("outlet %s does not fit in a diameter of %s", metres(outlet), metres(diameter))
	}
}

// checkFit tells when a head was made for another diameter, m.
func checkFit(f *faults, place string, head Head, diameter float64) {
	if head != nil && math.Abs(head.Diameter()-diameter) > 1e-9*diameter {
		f.add("%s is made for a diameter of %s, the cylinder has %s", place, metres(head.Diameter()), metres(diameter))
	}
}

func volumeOf(slices []slice) (v float64) {
	for i := range slices {
		dv, _ := slices[i].at(slices[i].h)
		v += dv
	}
	return v
}

func heightOf(slices []slice) (h float64) {
	for i := range slices {
		h += slices[i].h
	}
	return h
}
