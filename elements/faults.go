package elements

import (
	"errors"
	"math"
	"strings"
)

// faults collects what is wrong with the parameters of one element, so that all of it is said at once.
type faults []string

// when adds a fault if it holds.
func (f *faults) when(bad bool, says string) {
	if bad {
		*f = append(*f, says)
	}
}

// err returns the faults as one error that can be taken apart, or nil.
func (f faults) err() error {
	if len(f) == 0 {
		return nil
	}
	return Faults(f)
}

// Faults is all that is wrong with the parameters of one element, a sentence each.
type Faults []string

// Error returns them in one line.
func (f Faults) Error() string { return strings.Join(f, "; ") }

// Unwrap takes them apart.
func (f Faults) Unwrap() []error {
	all := make([]error, len(f))
	for i, says := range f {
		all[i] = errors.New(says)
	}
	return all
}

// circle is the area, m², of a circle of diameter d, m.
func circle(d float64) float64 { return math.Pi / 4 * d * d }
