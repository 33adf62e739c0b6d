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
	active   bool
}

// hold applies the floor to the line's flow.
func (f *floor) hold(l *line, a, b *end, gamma float64) {
	up := a
	if f.back {
		up = b
	}
	share := 1.0
	if f.throat != nil {
		share = f.throat.Recovery(l.chain.locals[f.part])
		quick := up.phi - gamma*f.z - f.pressure
		if dp := math.Abs(a.phi - b.phi - l.zero); (1+share)*dp <= share*quick {
			return
		}
		n := len(f.up.weight) - 1
		for i := range f.up.weight[:n] {
			f.up.weight[i] = share
		}
		f.up.fwd = share * f.base
	}
	dp := share * (up.phi - gamma*f.z - f.pressure)
	q := math.Abs(l.q)
	if d, _ := f.up.drop(q / 0.9); d <= dp {
		return
	}
	f.active = true
	near, far, byY := l.byA, l.byB, l.byYa
	if f.back {
		near, far, byY = -l.byB, -l.byA, -l.byYb
	}
	c, slope := 0.0, 0.0
	if dp, turn := elements.Join(dp, joinHead*gamma); dp > 0 {
		c, slope = f.up.solve(dp, q)
		slope *= turn * share
	}
	v, byQ, byC := elements.Min(q, c)
	near, far, byY = near*byQ+byC*slope, far*byQ, byY*byQ
	l.byT *= byQ
	if f.back {
		l.q, l.byB, l.byA, l.byYb = -v, -near, -far, -byY
	} else {
		l.q, l.byA, l.byB, l.byYa = v, near, far, byY
	}
}

// pressureAt returns the static pressure, Pa absolute, at the floor's point while the line carries q from its `up` side at phi.
func (f *floor) pressureAt(phi, q, gamma float64) float64 {
	d, _ := f.up.drop(math.Abs(q))
	return phi - gamma*f.z - d
}
