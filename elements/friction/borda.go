package friction

// Expansion returns the loss coefficient K (−), on the narrow bore, of a sudden widening from diameter narrow to diameter wide, both m:
//
//	K = (1 − β²)²,  β = narrow/wide.
//
// Turbulent flow. Source: Borda–Carnot, from the balance of momentum.
func Expansion(narrow, wide float64) float64 {
	b := narrow / wide
	k := 1 - b*b
	return k * k
}

// Contraction returns the loss coefficient K (−), on the narrow bore, of a sudden narrowing from diameter wide to diameter narrow, both m:
//
//	K = 0.5·(1 − β²),  β = narrow/wide.
//
// Turbulent flow; published correlations differ by up to a third. Source: Crane Technical Paper 410.
func Contraction(narrow, wide float64) float64 {
	b := narrow / wide
	return 0.5 * (1 - b*b)
}
