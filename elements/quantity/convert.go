package quantity

import (
	"fmt"
	"math"
	"math/big"
)

// pow10 holds the powers of ten a uint64 can take part in exactly.
var pow10 = [...]uint64{1, 1e1, 1e2, 1e3, 1e4, 1e5, 1e6, 1e7, 1e8, 1e9, 1e10, 1e11, 1e12, 1e13, 1e14, 1e15}

const exact = 1 << 53 // integers up to here are float64s

// toSI returns the float64 nearest to the number in unit u, in SI. With
// difference set the unit's offset is left out, as for a doubt. ok is false
// when the result is too large, or so small that it becomes zero.
func toSI(n *number, u *unit, difference bool) (si float64, ok bool) {
	centi := u.centi
	if difference {
		centi = 0
	}
	if !n.long {
		if si, ok = quick(n, u, centi); ok {
			return si, true
		}
	}
	if n.zero() {
		n = &number{text: "0"}
	} else if e := n.exp; e > maxExp || e < -2*maxExp || e < -maxExp && !n.long {
		return 0, false
	}
	r := n.rat()
	if centi != 0 {
		r.Add(r, u.offset)
	}
	si, _ = r.Mul(r, u.factor).Float64()
	if math.IsInf(si, 0) || si == 0 && r.Sign() != 0 {
		return 0, false
	}
	return si, true
}

// quick does toSI in integers with one division at the end. When numerator and
// denominator are both exact float64s, their quotient is correctly rounded.
func quick(n *number, u *unit, centi int64) (float64, bool) {
	if u.den == 0 || n.mant >= exact {
		return 0, false
	}
	mant, exp := int64(n.mant), n.exp
	if n.neg {
		mant = -mant
	}
	if centi != 0 { // bring number and offset to one power of ten
		low := min(exp, -2)
		if low < -10 || exp-low > 15 {
			return 0, false
		}
		a, okA := times(abs(mant), pow10[exp-low])
		b, okB := times(uint64(centi), pow10[-2-low])
		if !okA || !okB {
			return 0, false
		}
		if mant < 0 {
			mant = int64(b) - int64(a)
		} else {
			mant = int64(a) + int64(b)
		}
		exp = low
	}
	if mant == 0 {
		return 0, true // also for "-0": there is one zero
	}
	if exp < -15 || exp > 15 {
		return 0, false
	}
	up, down := u.num, u.den
	if exp > 0 {
		up, _ = times(up, pow10[exp])
	} else {
		down, _ = times(down, pow10[-exp])
	}
	up, ok := times(up, abs(mant))
	if !ok || up == 0 || down == 0 {
		return 0, false
	}
	return math.Copysign(float64(up)/float64(down), float64(mant)), true
}

// times multiplies; when the product is not below 2⁵³ it returns 0, false.
func times(a, b uint64) (uint64, bool) {
	if a == 0 || b == 0 || a >= exact/b {
		return 0, false
	}
	return a * b, true
}

func abs(x int64) uint64 {
	if x < 0 {
		return uint64(-x)
	}
	return uint64(x)
}

// fromSI returns si in unit u, right to an ulp or two.
func fromSI(si float64, u *unit, difference bool) float64 {
	shift := u.shift
	if difference {
		shift = 0
	}
	if u.den == 0 {
		return si/u.float - shift
	}
	return si*float64(u.den)/float64(u.num) - shift
}

// exactFromSI is fromSI without rounding; si must be finite.
func exactFromSI(si float64, u *unit, difference bool) *big.Rat {
	r := new(big.Rat)
	r.SetFloat64(si)
	r.Quo(r, u.factor)
	if u.offset != nil && !difference {
		r.Sub(r, u.offset)
	}
	return r
}

// Convert returns si, in the SI unit of d, as a number in the given unit, which
// may be any accepted spelling. A pressure keeps its reference: whether "bar(g)" fits is
// the caller's to know.
func Convert(si float64, d Dim, unit string) (float64, error) {
	u := tables[d].find(plain(unit))
	if u == nil {
		return 0, unknownUnit(unit, d)
	}
	return fromSI(si, u, false), nil
}

// unknownUnit is the error for a unit that stands alone, as in display settings.
func unknownUnit(name string, d Dim) *Error {
	p := plain(name)
	msg, better := explainUnit(p, d)
	hint := ""
	if better != "" {
		hint = "write " + better
	} else {
		hint = fmt.Sprintf("one of: %s", known(d))
	}
	return fault(p, 0, len(p), msg, hint)
}
