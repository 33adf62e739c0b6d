package friction_test

import (
	"fmt"

	"headfall/elements/friction"
)

// The loss coefficient of a named fitting in a bore.
func ExampleFittingK() {
	k, known := friction.FittingK("elbow_90", 0.1)
	fmt.Printf("%.2f %v\n", k, known)
	// Output: 0.49 true
}
