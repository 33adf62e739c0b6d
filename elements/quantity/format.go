package quantity

import (
	"math"
	"math/big"
	"strconv"
	"strings"
)

// Format writes si for reading, with sig significant digits (at least 1) in the
// given unit: "4.20 m". Digits before the point beyond sig are noughts ("12300 m3"), and
// there is no exponent from 10⁻⁷ to below 10¹⁵. A unit that is not known is replaced by
// the SI unit; what is no number is "n/a".
func Format(si float64, d Dim, unit string, sig int) string {
	u := unitOr(unit, d)
	x := fromSI(si, u, false)
	if math.IsNaN(x) || math.IsInf(x, 0) {
		return "n/a"
	}
	return withUnit(decimal(strconv.FormatFloat(x, 'e', max(sig, 1)-1, 64)), u)
}

// FormatExact writes the shortest text that reads back to the same bits. Where no
// text of reasonable length in that unit does (temperatures within a hair of
// absolute zero), or the unit is not known, the SI unit is used.
func FormatExact(si float64, d Dim, unit string) string {
	return exactText(si, d, unitOr(unit, d), false)
}

func unitOr(name string, d Dim) *unit {
	if u := tables[d].find(plain(name)); u != nil {
		return u
	}
	return tables[d].si
}

// exactText is FormatExact for a unit of the table, also for differences.
func exactText(si float64, d Dim, u *unit, difference bool) string {
	if math.IsNaN(si) || math.IsInf(si, 0) {
		return "n/a"
	}
	if si == 0 {
		si = 0 // there is one zero
	}
	x := fromSI(si, u, difference)
	for digits := range 16 {
		if s := strconv.FormatFloat(x, 'e', digits, 64); readsBack(s, si, u, difference) {
			return withUnit(decimal(s), u)
		}
	}
	const enough = 40 // digits; more are not worth reading
	r := new(big.Float).SetPrec(1200).SetRat(exactFromSI(si, u, difference))
	for digits := 14; digits < enough; digits++ {
		if s := r.Text('e', digits); readsBack(s, si, u, difference) {
			return withUnit(decimal(s), u)
		}
	}
	fallback := tables[d].si
	if u.kinematic {
		fallback = tables[d].find("m2/s")
	}
	return withUnit(decimal(strconv.FormatFloat(si, 'e', -1, 64)), fallback)
}

// readsBack reports whether the decimal s in unit u is si.
func readsBack(s string, si float64, u *unit, difference bool) bool {
	neg := strings.HasPrefix(s, "-")
	n, end := scanNumber(s, len(s)-len(strings.TrimPrefix(s, "-")))
	n.neg = neg
	got, ok := toSI(&n, u, difference)
	return ok && end == len(s) && math.Float64bits(got) == math.Float64bits(si)
}

// decimal rewrites a number of the form d.ddde±dd without an exponent where that
// stays short: from 10⁻⁷ to below 10¹⁵. Trailing noughts stay; zero is "0".
func decimal(s string) string {
	mant, exp, _ := strings.Cut(s, "e")
	sign := ""
	if mant[0] == '-' {
		sign, mant = "-", mant[1:]
	}
	digits := strings.Replace(mant, ".", "", 1)
	if strings.Trim(digits, "0") == "" {
		return "0"
	}
	e, _ := strconv.Atoi(exp)
	switch {
	case e < -7 || e >= 15:
		return sign + mant + "e" + strconv.Itoa(e)
	case e < 0:
		return sign + "0." + strings.Repeat("0", -e-1) + digits
	case e >= len(digits)-1:
		return sign + digits + strings.Repeat("0", e-len(digits)+1)
	}
	return sign + digits[:e+1] + "." + digits[e+1:]
}
