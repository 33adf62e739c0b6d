// Package integrate solves M y' = f(t, y) for stiff, sparse, smooth-in-pieces systems of index 1. It knows no tanks.
package integrate

import "headfall/integrate/sparse"

// System is a set of equations M y' = f(t, y), M diagonal of ones (differential) and zeros (algebraic), together with integrals
// z' = g(t, y) on which nothing depends, carried with the method's own weights.
//
// Rules between a System and the solver:
//  1. The solver calls Rates and Linearise one after the other, never at once; no call may allocate.
//  2. Slices handed over belong to the solver and are valid during the call only; y must not be changed.
//  3. Between two Restarts of the solver f and g are continuously differentiable in t and y.
//  4. Pattern, Mass and IntegralPattern stay the same for the life of the System.
//  5. A System may keep warm starts, but its results must not depend on the order of calls beyond rounding.
type System interface {
	// Dim returns the number of unknowns n and of integrals m.
	Dim() (n, m int)
	// Mass returns the diagonal of M: true where the unknown is differential.
	Mass() []bool
	// Pattern returns the compressed-column pattern of ∂f/∂y; every diagonal entry is in it.
	Pattern() *sparse.Pattern
	// IntegralPattern returns the compressed-row pattern of ∂g/∂y: row i has columns Cols[Ptr[i]:Ptr[i+1]].
	IntegralPattern() (ptr, cols []int32)
	// Rates fills f (length n) and g (length m) at (t, y).
	Rates(t float64, y, f, g []float64)
	// Linearise fills f and g and also the values of ∂f/∂y (in Pattern's order), ∂g/∂y (in IntegralPattern's order), ∂f/∂t and ∂g/∂t.
	Linearise(t float64, y, f, g []float64, lin *Linear)
	// Scale fills the absolute error allowed in each unknown at y for relative tolerance rtol; the error norm divides by it.
	Scale(y []float64, rtol float64, scale []float64)
}

// Linear is a linearisation of a System at one point.
type Linear struct {
	DfDy []float64 // values of ∂f/∂y in the order of Pattern
	DgDy []float64 // values of ∂g/∂y in the order of IntegralPattern
	DfDt []float64 // length n
	DgDt []float64 // length m
}

// Guard is a System that can refuse a step: Admit returns false when y is outside the range of the laws, and the step is then tried shorter.
type Guard interface {
	Admit(t float64, y []float64) bool
}

// Settler is a System that knows how to bring its algebraic unknowns near to consistency better than Newton's method from where they are: Settle
// changes those of y in place, for the present differential ones; the solver then finishes by itself. Settled tells from the rates f at the point
// that was linearised last whether they are near enough, or, for a method that solves them in every step (implicit), whether they are within reason:
// if not, the solver settles them before its next step.
type Settler interface {
	Settle(t float64, y []float64)
	Settled(f []float64, implicit bool) bool
}

// Idler is a System whose last integrals stand still for long: Busy returns how many of the first ones may have moved, by their rates and by the partials
// of these, at any point since the last Linearise, that included.
type Idler interface {
	Busy() int
}

// Events is a set of functions of time and state whose sign changes matter. The solver asks for all of them at once.
type Events interface {
	// Len returns the number of functions.
	Len() int
	// Values fills v with the functions at (t, y). A function that is off at present returns NaN.
	Values(t float64, y, v []float64)
	// Direction tells which crossings of function i count: +1 rising through zero, -1 falling, 0 both.
	Direction(i int) int
}

// Stop tells why Step returned.
type Stop int

const (
	Stepped    Stop = iota // a step was taken and neither the end nor an event was met
	ReachedEnd             // the step ended exactly at the end time
	HitEvent               // the step was ended at an event
)

// Outcome is what one call of Step did. The step spans [T0, T]; the dense output covers it until the next call.
type Outcome struct {
	Stop  Stop
	T0, T float64
	Fired []int // indices of the events at T (all within the event's time tolerance), ascending; valid until the next Step
}
