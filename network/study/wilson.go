package study

import (
	"math"

	"gonum.org/v1/gonum/stat/distuv"
)

// Wilson returns the score interval of a chance of which k of n trials came, at a confidence of, say, 0.95.
//
//	(p + z²/2n ± z·√(p(1−p)/n + z²/4n²)) / (1 + z²/n), p = k/n
//
// Source: E. B. Wilson, J. Am. Stat. Assoc. 22 (1927) 209. gonum has none.
func Wilson(k, n int, confidence float64) (low, high float64) {
	if n == 0 {
		return 0, 1
	}
	z := distuv.UnitNormal.Quantile(0.5 + confidence/2)
	m, p := float64(n), float64(k)/float64(n)
	middle := p + z*z/(2*m)
	half := z * math.Sqrt(p*(1-p)/m+z*z/(4*m*m))
	all := 1 + z*z/m
	low, high = (middle-half)/all, (middle+half)/all
	if k == 0 {
		low = 0
	}
	if k == n {
		high = 1
	}
	return low, high
}
