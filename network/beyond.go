package network

import "math"

// beyond looks at what enters the outside points over the step just taken: its peak, and the volume over their capacity (Simpson's rule on the
// excess). It also notes when vessels were last seen spilling.
func (o *observer) beyond() {
	s := o.sim.sys
	for i := range s.stations {
		if o.now.spill[i] > 0 || o.mid.spill[i] > 0 {
			o.spilled[i] = o.now.t
		}
	}
	for k := range s.outside {
		o.sums = [3]float64{}
		for j, w := range []*snapshot{&o.prev, &o.mid, &o.now} {
			o.sums[j] = o.enters(k, w)
			o.inflow[k].see(o.sums[j], w.t)
		}
		if c := s.outside[k].point.Capacity; c > 0 {
			e := func(i int) float64 { return math.Max(0, o.sums[i]-c) }
			o.over[k] += (o.now.t - o.prev.t) / 6 * (e(0) + 4*e(1) + e(2))
		}
	}
}

// enters returns what enters outside point k at a snapshot, m³/s.
func (o *observer) enters(k int, w *snapshot) (sum float64) {
	for _, i := range o.sim.sys.outside[k].fed {
		sum += w.q[i]
	}
	for _, i := range o.sim.sys.outside[k].drawn {
		sum -= w.q[i]
	}
	return sum
}
