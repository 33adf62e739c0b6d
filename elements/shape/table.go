package shape

import "fmt"

// Table returns the shape of a table of rows {level, m; volume, m³}, straight between rows, or smooth: see between.
//
//	straight: V(h) = V_i + A_i·(h − h_i),  A_i = (V_{i+1} − V_i)/(h_{i+1} − h_i)
//
// A row where the area jumps by more than 1 % is a corner; a smaller kink is rounded over ±0.5 mm (see soften). The levels are above the lowest
// inside point, where the volume is 0; a table that starts higher is taken straight down to there. Source: strapping table of the vessel.
// Range: levels and volumes both increase, no section under 1 cm².
func Table(rows [][2]float64, smooth bool) (Shape, error) {
	rows, err := checkRows(rows)
	if err != nil {
		return nil, err
	}
	var slices []slice
	if smooth {
		slices = smoothSlices(rows)
	} else {
		for i := 1; i < len(rows); i++ {
			h := rows[i][0] - rows[i-1][0]
			slices = append(slices, slice{piece: prismOf((rows[i][1] - rows[i-1][1]) / h), h: h})
		}
		slices = soften(slices)
	}
	b := pile(slices)
	for i := range b.slices {
		b.slices[i].rim = always(round(b.largest))
	}
	return b, nil
}

// checkRows returns the rows, from {0, 0} up, or all that is wrong with them.
func checkRows(rows [][2]float64) ([][2]float64, error) {
	var f faults
	if len(rows) == 0 {
		f.add("rows are missing: give level and volume, two rows at least")
		return nil, f.err("table")
	}
	first, added := rows[0], 0
	switch {
	case first[0] < 0 || first[1] < 0:
		f.add("row 1: levels and volumes start at 0, the lowest inside point")
	case first[0] == 0 && first[1] > 0:
		f.add("row 1: at level 0, the lowest inside point, the volume must be 0; give the levels above that point")
	case first[0] > 0 && first[1] == 0:
		f.add("row 1: there is no volume at level %s; levels are above the lowest inside point", metres(first[0]))
	case first[0] > 0:
		rows, added = append([][2]float64{{}}, rows...), 1
	}
	if len(rows) < 2 {
		f.add("two rows at least are needed, there is one")
	}
	for i := 1; i < len(rows); i++ {
		row := fmt.Sprintf("row %d", i+1-added)
		dh, dv := rows[i][0]-rows[i-1][0], rows[i][1]-rows[i-1][1]
		if !(dh > 0) || !(dv > 0) {
			f.add("%s: level and volume must both increase from row to row", row)
		} else {
			f.section(row+": the section below it", dv/dh)
		}
	}
	return rows, f.err("table")
}
