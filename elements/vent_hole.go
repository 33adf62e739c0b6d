package elements

func init() {
	Register(Kind{
		Name: "hole", Room: Vents,
		Doc:    "An open hole or pipe stub in the roof.",
		Law:    "ṁ = Cd·A·p₁/√(R·T)·ψ(p₂/p₁), kg/s, subcritical and choked, both ways; A in m², p in Pa absolute, T in K",
		Valid:  "air; a short hole, no length of pipe",
		Source: "isentropic nozzle with a discharge coefficient, compressible-flow textbooks; Cd 0.6: common practice, no source",
		Symbol: "M3 18H9V6M15 6V18H21",
		New:    func() Element { return &hole{cd: 0.6} },
		Sample: "{bore: 50 mm}",
	})
}

type hole struct {
	bore, cd, blocked float64 // m, −, −
	area              float64 // m², Cd·A of what is open
}

func (e *hole) Bind(p *Params) {
	p.Length(&e.bore, "bore", Required, "clear bore", Positive)
	p.Ratio(&e.cd, "cd", Optional, "discharge coefficient", Coefficient).Or("0.6")
	p.Ratio(&e.blocked, "blocked", Optional, "share of the area that is blocked", Share).Or("0 %")
}

func (e *hole) Ready() error {
	e.area = e.cd * circle(e.bore) * (1 - e.blocked)
	return nil
}

func (e *hole) Flow(p, p0, T float64, at *Local) (m, byP float64) {
	m, byP = airIn(p, p0, T, &at.keep().air)
	return e.area * at.Opening * m, e.area * at.Opening * byP
}

func (e *hole) Bore() float64 { return e.bore }

// Blocked returns the share of the opening that was stated to be blocked, −; it is in Flow already.
func (e *hole) Blocked() float64 { return e.blocked }
