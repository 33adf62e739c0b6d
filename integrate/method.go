package integrate

// Method is a way to step through time: a *Tableau or BDF.
type Method interface {
	Name() string
	stepper(s *Solver) stepper
}

// Methods returns the methods that there are.
func Methods() []Method { return []Method{Rodas5P, Rodas4P2, Rodas4P, BDF} }

// stepper is what a method does for the Solver, which owns the state, the linearisation, the factor and the step loop.
type stepper interface {
	// order is the order of the error estimate at the first step after a restart.
	order() int
	// restart forgets all history: state or rates have changed. The slopes at the present time and the next step are known.
	restart()
	// attempt tries a step of h from (t, y0, z0), fills y1 and z1, and returns the norm of the error estimate, NaN if it is not finite.
	attempt(h float64) (float64, error)
	// accept takes the last attempt as the step that was made and returns the next step.
	accept(norm float64) float64
	// reject returns the step to try instead of the last attempt of norm, which is infinite when the result was refused.
	reject(norm float64) float64
	// polynomial and polynomialZ fill the inner coefficients of the dense output of the last attempt, of all unknowns or integrals; row and rowZ of one.
	polynomial(k [][]float64)
	polynomialZ(kz [][]float64)
	row(i int) inner
	rowZ(i int) inner
	// half sets y and rate to what the inner coefficients add, half-way through the step, to the mean of the unknowns at its ends and to their difference.
	half(y, rate []float64)
	// halfZ is half for the rates of the first integrals.
	halfZ(rate []float64)
	// implicit tells that the algebraic equations are solved at the end of every step.
	implicit() bool
	// degree returns how many inner coefficients there may be.
	degree() int
}
