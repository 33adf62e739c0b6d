package shape

import "math"

// searched is a law without a closed inverse, and that inverse.
//
// A start value comes from a table of z against V, cubic Hermite between nodes that know dz/dV = 1/A. Its cells halve seven times an octave of V
// towards zero, since near a tip z goes as V^½ or V^⅓ and would not be met by even cells; the cell is found from the bits of the number. It is good to
// about 1e-6 of z. One step of Chebyshev's method, of third order,
//
//	e = V(z) − v,  z ← z − (e/A)/(1 − e·A′/(2A²))
//
// takes it to rounding; where the start was poor the step is repeated, and one that leaves the cell is replaced by halving.
type searched struct {
	law
	full  float64 // m³
	scale float64 // cells/full-scale: v·scale lies in (0, 1]
	nodes []node
}

type node struct{ v, z, slope, inv float64 } // m³, m, 1/m², 1/m³: one over the width of the cell above

const (
	cellBits    = 3 // 2³ cells an octave
	minOctaves  = 4
	maxOctaves  = 44
	settled     = 1e-5 // of z: a step smaller than this leaves an error of the order of its cube
	settledArea = 2e-6 // of A: the slope is then right to the order of its square
	maxSteps    = 80
)

// search returns the piece of a law over height h, m.
func search(l law, h float64) piece {
	s := &searched{law: l}
	s.full, _, _ = l.eval(h)
	s.scale = 1 / s.full
	cells := s.octaves(h) << cellBits
	s.nodes = make([]node, cells+2)
	_, tip, _ := l.eval(0)
	s.nodes[0] = node{slope: 1 / tip}
	for i := 0; i <= cells; i++ {
		v := s.full * fraction(i, cells)
		z := h
		if i < cells {
			z = s.solve(v, s.nodes[i].z, h)
		}
		_, a, _ := l.eval(z)
		s.nodes[i].inv = 1 / (v - s.nodes[i].v)
		s.nodes[i+1] = node{v: v, z: z, slope: 1 / a}
	}
	return s
}

// octaves tells how far down the table must reach: to where the area is twice that of the bottom.
func (s *searched) octaves(h float64) int {
	_, tip, _ := s.eval(0)
	lo, hi := 0.0, h
	for i := 0; i < 200 && hi-lo > 1e-3*hi; i++ {
		mid := (lo + hi) / 2
		if _, a, _ := s.eval(mid); a > 2*tip {
			hi = mid
		} else {
			lo = mid
		}
	}
	v, _, _ := s.eval(hi)
	return min(max(minOctaves, int(math.Ceil(math.Log2(s.full/v)))+3), maxOctaves)
}

// fraction returns the share of the full volume at node i of the cells: the inverse of cell.
func fraction(i, cells int) float64 {
	top := math.Float64bits(1) >> (52 - cellBits)
	return math.Float64frombits((top - uint64(cells) + uint64(i)) << (52 - cellBits))
}

// cell returns the cell of share x; 0 is everything below the table.
func (s *searched) cell(x float64) int {
	top := int(math.Float64bits(1) >> (52 - cellBits))
	i := int(math.Float64bits(x)>>(52-cellBits)) - top + len(s.nodes) - 1
	return min(max(i, 0), len(s.nodes)-2)
}

// solve finds z between lo and hi with volume v by Newton's method, halving where a step would leave them. It is for building only.
func (s *searched) solve(v, lo, hi float64) float64 {
	z := lo
	for range maxSteps {
		at, a, _ := s.eval(z)
		if at < v {
			lo = z
		} else {
			hi = z
		}
		next := z - (at-v)/a
		if !(next >= lo && next <= hi) {
			next = (lo + hi) / 2
		}
		if math.Abs(next-z) <= 2e-16*z {
			return next
		}
		z = next
	}
	return z
}

func (s *searched) level(v float64) (z, slope float64) {
	i := s.cell(v * s.scale)
	n, m := &s.nodes[i], &s.nodes[i+1]
	lo, hi := n.z, m.z
	t := (v - n.v) * n.inv
	w := m.v - n.v
	rise, p, q := hi-lo, w*n.slope, w*m.slope
	z = lo + t*(p+t*(3*rise-2*p-q+t*(p+q-2*rise)))
	z = max(lo, min(z, hi))
	for range maxSteps {
		at, a, grow := s.eval(z)
		e, r := at-v, 1/a
		newton, bend := e*r, grow*r
		step := newton * (1 + newton*bend/2)
		next := z - step
		if x := step * bend; math.Abs(step) <= settled*z && math.Abs(x) <= settledArea {
			// A at the new place: a·(1 − x), to second order.
			return next, r * (1 + x + x*x)
		}
		if e < 0 {
			lo = z
		} else {
			hi = z
		}
		if !(next >= lo && next <= hi) {
			next = (lo + hi) / 2
		}
		if next == z {
			break
		}
		z = next
	}
	_, area, _ := s.eval(z)
	return z, 1 / area
}
