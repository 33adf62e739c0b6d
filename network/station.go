package network

import (
	"math"

	"headfall/elements"
	"headfall/elements/shape"
)

const gasConstant = elements.AirConstant

// station is a vessel in the equations: where its unknowns are and what follows from them.
type station struct {
	plan    *Vessel
	shape   shape.Shape
	base    float64
	full    float64 // m³, volume under the top of the shape
	rim     float64 // m above base
	rimLen  float64 // m
	breach  float64 // m above base, where a covered vessel is full
	spillTo int32   // vessel; -1: the floor or an outside point
	closed  bool    // has a cover
	sealed  bool    // no vent: the mass of gas is a constant
	massRow int32   // unknown of the gas mass; -1
	mass    float64 // kg, of a sealed gas space
	temp    float64 // K
	vents   []ventAt
	airways []airway

	inflow, inflowRate float64 // m³/s at the segment's start and its slope, m³/s²
	inflowZ            int     // its integral; -1 where nothing ever comes in

	level   float64 // m above base
	slope   float64 // dh/dV, 1/m²
	surface float64 // m over datum
	gas     float64 // Pa absolute
	gasV    float64 // ∂gas/∂V, Pa/m³
	gasN    float64 // ∂gas/∂m, Pa/kg
	spill   float64 // m³/s over the rim
	spillV  float64 // ∂spill/∂V, 1/s
}

type ventAt struct {
	plan *VesselVent
	vent elements.Vent
	at   elements.Local
}

// rimCoefficient of the spill over a rim, m^½/s: a broad crest, common practice, no source.
const rimCoefficient = 1.7

func newStation(v *Vessel, p *Plant) station {
	st := station{plan: v, shape: v.Shape, base: v.Base, rim: v.RimLevel(), rimLen: v.RimLength, spillTo: -1, inflowZ: -1, massRow: -1, gas: p.Atmosphere}
	st.full, _ = v.Shape.Volume(v.Shape.Height())
	if math.IsNaN(st.rimLen) {
		st.rimLen = v.Shape.Perimeter(st.rim)
	}
	st.breach, _ = v.Shape.Level(st.full * (1 - gasLeft))
	if c := v.Cover; c != nil {
		st.closed, st.temp = true, c.Temperature
		st.sealed = len(c.Vents) == 0 && !p.mayBreathe(v)
		if len(c.Vents) == 0 {
			st.rim = v.fullLevel(st.breach)
		}
		for _, w := range c.Vents {
			st.vents = append(st.vents, ventAt{w, w.Vent, elements.Local{Opening: 1 - w.Blocked, Gravity: p.Gravity, Band: 1}})
		}
	}
	return st
}

// gasLeft is the share of a covered vessel under which its gas space counts as gone. Below it no gas law says what the pressure does: gas has left by
// the vents or through what gave way. The space is then counted, once differentiable, as no less than half of that share, so that the pressure stays
// finite, and liquid leaves by the law of the rim: over the rim where there are vents, from the level at which the gas is gone where there are none.
// Common practice, no source.
const gasLeft = 1e-3

// fullLevel returns the level, m above base, at which a vessel without vents counts as full and sealed: where its gas space is gone, or a lower
// rim that was stated.
func (v *Vessel) fullLevel(gone float64) float64 {
	if v.Rim < gone {
		return v.Rim
	}
	return gone
}

// startMass returns the mass of gas, kg, at the start.
func (st *station) startMass() float64 {
	g, _ := st.gasVolume(st.plan.StartVolume())
	return st.plan.Cover.Pressure * g / (gasConstant * st.temp)
}

// gasVolume returns the space left to gas, m³, and its slope by the volume of liquid v, m³: g = full − v down to gasLeft·full = 2e, then
// e + g²/4e, and e where none is left.
func (st *station) gasVolume(v float64) (vol, slope float64) {
	e := gasLeft / 2 * st.full
	switch g := st.full - v; {
	case g >= 2*e:
		return g, -1
	case g > 0:
		return e + g*g/(4*e), -g / (2 * e)
	}
	return e, 0
}

// look works out what follows from the volume v, m³, and the gas mass m, kg.
func (st *station) look(v, m float64) {
	st.level, st.slope = st.shape.Level(v)
	st.surface = st.base + st.level
	if st.closed {
		g, dg := st.gasVolume(v)
		rt := gasConstant * st.temp
		st.gas = m * rt / g
		st.gasV = -st.gas / g * dg
		st.gasN = rt / g
		if st.massRow < 0 {
			st.gasN = 0
		}
	}
	st.spill, st.spillV = 0, 0
	if h := st.level - st.rim; h > 0 {
		r := math.Sqrt(h)
		st.spill = rimCoefficient * st.rimLen * h * r
		st.spillV = 1.5 * rimCoefficient * st.rimLen * r * st.slope
	}
}

// beyond is an outside point in the equations.
type beyond struct {
	plan    *Outside
	point   *elements.Outside
	phi     float64 // Pa, total pressure, of a free fall or a pressurised connection
	surface float64 // m over datum now
	rate    float64 // m/s
	start   float64 // surface at the segment's start
	fed     []int32 // lines that end there
	drawn   []int32 // lines that begin there
}

func (b *beyond) init(o *Outside, s *system) {
	b.plan, b.point = o, o.Element.Outside()
	b.phi = s.atmosphere + s.gamma*b.point.Elevation
	if b.point.Pressed {
		b.phi = b.point.Pressure + s.gamma*b.point.Elevation
		if b.point.Gauge {
			b.phi += s.atmosphere
		}
	}
	if rows := Rows(b.point.Surface); len(rows) > 0 {
		b.start, b.surface = rows[0][1], rows[0][1]
	}
}
