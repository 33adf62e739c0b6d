package elements

import (
	"fmt"
	"sort"
)

// tableTrim is a trim given by rows: straight between them.
type tableTrim struct {
	x, phi []float64 // −
}

// NewTableTrim makes a trim of rows {travel, share of Kv}, both 0..1, straight between rows. Travel runs from 0 to 1 and rises from row to row; the share
// rises or stays, and is more than 0 at full travel.
func NewTableTrim(rows [][]float64) (Trim, error) {
	t := &tableTrim{}
	var f faults
	f.when(len(rows) < 2, "a trim needs at least two rows")
	for i, r := range rows {
		if len(r) != 2 {
			return nil, fmt.Errorf("row %d of the trim: travel and share of Kv are wanted", i+1)
		}
		f.when(Share(r[0]) != "" || Share(r[1]) != "", fmt.Sprintf("row %d: travel and share are from 0 %% to 100 %%", i+1))
		if i > 0 {
			f.when(r[0] <= rows[i-1][0], fmt.Sprintf("row %d: travel must rise from row to row", i+1))
			f.when(r[1] < rows[i-1][1], fmt.Sprintf("row %d: the share of Kv must not fall", i+1))
		}
		t.x, t.phi = append(t.x, r[0]), append(t.phi, r[1])
	}
	if n := len(rows); n > 1 {
		f.when(rows[0][0] != 0 || rows[n-1][0] != 1, "travel must run from 0 % to 100 %")
		f.when(rows[n-1][1] <= 0, "the share at full travel must be more than 0")
	}
	if err := f.err(); err != nil {
		return nil, err
	}
	return t, nil
}

func (e *tableTrim) Bind(*Params) {}
func (e *tableTrim) Ready() error { return nil }

// Share returns φ and dφ/dx at travel x, all −; at a row the slope is that of the travel above it.
func (e *tableTrim) Share(x float64) (phi, slope float64) {
	i := sort.Search(len(e.x)-2, func(i int) bool { return e.x[i+1] > x })
	slope = (e.phi[i+1] - e.phi[i]) / (e.x[i+1] - e.x[i])
	return e.phi[i] + (x-e.x[i])*slope, slope
}

// Corners returns the travels, −, at which the slope changes.
func (e *tableTrim) Corners() []float64 { return e.x[1 : len(e.x)-1] }

// LiquidRecovery returns F_L and its source.
func (e *tableTrim) LiquidRecovery() (float64, string) { return 0.90, fromIEC }
