package scenarios

import (
	"fmt"

	"headfall/elements"
	"headfall/elements/quantity"
)

// table reads rows of quantities.
func (d *decoder) table(n *node, key string, cols []quantity.Dim) ([][]float64, bool) {
	shape := fmt.Sprintf("%s is rows of %d values", key, len(cols))
	example := "e.g. " + key + ": " + tableSample(cols)
	if n.form != list || len(n.items) == 0 {
		d.problem(n, shape, example)
		return nil, false
	}
	rows, ok := make([][]float64, 0, len(n.items)), true
	for _, r := range n.items {
		if r.form != list || len(r.items) != len(cols) {
			d.problem(r, shape, example)
			ok = false
			continue
		}
		row := make([]float64, len(cols))
		for i, cell := range r.items {
			v, good := d.fixed(cell, key, cols[i])
			if v.Kinematic {
				d.problem(cell, key+": a dynamic viscosity is wanted here", "e.g. 24 mPa.s")
			}
			row[i], ok = v.SI, ok && good && !v.Kinematic
		}
		rows = append(rows, row)
	}
	return rows, ok
}

// increasing notes rows whose first column does not grow; two equal ones are a step where that is allowed.
func (d *decoder) increasing(n *node, key string, rows [][]float64, steps bool) bool {
	for i := 1; i < len(rows); i++ {
		step := steps && rows[i][0] == rows[i-1][0] && (i < 2 || rows[i-2][0] < rows[i][0])
		if !(rows[i][0] > rows[i-1][0]) && !step {
			d.problem(n.items[i].items[0], key+": rows do not increase", fmt.Sprintf("it is %s in the row before", quoted(n.items[i-1].items[0].text)))
			return false
		}
	}
	return true
}

// course reads one quantity, or rows of time and quantity.
func (d *decoder) course(n *node, owner, key string, dim quantity.Dim, to *[][]float64, checks []elements.Check) {
	if n.form == scalar {
		v, ok := d.quantity(n, key, dim)
		if ok && d.check(n, key, v, checks) {
			*to = [][]float64{{0, v.SI}}
			d.register(n, owner, key, v, &(*to)[0][1], checks)
		}
		return
	}
	if n.form != list || len(n.items) == 0 {
		d.problem(n, key+" is one value, or rows of time and value", "e.g. "+key+": "+tableSample([]quantity.Dim{quantity.Time, dim}))
		return
	}
	rows, ok := make([][]float64, 0, len(n.items)), true
	for _, r := range n.items {
		if r.form != list || len(r.items) != 2 {
			d.problem(r, key+" is rows of time and value", "e.g. "+key+": "+tableSample([]quantity.Dim{quantity.Time, dim}))
			ok = false
			continue
		}
		at, okT := d.moment(r.items[0], key)
		v, okV := d.fixed(r.items[1], key, dim, checks...)
		rows, ok = append(rows, []float64{at.S, v.SI}), ok && okT && okV
	}
	if ok && d.increasing(n, key, rows, true) {
		*to = rows
	}
}
