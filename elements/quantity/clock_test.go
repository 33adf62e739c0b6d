package quantity

import (
	"testing"
	"time"
)

func TestParseClock(t *testing.T) {
	for _, c := range []struct {
		text string
		want Clock
		echo string
	}{
		{"06:30", Clock{0, 23400}, "06:30"},
		{"6:30", Clock{0, 23400}, "06:30"},
		{" 06:30:15 ", Clock{0, 23415}, "06:30:15"},
		{"06:30:15.5", Clock{0, 23415.5}, "06:30:16"},
		{"00:00", Clock{0, 0}, "00:00"},
		{"23:59:59", Clock{0, 86399}, "23:59:59"},
		{"+1d 06:30", Clock{1, 23400}, "+1d 06:30"},
		{"+1 d 06:30", Clock{1, 23400}, "+1d 06:30"},
		{"+12d06:30", Clock{12, 23400}, "+12d 06:30"},
	} {
		got, err := ParseClock(c.text)
		if err != nil || got != c.want || got.String() != c.echo || !LooksLikeClock(c.text) {
			t.Errorf("%q: %+v %v, echo %q", c.text, got, err, got)
		}
	}
}

func TestClockMistakes(t *testing.T) {
	for text, want := range map[string]string{
		"06.30":         `"06.30" is not a time of day, write "06:30"`,
		"6h30":          `"6h30" is not a time of day, write "06:30"`,
		"6:30 pm":       `"6:30 pm" is not a time of day, write "18:30"`,
		"12:30 am":      `"12:30 am" is not a time of day, write "00:30"`,
		"24:00":         `a day ends where the next begins, write "+1d 00:00"`,
		"25:00":         `"25:00" is not on the clock, from "00:00" to "23:59"`,
		"06:60":         `"06:60" is not on the clock, from "00:00" to "23:59"`,
		"06:5":          `"06:5" is not a time of day, write "06:05"`,
		"380":           `"380" is not a time of day, e.g. "06:30"`,
		"+d 06:30":      `"+d 06:30" is not a time of day, for a later day write e.g. "+1d 06:30"`,
		"06:30 ± 5 min": `a time of day carries no doubt, e.g. "06:30"`,
		"":              `"" is not a time of day, e.g. "06:30"`,
	} {
		if c, err := ParseClock(text); err == nil || err.Error() != want {
			t.Errorf("%q: %v %v, want %s", text, c, err, want)
		}
	}
}

func TestLooksLikeClock(t *testing.T) {
	for text, want := range map[string]bool{
		"06:30": true, "6:3": true, "99:99": true, "+1d 06:30": true, "06:30:15.5": true,
		"5 min": false, "": false, ":": false, "06:": false, ":30": false, "2027-10-09 06:00": false, "a:b": false, "+1d": false, "06.30": false,
	} {
		if LooksLikeClock(text) != want {
			t.Errorf("%q: %v", text, !want)
		}
	}
}

func TestElapsed(t *testing.T) {
	start := time.Date(2027, 10, 9, 6, 0, 0, 0, time.UTC)
	for text, want := range map[string]float64{"06:20": 1200, "05:00": -3600, "+1d 06:00": 86400} {
		c, err := ParseClock(text)
		if got := c.Elapsed(start); err != nil || got != want {
			t.Errorf("%s: %v, %v", text, got, err)
		}
	}
}

func TestFormatClock(t *testing.T) {
	for seconds, want := range map[float64]string{
		0: "00:00", 23400: "06:30", 23400.4: "06:30", 86399.6: "+1d 00:00", 86400 + 61: "+1d 00:01:01", -60: "-1d 23:59", -86400: "-1d 00:00",
	} {
		if got := FormatClock(seconds); got != want {
			t.Errorf("%v: %q, want %q", seconds, got, want)
		}
	}
}

func TestParseDateTime(t *testing.T) {
	want := time.Date(2027, 10, 9, 6, 0, 0, 0, time.UTC)
	for _, text := range []string{"2027-10-09 06:00", " 2027-10-09T06:00 ", "2027-10-09 06:00:00", "2027\u201110\u201109 06:00"} {
		if got, err := ParseDateTime(text); err != nil || !got.Equal(want) || FormatDateTime(got) != "2027-10-09 06:00" {
			t.Errorf("%q: %v %v", text, got, err)
		}
	}
	for text, want := range map[string]string{
		"2027-10-09T06:00Z":         `times are local wall clock, without a zone, write "2027-10-09 06:00"`,
		"2027-10-09 06:00:00+02:00": `times are local wall clock, without a zone, write "2027-10-09 06:00:00"`,
		"09.10.2027 06:00":          `"09.10.2027 06:00" is not a date and time, write "2027-10-09 06:00"`,
		"10/09/2027 06:00":          `day and month could be either way round, write year-month-day, e.g. "2027-10-09 06:00"`,
		"2027-10-09":                `a time of day is missing, write "2027-10-09 06:00"`,
		"2027-02-30 06:00":          `"2027-02-30 06:00" is not in the calendar, e.g. "2027-10-09 06:00"`,
		"":                          `a date and time is missing, e.g. "2027-10-09 06:00"`,
		"tomorrow":                  `"tomorrow" is not a date and time, e.g. "2027-10-09 06:00"`,
	} {
		if got, err := ParseDateTime(text); err == nil || err.Error() != want {
			t.Errorf("%q: %v %v, want %s", text, got, err, want)
		}
	}
}
