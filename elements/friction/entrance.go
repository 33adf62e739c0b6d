package friction

// Loss coefficients K (−) of line ends, on the bore there.
//
// Source: Crane Technical Paper 410; textbooks (0.43–0.57 sharp, 0.78–1.0 re-entrant).
const (
	SharpEntry     = 0.5  // flush with the wall
	RoundedEntry   = 0.04 // rounded to a radius of 0.15 bores or more
	ReentrantEntry = 0.78 // the pipe stands into the vessel
	Exit           = 1.0  // the velocity head is lost
)
