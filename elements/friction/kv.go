package friction

import "math"

// CvOfKv is Cv, US gal/min at 1 psi, of a Kv of 1 m³/h at 1 bar. Source: unit conversion.
const CvOfKv = 1.156099

// QuadraticOfKv returns c of Δp = c·ρ·Q² for a valve of coefficient Kv, m³/h of water of 1000 kg/m³ at 1 bar; Δp in Pa, ρ in kg/m³, Q in m³/s.
//
// Turbulent flow, no cavitation. Source: IEC 60534-1, definition of Kv.
func QuadraticOfKv(kv float64) float64 {
	perSecond := kv / 3600
	return 1e5 / 1000 / (perSecond * perSecond)
}

// KvOfK returns the Kv, m³/h at 1 bar, of a loss coefficient K (−) on a bore, m: K·ρ·v²/2 = Δp.
//
// Source: definitions; in the handbooks K = 1.6·10⁹·D⁴/Kv².
func KvOfK(k, bore float64) float64 {
	return 3600 * math.Pi / 4 * bore * bore * math.Sqrt(2*1e5/1000/k)
}

// KOfKv returns the loss coefficient K (−), on a bore, m, of a Kv, m³/h at 1 bar. Source: definitions.
func KOfKv(kv, bore float64) float64 {
	a := 3600 * math.Pi / 4 * bore * bore / kv
	return 2 * 1e5 / 1000 * a * a
}
