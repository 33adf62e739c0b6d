package network

import "math"

// flowTable holds Q(Δp) of a line whose parts stand still, shared by all lines of the same parts: piecewise cubic Hermite in x = √|Δp|, cells
// taken from the bits of x, 2^k cells an octave with k chosen octave by octave so that the relative error is under tol. Read-only once built;
// the grid depends on nothing but the law.
type flowTable struct {
	base int // binary exponent of the lowest octave
	side [2][]octave
	low  float64 // Δp under which the law itself is solved
	high float64 // Δp beyond which the law itself is solved
	cell [][4]float64
}

type octave struct {
	first, shift int32
	scale        float64 // cells a unit of x
	unit         float64 // 2^-shift
}

const (
	tableOctaves = 16 // of x: from 0.03 Pa to 8 MPa
	tableBase    = -3 // lowest x = 2^(base) √Pa
)

func newFlowTable(c *chain, tol float64) *flowTable {
	t := &flowTable{base: tableBase}
	x0 := math.Ldexp(1, tableBase)
	t.low, t.high = x0*x0, math.Ldexp(1, 2*(tableBase+tableOctaves))
	for side := range t.side {
		sign := 1 - 2*float64(side)
		t.side[side] = make([]octave, tableOctaves)
		q := 0.0
		for o := range t.side[side] {
			t.side[side][o] = t.fill(c, sign, math.Ldexp(1, tableBase+o), tol, &q)
		}
	}
	return t
}

// fill adds the cells of one octave starting at x0, doubling their number until the middle of each is good to tol.
func (t *flowTable) fill(c *chain, sign, x0, tol float64, guess *float64) octave {
	first := len(t.cell)
	for k := 2; ; k++ {
		t.cell = t.cell[:first]
		n, worst := 1<<k, 0.0
		w := x0 / float64(n)
		law := func(x float64) (v, m float64) {
			q, s := c.solve(sign*x*x, *guess)
			*guess = q
			return q, sign * s * 2 * x * w
		}
		v0, m0 := law(x0)
		for i := 0; i < n; i++ {
			x := x0 + float64(i)*w
			vm, _ := law(x + w/2)
			v1, m1 := law(x + w)
			a := [4]float64{v0, m0, 3*(v1-v0) - 2*m0 - m1, 2*(v0-v1) + m0 + m1}
			mid := a[0] + (a[1]+(a[2]+a[3]/2)/2)/2
			if vm != 0 {
				worst = math.Max(worst, math.Abs(mid/vm-1))
			}
			t.cell = append(t.cell, a)
			v0, m0 = v1, m1
		}
		if worst < tol || k == 9 {
			return octave{first: int32(first), shift: int32(52 - k), scale: 1 / w, unit: math.Ldexp(1, k-52)}
		}
	}
}

// at returns the flow and ∂q/∂Δp; ok is false outside the table.
func (t *flowTable) at(dp float64) (q, slope float64, ok bool) {
	side := t.side[0]
	a := dp
	if dp < 0 {
		side, a = t.side[1], -dp
	}
	if !(a >= t.low && a < t.high) {
		return 0, 0, false
	}
	x := math.Sqrt(a)
	bits := math.Float64bits(x)
	o := &side[int(bits>>52)-1023-t.base]
	const mantissa = 1<<52 - 1
	m := bits & mantissa
	c := &t.cell[int(o.first)+int(m>>o.shift)]
	u := float64(m&(1<<o.shift-1)) * o.unit
	q = c[0] + u*(c[1]+u*(c[2]+u*c[3]))
	slope = (c[1] + u*(2*c[2]+3*u*c[3])) * o.scale * 0.5 / x
	if dp < 0 {
		slope = -slope
	}
	return q, slope, true
}
