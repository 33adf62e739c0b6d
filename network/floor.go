package network

import (
	"math"

	"headfall/elements"
)

// floor is a point of a line whose static pressure does not fall below a floor: the throat of a valve, or a crest. It limits the flow to what
// brings the point to that pressure from its upstream side:
//
//	share·(phi_up − γ·z − p_floor) = share·(Σ Drop upstream + ρv²/2) + Drop of the throat
//
// share is F_L² of a valve (with its own drop at the right), 1 of a crest (without).
type floor struct {
	part     int  // the part it is at
	back     bool // limits flow from `to` to `from`
	up       chain
	z        float64 // m over datum
	pressure float64 // Pa absolute
	throat   elements.Chokes
	vapour   bool    // the floor is vapour pressure: holding there is marked unreliable
	base     float64 // fwd coefficient of up without share
	blend    float64 // share of the flow within which the limit sets in
	active   bool
	off      bool // not in this run

	easyFlow, easyLoss float64 // m³/s and what the parts upstream lose at it, Pa, as they stand: a flow that was found to be admitted with some to spare
}

// loses tells that the parts upstream lose more than dp, Pa, at flow q. Their loss grows with the flow, so that one that is known serves for all that are less.
func (f *floor) loses(l *line, q, dp float64) bool {
	const spare = 1.05
	if f.throat == nil && len(l.moving) == 0 {
		if q <= f.easyFlow && f.easyLoss <= dp {
			return false
		}
		if d, _ := f.up.drop(spare * q); d <= dp {
			f.easyFlow, f.easyLoss = spare*q, d
			return false
		}
	}
	d, _ := f.up.drop(q)
	return d > dp
}

// blend and steadyBlend are the shares of the flow within which a floor's limit sets in: as every limit, and behind a pump of a steady rate, which gives a
// ten-thousandth less at ten metres more, within next to nothing.
const (
	blend       = 0.1
	steadyBlend = 1e-6
)

// hold applies the floor to the line's flow.
func (f *floor) hold(l *line, a, b *end, gamma float64) {
	up := a
	if f.back {
		up = b
	}
	share := 1.0
	if f.throat != nil {
		share = f.throat.Recovery(&l.locals[f.part])
		quick := up.phi - gamma*f.z - f.pressure
		if dp := math.Abs(a.phi - b.phi - l.zero); (1+share)*dp <= share*quick {
			return
		}
		f.share(l)
	}
	band, lift := joinHead*gamma, f.lift(l)
	over := share*(up.phi-gamma*f.z-f.pressure) - lift
	drive, turn := elements.Join(over, band)
	q := math.Abs(l.q)
	if !f.loses(l, q/(1-f.blend), drive+lift) {
		return
	}
	f.active = true
	near, far, byY := l.byA, l.byB, l.byYa
	if f.back {
		near, far, byY = -l.byB, -l.byA, -l.byYb
	}
	c, slope := 0.0, 0.0
	turn = l.roundCorner(turn, over/band)
	switch {
	case drive > 0:
		c, slope = f.up.solve(drive+lift, q)
		slope *= turn * share
	case turn > 0:
		_, d := f.up.drop(0)
		slope = turn * share / d
	}
	v, byQ, byC := elements.MinWithin(q, c, f.blend)
	near, far, byY = near*byQ+byC*slope, far*byQ, byY*byQ
	l.byT *= byQ
	if c > 0 && len(l.moving) > 0 {
		if t := byC * f.openingRate(l, up, c, gamma); f.back {
			l.byT -= t
		} else {
			l.byT += t
		}
	}
	if f.back {
		l.q, l.byB, l.byA, l.byYb = -v, -near, -far, -byY
	} else {
		l.q, l.byA, l.byB, l.byYa = v, near, far, byY
	}
}

// lift is the pressure, Pa, that the parts upstream lose at no flow: less than 0 with a running pump.
func (f *floor) lift(l *line) float64 {
	if !l.sources {
		return 0
	}
	d, _ := f.up.drop(0)
	return d
}

// openingRate returns ∂c/∂t, m³/s², of the flow c > 0 that the floor admits, by the parts that move upstream of it and its throat.
func (f *floor) openingRate(l *line, up *end, c, gamma float64) (rate float64) {
	share := f.share(l)
	loss, slope := f.up.drop(c)
	sign := 1.0
	if f.back {
		sign = -1
	}
	for _, m := range l.moving {
		at := &l.locals[m.local]
		for i, u := range f.up.locals {
			if u != at {
				continue
			}
			d := f.up.weight[i] * sign * dropByOpening(f.up.parts[i], sign*c, at)
			if f.throat != nil && i == len(f.up.locals)-1 {
				if s := f.shareByOpening(at); s != 0 {
					own, _ := f.up.parts[i].Drop(sign*c, at)
					d += s * ((loss-sign*own)/share - (up.phi - gamma*f.z - f.pressure))
				}
			}
			rate -= m.rate * d / slope
		}
	}
	return rate
}

// shareByOpening is the slope of F_L² by the opening of the throat, by differences; 0 to the bit where it does not depend on it.
func (f *floor) shareByOpening(at *elements.Local) float64 {
	const e = 1e-6
	x := at.Opening
	hi, lo := math.Min(1, x+e), math.Max(0, x-e)
	at.Opening = hi
	s := f.throat.Recovery(at)
	at.Opening = lo
	s -= f.throat.Recovery(at)
	at.Opening = x
	return s / (hi - lo)
}

// share brings the weights of a throat's floor to its present opening and returns F_L², or 1 for a crest.
func (f *floor) share(l *line) float64 {
	if f.throat == nil {
		return 1
	}
	share := f.throat.Recovery(&l.locals[f.part])
	n := len(f.up.weight) - 1
	for i := range f.up.weight[:n] {
		f.up.weight[i] = share
	}
	f.up.fwd = share * f.base
	return share
}

// pressureAt returns the static pressure, Pa absolute, at the floor's point while the line carries q from its `up` side at phi.
func (f *floor) pressureAt(phi, q, gamma float64) float64 {
	d, _ := f.up.drop(math.Abs(q))
	return phi - gamma*f.z - d
}
