package quantity

import (
	"regexp"
	"strings"
	"time"
)

// layouts are the spellings of a date and time that are read.
var layouts = []string{"2006-01-02 15:04", "2006-01-02 15:04:05", "2006-01-02T15:04", "2006-01-02T15:04:05"}

// ParseDateTime reads a local wall-clock moment, "2027-10-09 06:00". It is stored
// as if the wall clock showed UTC: there are no time zones in a scenario, and a day has
// 24 hours. The error is an *Error.
func ParseDateTime(s string) (time.Time, error) {
	p := plain(s)
	t := strings.TrimSpace(p)
	for _, layout := range layouts {
		if len(t) != len(layout) {
			continue // time.Parse would also take fractions and single digits
		}
		if at, err := time.Parse(layout, t); err == nil {
			return at, nil
		}
	}
	msg, hint := explainDate(t)
	return time.Time{}, fault(p, 0, len(p), msg, hint)
}

// FormatDateTime writes a moment as ParseDateTime reads it, to the minute, or to the
// second when it has any.
func FormatDateTime(t time.Time) string {
	if t.Second() != 0 {
		return t.Format(layouts[1])
	}
	return t.Format(layouts[0])
}

var (
	isoShape    = regexp.MustCompile(`^\d{4}-\d\d-\d\d[ T]\d\d:\d\d(:\d\d)?$`)
	zoned       = regexp.MustCompile(`^(\d{4}-\d\d-\d\d)[ T](\d\d:\d\d(?::\d\d)?)(?:\.\d+)? ?(?:Z|UTC|[+-]\d\d:?\d\d)$`)
	dateOnly    = regexp.MustCompile(`^\d{4}-\d\d-\d\d$`)
	dayFirst    = regexp.MustCompile(`^(\d\d)\.(\d\d)\.(\d{4}),? (\d\d:\d\d)$`)
	eitherFirst = regexp.MustCompile(`^\d\d?/\d\d?/\d{2,4}`)
)

// explainDate is only reached when reading failed.
func explainDate(t string) (msg, hint string) {
	msg = quote(t) + " is not a date and time"
	if m := zoned.FindStringSubmatch(t); m != nil {
		return "times are local wall clock, without a zone", `write "` + m[1] + " " + m[2] + `"`
	}
	if m := dayFirst.FindStringSubmatch(t); m != nil {
		return msg, `write "` + m[3] + "-" + m[2] + "-" + m[1] + " " + m[4] + `"`
	}
	switch {
	case t == "":
		return "a date and time is missing", `e.g. "2027-10-09 06:00"`
	case isoShape.MatchString(t):
		return quote(t) + " is not in the calendar", `e.g. "2027-10-09 06:00"`
	case dateOnly.MatchString(t):
		return "a time of day is missing", `write "` + t + ` 06:00"`
	case eitherFirst.MatchString(t):
		return "day and month could be either way round", `write year-month-day, e.g. "2027-10-09 06:00"`
	}
	return msg, `e.g. "2027-10-09 06:00"`
}
