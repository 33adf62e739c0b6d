package network

import (
	"fmt"
	"math"
	"slices"

	"headfall/elements"
)

// Model is a compiled plant: it is run as often as wanted, one run at a time.
type Model struct {
	plan *Plant
	opt  Options
	sys  *system
	sim  *simulation
}

// Compile numbers the unknowns of a plant, fixes the pattern of their equations and gives each contribution its slot. The plant must have been
// refreshed and found without faults by Validate.
func Compile(p *Plant, opt Options) (*Model, error) {
	if opt.Tolerance == 0 {
		opt.Tolerance = DefaultTolerance
	}
	s := &system{plan: p, gamma: 0, atmosphere: p.Atmosphere, rtol: opt.Tolerance}
	s.fluid = p.Liquid.Fluid()
	s.gamma = s.fluid.Density * p.Gravity
	s.number()
	if err := s.connect(); err != nil {
		return nil, err
	}
	s.layout()
	return &Model{plan: p, opt: opt, sys: s}, nil
}

// DefaultTolerance is the relative tolerance of a run where none is asked for.
const DefaultTolerance = 1e-6

// number gives vessels, gas spaces and tees their unknowns and outside points their places.
func (s *system) number() {
	p := s.plan
	s.vesselAt = make(map[string]int, len(p.Vessels))
	s.stations = make([]station, len(p.Vessels))
	for i, v := range p.Vessels {
		s.vesselAt[v.Tag] = i
		s.stations[i] = newStation(v, p)
	}
	s.basins, s.floor, s.isWide = make([]basin, len(p.Vessels)), make([]float64, len(p.Vessels)), make([]bool, len(p.Vessels))
	s.deep, s.isBare = make([]float64, len(p.Vessels)), make([]bool, len(p.Vessels))
	s.wide, s.narrow, s.odd = make([]int32, 0, len(p.Vessels)), make([]int32, 0, len(p.Vessels)), make([]int32, 0, len(p.Vessels))
	n := int32(len(p.Vessels))
	for i := range s.stations {
		st := &s.stations[i]
		if st.closed {
			s.closed = append(s.closed, int32(i))
		}
		st.massRow = -1
		if st.closed && !st.sealed {
			st.massRow = n
			n++
		}
	}
	s.teeRow = int(n)
	s.teeAt = make(map[string]int, len(p.Tees))
	for i, t := range p.Tees {
		s.teeAt[t.Tag] = i
		n++
	}
	s.outsideAt = make(map[string]int, len(p.Outside))
	s.outside = make([]beyond, len(p.Outside))
	for i, o := range p.Outside {
		s.outsideAt[o.Tag] = i
		s.outside[i].init(o, s)
	}
	s.flowRow = int(n)
	s.n = int(n)
}

// connect compiles the lines, gives inertial ones their unknowns, and finds the actuators.
func (s *system) connect() error {
	p := s.plan
	s.lines = make([]line, len(p.Lines))
	s.lineAt = make(map[string]int, len(p.Lines))
	s.actuatorAt = map[string]int{}
	for i, l := range p.Lines {
		s.lineAt[l.Tag] = i
		if err := s.compileLine(&s.lines[i], l, i); err != nil {
			return fmt.Errorf("%s: %w", l.Tag, err)
		}
	}
	for i := range s.lines {
		if s.lines[i].inertia > 0 {
			s.inertial = append(s.inertial, int32(i))
			s.lines[i].row = int32(s.n)
			s.n++
		}
	}
	for i, v := range p.Vessels {
		s.stations[i].spillTo = -1
		if k, ok := s.vesselAt[v.SpillsTo]; ok {
			s.stations[i].spillTo = int32(k)
		}
	}
	s.meetOutside()
	s.addAirways()
	s.shareTables()
	return nil
}

// mouthOf compiles one end of a line.
func (s *system) mouthOf(l *Line, to bool) mouth {
	tag, port := l.From, l.Leaves
	if to {
		tag, port = l.To, l.Enters
	}
	bore := l.endBore(to)
	if i, ok := s.vesselAt[tag]; ok {
		return s.vesselMouth(l, s.plan.Vessels[i], i, port, bore, to)
	}
	if i, ok := s.teeAt[tag]; ok {
		return mouth{kind: toTee, at: i, inlet: inletLaw{form: noInlet}}
	}
	i := s.outsideAt[tag]
	o := s.outside[i].point
	m := mouth{at: i, centre: o.Elevation, invert: o.Elevation, air: s.atmosphere}
	switch {
	case o.FreeFall:
		m.kind, m.inlet = toAir, inletLaw{form: dryInlet}
	case o.Pressed:
		m.kind = toPressure
	default:
		m.kind = toWater
	}
	return m
}

func (s *system) vesselMouth(l *Line, v *Vessel, at int, port Port, bore float64, to bool) mouth {
	m := mouth{kind: toVessel, at: at, air: s.atmosphere, centre: v.Base + port.centre(bore), invert: v.Base + port.invert(bore)}
	m.inlet = inletLaw{form: floorInlet, bore: bore, g: s.plan.Gravity}
	switch port.Form {
	case Centre, Invert:
		m.width, m.inlet.form = bore, sideInlet
	case Dip:
		m.width = bore
	}
	if part, ok := l.endPart(to).(elements.Mouthed); ok {
		o := part.Mouth()
		if w, h := o.Width, o.Height; w > 0 && (port.Form == Centre || port.Form == Invert) {
			m.width, m.inlet.form, m.inlet.bore = h, slotInlet, w
			m.centre, m.invert = v.Base+port.centre(h), v.Base+port.invert(h)
		}
	}
	if l.InletFull {
		m.inlet.form = fadeInlet
	}
	if bore == 0 && m.inlet.form != slotInlet { // no bore: no limit but that nothing leaves from under the mouth
		m.inlet.form, m.inlet.bore, m.width = fadeInlet, noBoreFade/fadeShare, 0
		if port.Form != Bottom {
			m.width = noBoreFade
		}
	}
	m.inlet.settle()
	return m
}

// noBoreFade is the depth, m, over which the flow into a line without any bore fades.
const noBoreFade = 2e-3

// compileLine builds line k.
func (s *system) compileLine(c *line, l *Line, k int) error {
	c.plan = l
	c.row = -1
	c.from, c.to = s.mouthOf(l, false), s.mouthOf(l, true)
	c.locals = slices.Grow(c.locals, len(l.Parts))[:len(l.Parts)]
	for i, f := range l.Parts {
		c.locals[i] = elements.Local{Fluid: &s.fluid, Gravity: s.plan.Gravity, Opening: 1, Strength: 1}
		if _, ok := f.Part.(elements.Ranged); ok {
			c.ranged = append(c.ranged, i)
		}
		if w, ok := f.Part.(elements.Crest); ok {
			if i > 0 {
				return fmt.Errorf("a weir must be the first part of its line")
			}
			c.weir, c.weirAt = w, &c.locals[0]
			c.crestZ = s.plan.vessel(l.From).Base + l.Leaves.Height
			continue
		}
		c.chain.parts = append(c.chain.parts, f.Part)
		c.chain.locals = append(c.chain.locals, &c.locals[i])
		if _, ok := f.Part.(elements.OneWay); ok {
			c.checks = true
		}
		if in, ok := f.Part.(elements.Inertial); ok {
			c.inertia += in.Inertance(&s.fluid)
		}
		if _, ok := f.Part.(elements.Long); ok {
			c.long = true
		}
		if b := boreOf(f.Part); b > 0 && (c.bore == 0 || b < c.bore) {
			c.bore, c.area = b, math.Pi/4*b*b
		}
		s.addActuators(c, f, i, k)
	}
	if c.weir != nil { // it runs from a free surface: no column
		c.inertia = 0
	}
	if c.weir != nil && len(c.chain.parts) == 0 {
		c.to.width = 0 // it sees the surface there, not a mouth
	}
	c.setLeak(s.plan.Assume.CheckLeak)
	if c.from.kind == toTee || c.to.kind == toTee {
		c.gmin = weepage
	}
	c.chain.near, c.cell = nearEnough(s.rtol), flowCell{tol: tableError(s.rtol)}
	s.setBand(c)
	s.endLosses(c)
	s.addFloors(c)
	s.findSide(c)
	return nil
}

// addActuators notes what moves in part i of line k.
func (s *system) addActuators(c *line, f *Fitted, i, k int) {
	add := func(a actuator) {
		a.line, a.part = k, i
		a.stuck, a.stops = math.NaN(), math.NaN()
		s.actuatorAt[a.tag] = len(s.actuators)
		s.actuators = append(s.actuators, a)
	}
	if v, ok := f.Part.(elements.Actuated); ok {
		act := v.Actuator()
		add(actuator{tag: act.Tag, kind: aValve, valve: act})
		c.acts = append(c.acts, int32(len(s.actuators)-1))
	}
	if p, ok := f.Part.(elements.Pumps); ok {
		d := p.Drive()
		c.sources, c.steady = true, c.steady || !d.Curved
		add(actuator{tag: d.Tag, kind: aPump, drive: d})
		c.acts = append(c.acts, int32(len(s.actuators)-1))
	}
	if h, ok := f.Part.(elements.Humps); ok {
		crown := h.Crown()
		tag := crown.Vent.Tag
		if crown.Vent.Given {
			add(actuator{tag: tag, kind: aVent})
			c.acts = append(c.acts, int32(len(s.actuators)-1))
		}
	}
}

// meetOutside notes which lines meet each outside point, and which have high points.
func (s *system) meetOutside() {
	s.crowned = s.crowned[:0]
	for k := range s.outside {
		s.outside[k].fed, s.outside[k].drawn = nil, nil
	}
	for i := range s.lines {
		l := &s.lines[i]
		if len(l.crowns) > 0 {
			s.crowned = append(s.crowned, int32(i))
		}
		if l.to.outside() {
			s.outside[l.to.at].fed = append(s.outside[l.to.at].fed, int32(i))
		}
		if l.from.outside() {
			s.outside[l.from.at].drawn = append(s.outside[l.from.at].drawn, int32(i))
		}
	}
}
