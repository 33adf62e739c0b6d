package study

import (
	"math"

	"gonum.org/v1/gonum/mat"
)

// tangle returns the condition number of the weighted slopes, columns scaled to length one, and the correlation of the numbers that they lead to.
//
// Source: Belsley, Kuh and Welsch, Regression Diagnostics (1980): from 30 on, columns cannot be told apart.
func tangle(s *solved) (condition float64, correlation [][]float64) {
	n := len(s.x)
	j := unitColumns(s)
	var svd mat.SVD
	if !svd.Factorize(j, mat.SVDNone) {
		return math.Inf(1), nil
	}
	values := svd.Values(nil)
	condition = math.Inf(1)
	if low := values[len(values)-1]; low > 1e-12 && len(values) == n {
		condition = values[0] / low
	}
	var square, inv mat.Dense
	square.Mul(j.T(), j)
	if math.IsInf(condition, 1) || inv.Inverse(&square) != nil {
		return condition, nil
	}
	for a := range n {
		row := make([]float64, n)
		for c := range n {
			row[c] = inv.At(a, c) / math.Sqrt(inv.At(a, a)*inv.At(c, c))
		}
		correlation = append(correlation, row)
	}
	return condition, correlation
}

// unitColumns returns the weighted slopes with every column made of length one; one of nothing stays as it is.
func unitColumns(s *solved) *mat.Dense {
	j := mat.NewDense(len(s.r), len(s.x), nil)
	for k := range s.x {
		var sum float64
		for i := range s.r {
			v := math.Sqrt(s.w[i]) * s.jacobian.At(i, k)
			j.Set(i, k, v)
			sum += v * v
		}
		if sum = math.Sqrt(sum); sum > 0 {
			for i := range s.r {
				j.Set(i, k, j.At(i, k)/sum)
			}
		}
	}
	return j
}
