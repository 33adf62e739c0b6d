package shape

import "math"

// knuckle is the slice of a torus that joins a crown to the straight side; z over the joint, y = up − z below the tangent line:
//
//	A = π·(c + w)²,  w = √(k² − y²),  dA/dz = 2·π·y·(1 + c/w)
//	V = G(up) − G(y),  G(y) = π·((c² + k²)·y − y³/3 + c·(y·w + k²·arcsin(y/k)))
type knuckle struct {
	c, k, up float64 // m, radius of the circle of knuckle centres, knuckle radius, height of the joint below the tangent line
	all      float64 // m³, G(up)
}

func newKnuckle(c, k, up float64) *knuckle {
	n := &knuckle{c: c, k: k, up: up}
	n.all = n.below(up, n.width(up))
	return n
}

func (n *knuckle) width(y float64) float64 { return math.Sqrt((n.k - y) * (n.k + y)) }

func (n *knuckle) below(y, w float64) float64 {
	return math.Pi * (y*(n.c*n.c+n.k*n.k-y*y/3) + n.c*(y*w+n.k*n.k*math.Atan2(y, w)))
}

func (n *knuckle) eval(z float64) (v, area, grow float64) {
	y := n.up - z
	w := n.width(y)
	return n.all - n.below(y, w), math.Pi * (n.c + w) * (n.c + w), 2 * math.Pi * y * (1 + n.c/w)
}
