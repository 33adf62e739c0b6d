package network

import (
	"math"

	"headfall/elements"
	"headfall/integrate"
)

// airway is a line of a covered vessel as a path for air: once its mouth in the vessel and its other end are clear of liquid, air passes it as
// through an orifice of its narrowest bore.
type airway struct {
	line  int
	area  float64 // m², with the discharge coefficient
	own   *mouth  // in the covered vessel
	far   *mouth
	inlet bool    // air comes in in the line's direction
	gap   float64 // m over the crest of a weir up to which it is open to the air; 0 for other lines
	byFar int32   // slot of the far vessel's volume in the row of the gas mass; -1
	near  elements.AirBand
}

// airwayCd is the discharge coefficient of an air path through a line; common practice, no source.
const airwayCd = 0.6

// airwayShare is the share of the bore over the invert of a mouth in a floor within which air begins to pass it; of one in a wall it is all of it.
const airwayShare = 0.25

// weirGap returns the height, m, over the crest of a line's weir up to which it is open to the air, which is taken to be the rim of the vessel it leaves, and the
// area by which air passes there; 0 for other lines. Common practice, no source: the file does not give the height of an overflow.
func (p *Plant) weirGap(l *Line) (height, area float64) {
	v := p.vessel(l.From)
	if v == nil || len(l.Parts) == 0 {
		return 0, 0
	}
	w, ok := l.Parts[0].Part.(elements.Gaps)
	if !ok {
		return 0, 0
	}
	height = math.Max(0, v.RimLevel()-l.Leaves.Height)
	area = w.Gap(height)
	for _, f := range l.Parts[1:] {
		if d := boreOf(f.Part); d > 0 {
			area = math.Min(area, math.Pi/4*d*d)
		}
	}
	return height, area
}

// mayBreathe tells whether a line of the covered vessel could let air in: its other end is a free fall or an open vessel.
func (p *Plant) mayBreathe(v *Vessel) bool {
	for _, l := range p.meets[v.Tag] {
		if p.breathes(l, v.Tag) {
			return true
		}
	}
	return false
}

func (p *Plant) breathes(l *Line, tag string) bool {
	other := l.To
	if l.To == tag {
		other = l.From
	}
	if gap, _ := p.weirGap(l); gap == 0 && l.endBore(false) == 0 {
		return false
	}
	if o := p.beyond(other); o != nil {
		return o.Element.Outside().FreeFall
	}
	w := p.vessel(other)
	return w != nil && w.Cover == nil
}

// addAirways finds the air paths of the covered vessels.
func (s *system) addAirways() {
	for i := range s.stations {
		st := &s.stations[i]
		st.airways = st.airways[:0]
		if st.massRow < 0 {
			continue
		}
		for _, plan := range s.plan.meets[st.plan.Tag] {
			if !s.plan.breathes(plan, st.plan.Tag) {
				continue
			}
			k := s.lineAt[plan.Tag]
			l := &s.lines[k]
			a := airway{line: k, area: airwayCd * l.area, own: &l.from, far: &l.to, byFar: -1}
			if h, area := s.plan.weirGap(plan); h > 0 {
				a.gap, a.area = h, airwayCd*area
			}
			if plan.To == st.plan.Tag {
				a.own, a.far, a.inlet = &l.to, &l.from, true
			}
			st.airways = append(st.airways, a)
		}
	}
}

// linkAirways finds the slots of the far ends.
func (s *system) linkAirways() {
	for i := range s.stations {
		for k := range s.stations[i].airways {
			if a := &s.stations[i].airways[k]; a.far.kind == toVessel {
				a.byFar = s.pat.Find(s.stations[i].massRow, int32(a.far.at))
			}
		}
	}
}

// clear returns the share of one end of an air path that is clear of liquid, and its slope by the volume of its vessel. A weir is clear over its crest, from both
// sides where no pipe follows it.
func (s *system) clear(a *airway, m *mouth) (share, byV float64) {
	if m.kind != toVessel {
		return 1, 0
	}
	st, z, w := &s.stations[m.at], m.invert, m.width
	if w == 0 {
		w = airwayShare * m.inlet.bore
	}
	if l := &s.lines[a.line]; a.gap > 0 && (m == &l.from || l.bore == 0) {
		z, w = l.crestZ, a.gap
	}
	if w == 0 {
		return 0, 0
	}
	v, d := elements.Step(1 - (st.surface-z)/w)
	return v, -d / w * st.slope
}

// breathe returns the mass flow of air into vessel st through one of its lines, kg/s, and its partials by the inside pressure and by the volumes of
// the vessel and of the one at the far end.
func (s *system) breathe(st *station, a *airway) (m, byP, byOwn, byFar float64) {
	l := &s.lines[a.line]
	if l.shut || a.area == 0 {
		return 0, 0, 0, 0
	}
	own, dOwn := s.clear(a, a.own)
	far, dFar := s.clear(a, a.far)
	if own == 0 || far == 0 {
		return 0, 0, 0, 0
	}
	g, byG := elements.AirIn(st.gas, s.atmosphere, st.temp, &a.near)
	if l.oneWay && g != 0 && (g > 0) != a.inlet {
		return 0, 0, 0, 0
	}
	return a.area * own * far * g, a.area * own * far * byG, a.area * dOwn * far * g, a.area * own * dFar * g
}

// addAir adds what passes the air paths of vessel i.
func (s *system) addAir(i int, f []float64, lin *integrate.Linear) {
	st := &s.stations[i]
	for k := range st.airways {
		a := &st.airways[k]
		m, byP, byOwn, byFar := s.breathe(st, a)
		f[st.massRow] += m
		if lin == nil {
			continue
		}
		lin.DfDy[s.gasS[i].byV] += byP*st.gasV + byOwn
		lin.DfDy[s.gasS[i].byM] += byP * st.gasN
		if a.byFar >= 0 {
			lin.DfDy[a.byFar] += byFar
		}
	}
}

// open returns the share of a vent's opening that air can pass.
func (v *ventAt) open() float64 {
	if b, ok := v.vent.(interface{ Blocked() float64 }); ok {
		return v.at.Opening * math.Max(0, 1-b.Blocked())
	}
	return v.at.Opening
}
