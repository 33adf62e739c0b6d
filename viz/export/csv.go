package export

import (
	"encoding/csv"
	"io"

	"headfall/network"
)

// CSV writes the series of r: one row a sample, SI units named in the header (T-1.level_m). The clock column is empty when the plant states no
// start. A cell without a number is empty.
func CSV(w io.Writer, plant *network.Plant, r *network.Result) error {
	cols := Columns(plant, r)
	out := csv.NewWriter(w)
	row := []string{"time_s", "clock"}
	for _, c := range cols {
		row = append(row, c.Name())
	}
	if err := out.Write(row); err != nil {
		return err
	}
	if r.Series != nil {
		for i, t := range r.Series.Time {
			row = append(row[:0], number(t), Clock(plant.Start, t))
			for _, c := range cols {
				cell := ""
				if i < len(c.Values) {
					cell = number(c.Values[i])
				}
				row = append(row, cell)
			}
			if err := out.Write(row); err != nil {
				return err
			}
		}
	}
	out.Flush()
	return out.Error()
}
