package network

import "math"

// plainLine is a line between two vessels' floors that needs nothing but its flow table: no end that uncovers in a wall, no limit but its inlets, nothing
// that moves. Most lines of large plants are; they are kept apart, small and in a row, since the law is where the time goes.
type plainLine struct {
	line     int32
	from, to int32 // vessels
	table    *flowTable
	invertA  float64 // m over datum
	invertB  float64
	in, out  inletLaw
}

// sortPlain separates the plain lines from the rest, as they stand in this segment.
func (s *system) sortPlain() {
	s.plain, s.rest = s.plain[:0], s.rest[:0]
	for i := range s.lines {
		l := &s.lines[i]
		if l.table == nil || l.shut || len(l.moving) > 0 || len(l.floors) > 0 || l.oneWay || l.zero != 0 ||
			l.from.kind != toVessel || l.to.kind != toVessel || l.from.width > 0 || l.to.width > 0 {
			s.rest = append(s.rest, int32(i))
			continue
		}
		s.plain = append(s.plain, plainLine{line: int32(i), from: int32(l.from.at), to: int32(l.to.at), table: l.table,
			invertA: l.from.invert, invertB: l.to.invert, in: l.from.inlet, out: l.to.inlet})
	}
}

// plainRates adds the flows of the plain lines.
func (s *system) plainRates(f, g []float64) {
	for k := range s.plain {
		p := &s.plain[k]
		a, b := &s.stations[p.from], &s.stations[p.to]
		dp := a.floor - b.floor
		q, ok := p.table.flow(dp)
		if !ok || q > 0 && !p.in.ample(a.surface-p.invertA, q) || q < 0 && !p.out.ample(b.surface-p.invertB, -q) {
			l := &s.lines[p.line]
			from, to := s.see(&l.from), s.see(&l.to)
			l.evaluate(&from, &to, s.gamma)
			q = l.q
		}
		f[p.from] -= q
		f[p.to] += q
		g[p.line] = q
	}
}

// flow is at without the slope.
func (t *flowTable) flow(dp float64) (q float64, ok bool) {
	side := t.side[0]
	a := dp
	if dp < 0 {
		side, a = t.side[1], -dp
	}
	if !(a >= t.low && a < t.high) {
		return 0, false
	}
	x := math.Sqrt(a)
	bits := math.Float64bits(x)
	o := &side[int(bits>>52)-1023-t.base]
	const mantissa = 1<<52 - 1
	m := bits & mantissa
	c := &t.cell[int(o.first)+int(m>>o.shift)]
	u := float64(m&(1<<o.shift-1)) * o.unit
	return c[0] + u*(c[1]+u*(c[2]+u*c[3])), true
}
