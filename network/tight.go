package network

import "math"

// airGamma is the ratio of specific heats of air. Source: any handbook of gas dynamics.
const airGamma = 1.4

// nearlyTight is the share of a vessel's full vent opening under which its gas space counts as tight: quick changes are then adiabatic, and what
// passes the vent within them is little.
const nearlyTight = 0.005

// tightNow tells that the vents of a vessel pass nothing, or next to nothing.
func (s *system) tightNow(i int) bool {
	for k := range s.stations[i].vents {
		if s.stations[i].vents[k].open() > nearlyTight {
			return false
		}
	}
	return true
}

// ratedPressure returns the pressure on which the rating of a cover is judged, Pa absolute, while the isothermal one is p: in a tight gas space
// the adiabatic one of the same volume, p·Vᵞ = p₀·V₀ᵞ against p·V = p₀·V₀ from the start on; else p itself.
func (s *system) ratedPressure(i int, p float64) float64 {
	if !s.tightNow(i) {
		return p
	}
	p0 := s.stations[i].plan.Cover.Pressure
	return p0 * math.Pow(p/p0, airGamma)
}
