package quantity

import (
	"fmt"
	"math/big"
	"strings"
)

// unit is one way to write a dimension: SI = (x + offset) × factor, exactly.
type unit struct {
	name      string   // canonical spelling
	factor    *big.Rat // SI units in one of this
	offset    *big.Rat // added before the factor; nil except for °C and °F
	num, den  uint64   // factor = num/den when both are below 2⁵³, else 0
	float     float64  // factor, rounded
	shift     float64  // offset, rounded
	centi     int64    // offset in hundredths, which holds it exactly
	order     int      // place in the list of its dimension
	gauge     Ref
	kinematic bool
}

// def is a line of a unit table.
type def struct {
	names  string // canonical spelling, then other accepted ones, parted by blanks
	factor string // SI units in one of it: decimal numbers joined by * and /
}

// unitTable holds the units of one dimension.
type unitTable struct {
	si     *unit            // the one with factor 1 and no offset
	list   []*unit          // canonical ones, as help shows them
	byName map[string]*unit // every accepted spelling
}

// tables is filled once and only read afterwards.
var tables = buildTables()

func buildTables() *[numDims]unitTable {
	t := new([numDims]unitTable)
	for d := range t {
		t[d].byName = map[string]*unit{}
		if Dim(d).Bare() {
			t[d].add(def{"", "1"}, "")
		}
	}
	t[Ratio].add(def{"%", "1/100"}, "")
	for d, defs := range plainUnits() {
		for _, u := range defs {
			t[d].add(u, "")
		}
	}
	addComposites(t)
	addPressures(&t[Pressure])
	addTemperatures(&t[Temperature])
	for _, u := range kinematicUnits {
		t[Viscosity].add(u, "").kinematic = true
	}
	return t
}

// plainUnits returns the tables whose lines need nothing more.
func plainUnits() map[Dim][]def {
	return map[Dim][]def{
		Length: lengthUnits, Head: lengthUnits, Area: areaUnits, Volume: volumeUnits,
		Time: timeUnits, Viscosity: dynamicUnits, Density: densityUnits,
		Acceleration: accelerationUnits, Angle: angleUnits, SurfaceTension: tensionUnits,
		ResistanceLinear: linearUnits, ResistanceQuadratic: quadraticUnits,
	}
}

// add enters a line, with a suffix on every spelling. A canonical name that is
// there already is left alone.
func (t *unitTable) add(d def, suffix string) *unit {
	names := strings.Split(d.names, " ")
	if old := t.byName[names[0]+suffix]; old != nil {
		return old
	}
	u := newUnit(names[0]+suffix, product(d.factor))
	u.order = len(t.list)
	t.list = append(t.list, u)
	for _, n := range names {
		t.alias(n+suffix, u)
	}
	if t.si == nil && u.float == 1 {
		t.si = u
	}
	return u
}

// alias enters one more spelling; a table that says one thing twice is a
// programmer's error.
func (t *unitTable) alias(name string, u *unit) {
	if old := t.byName[name]; old != nil && old != u {
		panic(fmt.Sprintf("quantity: %q is both %s and %s", name, old.name, u.name))
	}
	t.byName[name] = u
}

func newUnit(name string, factor *big.Rat) *unit {
	u := &unit{name: name, factor: factor}
	u.float, _ = factor.Float64()
	const limit = 53 // bits a float64 holds exactly
	if n, d := factor.Num(), factor.Denom(); n.BitLen() <= limit && d.BitLen() <= limit {
		u.num, u.den = n.Uint64(), d.Uint64()
	}
	return u
}

// product works out a factor such as "0.45359237*9.80665/0.0254/0.0254", exactly.
func product(s string) *big.Rat {
	r := big.NewRat(1, 1)
	op := byte('*')
	for s != "" {
		i := strings.IndexAny(s, "*/")
		next := byte(0)
		text := s
		if i >= 0 {
			text, next, s = s[:i], s[i], s[i+1:]
		} else {
			s = ""
		}
		x, ok := new(big.Rat).SetString(text)
		if !ok || x.Sign() <= 0 {
			panic("quantity: bad factor " + text)
		}
		if op == '*' {
			r.Mul(r, x)
		} else {
			r.Quo(r, x)
		}
		op = next
	}
	return r
}
