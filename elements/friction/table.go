package friction

import (
	"math"
	"sync"
)

// Table holds f·Re over Re for one relative roughness: a cubic Hermite in cells of equal width within each octave of Re, found from the
// bits of the number. It is C¹, never falls, keeps within 1e-8 of Churchill from Re 0 to 1e9, goes on straight beyond, and costs a tenth of the formula.
// A Table is only read once it is made and may be shared.
type Table struct {
	cell       [][4]float64 // coefficients of powers of the place within the cell, 0..1
	last, rise float64      // f·Re and its slope where the table ends
}

const (
	firstOctave = 9 // below Re = 2⁹ flow is laminar to the last bit
	endOfTable  = 1 << 30
)

// octaves is the number of cells, as a power of two, and where they begin. The critical range needs most: there f turns within a few per cent of Re.
var octaves, cells = layout([...]int{
	3, 7, 8, 7, 5, 5, 5, 5, 5, 5, 5, 5, 5, 5, 5, 4, 4, 4, 4, 4, 4,
})

type octave struct{ bits, start int }

func layout(bits [30 - firstOctave]int) (all [32]octave, n int) {
	for i, b := range bits {
		all[i] = octave{b, n}
		n += 1 << b
	}
	return all, n
}

// nodes are the points where cells meet, the same for every table.
var nodes = sync.OnceValue(func() []point {
	all := []point{pointAt(1 << firstOctave)}
	for i, o := range octaves[:30-firstOctave] {
		low := math.Ldexp(1, firstOctave+i)
		w := math.Ldexp(low, -o.bits)
		for k := range 1 << o.bits {
			all = append(all, pointAt(low+float64(k+1)*w))
		}
	}
	return all
})

// NewTable builds the table of the relative roughness ε/D (−).
func NewTable(rough float64) *Table {
	t := &Table{cell: make([][4]float64, cells)}
	at := nodes()
	y0, d0 := at[0].churchill(rough)
	for i := range t.cell {
		w := at[i+1].re - at[i].re
		y1, d1 := at[i+1].churchill(rough)
		m0, m1 := d0*w, d1*w
		t.cell[i] = [4]float64{y0, m0, 3*(y1-y0) - 2*m0 - m1, 2*(y0-y1) + m0 + m1}
		y0, d0 = y1, d1
	}
	t.last, t.rise = y0, d0
	return t
}

// FRe returns f·Re and its derivative by Re, both dimensionless, at a Reynolds number Re ≥ 0.
func (t *Table) FRe(re float64) (fre, slope float64) {
	if re < 1<<firstOctave {
		return Laminar, 0
	}
	if re >= endOfTable {
		return t.last + (re-endOfTable)*t.rise, t.rise
	}
	b := math.Float64bits(re)
	e := uint(b >> 52)
	o := &octaves[(e-1023-firstOctave)&31] // within range already; the mask spares a check
	m := b & (1<<52 - 1)
	k := uint(o.bits) & 63
	c := &t.cell[o.start+int(m>>((52-k)&63))]
	u := math.Float64frombits(0x3ff<<52|m<<k&(1<<52-1)) - 1
	perWidth := math.Float64frombits(uint64(2046+k-e) << 52)
	return c[0] + u*(c[1]+u*(c[2]+u*c[3])), (c[1] + u*(2*c[2]+u*3*c[3])) * perWidth
}

// shared keeps tables by relative roughness. A table is a pure function of its key, so who builds it does not matter; when there are
// too many (a study that draws a new roughness each time) all are let go.
var shared = struct {
	sync.Mutex
	of map[float64]*Table
}{of: map[float64]*Table{}}

const mostShared = 256

// Shared returns the table of the relative roughness ε/D (−), made once for all that ask.
func Shared(rough float64) *Table {
	shared.Lock()
	defer shared.Unlock()
	if t := shared.of[rough]; t != nil {
		return t
	}
	if len(shared.of) >= mostShared {
		clear(shared.of)
	}
	t := NewTable(rough)
	shared.of[rough] = t
	return t
}
