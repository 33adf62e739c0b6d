package elements

import (
	"math"

	"headfall/elements/quantity"
)

func init() {
	Register(Kind{
		Name: "stated", Room: Liquids,
		Doc:    "A liquid by its stated properties, or by a table of them at one temperature.",
		Law:    "as stated; between rows of the table density ρ, kg/m³, is straight in t and viscosity μ, Pa·s, straight in ln μ over t, °C",
		Valid:  "Newtonian liquids, within the table",
		Source: "definition; logarithmic interpolation of viscosity: common practice, no source",
		Symbol: "M8 3V9L3 20H21L16 9V3M6 14H18",
		New:    func() Element { return &stated{} },
		Sample: "{name: syrup, density: 1200 kg/m3, viscosity: 24 mPa.s}",
	})
}

type stated struct {
	name                                string
	density, viscosity, vapour, tension float64 // kg/m³; as written; Pa; N/m
	temperature                         float64 // K
	table                               [][]float64
	viscous, vaporous                   quantity.Value
	hasDensity, hasViscosity, hasVapour bool
	hasAt, hasTable                     bool
	fluid                               Fluid
}

func (e *stated) Bind(p *Params) {
	p.Name(&e.name, "name", Required, "what it is")
	p.Number(&e.density, "density", quantity.Density, Optional, "density; or at and table", Positive).Was(&e.hasDensity)
	p.Number(&e.viscosity, "viscosity", quantity.Viscosity, Optional, "dynamic or kinematic viscosity", Positive).Was(&e.hasViscosity).With(&e.viscous)
	p.Number(&e.vapour, "vapour_pressure", quantity.Pressure, Optional, "absolute vapour pressure; without it, it is not checked", NotNegative).
		Was(&e.hasVapour).With(&e.vaporous).Or("0 Pa(a)")
	p.Number(&e.tension, "surface_tension", quantity.SurfaceTension, Optional, "surface tension against air", Positive)
	p.Number(&e.temperature, "at", quantity.Temperature, Optional, "temperature at which the table is read", Positive).Was(&e.hasAt)
	p.Table(&e.table, "table", Optional, "temperature rising, density, dynamic viscosity", quantity.Temperature, quantity.Density, quantity.Viscosity).Was(&e.hasTable)
}

func (e *stated) Ready() error {
	var f faults
	one := e.hasDensity || e.hasViscosity
	f.when(one && (e.hasAt || e.hasTable), "a liquid takes density and viscosity, or at and table, not both")
	f.when(!one && !e.hasAt && !e.hasTable, "a liquid needs density and viscosity, or at and table")
	f.when(e.hasDensity != e.hasViscosity, "density and viscosity go together")
	f.when(e.hasAt != e.hasTable, "at and table go together")
	f.when(e.hasVapour && e.vaporous.Gauge == quantity.Gauge, "a vapour pressure is absolute: write (a)")
	if len(f) > 0 {
		return f.err()
	}
	e.fluid = Fluid{Name: e.name, Density: e.density, Dynamic: e.viscosity, Vapour: e.vapour, Checked: e.vapour > 0,
		Surface: e.tension, Celsius: math.NaN()}
	if e.hasTable {
		e.fluid.Celsius = e.temperature - 273.15
		e.fluid.Density, e.fluid.Dynamic = e.read(&f)
	} else if e.viscous.Kinematic {
		e.fluid.Dynamic *= e.density
	}
	return f.err()
}

// read interpolates the table.
func (e *stated) read(f *faults) (density, dynamic float64) {
	t := e.temperature
	for i, r := range e.table {
		f.when(r[1] <= 0 || r[2] <= 0, "density and viscosity of a row are more than 0")
		f.when(i > 0 && r[0] <= e.table[max(i-1, 0)][0], "the temperature must rise from row to row")
	}
	n := len(e.table)
	if n == 0 || t < e.table[0][0] || t > e.table[n-1][0] {
		f.when(true, "the temperature is outside the table")
	}
	if len(*f) > 0 {
		return 1000, 1e-3
	}
	i := 0
	for i < n-2 && e.table[i+1][0] < t {
		i++
	}
	a, b := e.table[i], e.table[min(i+1, n-1)]
	if b[0] == a[0] {
		return a[1], a[2]
	}
	u := (t - a[0]) / (b[0] - a[0])
	return a[1] + u*(b[1]-a[1]), a[2] * math.Pow(b[2]/a[2], u)
}

func (e *stated) Fluid() Fluid { return e.fluid }
