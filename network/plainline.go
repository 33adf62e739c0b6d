package network

import (
	"math"

	"headfall/integrate"
)

// plainLine is a line between the floors of two open vessels that needs nothing but its flow table: no end that uncovers in a wall, no limit but its inlets,
// nothing that moves. Most lines of large plants are; they are kept apart, small and in a row, since the law is where the time goes.
type plainLine struct {
	line     int32
	from, to int32 // vessels
	table    *flowTable
	in, out  gate
	bySlot   plainSlots
}

// plainSlots are the slots of a plain line: in the rows of the vessels it leaves and enters and in its integral, each by the volumes of both.
type plainSlots struct{ fromA, fromB, toA, toB, zA, zB int32 }

// gate tells quickly that a mouth in a floor admits a flow with room to spare. See inletLaw.ample.
type gate struct {
	zero  float64 // Pa, total pressure at the invert
	least float64 // m, depth
	wet   float64 // Pa, total pressure at that depth
	lip   float64 // m⁵/s² over m³: of the weir over the lip, squared, with a margin
	bore  float64 // Pa, of liquid as deep as the mouth is wide; less than any depth for one that draws no air
	swirl float64 // Pa·s/m³: how much deeper the mouth must lie for a flow not to make vortices. See system.shallow
}

func (s *system) gateOf(m *mouth) gate {
	g := gate{zero: s.atmosphere + s.gamma*m.invert, least: m.inlet.shallow}
	g.wet = g.zero + s.gamma*g.least
	if m.inlet.form == fadeInlet {
		g.lip, g.bore = math.Inf(1), math.Inf(-1)
		return g
	}
	d := m.inlet.bore
	w := 1.7 * math.Pi * d
	g.lip = w * w / 1.3
	g.bore, g.swirl = s.gamma*d, s.gamma*2.3/(math.Pi/4*d*math.Sqrt(s.plan.Gravity*d))
	return g
}

// passes tells that a flow q is well within what the mouth admits under a total pressure phi; perGamma is 1/ρg.
func (g *gate) passes(phi, q, perGamma float64) bool {
	y := (phi - g.zero) * perGamma
	return y >= g.least && g.lip*y*y*y >= q*q
}

// turns tells that the flow between total pressures a and b is within a band of its turn while there is next to no liquid over a mouth. See line.shoal.
func (p *plainLine) turns(a, b, band float64) bool {
	return a-b < band && b-a < band && (a < p.in.wet || b < p.out.wet)
}

// sortPlain separates the plain lines from the rest, as they stand in this segment.
func (s *system) sortPlain() {
	s.plain, s.rest = s.plain[:0], s.rest[:0]
	for i := range s.lines {
		l := &s.lines[i]
		if !s.isPlain(l) {
			s.rest = append(s.rest, int32(i))
			continue
		}
		sl := &s.slot[i]
		s.plain = append(s.plain, plainLine{line: int32(i), from: int32(l.from.at), to: int32(l.to.at), table: l.table, in: s.gateOf(&l.from), out: s.gateOf(&l.to),
			bySlot: plainSlots{sl.inFrom[0], sl.inFrom[2], sl.inTo[0], sl.inTo[2], sl.inZ[0], sl.inZ[2]}})
	}
}

func (s *system) isPlain(l *line) bool {
	floor := func(m *mouth) bool {
		return m.kind == toVessel && m.width == 0 && !s.stations[m.at].closed && (m.inlet.form == floorInlet || m.inlet.form == fadeInlet)
	}
	return l.table != nil && !l.shut && len(l.moving) == 0 && len(l.floors) == 0 && !l.oneWay && l.zero == 0 && floor(&l.from) && floor(&l.to)
}

// plainRates adds the flows of the plain lines.
func (s *system) plainRates(f, g []float64) {
	floor, per, band := s.floor, 1/s.gamma, joinHead*s.gamma
	for k := range s.plain {
		p := &s.plain[k]
		a, b := floor[p.from], floor[p.to]
		q, ok := p.table.flow(a - b)
		if !ok || p.turns(a, b, band) || q > 0 && !p.in.passes(a, q, per) || q < 0 && !p.out.passes(b, q, per) {
			q = s.evaluate(int(p.line)).q
		}
		f[p.from] -= q
		f[p.to] += q
		g[p.line] = q
	}
}

// evaluate works out a line by the full law, its vessels being looked into first.
func (s *system) evaluate(i int) *line {
	l := &s.lines[i]
	s.lookInto(l.from.at, s.y)
	s.lookInto(l.to.at, s.y)
	a, b := s.see(&l.from), s.see(&l.to)
	l.evaluate(&a, &b, s.gamma)
	return l
}

// linearisePlain adds the flows of the plain lines and their partials.
func (s *system) linearisePlain(f, g []float64, lin *integrate.Linear) {
	floor, per, band := s.floor, 1/s.gamma, joinHead*s.gamma
	for k := range s.plain {
		p := &s.plain[k]
		a, b := floor[p.from], floor[p.to]
		q, slope, ok := p.table.at(a - b)
		if !ok || p.turns(a, b, band) || q > 0 && !p.in.passes(a, q, per) || q < 0 && !p.out.passes(b, q, per) {
			s.lookInto(int(p.from), s.y)
			s.lookInto(int(p.to), s.y)
			s.lineariseLine(int(p.line), f, g, lin)
			continue
		}
		f[p.from] -= q
		f[p.to] += q
		g[p.line] = q
		byA, byB, at := slope*s.gamma*s.slopeOf(int(p.from)), -slope*s.gamma*s.slopeOf(int(p.to)), &p.bySlot
		lin.DgDy[at.zA], lin.DgDy[at.zB] = byA, byB
		lin.DfDy[at.fromA] -= byA
		lin.DfDy[at.fromB] -= byB
		lin.DfDy[at.toA] += byA
		lin.DfDy[at.toB] += byB
	}
}
