// Package shape turns the level in a vessel into its volume and back. It is geometry and nothing else: SI numbers in, SI numbers out.
//
// Every shape is a body of slices from the bottom up. Inside a slice the area A of the liquid's surface is a smooth function of the level h, the
// volume V is its integral, and
//
//	dV/dh = A(h),  dh/dV = 1/A(h)
//
// hold to rounding for the functions returned, not only for the vessel meant. See body.go for how slices are put together and search.go for how a
// level is found where there is no closed form.
package shape

// Shape is the inside of a vessel as level against volume.
type Shape interface {
	// Height returns the height over all, m.
	Height() float64
	// Volume returns the volume, m³, at level h, m above the lowest inside point, and the area dV/dh, m². Below 0 it goes on linearly with the area of
	// the tip, above Height with the area at the top or 1 % of the largest section, whichever is more.
	Volume(h float64) (v, area float64)
	// Level is the inverse: the level, m, at volume v, m³, and dh/dV, 1/m².
	Level(v float64) (h, slope float64)
	// Straight returns the span of volumes, m³, around v within which Level is a straight line; lo is not under hi where it is none.
	Straight(v float64) (lo, hi float64)
	// Corners returns the levels, m, where dV/dh jumps by more than 1 %, ascending; Height is one of them where the top is a pole or a point. The
	// slice is the shape's own.
	Corners() []float64
	// Outline returns the front elevation in true scale as a closed polygon, counter-clockwise from the bottom, x from the middle.
	Outline() []Point
	// Perimeter returns the length of the rim at level h, m: that of the circle or rectangle there, and where the section is neither that of a circle
	// with the area of the largest section.
	Perimeter(h float64) float64
}

// Point is a point of an outline, m: x to the right, y up.
type Point struct{ X, Y float64 }

const (
	minArea       = 1e-4  // m², no section is smaller
	defaultOutlet = 0.050 // m, bore of the opening in a tip where none is known
	cornerJump    = 0.01  // share by which an area must jump to be a corner
	topShare      = 0.01  // of the largest section: least area above the top
)
