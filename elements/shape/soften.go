package shape

import "math"

// rounding is the reach, m, over which a small kink of a table is rounded to either side.
const rounding = 0.5e-3

// soften rounds the joints of prisms whose areas differ by no more than 1 %: over a reach r to either side of the joint the area goes straight
// from one to the other. The volume is off by ΔA·r/4 at the joint, at most 1.25 µm of level, and right again r above it.
func soften(slices []slice) []slice {
	reach := make([]float64, len(slices)+1) // of joint i, below slice i; 0: sharp
	for i := 1; i < len(slices); i++ {
		low, isPrism := slices[i-1].piece.(prism)
		high, both := slices[i].piece.(prism)
		step := math.Abs(high.area - low.area)
		if isPrism && both && step > 0 && step <= cornerJump*math.Min(low.area, high.area) {
			reach[i] = math.Min(rounding, math.Min(slices[i-1].h, slices[i].h)/2)
		}
	}
	var out []slice
	for i, s := range slices {
		if r := reach[i]; r > 0 {
			a0, a1 := slices[i-1].piece.(prism).area, s.piece.(prism).area
			joint := slices[i]
			joint.piece, joint.h = wedge{a: a0, b: (a1 - a0) / (2 * r)}, 2*r
			out = append(out, joint)
		}
		s.h -= reach[i] + reach[i+1]
		out = append(out, s)
	}
	return out
}
