package quantity

import "strings"

// operator joins a value with its doubt.
type operator uint8

const (
	noOperator operator = iota
	plusMinus           // ± +- +/-
	upTo                // to
	timesOver           // ×÷ */
)

// spelling is how an operator is written again.
func (o operator) spelling() string { return [...]string{"", " ± ", " to ", " ×÷ "}[o] }

// scanOperator reads an operator at s[i:]; the place behind it is returned too.
func scanOperator(s string, i int) (operator, int) {
	if i >= len(s) {
		return noOperator, i
	}
	switch s[i] {
	case '+':
		switch {
		case strings.HasPrefix(s[i:], "+/-"):
			return plusMinus, i + 3
		case strings.HasPrefix(s[i:], "+-"):
			return plusMinus, i + 2
		}
	case 't':
		if strings.HasPrefix(s[i:], "to") && (i+2 == len(s) || s[i+2] == ' ' || startsNumber(s[i+2:])) {
			return upTo, i + 2
		}
	case '*':
		if strings.HasPrefix(s[i:], "*/") {
			return timesOver, i + 2
		}
	case "±"[0], "×"[0]:
		switch {
		case strings.HasPrefix(s[i:], "±"):
			return plusMinus, i + len("±")
		case strings.HasPrefix(s[i:], "×÷"):
			return timesOver, i + len("×÷")
		}
	}
	return noOperator, i
}
