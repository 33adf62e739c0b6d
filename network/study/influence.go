package study

import (
	"cmp"
	"math"
	"slices"
	"sort"

	"gonum.org/v1/gonum/stat"
)

// Influence is how much one doubt moves a number of the result.
type Influence struct {
	What  string  `json:"what"`
	Doubt string  `json:"doubt"`
	Rank  float64 `json:"rank_correlation"` // Spearman's, −1 to 1
	Share float64 `json:"share_of_variance"`
}

// ranks returns the ranks of values, from 1, the mean rank for ties; what never came (NaN) ranks last.
func ranks(values []float64) []float64 {
	order := make([]int, len(values))
	for i := range order {
		order[i] = i
	}
	key := func(i int) float64 {
		if math.IsNaN(values[i]) {
			return math.Inf(1)
		}
		return values[i]
	}
	sort.SliceStable(order, func(a, b int) bool { return key(order[a]) < key(order[b]) })
	r := make([]float64, len(values))
	for i := 0; i < len(order); {
		k := i
		for k < len(order) && key(order[k]) == key(order[i]) {
			k++
		}
		for _, at := range order[i:k] {
			r[at] = float64(i+1+k) / 2
		}
		i = k
	}
	return r
}

// influences returns what each doubt does to a number over the samples, the strongest first: Spearman's rank correlation ρ, and the share of the
// variance of the ranks that goes back to the doubt, ρ² less what comes by chance alone (1/(n−1)). Doubts are drawn independently, so that shares add up
// to one less what is due to their acting together. What moves nothing beyond chance is left out; so is all when the number stands still.
func influences(doubts []Doubt, drawn [][]float64, values []float64) []Influence {
	all := []Influence{}
	if len(values) < 3 || unmoved(values) {
		return all
	}
	r := ranks(values)
	chance := 1 / float64(len(values)-1)
	for k, d := range doubts {
		rho := stat.Correlation(drawn[k], r, nil)
		if share := rho*rho - chance; share > 3*chance { // ρ² passes 4/(n−1) by chance once in about 20
			all = append(all, Influence{d.Name, d.Says, rho, share})
		}
	}
	slices.SortStableFunc(all, func(a, b Influence) int { return cmp.Compare(b.Share, a.Share) })
	return all
}

func unmoved(values []float64) bool {
	for _, v := range values {
		if v != values[0] && !(math.IsNaN(v) && math.IsNaN(values[0])) {
			return false
		}
	}
	return true
}
