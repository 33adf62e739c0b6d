package elements

import "math"

// AirConstant is the gas constant of air, J/(kg·K), and airRatio its ratio of specific heats.
const (
	AirConstant = 287.05
	airRatio    = 1.4
)

const (
	airBand     = 1.0              // Pa, difference of pressure within which the flow is a cubic
	airCritical = 0.52828178771718 // (2/(κ+1))^(κ/(κ−1))
	airChoked   = 0.68473145563772 // ψ there: √(κ·(2/(κ+1))^((κ+1)/(κ−1)))
)

// airIn returns the mass flow of air per effective area into a vessel, kg/(s·m²), and its derivative by the inside pressure, for the pressures p inside
// and p0 outside, Pa absolute, and a temperature T, K, on either side:
//
//	G = p₁/√(R·T)·ψ(r),  ψ = √(2κ/(κ−1)·(r^(2/κ) − r^((κ+1)/κ))),  r = p₂/p₁,  choked below r = 0.528.
//
// Within 1 Pa of balance a cubic on either side with one slope at zero: C¹. Source: isentropic nozzle, compressible-flow textbooks.
func airIn(p, p0, T float64, near *AirBand) (g, byP float64) {
	d := p0 - p
	if math.Abs(d) >= airBand {
		return airBeyond(d, p0, T)
	}
	if near.p0 != p0 || near.temp != T {
		*near = newAirBand(p0, T)
	}
	u, c := math.Abs(d)/airBand, &near.inwards
	if d < 0 {
		c = &near.outwards
	}
	return math.Copysign(u*(near.slope+u*(c[0]+u*c[1])), d), -(near.slope + u*(2*c[0]+u*3*c[1])) / airBand
}

// AirBand is the flow of air within 1 Pa of balance, kept from call to call since what is outside hardly changes. The zero value is ready.
type AirBand struct {
	p0, temp          float64 // Pa, K, that it holds for
	slope             float64 // kg/(s·m²), at balance, over the band
	inwards, outwards [2]float64
}

// newAirBand works out the cubics of both sides in u = d/band: their slopes at zero differ by a part in 10⁵, and both take the mean.
func newAirBand(p0, T float64) AirBand {
	in, inBy := airBeyond(airBand, p0, T)
	out, outBy := airBeyond(-airBand, p0, T)
	s := (3*(in-out) + airBand*(inBy+outBy)) / 4
	side := func(end, t float64) [2]float64 { return [2]float64{3*end - t - 2*s, t + s - 2*end} }
	return AirBand{p0: p0, temp: T, slope: s, inwards: side(in, -inBy*airBand), outwards: side(-out, -outBy*airBand)}
}

// AirIn returns the mass flow of air into a vessel per effective area Cd·A, kg/(s·m²), and its derivative by the inside pressure: see airIn.
func AirIn(p, p0, T float64, near *AirBand) (g, byP float64) { return airIn(p, p0, T, near) }

// airBeyond is airIn at a difference d = p0 − p, Pa, outside the band.
func airBeyond(d, p0, T float64) (g, byP float64) {
	perRoot := 1 / math.Sqrt(AirConstant*T)
	if d > 0 { // inwards: p₁ outside is constant
		v, byR := throat(1-d/p0, d/p0)
		return perRoot * p0 * v, perRoot * byR
	}
	p := p0 - d
	r := p0 / p
	v, byR := throat(r, -d/p)
	return -perRoot * p * v, -perRoot * (v - r*byR)
}

// throat returns ψ(r) and dψ/dr, −, for r = p₂/p₁ and the drop 1 − r, given on its own so that it keeps its digits.
func throat(r, drop float64) (psi, byR float64) {
	if r <= airCritical {
		return airChoked, 0
	}
	const k = airRatio
	ln := math.Log1p(-drop)
	a := math.Exp(2 / k * ln)          // r^(2/κ)
	b := -math.Expm1((k - 1) / k * ln) // 1 − r^((κ−1)/κ)
	const c = 2 * k / (k - 1)
	psi = math.Sqrt(c * a * b)
	// d(a·b)/dr = (2/κ·a·b − (κ−1)/κ·a·(1−b))/r
	byR = c * a * (2/k*b - (k-1)/k*(1-b)) / r / (2 * psi)
	return psi, byR
}
