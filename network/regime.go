package network

import (
	"fmt"
	"math"

	"headfall/elements"
	"headfall/elements/quantity"
)

// regime is the spans of time in which a line is in some state worth a flag, looked at where steps end and timed within them.
type regime [regimes]span

type span struct {
	open     bool
	seen     bool
	from, to float64
	size     float64
	why      string // in whose words it is
	flags    int    // flags raised so far
}

const (
	airDrawn = iota // the inlet pulls air down
	airEnters
	surging  // part full now and then: Froude number 0.3 to 1
	selfVent // part full: Froude number under 0.3
	choked
	held
	offCurve
	shallow // less submerged than ANSI/HI 9.8 asks for
	outside // of a law's range
	regimes
)

// flowing is the flow, m³/s, under which a line is taken as still: 0.04 L/min.
const flowing = 6e-7

// most flags of one kind at one place; what comes after is left out.
const mostFlags = 6

// regime looks at every line in the present state.
func (o *observer) regime() {
	s := o.sim.sys
	for k := range s.plain {
		p := &s.plain[k]
		if q := o.now.q[p.line]; q == o.prev.q[p.line] || o.noted[p.line] == 0 && s.calm(k, q) {
			continue
		}
		s.evaluate(int(p.line))
		o.regimeOf(int(p.line))
	}
	for _, i := range s.rest {
		o.regimeOf(int(i))
	}
}

// calm tells that a plain line is in no state worth a flag: it stands, or the mouth that it draws from lies deeper than where vortices may begin, which is
// deeper than where air is drawn, and its flow is within the ranges of its parts.
func (s *system) calm(k int, q float64) bool {
	p, r := &s.plain[k], &s.plainRest[k]
	in, phi, a := &r.in, s.floor[p.from], q
	if q < 0 {
		in, phi, a = &r.out, s.floor[p.to], -q
	}
	return a <= flowing || a <= s.lines[p.line].table.within && phi-in.zero > in.bore+in.swirl*a
}

// states are what a line is in, with how far it is in it.
type states struct {
	in   [regimes]bool
	size [regimes]float64
	why  string // in whose words it is out of range
}

// regimeOf looks at line i.
func (o *observer) regimeOf(i int) {
	now := o.sim.sys.statesOf(i)
	for k, in := range now.in {
		if r := o.regimes[i]; in || r != nil && r[k].open {
			o.mark(i, k, in, now.size[k])
		}
	}
	if now.why != "" {
		o.regimes[i][outside].why = now.why
	}
}

// statesOf looks at line i as it was evaluated last.
func (s *system) statesOf(i int) (v states) {
	l := &s.lines[i]
	a, b := s.see(&l.from), s.see(&l.to)
	q := math.Abs(l.q)
	moving := q > flowing
	in, depth := &l.from.inlet, a.depth
	if l.q < 0 {
		in, depth = &l.to.inlet, b.depth
	}
	set := func(kind int, on bool, size float64) { v.in[kind], v.size[kind] = on, size }
	set(airDrawn, moving && drawsAir(in, depth, q, s.plan.Gravity), depth)
	set(shallow, moving && s.shallow(in, depth, q), depth)
	set(airEnters, l.to.kind == toAir && !l.shut && !l.oneWay && a.phi+s.gamma*1e-3 < b.phi && s.reachesLiquid(&l.from), (b.phi-a.phi)/s.gamma)
	froude := 0.0
	if l.bore > 0 {
		froude = q / l.area / math.Sqrt(s.plan.Gravity*l.bore)
	}
	part := moving && froude < 1 && l.to.kind == toAir && l.long && s.falls(l)
	set(surging, part && froude >= ventsItself, froude)
	set(selfVent, part && froude < ventsItself, froude)
	for k := range l.floors {
		f := &l.floors[k]
		v.in[choked] = v.in[choked] || moving && f.active && f.throat != nil
		v.in[held] = v.in[held] || moving && f.active && f.throat == nil && f.vapour
	}
	if len(l.ranged) > 0 && moving {
		v.why = l.outsideRange(a.depth)
		set(outside, v.why != "", q)
	}
	set(offCurve, l.sources && l.beyondCurve(), l.q)
	return v
}

// when returns the time within the step just taken at which line i entered a state, or left it, to a hundredth of a second.
func (o *observer) when(i, kind int, in bool) float64 {
	s, y, t0, t1 := o.sim.sys, o.sim.sys.y, o.prev.t, o.now.t
	if !(t1-t0 > stateTime) {
		return t1
	}
	for t1-t0 > stateTime {
		t := t0 + (t1-t0)/2
		o.sim.flowAt(i, t)
		if s.statesOf(i).in[kind] == in {
			t1 = t
		} else {
			t0 = t
		}
	}
	s.lookAlong(i, o.now.t, y)
	return t1
}

// stateTime is how well the times of states are known, s.
const stateTime = 0.01

// ventsItself is the pipe Froude number v/√(gD) under which a pipe to the open air vents itself; up to 1 it surges. Common practice for siphonic and drain
// lines (e.g. P. D. Hills, Chem. Eng. 1983), from memory.
const ventsItself = 0.3

// drawsAir tells that the depth over an inlet is under that at which gas is pulled through: h = (Q/2.53√g)^0.4 in a floor (Lubin & Springer
// 1967), the crown of a mouth in a wall.
func drawsAir(in *inletLaw, depth, q, g float64) bool {
	switch in.form {
	case floorInlet:
		return depth <= 0 || 2.53*math.Sqrt(g*depth)*depth*depth < q
	case sideInlet:
		return depth < in.bore
	}
	return false
}

// shallow tells that a mouth has less liquid over it than ANSI/HI 9.8 asks for against surface vortices: S/D = 1 + 2.3·Fr, Fr = v/√(gD), S over the mouth
// in a floor, over the middle of one in a wall; bores under which no vortex matters are not asked for. Source: ANSI/HI 9.8, intake design, from memory.
func (s *system) shallow(in *inletLaw, depth, q float64) bool {
	d := in.bore
	if d <= 0 {
		return false
	}
	switch in.form {
	case sideInlet:
		depth -= d / 2
	case floorInlet:
	default:
		return false
	}
	return depth < d+2.3*q/(math.Pi/4*d*math.Sqrt(s.plan.Gravity*d))
}

// outsideRange says in what a part of the line is used outside its law's range, depth being that over the crest of its weir, m; "" for none.
func (l *line) outsideRange(depth float64) string {
	for _, i := range l.ranged {
		h := math.NaN()
		if l.weir != nil && i == 0 {
			h = depth
		}
		if why := l.plan.Parts[i].Part.(elements.Ranged).Outside(l.q, h, &l.locals[i]); why != "" {
			return why
		}
	}
	return ""
}

// noteRange notes that its flow is within the ranges of its parts, and with it all between it and others of its direction that were; over a crest the head
// counts as well.
func (l *line) noteRange() {
	switch {
	case l.weir != nil:
	case !(l.q*l.inRange[0] > 0):
		l.inRange = [2]float64{l.q, l.q}
	default:
		l.inRange = [2]float64{math.Min(l.inRange[0], l.q), math.Max(l.inRange[1], l.q)}
	}
}

// withinRange returns the greatest flow of a table, either way, if that and the least that counts are within the ranges of the line's parts; else 0.
func (l *line) withinRange(t *flowTable) float64 {
	last := math.Nextafter(t.high, 0)
	forward, _ := t.flow(last)
	back, _ := t.flow(-last)
	for _, q := range [4]float64{flowing, -flowing, forward, back} {
		l.q = q
		if l.outsideRange(math.Inf(1)) != "" {
			return 0
		}
	}
	return math.Min(forward, -back)
}

// reachesLiquid tells that there is something beyond a mouth that the line could empty.
func (s *system) reachesLiquid(m *mouth) bool { return m.kind == toTee }

// falls tells that a line runs downhill to its free end, so that it may run part full.
func (s *system) falls(l *line) bool { return s.endElevation(&l.from) > l.to.centre }

// beyondCurve tells that a running pump works outside its curve.
func (l *line) beyondCurve() bool {
	for i, f := range l.plan.Parts {
		if p, ok := f.Part.(elements.Runs); ok && l.locals[i].Opening > 0 && l.q > 1.001*p.Runout() {
			return true
		}
	}
	return false
}

// mark opens, extends or closes a span.
func (o *observer) mark(i, kind int, on bool, size float64) {
	if o.regimes[i] == nil {
		o.regimes[i] = new(regime)
	}
	r := &o.regimes[i][kind]
	switch {
	case on && !r.open:
		o.noted[i]++
		r.open, r.seen, r.from, r.to, r.size = true, true, o.when(i, kind, true), o.now.t, size
	case on:
		r.to = o.now.t
		r.size = math.Max(r.size, size)
	case r.open:
		o.noted[i]--
		r.open, r.to = false, o.when(i, kind, false)
		o.raise(i, kind)
	}
}

// closeRegimes raises the flags of the spans that are still open.
func (o *observer) closeRegimes() {
	for i, r := range o.regimes {
		for k := 0; r != nil && k < len(r); k++ {
			if r[k].open {
				r[k].open = false
				o.raise(i, k)
			}
		}
	}
}

// raise makes a flag of a span.
func (o *observer) raise(i, kind int) {
	r := &o.regimes[i][kind]
	if r.flags++; r.flags > mostFlags || r.to-r.from <= 0 {
		return
	}
	if kind == shallow && !o.sim.sys.lines[i].sources { // said with the air that is drawn in, else of pumps only
		return
	}
	tag := o.sim.plan.Lines[i].Tag
	f := &Flag{Where: tag, From: r.from, To: r.to}
	size := r.size
	switch kind {
	case airDrawn:
		f.Kind, f.Says = "air_drawn_in", fmt.Sprintf("the inlet of %s is so shallow that it pulls air: flow surges and is slower than shown", tag)
		if early := &o.regimes[i][shallow]; early.seen && early.from < r.from {
			f.Says += fmt.Sprintf("; vortices may begin %s earlier, where the depth falls under that of ANSI/HI 9.8", quantity.FormatDuration(math.Ceil(r.from-early.from)))
		}
		f.Do = "expect gulping; throttle, or stop before the last of it"
	case airEnters:
		f.Kind, f.Says = "air_enters", fmt.Sprintf("%s would draw from its open end: air enters there and nothing flows", tag)
		f.Do, f.Size = "shut it, or keep its end drowned", &size
	case surging:
		f.Kind, f.Says = "part_full", fmt.Sprintf("%s surges: near its open end it runs full and part full by turns (pipe Froude number at most %.2g, between 0.3 and 1); full-pipe flow is assumed", tag, r.size)
		f.Do, f.Size = "take the flow as an upper estimate", &size
	case selfVent:
		f.Kind, f.Says = "part_full", fmt.Sprintf("%s vents itself and runs part full near its open end (pipe Froude number at most %.2g, under 0.3); full-pipe flow is assumed", tag, r.size)
		f.Do, f.Size = "take the flow as an upper estimate", &size
	case choked:
		f.Kind, f.Says = "valve_choked", fmt.Sprintf("a valve in %s chokes: opening it further does not add flow", tag)
		f.Do = "throttle; noise and damage are likely"
	case held:
		f.Kind, f.Says = "held_at_vapour_pressure", fmt.Sprintf("the high point of %s is held at vapour pressure: this flow is unreliable", tag)
		f.Do = "vent the high point, or throttle downstream of it"
	case shallow:
		f.Kind, f.Says = "air_drawn_in", fmt.Sprintf("the inlet of %s has less liquid over it than ANSI/HI 9.8 asks of a pump's suction: vortices may draw air", tag)
		f.Do, f.Size = "stop the pump at a higher level, or throttle it", &size
	case outside:
		f.Kind, f.Says = "outside_range", fmt.Sprintf("%s: %s; its flow is an extrapolation", tag, r.why)
		f.Do = "check the data, or state a loss that was measured"
	case offCurve:
		f.Kind, f.Says = "pump_off_curve", fmt.Sprintf("the pump in %s runs beyond the last point of its curve", tag)
		f.Do, f.Size = "throttle its discharge", &size
	}
	o.sim.flags = append(o.sim.flags, f)
}

// flag notes something that happens at one time, to be put into words by the caller; nil where none is wanted: in a brief run, and after mostFlags of a kind
// at one place.
func (sim *simulation) flag(kind, where string, t float64, do string) *Flag {
	if sim.obs.brief {
		return nil
	}
	n := 0
	for _, f := range sim.flags {
		if f.Kind == kind && f.Where == where {
			n++
		}
	}
	if n >= mostFlags {
		return nil
	}
	f := &Flag{Kind: kind, Where: where, From: t, To: t, Do: do}
	sim.flags = append(sim.flags, f)
	return f
}
