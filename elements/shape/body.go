package shape

import (
	"math"
	"sort"
)

// slice is one layer of a body.
type slice struct {
	piece
	z, v  float64                 // level, m, and volume, m³, at its bottom
	h, dv float64                 // its height, m, and volume, m³
	half  func(z float64) float64 // half the width in the front elevation, m, at z over its bottom; nil: of a circle of that area
	rim   func(z float64) float64 // perimeter, m; nil: of a circle of that area
	bent  bool                    // its outline is curved
}

// at returns volume, m³, and area, m², at z, m over its bottom.
func (s *slice) at(z float64) (v, area float64) {
	v, area, _ = s.eval(z)
	return v, area
}

// body is a pile of slices; all shapes are bodies.
//
//	V(h) = V_i + P_i(h − z_i)   in slice i
//	V(h) = A(0)·h               below 0
//	V(h) = V(H) + A_top·(h − H) above H,  A_top = max(A(H), 1 % of the largest section)
//
// Level(Volume(h)) gives h back to 1e-12, but no better than the rounding of V itself allows: ε·V/A, which is 3e-9 m under the very pole of a tank of
// 50 000 m³.
type body struct {
	slices  []slice
	height  float64 // m
	volume  float64 // m³ at height
	tip     float64 // m², area at the bottom
	above   float64 // m², area over the top
	largest float64 // m²
	corners []float64
}

// pile makes a body of slices given from the bottom up.
func pile(slices []slice) *body {
	b := &body{}
	for _, s := range slices {
		if s.h <= 0 {
			continue
		}
		s.z, s.v = b.height, b.volume
		s.dv, _ = s.at(s.h)
		b.height += s.h
		b.volume += s.dv
		b.slices = append(b.slices, s)
	}
	for i := range b.slices {
		b.largest = math.Max(b.largest, b.slices[i].widest())
	}
	_, b.tip = b.slices[0].at(0)
	last := &b.slices[len(b.slices)-1]
	_, top := last.at(last.h)
	b.above = math.Max(top, topShare*b.largest)
	b.corners = b.findCorners(top)
	return b
}

// widest returns the largest of a few areas over the slice's height, m²; ends included, so that it is exact for all but bulging slices.
func (s *slice) widest() float64 {
	const n = 32
	most := 0.0
	for i := 0; i <= n; i++ {
		_, a := s.at(s.h * float64(i) / n)
		most = math.Max(most, a)
	}
	return most
}

func (b *body) findCorners(top float64) []float64 {
	var corners []float64
	jump := func(z, below, above float64) {
		if math.Abs(above-below) > cornerJump*math.Min(below, above) {
			corners = append(corners, z)
		}
	}
	for i := 1; i < len(b.slices); i++ {
		_, below := b.slices[i-1].at(b.slices[i-1].h)
		_, above := b.slices[i].at(0)
		jump(b.slices[i].z, below, above)
	}
	jump(b.height, top, b.above)
	return corners
}

// Height returns the height over all, m.
func (b *body) Height() float64 { return b.height }

// Corners returns the levels, m, where the area jumps.
func (b *body) Corners() []float64 { return b.corners }

// Volume returns the volume, m³, and the area, m², at level h, m.
func (b *body) Volume(h float64) (v, area float64) {
	if !(h > 0) {
		return b.tip * h, b.tip
	}
	if h > b.height {
		return b.volume + b.above*(h-b.height), b.above
	}
	s := b.sliceAt(h)
	v, area = s.at(h - s.z)
	return s.v + v, area
}

// Level returns the level, m, and its slope 1/A, 1/m², at volume v, m³.
func (b *body) Level(v float64) (h, slope float64) {
	if !(v > 0) {
		return v / b.tip, 1 / b.tip
	}
	if v > b.volume {
		return b.height + (v-b.volume)/b.above, 1 / b.above
	}
	s := b.sliceOf(v)
	h, slope = s.level(v - s.v)
	return s.z + min(h, s.h), slope
}

// Straight returns the volumes, m³, between which the level goes straight with the volume around v.
func (b *body) Straight(v float64) (lo, hi float64) {
	switch {
	case !(v > 0):
		return math.Inf(-1), 0
	case v > b.volume:
		return b.volume, math.Inf(1)
	}
	s := b.sliceOf(v)
	if _, is := s.piece.(prism); !is {
		return 0, 0
	}
	return s.v, s.v + s.dv
}

// few is the number of slices up to which looking at each beats halving.
const few = 8

func (b *body) sliceAt(h float64) *slice {
	i := len(b.slices) - 1
	if i >= few {
		i = sort.Search(len(b.slices), func(k int) bool { return b.slices[k].z > h }) - 1
	}
	for i > 0 && b.slices[i].z > h {
		i--
	}
	return &b.slices[max(i, 0)]
}

func (b *body) sliceOf(v float64) *slice {
	i := len(b.slices) - 1
	if i >= few {
		i = sort.Search(len(b.slices), func(k int) bool { return b.slices[k].v > v }) - 1
	}
	for i > 0 && b.slices[i].v > v {
		i--
	}
	return &b.slices[max(i, 0)]
}
