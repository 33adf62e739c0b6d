package quantity

import (
	"math"
	"strconv"
	"strings"
)

// FormatDuration writes seconds for reading, in a form [ParseTime] reads: "45 s",
// "12.5 s", "1 h 20 min", "2 d 3 h". It is right to the second, below a minute to a
// tenth. Rounding to the safe side is the caller's.
func FormatDuration(seconds float64) string {
	if math.IsNaN(seconds) || math.Abs(seconds) > 1e14 {
		return "n/a"
	}
	sign := ""
	if seconds < 0 {
		sign, seconds = "-", -seconds
	}
	if tenths := math.Round(seconds * 10); tenths < 600 {
		if tenths == 0 {
			return "0 s"
		}
		return sign + strconv.FormatFloat(tenths/10, 'f', -1, 64) + " s"
	}
	t := int64(math.Round(seconds))
	var b strings.Builder
	b.WriteString(sign)
	for _, part := range [...]struct {
		size int64
		name string
	}{{86400, " d"}, {3600, " h"}, {60, " min"}, {1, " s"}} {
		if n := t / part.size; n > 0 {
			if b.Len() > len(sign) {
				b.WriteByte(' ')
			}
			b.WriteString(strconv.FormatInt(n, 10) + part.name)
			t -= n * part.size
		}
	}
	return b.String()
}
