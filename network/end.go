package network

// end is what a line sees at one of its ends: the total pressure there, the depth of liquid over the mouth, and how both move with the
// unknowns of the plant.
type end struct {
	phi   float64 // Pa: pressure + ρ·g·elevation at the surface, or at the mouth where that is above it
	depth float64 // m over the invert; +Inf where liquid is always there, -Inf where it never is
	phiV  float64 // ∂phi/∂V of its vessel, Pa/m³, gas pressure included
	phiN  float64 // ∂phi/∂n of the vessel's gas, Pa/kg
	depV  float64 // ∂depth/∂V, 1/m²
	phiT  float64 // ∂phi/∂t, Pa/s, of a moving outside level
}

// mouth is where a line meets a vessel or an outside point; fixed when the plant is compiled.
type mouth struct {
	kind   mouthKind
	at     int     // index of the vessel, tee or outside point
	centre float64 // m over datum: free-discharge elevation
	invert float64 // m over datum
	width  float64 // m over which a falling surface uncovers the mouth; 0 for a mouth in the floor
	inlet  inletLaw
	air    float64 // Pa absolute, of the air there, for weirs
}

type mouthKind int8

const (
	toVessel mouthKind = iota
	toTee
	toWater    // a body of water with a surface
	toPressure // a pressurised connection
	toAir      // a free fall
)

// see works out what the line sees at the mouth.
func (s *system) see(m *mouth) (e end) {
	switch m.kind {
	case toVessel:
		v := &s.stations[m.at]
		e = end{phiN: v.gasN, depth: v.surface - m.invert, depV: v.slope}
		z, dz := v.surface, 1.0
		if m.width > 0 {
			z, dz = uncover(v.surface, m.centre, m.width)
		}
		e.phi = v.gas + s.gamma*z
		e.phiV = v.gasV + s.gamma*dz*v.slope
	case toTee:
		e = end{phi: s.y[s.teeRow+m.at], depth: always}
	case toWater:
		z, rate := s.outside[m.at].surface, s.outside[m.at].rate
		e = end{phi: s.atmosphere + s.gamma*z, depth: always, phiT: s.gamma * rate}
	case toPressure:
		e = end{phi: s.outside[m.at].phi, depth: always}
	default:
		e = end{phi: s.outside[m.at].phi, depth: never}
	}
	return e
}

// meet is see without the slopes.
func (s *system) meet(m *mouth, e *end) {
	switch m.kind {
	case toVessel:
		z := s.stations[m.at].surface
		e.depth = z - m.invert
		if m.width == 0 {
			e.phi = s.floor[m.at]
			return
		}
		z, _ = uncover(z, m.centre, m.width)
		e.phi = s.stations[m.at].gas + s.gamma*z
	case toTee:
		e.phi, e.depth = s.y[s.teeRow+m.at], always
	case toWater:
		e.phi, e.depth = s.atmosphere+s.gamma*s.outside[m.at].surface, always
	case toPressure:
		e.phi, e.depth = s.outside[m.at].phi, always
	default:
		e.phi, e.depth = s.outside[m.at].phi, never
	}
}

// uncover returns the elevation that drives a mouth of centre c as the surface z falls over it, and its slope: z above the crown, c below the
// invert, once differentiable between.
func uncover(z, c, width float64) (elev, slope float64) {
	u := (z-c)/width + 0.5
	switch {
	case u >= 1:
		return z, 1
	case u <= 0:
		return c, 0
	}
	return c + width*u*u/2, u
}
