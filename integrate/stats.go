package integrate

// Stats counts what a Solver did since Reset.
type Stats struct {
	Steps          int // accepted
	Rejected       int // tried and found too long, refused by the Guard or not finite
	Factorisations int
	Pivoted        int // factorisations that needed other pivots than the diagonal
	Evaluations    int // calls of Rates and Linearise
	Linearisations int // calls of Linearise
	Events         int // steps ended by events
	Restarts       int
}
