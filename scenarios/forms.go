package scenarios

import (
	"fmt"
	"math"

	"headfall/elements"
	"headfall/elements/quantity"
)

func (d *decoder) tableParam(q *elements.Param) field {
	return field{written: &writing{style: aTable, cols: q.Cols}, read: func(n *node, _ string) {
		if rows, ok := d.table(n, q.Key, q.Cols); ok && d.increasing(n, q.Key, rows, false) {
			*q.Rows = rows
		}
	}}
}

func (d *decoder) nestedParam(q *elements.Param) field {
	return d.kindField(q.Room, q.Key, q.Need, q.Help, func(c chosen, n *node) {
		if err := q.Set(c.element, c.kind); err != nil {
			d.problem(n, q.Key+": "+err.Error(), d.example(q.Room, q.Key))
		}
	})
}

func (d *decoder) seriesParam(q *elements.Param) field {
	item := writing{style: aKind, room: q.Room}
	return field{written: &writing{style: aList, item: &item, least: 1}, read: func(n *node, owner string) {
		d.list(n, q.Key, func(i int, entry *node) {
			name := func(string, *node) string { return fmt.Sprintf("%s.%s[%d]", owner, q.Key, i+1) }
			c, ok := d.element(q.Room, entry, q.Key, name)
			if !ok || !d.ready(c, entry) {
				return
			}
			if err := q.Add(c.element, c.kind); err != nil {
				d.problem(entry, q.Key+": "+err.Error(), d.example(q.Room, q.Key))
			}
		})
	}}
}

// switchParam reads a level at which something starts or stops.
func (d *decoder) switchParam(q *elements.Param) field {
	return field{written: &writing{style: aCondition, words: []string{"level"}}, read: func(n *node, owner string) {
		height, above := math.NaN(), false
		side := func(key string, up bool) field {
			f := d.number(&q.Switch.Level, key, quantity.Length, elements.Optional, "")
			read := f.read
			f.read = func(n *node, owner string) { read(n, owner); height, above = q.Switch.Level, up }
			f.absent = nil
			return f
		}
		fields := []field{d.tagField(&q.Switch.Vessel, "level", elements.Required, "", aVessel), side("above", true), side("below", false)}
		if _, ok := d.one(n, q.Key, "above", "below"); d.mapping(n, q.Key, sub(owner, q.Key), fields) && ok && !math.IsNaN(height) {
			q.Switch.Above, q.Switch.Given = above, true
		}
	}}
}

func (d *decoder) courseParam(q *elements.Param) field {
	quantities := writing{style: aQuantity, dim: q.Dim, or: &writing{style: aTable, cols: []quantity.Dim{quantity.Time, q.Dim}}}
	return field{written: &quantities, read: func(n *node, owner string) { d.course(n, owner, q.Key, q.Dim, q.Rows, q.Checks) }}
}

// deviceParam reads a small vent that people open and shut.
func (d *decoder) deviceParam(q *elements.Param) field {
	return field{written: &writing{style: anObject, name: q.Key, fields: func() []field { return d.deviceFields(new(elements.Device)) }},
		read: func(n *node, owner string) {
			if d.mapping(n, q.Key, sub(owner, q.Key), d.deviceFields(q.Device)) {
				q.Device.Given = true
			}
		}}
}

func (d *decoder) deviceFields(v *elements.Device) []field {
	return []field{
		{key: "tag", need: elements.Required, help: "tag of the vent, which steps name", written: aTagWritten, read: func(n *node, _ string) {
			if t := d.declare(n, aDevice); t != nil {
				v.Tag, t.device = n.text, v
			}
		}},
		d.openShut(&v.Open, "open", "whether it is open at the start"),
	}
}

// counts adds a field for every word that is counted.
func (d *decoder) counts(fields []field, q *elements.Param) []field {
	for _, w := range q.Words {
		fields = append(fields, field{key: w, help: q.Help, written: inUnits(quantity.Count), read: func(n *node, _ string) {
			if v, ok := d.fixed(n, w, quantity.Count, elements.NotNegative); ok && v.SI > 1e6 {
				d.problem(n, w+" is more than anyone has", "it is a count of pieces")
			} else if ok {
				q.Count[w] = int(v.SI)
				if q.Given != nil {
					*q.Given = true
				}
			}
		}})
	}
	return fields
}
