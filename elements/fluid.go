package elements

// Fluid is the liquid of the plant at its one temperature.
type Fluid struct {
	Name    string
	Density float64 // kg/m³
	Dynamic float64 // viscosity, Pa·s
	Vapour  float64 // vapour pressure, Pa absolute
	Checked bool    // Vapour was stated: cavitation and siphons are checked against it
	Surface float64 // surface tension, N/m; 0 unknown
	Celsius float64 // temperature, °C; NaN when not stated
}

// Liquid is an element of room Liquids.
type Liquid interface {
	Element
	Fluid() Fluid
}
