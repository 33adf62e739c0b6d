package elements

import "headfall/elements/shape"

// Shaped is an element of room Shapes.
type Shaped interface {
	Element
	// Shape builds the inside of the vessel. outlet is the diameter, m, of the opening in the tip where the file does not give one: the default
	// bottom nozzle's bore, or 0 when there is none (the shape then takes 50 mm).
	Shape(outlet float64) (shape.Shape, error)
}

// Header is an element of room Heads: it turns itself into the geometry of a bottom, top or end of the given diameter.
type Header interface {
	Element
	Head(diameter, outlet float64) (shape.Head, error)
}

// Vent is an element of room Vents: an opening between the gas space of a covered vessel and the air.
type Vent interface {
	Element
	// Flow returns the mass flow of gas into the vessel, kg/s, and its slope by the inside pressure, for inside pressure p and outside pressure p0,
	// both Pa absolute, at gas temperature T, K; Local.Opening is the share of the opening that is not blocked, 0..1.
	Flow(p, p0, T float64, at *Local) (m, byP float64)
	// Bore returns the clear bore, m, for reports.
	Bore() float64
}

// Outsider is an element of room Beyond.
type Outsider interface {
	Element
	Outside() *Outside
}

// Outside is a point beyond the plant.
type Outside struct {
	FreeFall  bool        // the line's end is open to the air there: only receives
	Elevation float64     // m over the site datum
	Capacity  float64     // m³/s that it can swallow; 0 without limit
	Surface   [][]float64 // of a body of water: rows time s, elevation m; one row when constant; nil otherwise
	Pressure  float64     // Pa of a pressurised connection at Elevation
	Gauge     bool        // Pressure is over atmosphere
	Pressed   bool        // it is a pressurised connection
}

// Trim is an element of room Trims.
type Trim interface {
	Element
	// Share returns φ, the share of Kv at travel x (0..1), as the trim is made (inherent), and dφ/dx.
	Share(x float64) (phi, slope float64)
	// LiquidRecovery returns F_L at full travel, used where the valve states none, and its source.
	LiquidRecovery() (fl float64, source string)
}
