package integrate

// Tableau is a Rosenbrock–Wanner method as data, in the transformed form that needs no product with the Jacobian (Hairer and Wanner, Solving
// Ordinary Differential Equations II, 2nd ed., IV.7). With J = ∂f/∂y and everything of the linearisation taken at the start of the step:
//
//	(M/(hγ) − J) Uᵢ = f(t₀+cᵢh, y₀+Σ_{j<i} aᵢⱼUⱼ) + M Σ_{j<i} (Cᵢⱼ/h) Uⱼ + dᵢ h ∂f/∂t
//	y₁ = y₀ + Σ mᵢUᵢ,   error estimate Σ eᵢUᵢ
//	k_r = Σ H_{ri}Uᵢ,   y(t₀+θh) = (1−θ)y₀ + θ(y₁ + (1−θ)(k₁ + θ(k₂ + θk₃)))
//
// Tables are shared and must not be changed.
type Tableau struct {
	Title                       string
	Order, Embedded, DenseOrder int
	Gamma                       float64
	A, C                        [][]float64 // row i has i entries
	M, E                        []float64   // weights of the result and of the error estimate
	Node, D                     []float64   // cᵢ, and dᵢ = Σⱼ γᵢⱼ
	H                           [][]float64 // dense output
}

// Name implements Method.
func (m *Tableau) Name() string { return m.Title }

func (m *Tableau) stages() int { return len(m.M) }

// extends reports whether stage i starts where stage i−1 would end: its row of A is that of stage i−1 with a one appended.
func (m *Tableau) extends(i int) bool {
	if i == 0 || m.A[i][i-1] != 1 {
		return false
	}
	for j, a := range m.A[i-1] {
		if m.A[i][j] != a {
			return false
		}
	}
	return true
}

// stiffly reports whether the method is stiffly accurate with the last stage as error estimate: y₁ is the last stage's point plus U.
func (m *Tableau) stiffly() bool {
	s := m.stages() - 1
	for j := range s {
		if m.M[j] != m.A[s][j] || m.E[j] != 0 {
			return false
		}
	}
	return m.M[s] == 1 && m.E[s] == 1
}
