package friction

// Fitting is one usual fitting, fully open where it can be shut.
type Fitting struct {
	Name   string  // as in a plant file
	Says   string  // in words
	Ratio  float64 // L/D of Crane: K = L/D·f_T; 0 where K is given outright
	K      float64 // on the bore (narrower one); 0 where Ratio is given
	Source string
}

const (
	crane    = "Crane Technical Paper 410: K = L/D·f_T"
	practice = "common practice, no source"
)

var fittings = []Fitting{
	{"elbow_90", "standard 90° elbow", 30, 0, crane},
	{"elbow_90_long", "90° elbow of long radius, r/d 1.5", 14, 0, crane},
	{"elbow_45", "standard 45° elbow", 16, 0, crane},
	{"bend_180", "close return bend", 50, 0, crane},
	{"tee_run", "tee, flow straight through", 20, 0, crane},
	{"tee_branch", "tee, flow through the branch", 60, 0, crane},
	{"gate_open", "gate valve, open", 8, 0, crane},
	{"ball_open", "ball valve of full bore, open", 3, 0, crane},
	{"globe_open", "globe valve, open", 340, 0, crane},
	{"butterfly_open", "butterfly valve up to 200 mm, open", 45, 0, crane},
	{"swing_check", "swing check valve, held open", 100, 0, crane},
	{"reducer", "gradual reducer, on the narrow bore", 0, 0.1, practice},
	{"expander", "gradual expander, on the narrow bore", 0, 0.3, practice},
	{"strainer", "clean Y-strainer", 0, 2, practice},
}

// Fittings returns the table of usual fittings, in its order.
func Fittings() []Fitting { return append([]Fitting(nil), fittings...) }

// FittingNames returns their names, in the order of the table.
func FittingNames() []string {
	names := make([]string, len(fittings))
	for i, f := range fittings {
		names[i] = f.Name
	}
	return names
}

// FittingK returns the loss coefficient K (−), on its bore, m, of a usual fitting, and false when the name is unknown.
//
//	K = L/D·f_T
//
// with the friction factor f_T of fully rough flow in commercial steel pipe of that bore, whatever the pipe of the line is made of. Turbulent flow; handbooks
// differ by 25 % and more. Source: Crane Technical Paper 410, or as the table says.
func FittingK(name string, bore float64) (float64, bool) {
	for _, f := range fittings {
		if f.Name == name {
			if f.Ratio > 0 {
				return f.Ratio * SteelFriction(bore), true
			}
			return f.K, true
		}
	}
	return 0, false
}

// SteelFriction returns f_T (−), the Darcy friction factor of fully rough flow in commercial steel pipe (ε 0.0457 mm) of a bore, m.
//
// Source: Crane Technical Paper 410, A-26.
func SteelFriction(bore float64) float64 {
	const steel = 4.57e-5
	return FullyRough(min(steel/bore, 0.05))
}
