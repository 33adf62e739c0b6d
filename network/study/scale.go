package study

import (
	"math"

	"headfall/elements/quantity"
	"headfall/network"
)

// scaled is a number on the scale that it is searched on: heights, times and shares as they are, coefficients by their logarithm.
type scaled struct {
	at  int // place in the plant's list
	n   *network.Number
	log bool
}

func newScaled(p *network.Plant, n *network.Number) scaled {
	s := scaled{n: n}
	for i, m := range p.Numbers {
		if m == n {
			s.at = i
		}
	}
	switch n.Dim {
	case quantity.Time, quantity.Ratio:
	case quantity.Length:
		s.log = !heights[n.Key]
	default:
		s.log = true
	}
	s.log = s.log && *n.At > 0
	return s
}

// heights are the lengths that may be 0 or less: they are not searched by ratio.
var heights = map[string]bool{"level": true, "base": true, "elevation": true, "surface": true, "centre": true, "invert": true, "crest": true, "dip": true,
	"rim": true, "zero": true, "empty_at": true, "above": true, "below": true}

// unit is one step of the scale, SI: hours count in time.
func (s *scaled) unit() float64 {
	if s.n.Dim == quantity.Time {
		return 3600
	}
	return 1
}

// to turns a value into its place on the scale.
func (s *scaled) to(v float64) float64 {
	if s.log {
		return math.Log(v)
	}
	return v / s.unit()
}

// from turns a place on the scale into a value; a share stays a share.
func (s *scaled) from(x float64) float64 {
	if s.log {
		return math.Exp(x)
	}
	v := x * s.unit()
	if s.n.Dim == quantity.Ratio {
		v = math.Max(0, math.Min(1, v))
	}
	return v
}

// out turns a place on the scale into a value for people, without holding it within what is allowed.
func (s *scaled) out(x float64) float64 {
	if s.log {
		return math.Exp(x)
	}
	return x * s.unit()
}
