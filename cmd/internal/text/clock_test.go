package text_test

import (
	"testing"
	"time"

	"headfall/cmd/internal/text"
)

var six = text.Clock{Start: time.Date(2027, 10, 9, 6, 0, 0, 0, time.UTC)}

var long = text.Clock{Start: six.Start, Whole: 4 * 3600}

func TestWhen(t *testing.T) {
	for _, c := range []struct {
		clock text.Clock
		s     float64
		dir   text.Dir
		want  string
	}{
		{six, 0, text.Near, "06:00 (start)"},
		{six, 2519, text.Down, "06:41 (41 min)"},
		{six, 2519, text.Up, "06:42 (42 min)"},
		{six, 446.2, text.Down, "06:07:26 (7 min 26 s)"}, // under ten minutes seconds count
		{six, 300, text.Down, "06:05 (5 min)"},
		{six, 299.9999999999, text.Down, "06:05 (5 min)"}, // rounding noise is not a second
		{six, 18*3600 + 1200, text.Down, "+1d 00:20 (18 h 20 min)"},
		{six, 42 * 3600, text.Up, "+2d 00:00 (42 h)"},
		{long, 446.2, text.Down, "06:07 (7 min 26 s)"}, // the clock of a long answer shows whole minutes
		{long, 446.2, text.Up, "06:08 (7 min 27 s)"},
		{text.Clock{}, 5.04, text.Down, "5 s"},
		{text.Clock{}, 5.04, text.Up, "5.1 s"},
		{text.Clock{}, 5.04e3, text.Near, "1 h 24 min"},
	} {
		if got := c.clock.When(c.s, c.dir); got != c.want {
			t.Errorf("When(%g, %d) = %q, want %q", c.s, c.dir, got, c.want)
		}
	}
}

func TestSpan(t *testing.T) {
	if got, want := six.Span(730, 1439), "06:12 to 06:24"; got != want {
		t.Errorf("got %q, want %q", got, want)
	}
	if got, want := six.Span(600, 600), "06:10"; got != want {
		t.Errorf("got %q, want %q", got, want)
	}
}

func TestDuration(t *testing.T) {
	for _, c := range []struct {
		s    float64
		dir  text.Dir
		want string
	}{
		{0, text.Near, "0 s"}, {7.66, text.Down, "7.6 s"}, {46.2, text.Up, "47 s"}, {131, text.Up, "2 min 11 s"},
		{3599, text.Up, "1 h"}, {5279.6, text.Down, "1 h 27 min"}, {-90, text.Down, "-1 min 30 s"},
	} {
		if got := text.Duration(c.s, c.dir); got != c.want {
			t.Errorf("Duration(%g, %d) = %q, want %q", c.s, c.dir, got, c.want)
		}
	}
}
