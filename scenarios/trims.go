package scenarios

import (
	"headfall/elements"
	"headfall/elements/quantity"
)

var trimColumns = []quantity.Dim{quantity.Ratio, quantity.Ratio}

// trim reads one named trim of the file.
func (d *decoder) trim(key, n *node) {
	if elements.Lookup(elements.Trims, key.text) != nil {
		d.problem(key, key.text+" is the name of a trim already", "give it another name")
		return
	}
	d.trims[key.text] = nil
	rows, ok := d.table(n, key.text, trimColumns)
	if !ok || !d.increasing(n, key.text, rows, false) {
		return
	}
	if _, err := elements.NewTableTrim(rows); err != nil {
		for _, one := range split(err) {
			d.problem(spokenOf(n, n, one.Error()), key.text+": "+one.Error(), "e.g. "+key.text+": "+tableSample(trimColumns))
		}
		return
	}
	d.trims[key.text] = rows
}

// namedTrim makes the element of a trim of the file; one that had a fault stands for a straight line, so that only its own fault is told.
func (d *decoder) namedTrim(word *node) (chosen, bool) {
	rows := d.trims[word.text]
	if rows == nil {
		rows = [][]float64{{0, 0}, {1, 1}}
	}
	t, err := elements.NewTableTrim(rows)
	if err != nil {
		return chosen{}, false
	}
	return chosen{element: t, kind: word.text, body: word}, true
}
