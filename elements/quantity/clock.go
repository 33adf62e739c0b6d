package quantity

import (
	"math"
	"strconv"
	"strings"
	"time"
)

// Clock is a wall-clock time on the day of the start or a number of days later.
type Clock struct {
	Day     int     // days after the day of the start
	Seconds float64 // since midnight, s; from 0 to below 86 400
}

// ParseClock reads "06:30", "06:30:15" and "+1d 06:30". The error is an *Error.
func ParseClock(s string) (Clock, error) {
	c, err := readClock(plain(s))
	if err != nil {
		return Clock{}, err
	}
	return c, nil
}

func readClock(s string) (Clock, *Error) {
	bad := func(msg, hint string) (Clock, *Error) { return Clock{}, fault(s, 0, len(s), msg, hint) }
	t := strings.TrimSpace(s)
	if len(t) > maxText {
		return bad("this is too long for a time of day", `e.g. "06:30"`)
	}
	if strings.Contains(t, "±") || strings.Contains(t, " to ") || strings.Contains(t, "+-") || strings.Contains(t, "+/-") {
		return bad("a time of day carries no doubt", `e.g. "06:30"`)
	}
	var c Clock
	if rest, ok := strings.CutPrefix(t, "+"); ok {
		day, clock, found := strings.Cut(rest, "d")
		n, ok := wholeNumber(strings.TrimSpace(day), 1, 5)
		if !found || !ok {
			return bad(quote(t)+" is not a time of day", `for a later day write e.g. "+1d 06:30"`)
		}
		c.Day, t = n, strings.TrimSpace(clock)
	}
	hour, rest, found := strings.Cut(t, ":")
	minute, second, seconds := strings.Cut(rest, ":")
	h, okH := wholeNumber(hour, 1, 2)
	m, okM := wholeNumber(minute, 2, 2)
	sec, okS := 0.0, true
	if seconds {
		sec, okS = clockSeconds(second)
	}
	switch {
	case !found || !okH || !okM || !okS:
		return bad(quote(t)+" is not a time of day", clockHint(t))
	case h == 24 && m == 0 && sec == 0:
		return bad("a day ends where the next begins", `write "+`+strconv.Itoa(c.Day+1)+`d 00:00"`)
	case h > 23 || m > 59 || sec >= 60:
		return bad(quote(t)+" is not on the clock", `from "00:00" to "23:59"`)
	}
	c.Seconds = float64(h*3600+m*60) + sec
	return c, nil
}

// clockSeconds reads "15" or "15.5".
func clockSeconds(s string) (float64, bool) {
	whole, part, fraction := strings.Cut(s, ".")
	n, ok := wholeNumber(whole, 2, 2)
	if !ok || !fraction {
		return float64(n), ok
	}
	if _, ok = wholeNumber(part, 1, 9); !ok {
		return 0, false
	}
	f, err := strconv.ParseFloat(s, 64)
	return f, err == nil
}

// wholeNumber reads from least to most digits and nothing else.
func wholeNumber(s string, least, most int) (n int, ok bool) {
	if len(s) < least || len(s) > most {
		return 0, false
	}
	for i := range len(s) {
		if !isDigit(s[i]) {
			return 0, false
		}
		n = n*10 + int(s[i]-'0')
	}
	return n, true
}

// clockHint shows the right spelling of "6.30", "6h30", "0630" and "6:30 pm".
func clockHint(t string) string {
	low := strings.ToLower(t)
	later := 0
	if low = strings.ReplaceAll(low, ".m.", "m"); strings.HasSuffix(low, "pm") {
		later = 12
	}
	low = strings.TrimSpace(strings.TrimSuffix(strings.TrimSuffix(low, "am"), "pm"))
	if _, whole := wholeNumber(low, 1, 2); whole {
		low += ":00"
	}
	for _, sep := range []string{":", ".", "h"} {
		hour, minute, ok := strings.Cut(low, sep)
		h, okH := wholeNumber(hour, 1, 2)
		m, okM := wholeNumber(minute, 1, 2)
		if !ok || !okH || !okM || m > 59 {
			continue
		}
		if later > 0 || low != strings.ToLower(t) { // twelve-hour clock
			h = h%12 + later
		}
		if h < 24 {
			return `write "` + FormatClock(float64(h*3600+m*60)) + `"`
		}
	}
	return `e.g. "06:30"`
}

// LooksLikeClock reports whether s was meant as a time of day: digits on both
// sides of a colon and nothing but digits, colons, a point and a leading "+1d".
func LooksLikeClock(s string) bool {
	t := strings.TrimSpace(s)
	if rest, ok := strings.CutPrefix(t, "+"); ok {
		day, clock, found := strings.Cut(rest, "d")
		if _, ok := wholeNumber(strings.TrimSpace(day), 1, 5); !found || !ok {
			return false
		}
		t = strings.TrimSpace(clock)
	}
	colon := false
	for i := range len(t) {
		if t[i] == ':' {
			if i == 0 || !isDigit(t[i-1]) || !digitAt(t, i+1) {
				return false
			}
			colon = true
		} else if !isDigit(t[i]) && t[i] != '.' {
			return false
		}
	}
	return colon
}

// Elapsed returns the seconds from start to the clock time, negative when it is
// earlier on the day of the start.
func (c Clock) Elapsed(start time.Time) float64 {
	h, m, s := start.Clock()
	return float64(c.Day)*86400 + c.Seconds - float64(h*3600+m*60+s) - float64(start.Nanosecond())*1e-9
}

// String returns the time as it is written: "06:30", "06:30:15", "+1d 06:30".
func (c Clock) String() string { return FormatClock(float64(c.Day)*86400 + c.Seconds) }

// FormatClock writes seconds since midnight of the day of the start, to the nearest
// second: "06:30", "06:30:15", "+1d 06:30". Rounding to the safe side is the caller's.
func FormatClock(seconds float64) string {
	if math.IsNaN(seconds) || math.Abs(seconds) > 1e14 {
		return "n/a"
	}
	t := int64(math.Round(seconds))
	day := t / 86400
	if t%86400 < 0 {
		day--
	}
	t -= day * 86400
	b := make([]byte, 0, 16)
	if day != 0 {
		if day > 0 {
			b = append(b, '+')
		}
		b = append(strconv.AppendInt(b, day, 10), 'd', ' ')
	}
	b = twoDigits(b, t/3600)
	b = twoDigits(append(b, ':'), t/60%60)
	if t%60 != 0 {
		b = twoDigits(append(b, ':'), t%60)
	}
	return string(b)
}

func twoDigits(b []byte, n int64) []byte { return append(b, byte('0'+n/10), byte('0'+n%10)) }
