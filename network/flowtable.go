package network

import "math"

// flowTable holds Q(Δp) of a line whose parts stand still, shared by all lines of the same parts: piecewise cubic Hermite in x = √|Δp|, cells
// taken from the bits of x, 2^k cells an octave with k chosen octave by octave so that the relative error is under tol. Read-only once built;
// the grid depends on nothing but the law.
type flowTable struct {
	low, high float64 // Pa: outside of them the law itself is solved
	within    float64 // m³/s: the greatest flow, either way, known to be within the ranges of the parts
	octaves   [2][]octave
	cells     []tableCell
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

// newFlowTable makes the table of a chain for pressures up to most, Pa.
func newFlowTable(c *chain, most, tol float64) *flowTable {
	t := &flowTable{low: math.Ldexp(1, 2*tableBase)}
	n := 1
	for t.high = 4 * t.low; t.high < most; t.high *= 4 {
		n++
	}
	for side, sign := range [2]float64{1, -1} {
		if side == 1 && c.symmetric() {
			t.octaves[1] = t.octaves[0]
			break
		}
		b := tableBuilder{chain: c, sign: sign, tol: tol, bits: 2}
		for o := range n {
			t.octaves[side] = append(t.octaves[side], b.octave(t, math.Ldexp(1, tableBase+o)))
		}
	}
	return t
}

// tableBuilder adds octaves from the lowest up.
type tableBuilder struct {
	chain *chain
	sign  float64
	tol   float64
	bits  uint    // log₂ of the cells of the last octave
	q, s  float64 // flow and slope found last
	dp    float64
}

// law returns |Q| and its slope by x.
func (b *tableBuilder) law(x float64) (v, slope float64) {
	dp := b.sign * x * x
	q, s := b.chain.solve(dp, b.q+b.s*(dp-b.dp))
	b.q, b.s, b.dp = q, s, dp
	return b.sign * q, s * 2 * x
}

// octave adds the cells from x0 to 2·x0, in twos of what the last octave took until the middle of each is good to tol.
func (b *tableBuilder) octave(t *flowTable, x0 float64) octave {
	first := len(t.cells)
	for k := max(2, b.bits-1); ; k++ {
		t.cells = t.cells[:first]
		if n := 1 << k; b.fill(t, x0, n) < b.tol || k == mostCellBits {
			b.bits = k
			return octave{first: first, bits: mantissaBits - k, unit: math.Ldexp(1, -int(mantissaBits-k)), scale: float64(n) / x0}
		}
	}
}

// fill adds n cells and returns the worst relative error in the middle of one; it stops where that is over tol.
func (b *tableBuilder) fill(t *flowTable, x0 float64, n int) (worst float64) {
	w := x0 / float64(n)
	v0, m0 := b.law(x0)
	for i := range n {
		x := x0 + float64(i)*w
		vm, _ := b.law(x + w/2)
		v1, m1 := b.law(x + w)
		a := tableCell{v0, m0 * w, 3*(v1-v0) - (2*m0+m1)*w, 2*(v0-v1) + (m0+m1)*w}
		if vm != 0 {
			worst = math.Max(worst, math.Abs((a[0]+(a[1]+(a[2]+a[3]/2)/2)/2)/vm-1))
		}
		if worst >= b.tol && n < 1<<mostCellBits {
			return worst
		}
		t.cells = append(t.cells, a)
		v0, m0 = v1, m1
	}
	return worst
}

// at returns the flow and ∂q/∂Δp; ok is false outside the table.
func (t *flowTable) at(dp float64) (q, slope float64, ok bool) {
	side, a := t.octaves[0], dp
	if dp < 0 {
		side, a = t.octaves[1], -dp
	}
	if !(a >= t.low && a < t.high) {
		return 0, 0, false
	}
	x := math.Sqrt(a)
	o, u, i := findCell(side, x)
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
	side, a := t.octaves[0], dp
	if dp < 0 {
		side, a = t.octaves[1], -dp
	}
	if !(a >= t.low && a < t.high) {
		return 0, false
	}
	_, u, i := findCell(side, math.Sqrt(a))
	c := &t.cells[i]
	if q = c[0] + u*(c[1]+u*(c[2]+u*c[3])); dp < 0 {
		q = -q
	}
	return q, true
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
