package shape

import "math"

// LyingCylinder returns a lying cylinder of diameter D, m, and length L between tangent lines, m, with two like ends (nil: flat); outlet, m, is the
// opening in its lowest line (0: 50 mm, or a quarter of the diameter), whose area is the least near the lowest and highest line.
//
//	A(h) = 2·L·√(2·R·h − h²) + A_ends(h)
//	V(h) = L·(R²·arccos(1 − h/R) − (R − h)·√(2·R·h − h²)) + V_ends(h)
//
// R = D/2; the upper half is the lower one upside down. A is tabled (see strip) and V is the integral of the table, within 1e-9 of the formula.
// Source: circular segment; the ends' are with them. Range: h from 0 to D.
func LyingCylinder(diameter, length, outlet float64, ends Head) (Shape, error) {
	var f faults
	checkHead(&f, diameter, outlet)
	f.positive("length", length)
	checkFit(&f, "ends", ends, diameter)
	if err := f.err("lying_cylinder"); err != nil {
		return nil, err
	}
	l := &lying{length: length, r: diameter / 2}
	if ends != nil {
		l.ends = ends.ends()
	}
	tip := tipArea(outletOr(outlet, diameter))
	most, _ := l.section(l.r)
	if tip >= most {
		f.add("outlet %s is larger than the largest section", metres(outlet))
		return nil, f.err("lying_cylinder")
	}
	l.table()
	half := l.lowerHalf(tip, most)
	return pile(append(half, flipAll(half)...)), nil
}

// lying is the lower half of a lying cylinder.
type lying struct {
	length, r float64 // m
	ends      endPair // nil: flat
	split     float64 // m, level of the joint of the strips; +Inf: only one
	low, high strip
	z0, v0    float64 // m, m³: where the slice starts
}

// section returns the area, m², and dA/dh, m, at level h, m.
func (l *lying) section(h float64) (area, grow float64) {
	s := math.Sqrt(h * (2*l.r - h))
	area, grow = 2*l.length*s, 2*l.length*(l.r-h)/s
	if l.ends != nil {
		a, g := l.ends.section(h)
		area, grow = area+a, grow+g
	}
	return area, grow
}

// stripCells are the cells of one strip; 128 keep the volume within 1e-9, straight ones, which have a weak singularity to meet, are twice as many.
const stripCells = 128

func (l *lying) table() {
	l.split = math.Inf(1)
	root := true
	if l.ends != nil {
		if h, withRoot := l.ends.split(); h > 0 {
			l.split, root = h, withRoot
		}
	}
	l.low = newStrip(0, min(l.split, l.r), 0, true, stripCells, l.section)
	if l.split < l.r {
		cells := stripCells
		if !root {
			cells *= 2
		}
		v, _, _ := l.low.eval(l.split)
		l.high = newStrip(l.split, l.r, v, root, cells, l.section)
	}
}

func (l *lying) eval(z float64) (v, area, grow float64) {
	s := &l.low
	if z+l.z0 > l.split {
		s = &l.high
	}
	v, area, grow = s.eval(z + l.z0)
	return v - l.v0, area, grow
}

// lowerHalf returns the slices up to the axis: a prism as wide as the tip until the cylinder is that wide, then the cylinder.
func (l *lying) lowerHalf(tip, most float64) []slice {
	lo, hi := 0.0, l.r
	for range 1200 {
		mid := (lo + hi) / 2
		if mid == lo || mid == hi {
			break
		}
		if _, a, _ := l.eval(mid); a < tip {
			lo = mid
		} else {
			hi = mid
		}
	}
	rim := always(round(most))
	width := func(h float64) float64 {
		x := l.length / 2
		if l.ends != nil {
			x += l.ends.depthAt(l.r - h)
		}
		return x
	}
	v, _, _ := l.eval(hi)
	l.z0, l.v0 = hi, v
	curved := l.ends != nil
	return []slice{
		{piece: prismOf(tip), h: hi, half: width, rim: rim, bent: curved},
		{piece: search(l, l.r-hi), h: l.r - hi, half: func(z float64) float64 { return width(z + hi) }, rim: rim, bent: curved},
	}
}
