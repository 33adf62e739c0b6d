package viz

import (
	"math"
	"strconv"
	"strings"
)

// none stands where there is no number.
const none = "–"

// places writes x with dec decimals.
func places(x float64, dec int) string {
	switch {
	case !finite(x):
		return none
	case x == 0:
		return "0"
	case math.Abs(x) < 0.5*math.Pow10(-dec):
		x = 0 // without a sign
	case math.Abs(x) >= 1e7:
		return digits(x, 6)
	}
	return minus(strconv.FormatFloat(x, 'f', dec, 64))
}

// digits writes x with n significant digits, without an exponent where that stays short.
func digits(x float64, n int) string {
	switch a := math.Abs(x); {
	case !finite(x):
		return none
	case x == 0:
		return "0"
	case a >= 1e7 || a < 1e-4:
		mant, exp, _ := strings.Cut(strconv.FormatFloat(x, 'e', n-1, 64), "e")
		e, _ := strconv.Atoi(exp)
		return minus(mant) + "·10" + superscript(e)
	case a >= math.Pow10(n-1):
		return minus(strconv.FormatFloat(x, 'f', 0, 64))
	}
	s := strconv.FormatFloat(x, 'e', n-1, 64)
	_, exp, _ := strings.Cut(s, "e")
	e, _ := strconv.Atoi(exp)
	return minus(strconv.FormatFloat(x, 'f', max(n-1-e, 0), 64))
}

func minus(s string) string { return strings.Replace(s, "-", "−", 1) }

func superscript(e int) string {
	const up = "⁰¹²³⁴⁵⁶⁷⁸⁹"
	runes := []rune(up)
	var b strings.Builder
	for _, c := range strconv.Itoa(e) {
		if c == '-' {
			b.WriteRune('⁻')
			continue
		}
		b.WriteRune(runes[c-'0'])
	}
	return b.String()
}

// six writes x for the data in the page: 6 significant digits, as JSON takes it; what is not finite is null.
func six(x float64) string { return sig(x, 6) }

func sig(x float64, n int) string {
	if !finite(x) {
		return "null"
	}
	if x == 0 {
		return "0"
	}
	s := strconv.FormatFloat(x, 'g', n, 64)
	s = strings.Replace(s, "e+0", "e", 1)
	s = strings.Replace(s, "e+", "e", 1)
	return strings.Replace(s, "e-0", "e-", 1)
}

// round6 is six as a number.
func round6(x float64) float64 {
	if !finite(x) {
		return x
	}
	y, _ := strconv.ParseFloat(strconv.FormatFloat(x, 'g', 6, 64), 64)
	return y
}

// plainKind writes the name of a kind as words.
func plainKind(name string) string { return strings.ReplaceAll(name, "_", " ") }

// round10 cuts a moment to the digits that the page carries.
func round10(x float64) float64 {
	y, _ := strconv.ParseFloat(strconv.FormatFloat(x, 'g', 10, 64), 64)
	return y
}
