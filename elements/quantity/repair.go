package quantity

import "strings"

// Repair finds the plain spelling of numbers such as "4,2", "1'000", "1.000,5".

// runEnd returns the end of the run of digits, points, commas, separators and
// single blanks before three digits that begins at s[i:].
func runEnd(s string, i int) int {
	for i < len(s) {
		switch c := s[i]; {
		case isDigit(c), c == '.', c == ',' && digitAt(s, i+1), c == '\'' && digitAt(s, i+1), c == '_':
			i++
		case c == ' ' && threeDigits(s[i+1:]):
			i++
		case strings.HasPrefix(s[i:], "’") && digitAt(s, i+len("’")):
			i += len("’")
		default:
			return i
		}
	}
	return i
}

func digitAt(s string, i int) bool { return i < len(s) && isDigit(s[i]) }

// threeDigits reports whether s begins with exactly three digits.
func threeDigits(s string) bool {
	return digitAt(s, 0) && digitAt(s, 1) && digitAt(s, 2) && !digitAt(s, 3)
}

// thousandsBlank reports whether a blank behind n parts thousands: "1 000 m3".
func thousandsBlank(n *number, rest string) bool {
	return len(n.text) <= 3 && n.exp == 0 && threeDigits(rest[1:])
}

// repair rewrites every run of digits and separators in s as a plain number.
func repair(s string) string {
	var b strings.Builder
	for i := 0; i < len(s); {
		if !isDigit(s[i]) || i > 0 && (isLetter(s[i-1]) || s[i-1] >= 0x80) {
			b.WriteByte(s[i])
			i++
			continue
		}
		end := runEnd(s, i)
		b.WriteString(plainNumber(s[i:end]))
		i = end
	}
	return b.String()
}

func isLetter(c byte) bool { return 'a' <= c|0x20 && c|0x20 <= 'z' }

// plainNumber guesses the number a run means: with both points and commas the
// last one is the decimal point; several of one kind part thousands.
func plainNumber(run string) string {
	run = strings.NewReplacer(" ", "", "_", "", "'", "", "’", "").Replace(run)
	commas, points := strings.Count(run, ","), strings.Count(run, ".")
	switch {
	case commas > 0 && points > 0:
		if strings.LastIndexByte(run, ',') > strings.LastIndexByte(run, '.') {
			run = strings.ReplaceAll(run, ".", "")
		} else {
			run = strings.ReplaceAll(run, ",", "")
		}
	case commas > 1 || points > 1:
		run = strings.NewReplacer(",", "", ".", "").Replace(run)
	}
	run = strings.TrimSuffix(strings.Replace(run, ",", ".", 1), ".")
	run = strings.TrimLeft(run, "0")
	if run == "" || run[0] == '.' {
		run = "0" + run
	}
	return run
}

// twoReadings reports whether a run such as "1,000" can be a thousand as well as
// one with three decimals, and gives both.
func twoReadings(run string) (thousand, decimal string, two bool) {
	whole, part, ok := strings.Cut(run, ",")
	if !ok || len(whole) > 3 || whole == "0" || len(part) != 3 || strings.ContainsAny(part, ",.'_ ") {
		return "", "", false
	}
	return whole + part, whole + "." + part, true
}
