package sparse_test

import (
	"fmt"

	"headfall/integrate/sparse"
)

// The pattern is analysed once; numbers change often.
func ExampleAnalyse() {
	p := &sparse.Pattern{N: 2, Ptr: []int32{0, 2, 3}, Row: []int32{0, 1, 1}} // [2 0; 1 4] by columns
	f := sparse.Analyse(p)
	for _, values := range [][]float64{{2, 1, 4}, {1, 1, 2}} {
		if err := f.Refactor(values); err != nil {
			fmt.Println(err)
			return
		}
		x := []float64{2, 9}
		f.Solve(x)
		fmt.Println(x)
	}
	// Output:
	// [1 2]
	// [2 3.5]
}
