package elements

const (
	fromIEC     = "typical values of IEC 60534-2-1, from memory"
	noSource    = "common practice, no source"
	throughBody = "M0 12H2M22 12H24M2 5V19L22 5V19Z" // a trim is inside a valve
	inherent    = "inherent, as made: travel x and share φ of Kv from 0 to 1"
)

// curveTrim is a trim without parameters.
type curveTrim struct {
	curve  func(x float64) (phi, slope float64)
	fl, fd float64 // −
}

func (e *curveTrim) Bind(*Params) {}
func (e *curveTrim) Ready() error { return nil }

// Share returns φ and dφ/dx at travel x, all −.
func (e *curveTrim) Share(x float64) (phi, slope float64) { return e.curve(x) }

// LiquidRecovery returns F_L and its source.
func (e *curveTrim) LiquidRecovery() (float64, string) { return e.fl, fromIEC }

// StyleModifier returns F_d (−) of IEC 60534-2-1.
func (e *curveTrim) StyleModifier() float64 { return e.fd }
