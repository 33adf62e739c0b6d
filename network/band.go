package network

import (
	"math"

	"headfall/elements"
)

// laminarHead is the head, m, which the laminar flow in a line's pipes must reach at least for the line to be smooth enough by itself; the level
// tolerance is of that size (levelCap).
const laminarHead = levelCap

// narrowBand is the share of the usual band that is left to quadratic losses in such a line.
const narrowBand = 1e-3

// setBand chooses the drop, Pa, under which the quadratic losses of a line are made linear through zero: a tenth of a millimetre of liquid. Where
// friction in the pipes is laminar up to a head that counts, it does that by itself, and the other losses stay quadratic almost to nothing.
func (s *system) setBand(c *line) {
	band := joinHead * s.gamma
	c.join = band
	if s.laminarUpTo(c) >= laminarHead {
		band *= narrowBand
		if c.gmin == 0 && c.crack == 0 { // a valve that cracks open lets the whole flow begin there
			c.join = band
		}
	}
	c.chain.band = band
	for i := range c.locals {
		c.locals[i].Band = band
	}
}

// laminarUpTo returns the head, m, that the pipes of a line lose at a Reynolds number of 2000 by the slope of their law at rest.
func (s *system) laminarUpTo(c *line) (head float64) {
	for i, f := range c.plan.Parts {
		if _, long := f.Part.(elements.Long); !long {
			continue
		}
		c.locals[i].Band = 1e-9 * s.gamma // till setBand has chosen
		_, slope := f.Part.Drop(0, &c.locals[i])
		q := 2000 * math.Pi / 4 * boreOf(f.Part) * s.fluid.Dynamic / s.fluid.Density
		head += slope * q / s.gamma
	}
	return head
}
