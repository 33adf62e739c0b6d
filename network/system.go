package network

import (
	"math"

	"headfall/elements"
	"headfall/integrate"
	"headfall/integrate/sparse"
)

// system is a compiled plant as M y' = f(t, y) with integrals z' = g(t, y).
//
//	unknowns:  volumes of the vessels, m³ · gas masses of vented covers, kg · total pressures of the tees, Pa · flows of inertial lines, m³/s
//	integrals: volumes passed by the lines, m³ · volumes spilled over the rims, m³ · volumes that came in from outside, m³
//
// Volume is conserved by construction: the flow that is subtracted at one end of a line is the one that is added at the other.
type system struct {
	plan       *Plant
	fluid      elements.Fluid
	gamma      float64 // ρ·g, Pa/m
	atmosphere float64 // Pa absolute
	rtol       float64

	n, m      int
	busy      int // integrals that moved since the last Linearise
	teeRow    int // first unknown of the tees
	flowRow   int // first unknown of the inertial lines
	stations  []station
	basins    []basin
	floor     []float64 // Pa, total pressures at the floors of the vessels where they were looked at last
	wide      []int32   // vessels of which a segment asks more than their basins tell
	narrow    []int32   // the others
	odd       []int32   // of these, what stood outside its basin's span when looked at last
	isWide    []bool
	closed    []int32 // vessels with covers
	outside   []beyond
	lines     []line
	actuators []actuator
	inertial  []int32
	plain     []plainLine
	plainRest []plainRest
	runs      []plainRun
	lots      plainLots
	rest      []int32   // the other lines
	deep      []float64 // m³, of the vessels: from there on their plain lines go by their tables
	isBare    []bool    // vessels that are not deep
	bare      bool      // some vessel is bare
	crowned   []int32   // lines with high points

	vesselAt, teeAt, outsideAt, lineAt, actuatorAt map[string]int

	t0       float64   // start of the segment
	y        []float64 // where Rates was called last
	mass     []bool
	ids      []int32 // 0, 1, 2 …
	pat      sparse.Pattern
	iPtr     []int32
	iCol     []int32
	slot     []slots
	rims     []rimSlots
	gasS     []gasSlots
	tees     []teeSlots
	floating []int32 // diagonal slots of tees that nothing holds
	settler  *settler
	lowest   float64 // Pa, total pressure that no tee falls below
}

var (
	_ integrate.System  = (*system)(nil)
	_ integrate.Settler = (*system)(nil)
	_ integrate.Idler   = (*system)(nil)
)

// Dim returns the numbers of unknowns and of integrals.
func (s *system) Dim() (n, m int) { return s.n, s.m }

// Mass tells which unknowns are differential.
func (s *system) Mass() []bool { return s.mass }

// Pattern returns the pattern of ∂f/∂y.
func (s *system) Pattern() *sparse.Pattern { return &s.pat }

// IntegralPattern returns the pattern of ∂g/∂y.
func (s *system) IntegralPattern() (ptr, cols []int32) { return s.iPtr, s.iCol }

// look sets everything that depends on time and state but lines: openings, outside levels, vessels.
func (s *system) look(t float64, y []float64) {
	s.y = y
	for _, i := range s.rest {
		l := &s.lines[i]
		for _, m := range l.moving {
			l.locals[m.local].Opening = s.actuators[m.actuator].at(t)
		}
		if l.inertia > 0 {
			l.own = y[l.row]
		}
	}
	for i := range s.outside {
		b := &s.outside[i]
		b.surface = b.start + b.rate*(t-s.t0)
	}
	s.lookAtVessels(y)
}

// Rates fills f and g.
func (s *system) Rates(t float64, y, f, g []float64) {
	s.look(t, y)
	clear(f)
	clear(g[len(s.lines):])
	for _, list := range [2][]int32{s.wide, s.odd} {
		for _, i := range list {
			s.addVessel(int(i), t, f, g, nil)
		}
	}
	s.plainRates(f, g)
	var a, b end
	for _, i := range s.rest {
		l := &s.lines[i]
		s.meet(&l.from, &a)
		s.meet(&l.to, &b)
		l.evaluate(&a, &b, s.gamma)
		sl := &s.slot[i]
		if sl.from >= 0 {
			f[sl.from] -= l.q
		}
		if sl.to >= 0 {
			f[sl.to] += l.q
		}
		if l.row >= 0 {
			f[l.row] = l.push
		}
		g[i] = l.q
	}
	s.balanceTees(f)
}

// Busy tells how many integrals move: while nothing spills and nothing comes in from outside, those of the lines.
func (s *system) Busy() int { return s.busy }

// addVessel adds inflow, rim spill, vents and air paths of vessel i; the partials of the latter go into lin where it is given.
func (s *system) addVessel(i int, t float64, f, g []float64, lin *integrate.Linear) {
	st := &s.stations[i]
	if st.spill > 0 || st.inflowZ >= 0 {
		s.busy = s.m
	}
	f[i] += st.inflow + st.inflowRate*(t-s.t0) - st.spill
	if st.spillTo >= 0 {
		f[st.spillTo] += st.spill
	}
	g[len(s.lines)+i] = st.spill
	if st.inflowZ >= 0 {
		g[st.inflowZ] = st.inflow + st.inflowRate*(t-s.t0)
	}
	if st.massRow >= 0 {
		for k := range st.vents {
			v := &st.vents[k]
			m, _ := v.vent.Flow(st.gas, s.atmosphere, st.temp, &v.at)
			f[st.massRow] += m
		}
		s.addAir(i, f, lin)
	}
}

// balanceTees replaces the balance of a tee whose open lines are all inertial by its derivative in time, so that its pressure is determined.
func (s *system) balanceTees(f []float64) {
	for i := range s.tees {
		t := &s.tees[i]
		if !t.slow {
			continue
		}
		var sum float64
		for _, k := range t.lines {
			l := &s.lines[k.line]
			if !l.shut {
				sum += k.sign * l.push
			}
		}
		f[s.teeRow+i] = sum
	}
}

// Scale fills the error allowed in each unknown: of a level l, rtol·(0.1 m + |l|) up to 2·10⁻⁵ m, as a volume over the present surface.
func (s *system) Scale(y []float64, rtol float64, scale []float64) {
	most := max(levelCap, rtol*1) // m
	below, share := leastLevel, 1.0
	if rtol > coarse {
		below, share = 1, coarseTee
	}
	tol := func(l float64) float64 { return min(rtol*(below+l), most) }
	least := 1e-9 * math.Min(1, rtol*1e6)
	for i := range s.stations {
		if b := &s.basins[i]; b.holds(y[i]) {
			scale[i] = max(tol(math.Abs(b.at(y[i])))/b.slope, least*b.full)
			continue
		}
		st := &s.stations[i]
		h, slope := st.shape.Level(y[i])
		scale[i] = math.Max(tol(math.Abs(h))/slope, least*st.full)
		if st.closed {
			scale[i] = math.Min(scale[i], gasCap/math.Max(st.gasV, 1e-9))
		}
		if st.massRow >= 0 {
			m := y[st.massRow]
			g, _ := st.gasVolume(y[i])
			p := m * gasConstant * st.temp / g
			scale[st.massRow] = math.Max(1e-12, math.Abs(m)*math.Min(0.25, 0.25e6*rtol)/math.Max(p, 1))
		}
	}
	for i := s.teeRow; i < s.teeRow+len(s.teeAt); i++ {
		scale[i] = s.gamma * math.Max(math.Max(leastTee, share*tol(1)), rtol*(math.Abs(y[i]-s.atmosphere)/s.gamma-plainHead))
		if t := &s.tees[i-s.teeRow]; t.ease > 0 && !t.slow { // where next to nothing flows a pressure means little
			scale[i] = math.Max(scale[i], 1e6*rtol*stillFlow/t.ease)
		}
	}
	for _, k := range s.inertial {
		l := &s.lines[k]
		scale[l.row] = rtol * math.Max(math.Abs(y[l.row])+1e-3*l.area, 1e5*stillFlow)
	}
}

// stillFlow is the flow, m³/s, that a tee may be out of balance by: 4 mL an hour.
const stillFlow = 1e-9

// gasCap bounds the error allowed in a volume by what it does to the pressure of the gas above it, Pa: where that is all but gone the last of it is a
// hard spring.
const gasCap = 1

// plainHead is the head, m, beyond which the error allowed in the pressure of a tee grows with it: pumps of a steady rate against shut valves come there.
const plainHead = 100

// coarseTee is the error allowed in the head at a tee over that in a level of a metre in a coarse run: it drives flows at the time, and is forgotten.
const coarseTee = 10

// leastTee is the error, m, always allowed in the head at a tee: twice the head within which its lines are given other slopes than those of their laws
// (roundCorner), so that no step is cut short there. Flows are integrated with errors of their own, and a head at a tee is forgotten with the step.
const leastTee = 2 * corner * joinHead

// coarse is the tolerance from which on a run is one of many, as of samples, and the last of a heel is as good as a metre.
const coarse = 5e-6

// leastLevel is the level, m, under which the error allowed does not shrink with the level any more: the last of a heel needs no micrometres.
const leastLevel = 0.1

// levelCap bounds the error allowed in a level, m, where no more than a metre's share of the tolerance is asked for: a quarter of the head under which flows
// are made linear, so that an equilibrium is quiet.
const levelCap = 2e-5

// Admit refuses a state with a volume well under nothing or gas that has gone.
func (s *system) Admit(_ float64, y []float64) bool {
	for i, v := range y[:len(s.stations)] {
		if v < 0 && v < -1e-7*s.stations[i].full {
			return false
		}
	}
	for _, i := range s.wide {
		if r := s.stations[i].massRow; r >= 0 && y[r] < 0 {
			return false
		}
	}
	return true
}
