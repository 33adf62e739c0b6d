package network

import (
	"math"

	"headfall/elements"
)

// line is a compiled Line: its parts in series as a chain, what limits its flow, and its last result with the partial derivatives by its own
// end conditions. evaluate fills the result; nothing here knows the numbering of the plant.
type line struct {
	plan     *Line
	from, to mouth
	chain    chain
	table    *flowTable
	locals   []elements.Local
	moving   []mover // parts whose opening changes in time in this segment
	crack    float64 // Pa, of the check valves
	zero     float64 // Pa lost at no flow: less than 0 with a running pump
	losses   []directed
	floors   []floor
	crowns   []crown
	breakAt  int // floor at its upper end, for runs that break it there; -1
	weir     elements.Crest
	weirAt   *elements.Local
	crestZ   float64 // m over datum, of the weir
	side     *sideOpening
	gmin     float64    // m³/(s·Pa), the weepage at a tee; else 0
	stiff    float64    // m³/(s·Pa), added to its slopes when it is linearised
	inertia  float64    // ρL/A of all parts, kg/m⁴; 0 for none
	own      float64    // the flow itself where it is an unknown of the plant
	bore     float64    // m, the narrowest, for velocities; 0 for none
	area     float64    // m², of it
	acts     []int32    // its actuators
	clean    *unfouled  // what it was before an upset fouled it; nil while it is clean
	ranged   []int      // parts whose laws have a range
	inRange  [2]float64 // m³/s: flows between which they are known to be within it
	join     float64    // Pa over which a one-way end takes up flow
	reach    float64    // pressure that drives the flow, in bands
	turn     float64    // its slope by the pressure between the ends
	cell     flowCell   // of its flow while its parts stand, where it has no table
	lastDp   float64    // warm start of the chain while they move
	lastQ    float64
	lastS    float64

	q          float64 // m³/s from `from` to `to`
	byA, byB   float64 // ∂q/∂phi at each end, m³/(s·Pa)
	byYa, byYb float64 // ∂q/∂depth at each end, m²/s
	byT        float64 // ∂q/∂t at fixed end conditions, by moving parts, m³/s²
	byQ        float64 // ∂q/∂own where the flow is an unknown
	push       float64 // of an unknown flow: dq/dt, m³/s², and its partials
	pushA      float64
	pushB      float64
	pushQ      float64
	pushYa     float64
	pushYb     float64
	pushT      float64

	row     int32 // unknown of an inertial flow; -1
	stale   bool  // its parts do not stand as they did when its chain was merged
	oneWay  bool  // a check valve lets nothing back
	shut    bool  // nothing passes, as the parts stand
	parted  bool  // its flow is no unknown for the moment: its column has parted
	whole   bool  // it meets a tee whose balance is differentiated: what it passes is its unknown, to the bit, or nothing
	sources bool  // it has a pump
	steady  bool  // of a steady rate
	long    bool  // it has a pipe
	checks  bool  // it has a check valve
}

// mover is a part whose opening moves at a steady rate.
type mover struct {
	part     int // in the chain
	local    int // in the line
	actuator int
	rate     float64 // 1/s
}

// joinHead is the head over which a one-way end or a check valve takes up flow, m of liquid.
const joinHead = 1e-4

// evaluate works out the flow for ends a and b.
func (l *line) evaluate(a, b *end, gamma float64) {
	l.byA, l.byB, l.byYa, l.byYb, l.byT, l.byQ = 0, 0, 0, 0, 0, 0
	for i := range l.floors {
		l.floors[i].active = false
	}
	switch {
	case l.carries():
		l.carry(a, b, gamma)
	case l.shut:
		l.q = 0
	case l.weir != nil:
		l.spill(a, b, gamma)
	case l.side != nil:
		l.strips(a, b, gamma)
	default:
		l.pass(a, b, gamma)
	}
	if l.gmin > 0 && !l.whole {
		l.weep(a, b)
	}
}

// pass is the flow of a line that fills: what its parts let through at the pressure between its ends, within the limits.
func (l *line) pass(a, b *end, gamma float64) {
	dp := a.phi - b.phi
	drive := dp - l.zero
	onlyOn := l.oneWay || b.depth == never
	onlyBack := a.depth == never
	turn := 1.0 // slope of the one-way join
	band := l.join
	switch {
	case onlyOn && onlyBack:
		l.q = 0
		return
	case onlyOn:
		u := (drive - l.crack) / band
		drive, turn = crackOpen(drive, l.crack, band)
		turn = l.roundCorner(turn, u)
		if drive <= 0 {
			l.stand(turn)
			return
		}
	case onlyBack:
		u := -drive / band
		drive, turn = elements.Join(-drive, band)
		turn = l.roundCorner(turn, u)
		if drive <= 0 {
			l.stand(turn)
			return
		}
		drive = -drive
	}
	q, s := l.flowAt(drive + l.zero)
	l.byT = l.openingRate(q, s)
	s *= turn
	l.reach, l.turn = math.Abs(drive)/band, turn
	l.q, l.byA, l.byB = q, s, -s
	l.limit(a, b, gamma)
}

// corner is the share of the join's band within which a one-way line at a tee is given the slope that it has at the far side of it.
const corner = 0.05

// roundCorner returns the slope to use for a one-way line at a tee, u bands beyond the point where it takes up flow. Near that point the join is so
// flat that a pressure off by less than its tolerance would find no slope at all to bring it back; a steeper slope there only slows the approach.
// Flows are not touched.
func (l *line) roundCorner(turn, u float64) float64 {
	if l.gmin == 0 || u >= corner || u <= -10*corner {
		return turn
	}
	return math.Max(turn, corner*(4-3*corner)*math.Min(1, 1+u/(10*corner)))
}

// stand is a one-way line without flow, with share of the slope that it will have.
func (l *line) stand(share float64) {
	l.q = 0
	if share > 0 {
		_, d := l.chain.drop(0)
		l.byA, l.byB = share/d, -share/d
	}
}

// crackOpen returns the pressure that drives the flow through check valves which lift at crack: 0 up to there, the whole pressure from one band
// beyond, C¹ between; with its slope.
func crackOpen(drive, crack, band float64) (v, slope float64) {
	u := (drive - crack) / band
	switch {
	case u <= 0:
		return 0, 0
	case u >= 1:
		return drive, 1
	}
	top := crack + band
	return u * u * ((3-2*u)*top + (u-1)*band), u * (6*(1-u)*top/band + 3*u - 2)
}

// flowAt is the flow that the chain lets through at dp, by table, by its cell or by solving.
func (l *line) flowAt(dp float64) (q, slope float64) {
	if l.table != nil {
		if q, slope, ok := l.table.at(dp); ok {
			return q, slope
		}
	}
	if d := dp - l.zero; len(l.moving) == 0 && l.side == nil { // a side opening asks at two heads in turn
		if a := math.Abs(d); a >= leastTabled && a <= mostTabled {
			return l.cell.at(&l.chain, d, l.zero)
		}
	}
	guess := l.lastQ + l.lastS*(dp-l.lastDp)
	if (guess < 0) != (dp-l.zero < 0) {
		guess = l.lastQ
	}
	if !(math.Abs(guess) < absurdFlow) { // a trial step went astray: what it left is no start for the next
		guess = 0
	}
	q, slope = l.chain.solve(dp, guess)
	l.lastDp, l.lastQ, l.lastS = dp, q, slope
	return q, slope
}

// absurdFlow is a flow, m³/s, that no line passes.
const absurdFlow = 1e6

// openingRate returns ∂q/∂t at fixed pressures from the parts that move.
func (l *line) openingRate(q, s float64) float64 {
	var dt float64
	for _, m := range l.moving {
		dt -= s * m.rate * dropByOpening(l.chain.parts[m.part], q, l.chain.locals[m.part])
	}
	return dt
}

// dropByOpening returns ∂Drop/∂opening, Pa, by the part itself when it knows, else by differences.
func dropByOpening(p elements.Part, q float64, at *elements.Local) float64 {
	if t, ok := p.(elements.Throttles); ok {
		return t.DropByOpening(q, at)
	}
	x := at.Opening
	const e = 1e-6
	at.Opening = math.Min(1, x+e)
	up, _ := p.Drop(q, at)
	hi := at.Opening
	at.Opening = math.Max(0, x-e)
	dn, _ := p.Drop(q, at)
	lo := at.Opening
	at.Opening = x
	return (up - dn) / (hi - lo)
}

// limit applies the limits of the ends and the floors to the flow.
func (l *line) limit(a, b *end, gamma float64) {
	l.shoal(a, b, gamma)
	if l.q >= 0 {
		l.admitAt(&l.from.inlet, a.depth, &l.byYa)
	} else {
		l.admitAt(&l.to.inlet, b.depth, &l.byYb)
	}
	for i := range l.floors {
		f := &l.floors[i]
		if !f.off && f.back == (l.q < 0) && l.q != 0 {
			f.hold(l, a, b, gamma)
		}
	}
}

// shoal eases the turn of the flow where an end has next to no liquid over its mouth: little leaves there whatever the head, but anything may come in, and
// without more the law would have a corner at no flow. With w, v from 0 to 1 over the shallow depth at the end that liquid leaves and at the one it comes to,
//
//	q·w·(v + (1 − v)·u·(2 − u)), u = Δ/band < 1,
//
// Δ the pressure that drives the flow and the band that of a tenth of a millimetre: C¹, and the flow itself beyond the band or the shallow depth.
func (l *line) shoal(a, b *end, gamma float64) {
	leave, come, y, z, byY, byZ := &l.from.inlet, &l.to.inlet, a.depth, b.depth, &l.byYa, &l.byYb
	if l.q < 0 {
		leave, come, y, z, byY, byZ = come, leave, z, y, byZ, byY
	}
	band := joinHead * gamma
	drive := l.reach * l.join
	if y >= leave.shallow && (z >= come.shallow || drive >= band || z == never) {
		return
	}
	w, dw := leave.wet(y)
	v, dv := come.wet(z)
	u := drive / band
	g, dg := 1.0, 0.0
	if u < 1 {
		g, dg = u*(2-u), 2*(1-u)
	}
	s, q := l.byA, l.q
	r := v + (1-v)*g
	slope := s*w*r + math.Abs(q)*w*(1-v)*dg*l.turn/band
	if l.gmin > 0 { // as in roundCorner
		const c = corner * (4 - 3*corner)
		switch {
		case u < corner:
			slope = math.Max(slope, c*s)
		case w < 1:
			slope = math.Max(slope, c*s*(1-u/(10*corner)))
		}
	}
	l.q, l.byA, l.byB = q*w*r, slope, -slope
	*byY, *byZ = q*dw*r, q*w*(1-g)*dv
	l.byT *= w * r
}

// wet goes from 0 to 1 over the shallow depth, with its slope, 1/m.
func (l *inletLaw) wet(y float64) (w, slope float64) {
	if y >= l.shallow || y == never {
		return 1, 0
	}
	w, slope = elements.Step(y / l.shallow)
	return w, slope / l.shallow
}

// admitAt applies an inlet's limit at depth y to the flow that leaves there.
func (l *line) admitAt(in *inletLaw, y float64, byY *float64) {
	if l.q == 0 || in.form == fadeInlet || in.ample(y, math.Abs(l.q)) {
		return
	}
	q, byQ, by := in.admit(y, math.Abs(l.q))
	l.q = math.Copysign(q, l.q)
	l.byA, l.byB, l.byT = l.byA*byQ, l.byB*byQ, l.byT*byQ
	l.byYa, l.byYb = l.byYa*byQ, l.byYb*byQ
	*byY += math.Copysign(by, l.q)
}

// admit returns what an inlet lets through of a flow q > 0 that leaves there at depth y, with the partials by q and by y.
func (l *inletLaw) admit(y, q float64) (q1, byQ, byY float64) {
	if l.form == fadeInlet {
		w, dw := l.wet(y)
		return q * w, w, q * dw
	}
	c, slope := l.limit(y)
	q1, byQ, byC := elements.Min(q, c)
	return q1, byQ, byC * slope
}

// weepage is the conductance that every line at a tee has besides its own, m³/(s·Pa), so small that it counts only where a tee has no other path,
// and booked at both ends; dryWeepage is the share of it left where an end is dry, so that next to nothing is drawn from there.
const (
	weepage    = 1e-22
	dryWeepage = 1e-3
)

// weep adds the weepage, so that the pressure of a tee is determined when every path is shut.
func (l *line) weep(a, b *end) {
	g := l.gmin
	if a.depth <= 0 || b.depth <= 0 {
		g *= dryWeepage
	}
	l.q += g * (a.phi - b.phi)
	l.byA += g
	l.byB -= g
}
