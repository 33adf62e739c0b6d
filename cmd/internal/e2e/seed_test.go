package e2e

import "flag"

// Random draws begin at one seed, so that a run of the tests can be repeated; -rapid.seed chooses another. A failure is printed, not kept in a file.
func init() {
	flag.Set("rapid.seed", "1")
	flag.Set("rapid.nofailfile", "true")
}
