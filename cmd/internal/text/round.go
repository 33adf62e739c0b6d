package text

import (
	"math"
	"strconv"
)

// Dir tells which side of a number is the safe one.
type Dir int

const (
	Down Dir = iota // towards minus infinity: margins, "not later than"
	Near
	Up // towards plus infinity: peaks, durations, "not before"
)

const hair = 1e-9 // of a step: a number this close to a step is on it

// round returns x as a multiple of step.
func round(x, step float64, dir Dir) float64 {
	n := x / step
	switch dir {
	case Down:
		n = math.Floor(n + hair)
	case Up:
		n = math.Ceil(n - hair)
	default:
		n = math.Round(n)
	}
	return n * step
}

// unknowable tells that a number was never worked out.
func unknowable(x float64) bool { return math.IsNaN(x) || math.IsInf(x, 0) }

// inSteps writes x as a multiple of step, which is a power of ten.
func inSteps(x, step float64, dir Dir) string {
	if unknowable(x) {
		return "-"
	}
	decimals := max(0, -int(math.Floor(math.Log10(step)+hair)))
	s := strconv.FormatFloat(round(x, step, dir), 'f', decimals, 64)
	if zero, _ := strconv.ParseFloat(s, 64); zero == 0 && s[0] == '-' {
		return s[1:]
	}
	return s
}

// figures writes x with so many significant digits, never finer than least.
func figures(x float64, digits int, least float64, dir Dir) string {
	if x == 0 || unknowable(x) {
		return inSteps(x, 1, dir)
	}
	order := math.Floor(math.Log10(math.Abs(x)) + hair)
	return inSteps(x, math.Max(math.Pow(10, order-float64(digits-1)), least), dir)
}
