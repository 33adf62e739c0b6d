package shape

import (
	"fmt"
	"math"
	"strings"
)

// faults collects what is wrong with the parameters of a shape, so that all of it is said at once.
type faults []string

func (f *faults) add(format string, args ...any) { *f = append(*f, fmt.Sprintf(format, args...)) }

// positive asks for a length, m, over zero.
func (f *faults) positive(name string, x float64) bool {
	if x > 0 && !math.IsInf(x, 1) {
		return true
	}
	f.add("%s must be more than zero, not %s", name, metres(x))
	return false
}

// notNegative asks for a length, m, of zero or more.
func (f *faults) notNegative(name string, x float64) bool {
	if x >= 0 && !math.IsInf(x, 1) {
		return true
	}
	f.add("%s must not be negative, it is %s", name, metres(x))
	return false
}

// section asks for an area, m², that the calculation can work with.
func (f *faults) section(name string, area float64) bool {
	if area >= minArea && !math.IsInf(area, 1) {
		return true
	}
	f.add("%s is only %.3g cm²; the least section of a vessel is 1 cm²", name, area*1e4)
	return false
}

// err returns the faults as one error that names the shape, or nil.
func (f faults) err(shape string) error {
	if len(f) == 0 {
		return nil
	}
	return &Fault{Shape: shape, Says: f}
}

// Fault tells what is wrong with the parameters of a shape or head, in the trade's words.
type Fault struct {
	Shape string   // upright_cylinder, cone …
	Says  []string // one sentence a fault, each naming its parameter
}

func (f *Fault) Error() string { return f.Shape + ": " + strings.Join(f.Says, "; ") }

// metres writes a length as people do.
func metres(x float64) string {
	if a := math.Abs(x); a > 0 && a < 1 {
		return fmt.Sprintf("%.5g mm", x*1e3)
	}
	return fmt.Sprintf("%.5g m", x)
}

// circle returns the area, m², of a circle of diameter d, m.
func circle(d float64) float64 { return math.Pi * d * d / 4 }

// round returns the circumference, m, of the circle of an area, m².
func round(area float64) float64 { return 2 * math.Sqrt(math.Pi*area) }
