package study

import (
	"math"

	"gonum.org/v1/gonum/mat"
	"gonum.org/v1/gonum/stat/distuv"
)

// certainty is how well the numbers of a solved fit are known, on their own scales.
type certainty struct {
	half        []float64   // half-width of the 95 % band, from the readings alone
	correlation [][]float64 // between the numbers
	condition   float64     // of the slopes, each column made of length one; Inf when a number moves nothing
	dead        []bool      // numbers that move no reading
	inverse     *mat.Dense  // (JᵀWJ)⁻¹; nil when singular
	persistence float64
}

// deadSlope is the slope, m for the whole scale of a number, under which it moves no reading: a run is not more exact than that.
const deadSlope = 1e-5

// certaintyOf works out how well the numbers are known. The covariance is Huber's for M-estimates, s²·Σψ²/(n−p)/(mean ψ′)²·(JᵀJ)⁻¹; where
// residuals follow one another with correlation ρ it is widened by (1+ρ)/(1−ρ), as the variance of a mean is by a first-order process.
//
// Source: Huber, Robust Statistics (1981), 7.6; Bayley and Hammersley, J. Roy. Statist. Soc. Suppl. 8 (1946).
func certaintyOf(s *solved) *certainty {
	n := len(s.x)
	c := &certainty{half: make([]float64, n), dead: deadOf(s), condition: math.Inf(1)}
	for k := range c.half {
		c.half[k] = math.Inf(1)
	}
	c.condition, c.correlation = tangle(s)
	var counted, weight, square, bend float64
	for i, w := range s.w {
		u := s.r[i] / s.scatter
		weight += w
		square += w * w * u * u
		if v := u / tukeyEdge; math.Abs(v) < 1 {
			counted++
			bend += (1 - v*v) * (1 - 5*v*v)
		}
	}
	free := counted - float64(n)
	a, _ := s.normal()
	var inv mat.Dense
	if c.condition > 1e7 || free <= 0 || inv.Inverse(a) != nil {
		return c
	}
	c.inverse = &inv
	c.persistence = math.Min(0.9, persistence(s.r, s.w))
	m := math.Max(0.3, bend/counted)
	variance := s.scatter * s.scatter * square / free / (m * m) * weight / counted // (JᵀJ)⁻¹ is (JᵀWJ)⁻¹ by the mean weight
	variance *= (1 + c.persistence) / (1 - c.persistence)
	t := distuv.StudentsT{Mu: 0, Sigma: 1, Nu: free}.Quantile(0.975)
	for k := range n {
		c.half[k] = t * math.Sqrt(math.Max(0, variance*inv.At(k, k)))
	}
	return c
}

// deadOf tells which numbers move no reading.
func deadOf(s *solved) []bool {
	dead := make([]bool, len(s.x))
	for k := range dead {
		var most float64
		for i := range s.r {
			most = math.Max(most, math.Abs(s.jacobian.At(i, k)))
		}
		dead[k] = most < deadSlope
	}
	return dead
}

// pulled returns by how much the fitted numbers move when the residuals move by dr: −(JᵀWJ)⁻¹JᵀW·dr.
func (c *certainty) pulled(s *solved, dr []float64) []float64 {
	n := len(s.x)
	out := make([]float64, n)
	if c.inverse == nil {
		return out
	}
	g := make([]float64, n)
	for i := range dr {
		for k := range n {
			g[k] += s.w[i] * s.jacobian.At(i, k) * dr[i]
		}
	}
	for k := range n {
		for m := range n {
			out[k] -= c.inverse.At(k, m) * g[m]
		}
	}
	return out
}
