package network

import (
	"math"
	"slices"
)

// flowTable holds Q(Δp) of a line whose parts stand still, shared by all lines of the same parts: piecewise cubic Hermite in x = √|Δp|, cells
// taken from the bits of x, 2^k cells an octave with k chosen octave by octave so that the relative error is under tol. Read-only once built;
// the grid depends on nothing but the law.
type flowTable struct {
	low     float64       // Pa: below it the flow is a cubic in Δp
	high    float64       // Pa: beyond it the law itself is solved
	most    float64       // m³/s: the greatest flow in it, either way
	within  float64       // m³/s: the greatest flow, either way, known to be within the ranges of the parts
	still   [2][2]float64 // of that cubic, by side: the flow is Δp·(a + b·Δp²)
	octaves [2][]octave
	cells   []tableCell
}

type tableCell [4]float64 // coefficients of the cubic in 0 ≤ u < 1

// octave is the cells of 2ⁿ ≤ x < 2ⁿ⁺¹.
type octave struct {
	first int     // cell
	bits  uint    // mantissa bits under those that number the cell
	unit  float64 // 2^-bits
	scale float64 // cells a unit of x
}

const (
	tableBase    = -3 // x from 2^tableBase √Pa on: Δp from 0.016 Pa
	mostCellBits = 9
	mantissaBits = 52
	mantissa     = 1<<mantissaBits - 1
	exponentBias = 1023
)

// newFlowTable makes the table of a chain for pressures up to most, Pa. The relative error is under tol, or under that over the head by which a
// pressure could move levels, where that is less than easeBelow: gamma is ρg, Pa/m.
func newFlowTable(c *chain, most, tol, gamma float64) *flowTable {
	t := &flowTable{low: math.Ldexp(1, 2*tableBase)}
	n := 1
	for t.high = 4 * t.low; t.high < most; t.high *= 4 {
		n++
	}
	for side, sign := range [2]float64{1, -1} {
		if side == 1 && c.symmetric() {
			t.octaves[1], t.still[1] = t.octaves[0], t.still[0]
			break
		}
		q, slope := c.solve(sign*t.low, 0)
		bend := (slope - sign*q/t.low) / 2
		t.still[side] = [2]float64{slope - 3*bend, bend / (t.low * t.low)}
		t.cells = slices.Grow(t.cells, usualCells)
		t.octaves[side] = make([]octave, 0, n)
		room := make([]float64, 4*builderRoom)
		b := tableBuilder{chain: c, sign: sign, v: room[:0:builderRoom], m: room[builderRoom : builderRoom : 2*builderRoom],
			finer: room[2*builderRoom : 2*builderRoom : 3*builderRoom], slope: room[3*builderRoom : 3*builderRoom : 4*builderRoom]}
		for o := range n {
			x0 := math.Ldexp(1, tableBase+o)
			t.octaves[side] = append(t.octaves[side], b.octave(t, x0, tol*math.Max(1, easeBelow*gamma/(4*x0*x0))))
		}
	}
	last := math.Nextafter(t.high, 0)
	forward, _ := t.flow(last)
	back, _ := t.flow(-last)
	t.most = math.Max(forward, -back)
	return t
}

// usualCells and builderRoom are what a table and its making take, as a rule: they grow where that is too little.
const (
	usualCells  = 256
	builderRoom = 65
)

// easeBelow is the head, m, under which a flow may be off by more: a head moves levels by no more than itself.
const easeBelow = 0.01

// tableBuilder adds octaves from the lowest up.
type tableBuilder struct {
	chain        *chain
	sign         float64
	v, m         []float64 // |Q| and its slope by x at the ends of the cells
	finer, slope []float64 // the same for twice as many
}

// law returns |Q| and its slope by x, starting from a guess of |Q|.
func (b *tableBuilder) law(x, guess float64) (v, slope float64) {
	q, s := b.chain.solve(b.sign*x*x, b.sign*guess)
	return b.sign * q, s * 2 * x
}

// octave adds the cells from x0 to 2·x0: from four on, twice as many until the middle of each is good to tol. The middles are then the new ends.
func (b *tableBuilder) octave(t *flowTable, x0, tol float64) octave {
	k := 2
	n, w := 1<<k, x0/float64(int(1)<<k)
	b.v, b.m = b.v[:0], b.m[:0]
	guess := 0.0
	for i := range n + 1 {
		v, m := b.law(x0+float64(i)*w, guess)
		b.v, b.m = append(b.v, v), append(b.m, m)
		guess = v + m*w
	}
	for ; ; k++ {
		worst := b.halve(x0, w)
		if worst < tol || k == mostCellBits {
			break
		}
		b.v, b.finer = b.finer, b.v
		b.m, b.slope = b.slope, b.m
		n, w = 2*n, w/2
	}
	first := len(t.cells)
	for i := range n {
		t.cells = append(t.cells, b.cell(i, w))
	}
	return octave{first: first, bits: uint(mantissaBits - k), unit: math.Ldexp(1, k-mantissaBits), scale: 1 / w}
}

// cell returns the cubic of cell i of width w.
func (b *tableBuilder) cell(i int, w float64) tableCell {
	return hermite(b.v[i], b.v[i+1], b.m[i]*w, b.m[i+1]*w)
}

// hermite returns the cubic in 0 ≤ u ≤ 1 with these values and slopes at its ends, middle its value at ½ and steepness its slope there.
func hermite(v0, v1, m0, m1 float64) tableCell {
	return tableCell{v0, m0, 3*(v1-v0) - 2*m0 - m1, 2*(v0-v1) + m0 + m1}
}

func middle(c *tableCell) float64    { return c[0] + (c[1]+(c[2]+c[3]/2)/2)/2 }
func steepness(c *tableCell) float64 { return c[1] + c[2] + 0.75*c[3] }

// halve puts the law at the middles of the cells between the values at their ends, and returns the worst relative error of a cell there.
func (b *tableBuilder) halve(x0, w float64) (worst float64) {
	b.finer, b.slope = b.finer[:0], b.slope[:0]
	last := len(b.v) - 1
	for i := range last {
		c := b.cell(i, w)
		mid := middle(&c)
		v, m := b.law(x0+(float64(i)+0.5)*w, mid)
		worst = math.Max(worst, math.Abs(mid/v-1))
		b.finer, b.slope = append(b.finer, b.v[i], v), append(b.slope, b.m[i], m)
	}
	b.finer, b.slope = append(b.finer, b.v[last]), append(b.slope, b.m[last])
	return worst
}

// at returns the flow and ∂q/∂Δp; ok is false beyond the table.
func (t *flowTable) at(dp float64) (q, slope float64, ok bool) {
	side, a := 0, dp
	if dp < 0 {
		side, a = 1, -dp
	}
	if a < t.low {
		c := &t.still[side]
		bend := c[1] * a * a
		return dp * (c[0] + bend), c[0] + 3*bend, true
	}
	if !(a < t.high) {
		return 0, 0, false
	}
	x := math.Sqrt(a)
	o, u, i := findCell(t.octaves[side], x)
	c := &t.cells[i]
	q = c[0] + u*(c[1]+u*(c[2]+u*c[3]))
	slope = (c[1] + u*(2*c[2]+3*u*c[3])) * o.scale * 0.5 / x
	if dp < 0 {
		q = -q
	}
	return q, slope, true
}

// flow is at without the slope.
func (t *flowTable) flow(dp float64) (q float64, ok bool) {
	q, _, ok = t.at(dp)
	return q, ok
}

// flows puts the flow at each of dp into q, not a number beyond the table.
func (t *flowTable) flows(dp, q []float64) {
	low, high, cells := t.low, t.high, t.cells
	q = q[:len(dp)]
	for k, d := range dp {
		a, side := math.Abs(d), math.Float64bits(d)>>63
		switch {
		case a < low:
			c := &t.still[side]
			q[k] = d * (c[0] + c[1]*a*a)
		case a < high:
			_, u, i := findCell(t.octaves[side], math.Sqrt(a))
			c := &cells[i]
			q[k] = math.Copysign(c[0]+u*(c[1]+u*(c[2]+u*c[3])), d)
		default:
			q[k] = math.NaN()
		}
	}
}

// slopes is flows with the slopes ∂q/∂Δp.
func (t *flowTable) slopes(dp, q, slope []float64) {
	q, slope = q[:len(dp)], slope[:len(dp)]
	for k, d := range dp {
		v, s, ok := t.at(d)
		if !ok {
			v = math.NaN()
		}
		q[k], slope[k] = v, s
	}
}

// findCell returns the octave of x, its cell and the place in it, 0 ≤ u < 1, from the bits of x.
func findCell(side []octave, x float64) (o *octave, u float64, cell int) {
	b := math.Float64bits(x)
	o = &side[int(b>>mantissaBits)-exponentBias-tableBase]
	m := b & mantissa
	top := m >> (o.bits & 63)
	u = float64(m-top<<(o.bits&63)) * o.unit
	return o, u, o.first + int(top)
}
