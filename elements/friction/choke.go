package friction

import "math"

// CriticalPressureOfWater is p_c of water, Pa absolute. Source: IAPWS.
const CriticalPressureOfWater = 22.064e6

// CriticalRatio returns F_F (−), the pressure in a choked throat over the vapour pressure p_v, for p_v and the critical pressure p_c in Pa absolute:
//
//	F_F = 0.96 − 0.28·√(p_v/p_c).
//
// Source: IEC 60534-2-1.
func CriticalRatio(vapour, critical float64) float64 {
	return 0.96 - 0.28*math.Sqrt(min(max(vapour/critical, 0), 1))
}
