package shape

import "math"

// strip is one stretch of a tabled area: cubics of A, m², between evenly spaced nodes of u. The volume is their integral, so that dV/dh = A is exact:
//
//	root:     u = √(h − h₀),  dh = 2u·du
//	straight: u = h − h₀
//
// The root takes the half powers of h out of an area that starts with them. Error of V: of the order of n⁻⁴/384 of A″″ in u.
type strip struct {
	h0, du float64
	inv    float64 // 1/du
	root   bool
	cells  []stripCell
}

// stripCell is A = a₀ + a₁t + a₂t² + a₃t³ at u = u₀ + t, and the volume, m³, at t = 0.
type stripCell struct{ v, a0, a1, a2, a3 float64 }

// newStrip tables area(h) with slope dA/dh between h0 and h1 in n cells, the volume at h0 being v0. At level 0 the area is 0.
func newStrip(h0, h1, v0 float64, root bool, n int, area func(h float64) (a, grow float64)) strip {
	s := strip{h0: h0, root: root, cells: make([]stripCell, n)}
	width := h1 - h0
	if root {
		width = math.Sqrt(width)
	}
	s.du = width / float64(n)
	s.inv = 1 / s.du
	at := func(i int) (a, slope float64) {
		u := s.du * float64(i)
		if !root {
			return area(h0 + u)
		}
		if i == 0 && h0 == 0 {
			// dA/du has a limit where dA/dh has none.
			u = 1e-7 * s.du
			_, slope = area(u * u)
			return 0, 2 * u * slope
		}
		a, slope = area(h0 + u*u)
		return a, 2 * u * slope
	}
	a, p := at(0)
	for i := range n {
		b, q := at(i + 1)
		rise := (b - a) / s.du
		s.cells[i] = stripCell{v0, a, p, (3*rise - 2*p - q) / s.du, (p + q - 2*rise) / s.du / s.du}
		v0, _, _ = s.in(i, s.du)
		a, p = b, q
	}
	return s
}

func (s *strip) eval(h float64) (v, area, grow float64) {
	u := max(h-s.h0, 0)
	if s.root {
		u = math.Sqrt(u)
	}
	i := min(int(u*s.inv), len(s.cells)-1)
	return s.in(i, u-float64(i)*s.du)
}

// in evaluates cell i at t past its start.
func (s *strip) in(i int, t float64) (v, area, grow float64) {
	c := &s.cells[i]
	t2 := t * t
	area = c.a0 + t*c.a1 + t2*(c.a2+t*c.a3)
	grow = c.a1 + t*(2*c.a2+t*3*c.a3)
	v = t * (c.a0 + t*(c.a1*(1./2)) + t2*(c.a2*(1./3)+t*(c.a3*(1./4))))
	if !s.root {
		return c.v + v, area, grow
	}
	// ∫A·2u du with u = u₀ + t.
	u0 := float64(i) * s.du
	moment := t2 * (c.a0*(1./2) + t*(c.a1*(1./3)) + t2*(c.a2*(1./4)+t*(c.a3*(1./5))))
	return c.v + 2*(u0*v+moment), area, grow / max(2*(u0+t), 1e-150)
}
