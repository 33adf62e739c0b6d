package integrate

// FixStep makes the solver take steps of h whatever their error, for tests of the order.
func (s *Solver) FixStep(h float64) { s.fixed = h }
