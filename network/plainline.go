package network

import (
	"math"

	"headfall/integrate"
)

// plainLine is a line between the floors of two open vessels that needs nothing but its flow table: no end that uncovers in a wall, no limit but its inlets,
// nothing that moves. Most lines of large plants are; they are kept apart, small and in a row, since the law is where the time goes.
type plainLine struct{ line, from, to int32 } // and vessels

// plainRun is a stretch of plain lines that share a table; it ends before line `to` of them.
type plainRun struct {
	table *flowTable
	to    int
}

// plainRest is what a plain line needs now and then.
type plainRest struct {
	in, out gate
	bySlot  plainSlots
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

// depth returns the depth, m, from which on the mouth passes any flow up to most, and that does not turn next to no liquid.
func (g *gate) depth(most float64) float64 { return math.Max(g.least, math.Cbrt(most*most/g.lip)) }

// sortPlain separates the plain lines from the rest, as they stand in this segment.
func (s *system) sortPlain() {
	s.plain, s.plainRest, s.runs, s.rest = s.plain[:0], s.plainRest[:0], s.runs[:0], s.rest[:0]
	clear(s.deep)
	if s.plain == nil {
		n := 0
		for i := range s.lines {
			if s.lines[i].table != nil {
				n++
			}
		}
		s.plain, s.plainRest, s.rest = make([]plainLine, 0, n), make([]plainRest, 0, n), make([]int32, 0, len(s.lines))
	}
	for i := range s.lines {
		l := &s.lines[i]
		if !s.isPlain(l) {
			s.rest = append(s.rest, int32(i))
			continue
		}
		sl := &s.slot[i]
		r := plainRest{s.gateOf(&l.from), s.gateOf(&l.to), plainSlots{sl.inFrom[0], sl.inFrom[2], sl.inTo[0], sl.inTo[2], sl.inZ[0], sl.inZ[2]}}
		s.deepen(&l.from, &r.in, l.table)
		s.deepen(&l.to, &r.out, l.table)
		if n := len(s.runs); n == 0 || s.runs[n-1].table != l.table {
			s.runs = append(s.runs, plainRun{table: l.table})
		}
		s.plain, s.plainRest = append(s.plain, plainLine{int32(i), int32(l.from.at), int32(l.to.at)}), append(s.plainRest, r)
		s.runs[len(s.runs)-1].to = len(s.plain)
	}
}

// deepen raises the volume from which on a vessel leaves its plain lines to their tables to what this mouth needs.
func (s *system) deepen(m *mouth, g *gate, t *flowTable) {
	st := &s.stations[m.at]
	v, _ := st.shape.Volume(m.invert - st.base + g.depth(t.most))
	s.deep[m.at] = math.Max(s.deep[m.at], v)
}

func (s *system) isPlain(l *line) bool {
	floor := func(m *mouth) bool {
		return m.kind == toVessel && m.width == 0 && !s.stations[m.at].closed && (m.inlet.form == floorInlet || m.inlet.form == fadeInlet)
	}
	return l.table != nil && !l.shut && len(l.moving) == 0 && len(l.floors) == 0 && !l.oneWay && l.zero == 0 && floor(&l.from) && floor(&l.to)
}

// plainLots is the room for the flows of a lot of plain lines.
type plainLots struct{ dp, q, slope [lot]float64 }

// lot is the number of plain lines whose flows are worked out in one go.
const lot = 64

// plainRates adds the flows of the plain lines.
func (s *system) plainRates(f, g []float64) {
	at := 0
	for _, r := range s.runs {
		for at < r.to {
			n := min(at+lot, r.to)
			lines := s.plain[at:n]
			q := s.lots.q[:len(lines)]
			r.table.flows(s.drops(lines), q)
			for k := range lines {
				p := &lines[k]
				v := q[k]
				if v != v || s.bare && !s.admits(at+k, v) {
					v = s.evaluate(int(p.line)).q
				}
				f[p.from] -= v
				f[p.to] += v
				g[p.line] = v
			}
			at = n
		}
	}
}

// drops returns the pressures between the ends of a lot of plain lines.
func (s *system) drops(lines []plainLine) []float64 {
	floor, dp := s.floor, s.lots.dp[:len(lines)]
	for k := range lines {
		dp[k] = floor[lines[k].from] - floor[lines[k].to]
	}
	return dp
}

// admits tells that plain line k carries flow q by its table alone: both vessels are deep, or the mouth that it draws from lets it in, and it is no band from
// its turn while there is next to no liquid over a mouth. See line.shoal.
func (s *system) admits(k int, q float64) bool {
	p := &s.plain[k]
	if !s.isBare[p.from] && !s.isBare[p.to] {
		return true
	}
	r, a, b, band := &s.plainRest[k], s.floor[p.from], s.floor[p.to], joinHead*s.gamma
	switch {
	case a-b < band && b-a < band && (a < r.in.wet || b < r.out.wet):
		return false
	case q > 0:
		return r.in.passes(a, q, 1/s.gamma)
	case q < 0:
		return r.out.passes(b, q, 1/s.gamma)
	}
	return true
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
	at := 0
	for _, r := range s.runs {
		for at < r.to {
			n := min(at+lot, r.to)
			lines := s.plain[at:n]
			q, slope := s.lots.q[:len(lines)], s.lots.slope[:len(lines)]
			r.table.slopes(s.drops(lines), q, slope)
			for k := range lines {
				p := &lines[k]
				v := q[k]
				if v != v || s.bare && !s.admits(at+k, v) {
					s.lookInto(int(p.from), s.y)
					s.lookInto(int(p.to), s.y)
					s.lineariseLine(int(p.line), f, g, lin)
					continue
				}
				f[p.from] -= v
				f[p.to] += v
				g[p.line] = v
				d, to := slope[k]*s.gamma, &s.plainRest[at+k].bySlot
				byA, byB := d*s.slopeOf(int(p.from)), -d*s.slopeOf(int(p.to))
				lin.DgDy[to.zA], lin.DgDy[to.zB] = byA, byB
				lin.DfDy[to.fromA] -= byA
				lin.DfDy[to.fromB] -= byB
				lin.DfDy[to.toA] += byA
				lin.DfDy[to.toB] += byB
			}
			at = n
		}
	}
}
