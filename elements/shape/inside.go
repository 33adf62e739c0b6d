package shape

import (
	"fmt"
	"math"
	"sort"
)

// Internal is something in a vessel between two levels that leaves less room for liquid.
type Internal struct {
	From, To  float64 // m above the lowest inside point
	Voids     float64 // share of the room left between solid media, 0..1; 0: not given, all of it
	Displaces float64 // m³ taken up, spread evenly over the levels
}

// Inside returns a shape with media and internals in it:
//
//	A'(h) = voids·A(h) − displaced/(to − from)   for from ≤ h ≤ to
//
// in the order given where they overlap. Their ends are corners where the area jumps by more than 1 %. Range: 0 ≤ from < to ≤ height, 0 < voids ≤ 1, and 1 cm²
// must be left everywhere.
func Inside(s Shape, internals ...Internal) (Shape, error) {
	var f faults
	b, ours := s.(*body)
	if !ours {
		f.add("this shape can not have internals")
		return nil, f.err("inside")
	}
	for i, in := range internals {
		in.check(&f, fmt.Sprintf("internal %d", i+1), b.height)
	}
	if err := f.err("inside"); err != nil {
		return nil, err
	}
	for i, in := range internals {
		b = pile(in.fill(b))
		for k := range b.slices {
			if low := b.slices[k].least(); low < minArea {
				f.add("internal %d: it leaves no room for liquid at level %s", i+1, metres(b.slices[k].z))
				return nil, f.err("inside")
			}
		}
	}
	return b, nil
}

func (in Internal) check(f *faults, name string, height float64) {
	if !(in.From >= 0) || !(in.To > in.From) || !(in.To <= height*(1+1e-9)) {
		f.add("%s: from and to must rise within the height of %s, they are %s and %s", name, metres(height), metres(in.From), metres(in.To))
	}
	if !(in.Voids >= 0 && in.Voids <= 1) {
		f.add("%s: voids is a share between 0 and 100 %%, not %.5g %%", name, in.Voids*100)
	}
	if !(in.Displaces >= 0) || math.IsInf(in.Displaces, 1) {
		f.add("%s: displaces must not be negative, it is %.5g m3", name, in.Displaces)
	}
	if in.Voids == 0 && in.Displaces == 0 {
		f.add("%s: give voids or displaces", name)
	}
}

// fill returns the slices of b, cut at the internal's ends and narrowed between them.
func (in Internal) fill(b *body) []slice {
	share, less := in.Voids, in.Displaces/(in.To-in.From)
	if share == 0 {
		share = 1
	}
	var out []slice
	for _, s := range b.slices {
		cuts := []float64{0, in.From - s.z, in.To - s.z, s.h}
		for i := range cuts {
			cuts[i] = math.Min(math.Max(cuts[i], 0), s.h)
		}
		sort.Float64s(cuts)
		for i := 1; i < len(cuts); i++ {
			lo, hi := cuts[i-1], cuts[i]
			if hi-lo <= 1e-12*b.height {
				continue
			}
			if middle := s.z + (lo+hi)/2; middle > in.From && middle < in.To {
				out = append(out, narrowed(s, lo, hi, share, less))
			} else {
				out = append(out, narrowed(s, lo, hi, 1, 0))
			}
		}
	}
	return out
}

// least returns the smallest of a few areas of the slice, m².
func (s *slice) least() float64 {
	least := math.Inf(1)
	for i := range 33 {
		_, a := s.at(s.h * float64(i) / 32)
		least = math.Min(least, a)
	}
	return least
}
