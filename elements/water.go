package elements

import (
	"math"

	"headfall/elements/quantity"
)

func init() {
	Register(Kind{
		Name: "water", Room: Liquids,
		Doc:    "Water at one temperature and about atmospheric pressure.",
		Law:    "density, viscosity, vapour pressure and surface tension of the standard formulations at t, °C",
		Valid:  "0–100 °C, near 0.1 MPa; 0.02 % on density, 1 % on viscosity, 0.1 % on vapour pressure",
		Source: "Kell 1975 (density); IAPWS R12-08 (viscosity); IAPWS SR1-86(1992), Wagner and Pruss 1993 (vapour pressure); IAPWS R1-76(2014) (surface tension)",
		Symbol: "M12 3Q5 12 5 16A7 6 0 0 0 19 16Q19 12 12 3",
		New:    func() Element { return &water{} },
		Sample: "{temperature: 12 °C}",
	})
}

type water struct{ temperature float64 } // K

func (e *water) Bind(p *Params) {
	p.Number(&e.temperature, "temperature", quantity.Temperature, Required, "temperature of the water", func(v float64) string {
		if v >= 273.15 && v <= 373.15 {
			return ""
		}
		return "from 0 °C to 100 °C"
	})
}

func (e *water) Ready() error { return nil }

func (e *water) Fluid() Fluid {
	t := e.temperature - 273.15
	rho := WaterDensity(t)
	return Fluid{
		Name:    "water",
		Density: rho,
		Dynamic: WaterViscosity(t, rho),
		Vapour:  WaterVapourPressure(t),
		Checked: true,
		Surface: WaterSurfaceTension(t),
		Celsius: t,
	}
}

// WaterDensity returns the density, kg/m³, of air-free water at 101 325 Pa and t, °C, from 0 to 100 (IPTS-68; within 0.01 kg/m³ on today's scale).
//
// Source: G. S. Kell, J. Chem. Eng. Data 20, 97–105, 1975.
func WaterDensity(t float64) float64 {
	n := 999.83952 + t*(16.945176+t*(-7.9870401e-3+t*(-46.170461e-6+t*(105.56302e-9-280.54253e-12*t))))
	return n / (1 + 16.879850e-3*t)
}

// viscosity coefficients H_ij of IAPWS R12-08, table 2: rows i, columns j.
var viscosityH = [6][7]float64{
	{5.20094e-1, 2.22531e-1, -2.81378e-1, 1.61913e-1, -3.25372e-2, 0, 0},
	{8.50895e-2, 9.99115e-1, -9.06851e-1, 2.57399e-1, 0, 0, 0},
	{-1.08374, 1.88797, -7.72479e-1, 0, 0, 0, 0},
	{-2.89555e-1, 1.26613, -4.89837e-1, 0, 6.98452e-2, 0, -4.35673e-3},
	{0, 0, -2.57040e-1, 0, 0, 8.72102e-3, 0},
	{0, 1.20573e-1, 0, 0, 0, 0, -5.93264e-4},
}

// WaterViscosity returns the dynamic viscosity, Pa·s, of water at t, °C, and a density, kg/m³, without the critical enhancement (nothing below 100 °C):
//
//	μ = 10⁻⁶·(100·√T̄/Σ Hᵢ/T̄ⁱ)·exp(ρ̄·Σᵢ(1/T̄ − 1)ⁱ·Σⱼ Hᵢⱼ·(ρ̄ − 1)ʲ),  T̄ = T/647.096 K, ρ̄ = ρ/322 kg/m³.
//
// Uncertainty 1 %. Source: IAPWS R12-08.
func WaterViscosity(t, density float64) float64 {
	T := (t + 273.15) / 647.096
	r := density/322 - 1
	i := 1 / T
	mu0 := 100 * math.Sqrt(T) / (1.67752 + i*(2.20462+i*(0.6366564-0.241605*i)))
	sum := 0.0
	for k := 5; k >= 0; k-- {
		inner := 0.0
		for j := 6; j >= 0; j-- {
			inner = inner*r + viscosityH[k][j]
		}
		sum = sum*(i-1) + inner
	}
	return 1e-6 * mu0 * math.Exp((r+1)*sum)
}

// WaterVapourPressure returns the saturation pressure, Pa absolute, of water at t, °C, from 0 to 374:
//
//	ln(p/p_c) = T_c/T·(a₁τ + a₂τ^1.5 + a₃τ³ + a₄τ^3.5 + a₅τ⁴ + a₆τ^7.5),  τ = 1 − T/T_c.
//
// Uncertainty 0.03 %. Source: IAPWS SR1-86(1992); W. Wagner, A. Pruss, J. Phys. Chem. Ref. Data 22, 783–787, 1993.
func WaterVapourPressure(t float64) float64 {
	const tc, pc = 647.096, 22.064e6
	T := t + 273.15
	x := 1 - T/tc
	s := math.Sqrt(x)
	x3 := x * x * x
	sum := -7.85951783*x + 1.84408259*x*s + x3*(-11.7866497+22.6807411*s-15.9618719*x+1.80122502*x3*x*s)
	return pc * math.Exp(tc/T*sum)
}

// WaterSurfaceTension returns the surface tension, N/m, of water against its vapour at t, °C: 0.2358·τ^1.256·(1 − 0.625·τ), τ = 1 − T/647.096 K.
//
// Uncertainty 0.5 %. Source: IAPWS R1-76(2014).
func WaterSurfaceTension(t float64) float64 {
	x := 1 - (t+273.15)/647.096
	return 0.2358 * math.Pow(x, 1.256) * (1 - 0.625*x)
}
