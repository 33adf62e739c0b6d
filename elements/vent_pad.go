package elements

import (
	"math"

	"headfall/elements/quantity"
)

func init() {
	Register(Kind{
		Name: "pad", Room: Vents,
		Doc:    "A gas blanket that holds its pressure, both ways, up to its capacity.",
		Law:    "ṁ = ρ₀·capacity·s(u), u = (p_set − p)/band, s = (3u − u³)/2 within ±1; ρ₀ = p₀/(R·T), kg/m³; band a tenth of the set pressure, at least 50 Pa",
		Valid:  "gas of the density of air; capacity as volume at outside pressure",
		Source: "common practice, no source",
		Symbol: "M12 3V9M7 9H17V15H7ZM12 15V21",
		New:    func() Element { return &pad{} },
		Sample: "{pressure: 20 mbar(g), capacity: 60 m3/h}",
	})
}

type pad struct {
	pressure, capacity float64 // Pa as written, m³/s
	written            quantity.Value
}

func (e *pad) Bind(p *Params) {
	p.Number(&e.pressure, "pressure", quantity.Pressure, Required, "pressure that it holds").With(&e.written)
	p.Number(&e.capacity, "capacity", quantity.Flow, Required, "gas that it can bring or take away", Positive)
}

func (e *pad) Ready() error { return nil }

func (e *pad) Flow(p, p0, T float64, at *Local) (m, byP float64) {
	over := e.pressure
	if e.written.Gauge == quantity.Absolute {
		over -= p0
	}
	band := max(0.1*math.Abs(over), 50)
	full := e.capacity * at.Opening * p0 / (AirConstant * T)
	u := (p0 + over - p) / band
	if math.Abs(u) >= 1 {
		return math.Copysign(full, u), 0
	}
	return full * u * (3 - u*u) / 2, -full * 1.5 * (1 - u*u) / band
}

// Bore returns 0: a pad is given by its capacity.
func (e *pad) Bore() float64 { return 0 }
