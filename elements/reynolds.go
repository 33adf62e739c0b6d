package elements

import "math"

// reynoldsFactor is F_R (−), the share of a valve's Kv that is left in a thick liquid, from the valve Reynolds number
//
//	Re_v = N₄·F_d·Q/(ν·√(Kv·F_L))·(F_L²·Kv²/(N₂·D⁴) + 1)^¼, N₄ = 0.0707, N₂ = 0.0016; Q and Kv in m³/h, ν in m²/s, D in mm:
//
//	transitional  F_R = 1 + 0.33·√F_L/n^¼·log₁₀(Re_v/10⁴),   laminar  F_R = 0.026/F_L·√(n·Re_v),   never over 1,
//
//	n = N₂/(Kv/d²)², or 1 + 140·(Kv/d²)^⅔ where Kv/d² is under 0.0138, d in mm.
//
// The lesser one holds; the corners are rounded over 2 %, so that Δp is C¹, increasing, and linear through zero. Exactly 1 above Re_v = 1.4·10⁴, or a
// little later for a wide valve in a narrow pipe.
//
// Valid for single-stage valves, F_R within about 20 %. Source: IEC 60534-2-1:2011, annex A (constants from memory).
type reynoldsFactor struct {
	re        float64 // Re_v = re·Q/(ν·√φ), 1/m: Q in m³/s, ν in m²/s
	climb     float64 // of the transitional law, per ln Re_v
	laminar   float64 // of the laminar law, per √Re_v
	turbulent float64 // Re_v from which F_R is exactly 1
	laminarTo float64 // Re_v up to which only the laminar law holds: where it lies deepest under the transitional one
}

const cornerShare = 0.02

// newReynoldsFactor takes Kv, m³/h, the bore, m (0: unknown), F_L and F_d, −.
func newReynoldsFactor(kv, bore, fl, fd float64) reynoldsFactor {
	const n2, n4, limit = 1.6e-3, 7.07e-2, 0.016 * 0.865
	ratio, approach := limit, 1.0
	if bore > 0 {
		d := 1000 * bore
		ratio = kv / (d * d)
		approach = math.Sqrt(math.Sqrt(fl*fl*ratio*ratio/n2 + 1))
	}
	n := n2 / (ratio * ratio)
	if ratio < limit {
		n = 1 + 140*math.Cbrt(ratio*ratio)
	}
	r := reynoldsFactor{
		re:      n4 * fd * 3600 / math.Sqrt(kv*fl) * approach,
		climb:   0.33 * math.Sqrt(fl) / math.Sqrt(math.Sqrt(n)) / math.Ln10,
		laminar: 0.026 / fl * math.Sqrt(n),
	}
	full := 1.021 / r.laminar // √Re_v at which the laminar law has left its corner
	r.turbulent = max(1.4e4, full*full)
	deepest := 2 * r.climb / r.laminar
	r.laminarTo = deepest * deepest
	if r.transitional(r.laminarTo) < r.laminar*deepest*(1+2*cornerShare) {
		r.laminarTo = math.Inf(1) // an odd valve: no transitional range between the two
	}
	return r
}

func (r *reynoldsFactor) transitional(re float64) float64 { return 1 + r.climb*math.Log(re/1e4) }

// at returns F_R and d ln F_R/d ln Re_v, both −, at Re_v > 0.
func (r *reynoldsFactor) at(re float64) (factor, bend float64) {
	lam := r.laminar * math.Sqrt(re)
	top, byLn := 1.0, 0.0
	if re > r.laminarTo {
		v, byV, _ := MinWithin(r.transitional(re), 1, cornerShare)
		top, byLn = v, byV*r.climb
	} else if !math.IsInf(r.laminarTo, 1) {
		return lam, 0.5
	}
	v, byTop, byLam := MinWithin(top, lam, cornerShare)
	return v, (byTop*byLn + byLam*lam/2) / v
}

// styleOf returns F_d (−) of a trim: 0.46, a globe valve with a contoured plug, unless it knows better.
func styleOf(t Trim) float64 {
	if s, ok := t.(interface{ StyleModifier() float64 }); ok {
		return s.StyleModifier()
	}
	return 0.46
}
