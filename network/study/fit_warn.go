package study

import (
	"fmt"
	"math"
	"sort"
	"strings"

	"headfall/elements/quantity"
)

// warn says what to mind about a fit, and settles its exit code.
func (r *FitResult) warn() {
	say := func(format string, args ...any) { r.Warnings = append(r.Warnings, fmt.Sprintf(format, args...)) }
	for _, v := range r.Values {
		switch {
		case v.Low == nil && len(r.Values) == 1:
			say("the readings say nothing about %s: it moves no level that was read", v.Name)
		case v.Low == nil:
			say("the readings say nothing about %s", v.Name)
		case v.HighAll != nil && v.Value != 0 && (*v.HighAll-*v.LowAll)/2 > 0.25*math.Abs(v.Value) && !heights[lastWord(v.Name)]:
			say("%s is known to no better than %.0f %%", v.Name, 50*(*v.HighAll-*v.LowAll)/math.Abs(v.Value))
		}
	}
	for _, p := range r.Pairs {
		if math.Abs(p.Value) > apart {
			say("%s and %s cannot be told apart by these readings (correlation %.3f): fix one of them, or read more levels, at other openings", p.A, p.B, p.Value)
		}
	}
	if r.Condition != nil && *r.Condition > entangled && len(r.Pairs) != 1 {
		say("the numbers cannot be told apart by these readings (condition %.0f): fit fewer of them", *r.Condition)
	}
	if r.Verdict == NotFitted {
		say("the search did not end: look at the readings, and at the values to begin with")
	}
	r.mindReadings(say)
	for _, tag := range sortedKeys(r.Range) {
		say("do not use it below the lowest level of the test: %s at %s", tag, quantity.Format(r.Range[tag].Low, quantity.Length, "m", 3))
	}
	r.ExitCode = map[string]int{Fitted: 0, NotApart: 1, NotFitted: 3}[r.Verdict]
}

// mindReadings looks at what the residuals have in common.
func (r *FitResult) mindReadings(say func(string, ...any)) {
	if left := r.Of - r.Used; left > 0 {
		say("%d of %d readings were left out as not fitting the rest", left, r.Of)
		if left*5 > r.Of {
			say("that is more than one in five: look at the gauge, or at whether the line-up was the same all through")
		}
	}
	if r.Together > 0.6 && r.Of >= 8 {
		say("residuals go up and down in long waves%s: the plant as written does not follow the readings to their scatter; the vessel's shape, its start level or something that changed during the test may be why", r.wave())
	}
	for _, tag := range sortedKeys(r.Range) {
		t := r.Range[tag]
		if fall := t.High - t.Low; fall < 10*r.Scatter {
			say("%s moved by no more than %.0f mm during the test: a longer test tells more", tag, 1000*fall)
		}
	}
}

// wave says where the mean residual of the first and the last third lie.
func (r *FitResult) wave() string {
	n := len(r.Rows) / 3
	if n < 2 {
		return ""
	}
	mean := func(rows []*FittedReading) float64 {
		var sum float64
		for _, x := range rows {
			sum += x.Read - x.Level
		}
		return sum / float64(len(rows))
	}
	return fmt.Sprintf(" (read less fitted: %+.0f mm early, %+.0f mm midway, %+.0f mm late)", 1000*mean(r.Rows[:n]), 1000*mean(r.Rows[n:2*n]), 1000*mean(r.Rows[2*n:]))
}

func sortedKeys[T any](m map[string]T) []string {
	var keys []string
	for k := range m {
		keys = append(keys, k)
	}
	sort.Strings(keys)
	return keys
}

func lastWord(name string) string { return name[strings.LastIndexByte(name, '.')+1:] }
