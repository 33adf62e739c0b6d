package quantity

// Dim is what a value measures; it decides which units are understood.
type Dim int

// The dimensions of the scenario file. The SI unit of Value.SI is in brackets.
const (
	Number              Dim = iota // bare number: coefficients, ratios that are never in per cent [1]
	Ratio                          // bare or per cent: openings, shares [1]
	Count                          // bare whole number [1]
	Kv                             // valve coefficient, bare by definition [m³/h of water at 1 bar]
	Cv                             // valve coefficient, bare by definition [US gal/min of water at 1 psi]
	Length                         // [m]
	Head                           // column of the liquid itself, written as a length [m]
	Area                           // [m²]
	Volume                         // [m³]
	Flow                           // volume flow [m³/s]
	Time                           // duration; sums such as "1 h 20 min" are understood [s]
	Pressure                       // [Pa], gauge or absolute as Value.Gauge says
	Temperature                    // [K]
	Viscosity                      // dynamic [Pa·s], or kinematic [m²/s] when Value.Kinematic
	Density                        // [kg/m³]
	Velocity                       // [m/s]; also how fast a level rises
	Acceleration                   // [m/s²]
	Angle                          // [rad]
	ResistanceLinear               // head lost over flow [s/m²]
	ResistanceQuadratic            // head lost over flow squared [s²/m⁵]
	SurfaceTension                 // [N/m]
	numDims
)

// dimWords is how a dimension is spoken of in messages.
type dimWords struct {
	name    string // as an identifier in help: "length"
	noun    string // with its article: "a length"
	example string // unit shown when one is missing; empty when values are bare
	why     string // why no unit is written, for bare dimensions
}

var words = [numDims]dimWords{
	Number:              {"number", "a bare number", "", "this is a bare number, without a unit"},
	Ratio:               {"ratio", "a share", "%", "this is a share: a bare number or per cent"},
	Count:               {"count", "a count", "", "this is a count: a whole number without a unit"},
	Kv:                  {"kv", "kv", "", "kv is a bare number: by definition m3/h of water at 1 bar"},
	Cv:                  {"cv", "cv", "", "cv is a bare number: by definition US gal/min of water at 1 psi"},
	Length:              {"length", "a length", "m", ""},
	Head:                {"head", "a head", "m", ""},
	Area:                {"area", "an area", "m2", ""},
	Volume:              {"volume", "a volume", "m3", ""},
	Flow:                {"flow", "a flow", "m3/h", ""},
	Time:                {"time", "a duration", "min", ""},
	Pressure:            {"pressure", "a pressure", "mbar(g)", ""},
	Temperature:         {"temperature", "a temperature", "°C", ""},
	Viscosity:           {"viscosity", "a viscosity", "mPa.s", ""},
	Density:             {"density", "a density", "kg/m3", ""},
	Velocity:            {"velocity", "a velocity", "m/s", ""},
	Acceleration:        {"acceleration", "an acceleration", "m/s2", ""},
	Angle:               {"angle", "an angle", "deg", ""},
	ResistanceLinear:    {"linear resistance", "a linear resistance", "s/m2", ""},
	ResistanceQuadratic: {"quadratic resistance", "a quadratic resistance", "s2/m5", ""},
	SurfaceTension:      {"surface tension", "a surface tension", "mN/m", ""},
}

// String returns the dimension's name in lower case: "length", "kv".
func (d Dim) String() string {
	if d < 0 || d >= numDims {
		return "unknown dimension"
	}
	return words[d].name
}

// Bare reports whether values of this dimension may be written without a unit.
func (d Dim) Bare() bool { return d >= Number && d <= Cv }
