package network

import (
	"errors"
	"fmt"
	"math"

	"headfall/integrate"
)

// A line with a mass of liquid (inertia: yes) carries one column as long as it is full and the pressures at its ends answer to its flow. It does so
// neither where its feed is down to a trickle that no pressure at the tee makes more of, or to what comes at vapour pressure, nor where a high point or a valve of its own stands at its floor
// pressure. Meanwhile it is parted: it runs part full, its flow is that of a line without mass, and its unknown stands still.
//
// The measure is the lag, s: inertance times the conductance by which the rest of the plant answers at its ends,
//
//	lag = ρL/A / (bᵀK⁻¹b),
//
// K the slopes of the balances of the tees without the line, m³/(s·Pa), b = +1 and −1 at the tees at its ends. Within that time the flow of the line
// falls in with what the plant gives it; at nothing, the balance of the tee has no solution but by chance. The times below are our choice, without a source.
const (
	shortestLag = 1e-3 // s: under that a column parts
	rejoinedLag = 10   // times that, and it carries again
	shortWhole  = 1    // s: one that parts sooner after it joined waits, each time twice as long
	mostRescues = 40   // columns parted because the solver got no further, in one run
)

// liquidColumn is what a run keeps of a line with a mass.
type liquidColumn struct {
	line    int32
	least   float64 // s, lag under which it parts; more where the solver could not cope
	changed float64 // s, when it parted or joined last
	flow    float64 // m³/s, when it was looked at last
	wait    float64 // s that it stays parted at least
	flag    *Flag   // of the last parting that was told
}

// carries tells that the flow of the line is an unknown of its own at present.
func (l *line) carries() bool { return l.inertia > 0 && !l.parted }

// part makes the line one without mass until it is whole again.
func (l *line) part() {
	l.parted = true
	l.push, l.pushA, l.pushB, l.pushQ, l.pushYa, l.pushYb, l.pushT = 0, 0, 0, 0, 0, 0, 0
}

// beginColumns makes all columns whole.
func (sim *simulation) beginColumns() {
	s := sim.sys
	sim.columns, sim.rescues = sim.columns[:0], 0
	for _, k := range s.inertial {
		l := &s.lines[k]
		l.parted = false
		if l.from.kind == toTee || l.to.kind == toTee || len(l.floors) > 0 {
			sim.columns = append(sim.columns, liquidColumn{line: k, least: shortestLag, changed: math.Inf(-1)})
		}
	}
}

// reconsider parts columns that have lost their feed and joins those that have it back, one after the other, and tells whether there were any.
func (sim *simulation) reconsider() (changed bool) {
	if len(sim.columns) == 0 {
		return false
	}
	s := sim.sys
	s.look(sim.t, sim.solver.Y())
	looked := false
	for i := range sim.columns {
		if c := &sim.columns[i]; sim.rests(c) {
			sim.turnColumn(c, shortestLag)
			changed = true
		}
	}
	for range 2 * len(sim.columns) {
		best, lag := -1, math.Inf(1)
		for i := range sim.columns {
			c := &sim.columns[i]
			l := &s.lines[c.line]
			if l.shut || c.changed == sim.t {
				continue
			}
			if !looked && s.easyColumn(l, c.least) {
				continue
			}
			if !looked {
				looked = true
				s.formBalances()
			}
			now := s.lag(l)
			if l.floored(s) || l.stands(s) {
				now = 0
			} else {
				now = math.Max(now, 1e-300)
			}
			if l.parted {
				if now >= rejoinedLag*c.least && best < 0 && sim.t >= c.changed+c.wait {
					best, lag = i, math.Inf(1)
				}
			} else if now < c.least && (best < 0 || s.lines[sim.columns[best].line].parted || l.inertia < s.lines[sim.columns[best].line].inertia) {
				best, lag = i, now
			}
		}
		if best < 0 {
			return changed
		}
		changed = true
		sim.turnColumn(&sim.columns[best], lag)
		s.formBalances()
	}
	return changed
}

// rests tells that the flow of a column has just turned at a tee where, once it stands, nothing else moves: check valves and mouths that only receive then hold
// the pressure between two bounds, and with a mass it would swing for ever between the one and the other.
func (sim *simulation) rests(c *liquidColumn) bool {
	s := sim.sys
	l := &s.lines[c.line]
	turned := c.flow*l.own < 0
	c.flow = l.own
	if !turned || !l.carries() || l.shut || !s.answers(&l.from) && !s.answers(&l.to) {
		return false
	}
	l.part()
	s.Settle(sim.t, sim.y)
	s.formBalances()
	still := math.Abs(l.q) < turnSpeed*l.area && s.lag(l) < c.least
	l.parted = false
	copy(sim.y, sim.solver.Y())
	s.look(sim.t, sim.y)
	return still
}

// turnColumn parts a column, or joins one that is parted.
func (sim *simulation) turnColumn(c *liquidColumn, lag float64) {
	l := &sim.sys.lines[c.line]
	whole := sim.t - c.changed
	c.changed = sim.t
	if l.parted {
		l.parted = false
		sim.y[l.row] = l.q
		if c.flag != nil {
			c.flag.To = sim.t
		}
		return
	}
	if math.Abs(l.own) > flowing && lag < shortestLag {
		sim.flagParting(c, lag)
	}
	l.part()
	if whole < math.Max(shortWhole, c.wait) {
		c.wait = math.Max(shortWhole, 2*c.wait)
	} else {
		c.wait = 0
	}
}

// flagParting tells that a column with some flow parts; partings that follow soon are one.
func (sim *simulation) flagParting(c *liquidColumn, lag float64) {
	const soon = 60 // s
	if c.flag != nil && c.flag.To > c.flag.From && sim.t < c.flag.To+soon {
		return
	}
	tag := sim.sys.lines[c.line].plan.Tag
	f := sim.flag("column_parted", tag, sim.t, "expect air in it, and a knock when it fills again; meanwhile its flow is reckoned without the mass of its liquid")
	if f == nil {
		return
	}
	c.flag = f
	f.Says = fmt.Sprintf("%s is fed no more than a trickle: its column parts and it runs part full", tag)
	if sim.sys.lines[c.line].floored(sim.sys) {
		f.Says = fmt.Sprintf("the column of %s parts at its high point or a choked valve: it runs part full beyond", tag)
	}
}

// rescue parts a column where the solver got no further, one at the tee, or of the line, that the error names if there is any, and tells whether there was one.
func (sim *simulation) rescue(err error) bool {
	var e *integrate.Error
	if !errors.As(err, &e) || sim.rescues >= mostRescues || e.Reason == integrate.TooManySteps {
		return false
	}
	s := sim.sys
	best, near := -1, false
	for i := range sim.columns {
		l, sl, u := &s.lines[sim.columns[i].line], &s.slot[sim.columns[i].line], int32(e.Unknown)
		if l.parted || l.shut {
			continue
		}
		at := u >= 0 && (sl.from == u || sl.to == u || l.row == u)
		if best < 0 || at && !near || at == near && l.inertia < s.lines[sim.columns[best].line].inertia {
			best, near = i, at
		}
	}
	if best < 0 {
		return false
	}
	c := &sim.columns[best]
	l := &s.lines[c.line]
	s.look(sim.t, sim.y)
	s.formBalances()
	c.least = math.Max(10*c.least, 2*s.lag(l))
	sim.turnColumn(c, 0)
	sim.rescues++
	return true
}

// easyColumn tells from the last linearisation, without solving anything, that a column has nothing to fear: the lines that lead from its tees to
// vessels and the outside answer well enough by themselves, and it has no floors.
func (s *system) easyColumn(l *line, least float64) bool {
	if l.parted || len(l.floors) > 0 || l.stands(s) {
		return false
	}
	stiff := 0.0
	for _, m := range [2]*mouth{&l.from, &l.to} {
		if s.answers(m) {
			stiff += 1 / s.tees[m.at].direct
		}
	}
	return l.inertia > rejoinedLag*least*stiff
}

// answers tells that a mouth is at a tee whose pressure follows from the balance of its flows.
func (s *system) answers(m *mouth) bool { return m.kind == toTee && !s.tees[m.at].slow }

// formBalances works out the slopes of the balances of the tees in the present state.
func (s *system) formBalances() {
	if s.settler == nil {
		for _, k := range s.inertial {
			l := &s.lines[k]
			a, b := s.see(&l.from), s.see(&l.to)
			l.evaluate(&a, &b, s.gamma)
		}
		return
	}
	for i := range s.settler.manifolds {
		c := &s.settler.manifolds[i]
		c.balances(s, every, true)
		c.factorise()
	}
}

// lag returns inertance times the conductance of the plant at the ends of the line, s; infinite where an end is held.
func (s *system) lag(l *line) float64 {
	ends, c := [2]int32{-1, -1}, (*manifold)(nil)
	for k, m := range [2]*mouth{&l.from, &l.to} {
		if s.answers(m) {
			at := s.settler.of[m.at]
			c, ends[k] = &s.settler.manifolds[at[0]], at[1]
		}
	}
	if c == nil {
		return math.Inf(1)
	}
	if !c.sound {
		return 0
	}
	clear(c.d)
	for k, i := range ends {
		if i >= 0 {
			c.d[i] = float64(1 - 2*k)
		}
	}
	c.factor.Solve(c.d)
	give := 0.0
	for k, i := range ends {
		if i >= 0 {
			give += float64(1-2*k) * c.d[i]
		}
	}
	own := 0.0
	if l.parted {
		own = (l.byA - l.byB) / 2
	}
	return l.inertia * math.Max(0, 1/give-own)
}

// stands tells that the line has no column that could move: the mouth that it would leave by does not admit its flow, the tee there is at vapour pressure, or it
// has come to rest before an end or a valve that lets nothing back. Where it is parted there is a margin.
func (l *line) stands(s *system) bool {
	a, b := s.see(&l.from), s.see(&l.to)
	q, least := l.own, 0.0
	if l.parted {
		q, least = l.q/0.9, turnSpeed*math.Max(l.area, 1e-6)
	}
	if onlyOn := l.oneWay || b.depth == never; onlyOn && (q < 0 || l.parted && q <= least) {
		return true
	}
	if onlyBack := a.depth == never; onlyBack && (q > 0 || l.parted && q >= -least) {
		return true
	}
	from, up := &l.from, &a
	if q < 0 || q == 0 && a.phi < b.phi {
		from, up = &l.to, &b
	}
	if from.kind == toTee && up.phi < s.voidPressure(from.at) {
		return true
	}
	return up.depth != never && !from.inlet.ample(up.depth, math.Abs(q))
}

// voidPressure is the total pressure, Pa, under which the liquid at a tee would boil; for a tee whose elevation is not known it is taken at the lowest mouth of
// the plant.
func (s *system) voidPressure(tee int) float64 {
	z := s.plan.Tees[tee].Elevation
	if math.IsNaN(z) {
		return s.lowest + deepest*s.gamma - s.atmosphere + s.fluid.Vapour
	}
	return s.gamma*z + s.fluid.Vapour
}

// floored tells that at the flow of the line a high point or a valve of it stands at its floor pressure: with a margin of a tenth of the flow where it
// is parted.
func (l *line) floored(s *system) bool {
	if len(l.floors) == 0 {
		return false
	}
	a, b := s.see(&l.from), s.see(&l.to)
	q := l.own
	if l.parted {
		q = l.q / 0.9
	}
	back := q < 0 || q == 0 && a.phi < b.phi
	for i := range l.floors {
		f := &l.floors[i]
		if f.off || f.back != back {
			continue
		}
		up := &a
		if back {
			up = &b
		}
		share := f.share(l)
		if d, _ := f.up.drop(math.Abs(q)); d > share*(up.phi-s.gamma*f.z-f.pressure) {
			return true
		}
	}
	return false
}
