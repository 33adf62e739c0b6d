package integrate

import "fmt"

// Reason tells why a run could not go on.
type Reason int

const (
	TooManySteps Reason = iota // MaxSteps were taken
	StepTooSmall               // no step, however short, was good enough
	Singular                   // the equations do not determine an unknown
	NotSettled                 // no consistent values of the algebraic unknowns were found at a restart
	NotFinite                  // rates or state are not numbers at a restart
)

func (r Reason) String() string {
	return [...]string{"too many steps", "step too small", "singular", "not settled", "not finite"}[r]
}

// Error tells that a run could not go on, when, and because of which unknown. State and integrals of the Solver are those of the last accepted step.
type Error struct {
	Reason  Reason
	T       float64 // time of the last accepted step or of the restart
	H       float64 // last step tried
	Unknown int     // index of the worst unknown, -1 if there is none to name
	Steps   int     // accepted since Reset
	Err     error   // of the factorisation, or nil
}

func (e *Error) Error() string {
	s := fmt.Sprintf("integrate: %v at t = %g", e.Reason, e.T)
	if e.Unknown >= 0 {
		s += fmt.Sprintf(", unknown %d", e.Unknown)
	}
	if e.Err != nil {
		s += ": " + e.Err.Error()
	}
	return s
}

func (e *Error) Unwrap() error { return e.Err }
