package quantity

import (
	"math/big"
	"strings"
)

// number is a decimal as written: ±mant × 10^exp, exactly. When its digits do not
// fit into mant, long is set and the digits are in text only.
type number struct {
	text string // digits as written, without sign
	mant uint64
	exp  int
	neg  bool
	long bool
}

const (
	maxDigits = 19  // digits that surely fit a uint64
	maxExp    = 400 // past the range of float64 either way
	maxText   = 400 // longest text that is looked at, bytes
)

// scanNumber reads digits[.digits][e[±]digits] or .digits at s[i:], without a
// sign. It returns the place behind, or i when there is no number.
func scanNumber(s string, i int) (n number, end int) {
	start, digits, seen := i, 0, 0
	for point := false; i < len(s); i++ {
		c := s[i]
		if c == '.' && !point && i+1 < len(s) && isDigit(s[i+1]) {
			point = true
			continue
		}
		if !isDigit(c) {
			break
		}
		seen++
		if point {
			n.exp--
		}
		if c != '0' || n.mant != 0 {
			digits++
		}
		if digits <= maxDigits {
			n.mant = n.mant*10 + uint64(c-'0')
		}
	}
	if seen == 0 {
		return number{}, start
	}
	n.long = digits > maxDigits
	if e, after, ok := scanExponent(s, i); ok {
		n.exp += e
		i = after
	}
	n.text = s[start:i]
	return n, i
}

// scanExponent reads e[±]digits at s[i:].
func scanExponent(s string, i int) (e, end int, ok bool) {
	if i >= len(s) || s[i] != 'e' && s[i] != 'E' {
		return 0, i, false
	}
	j, neg := i+1, false
	if j < len(s) && (s[j] == '+' || s[j] == '-') {
		neg = s[j] == '-'
		j++
	}
	first := j
	for ; j < len(s) && isDigit(s[j]); j++ {
		e = min(e*10+int(s[j]-'0'), 1e6)
	}
	if neg {
		e = -e
	}
	return e, j, j > first
}

func isDigit(c byte) bool { return '0' <= c && c <= '9' }

// zero reports whether every digit is a nought.
func (n *number) zero() bool { return n.mant == 0 }

// rat returns the number exactly. The exponent must have been checked.
func (n *number) rat() *big.Rat {
	r, ok := new(big.Rat).SetString(n.text)
	if !ok {
		return new(big.Rat)
	}
	if n.neg {
		r.Neg(r)
	}
	return r
}

// plain returns the number as it is written again: a nought before a leading
// point, a small e, no sign when it is zero.
func (n *number) plain() string {
	t := strings.ToLower(n.text)
	if t[0] == '.' {
		t = "0" + t
	}
	if n.neg && !n.zero() {
		t = "-" + t
	}
	return t
}
