package study

import (
	"encoding/json"
	"math"
)

// gaps are numbers of which some never came: NaN here, null in JSON.
type gaps []float64

// MarshalJSON writes null for NaN.
func (g gaps) MarshalJSON() ([]byte, error) {
	list := make([]*float64, len(g))
	for i := range g {
		if !math.IsNaN(g[i]) && !math.IsInf(g[i], 0) {
			list[i] = &g[i]
		}
	}
	return json.Marshal(list)
}

// UnmarshalJSON reads null as NaN.
func (g *gaps) UnmarshalJSON(data []byte) error {
	var list []*float64
	if err := json.Unmarshal(data, &list); err != nil {
		return err
	}
	*g = make(gaps, len(list))
	for i, v := range list {
		if (*g)[i] = math.NaN(); v != nil {
			(*g)[i] = *v
		}
	}
	return nil
}
