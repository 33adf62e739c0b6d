package scenarios

import (
	"fmt"

	"headfall/elements"
)

// params turns the parameters of an element into fields.
func (d *decoder) params(e elements.Element) []field {
	var p elements.Params
	e.Bind(&p)
	return d.paramsOf(&p)
}

func (d *decoder) paramsOf(p *elements.Params) []field {
	size := len(p.List)
	for _, q := range p.List {
		if q.Form == elements.Counts {
			size += len(q.Words)
		}
	}
	fields := make([]field, 0, size)
	for _, q := range p.List {
		if q.Form == elements.Counts {
			fields = d.counts(fields, q)
			continue
		}
		f := d.param(q)
		f.key, f.need, f.help = q.Key, q.Need, q.Help
		f.absent = d.defaulted(q)
		if read := f.read; q.Given != nil {
			f.read = func(n *node, owner string) { *q.Given = true; read(n, owner) }
		}
		fields = append(fields, f)
	}
	return fields
}

// param makes the field of one parameter by its form.
func (d *decoder) param(q *elements.Param) field {
	switch q.Form {
	case elements.Number:
		return d.numberParam(q)
	case elements.YesNo:
		return d.yesNo(q.Bool, q.Key, q.Need, q.Help)
	case elements.Word:
		return d.word(q.Text, q.Key, q.Need, q.Help, q.Words...)
	case elements.Name:
		return d.freeText(q.Text, q.Key, q.Need, q.Help)
	case elements.Table:
		return d.tableParam(q)
	case elements.Nested:
		return d.nestedParam(q)
	case elements.Series:
		return d.seriesParam(q)
	case elements.Levels:
		return d.switchParam(q)
	case elements.LevelRows:
		return d.courseParam(q)
	case elements.OwnDevice:
		return d.deviceParam(q)
	case elements.Group:
		return d.groupParam(q)
	}
	panic(fmt.Sprintf("scenarios: parameter %s has a form that is not read: %d", q.Key, q.Form))
}

func (d *decoder) numberParam(q *elements.Param) field {
	f := d.number(q.Num, q.Key, q.Dim, q.Need, q.Help, q.Checks...)
	read := f.read
	f.read = func(n *node, owner string) {
		read(n, owner)
		if q.Doubt != nil && n.form == scalar {
			*q.Doubt = d.cache[written{n.text, q.Dim}].value
		}
	}
	return f
}

// defaulted notes a parameter that has a default and was not written, and enters its number.
func (d *decoder) defaulted(q *elements.Param) func(n *node, owner string) {
	if q.Default == "" {
		return nil
	}
	return func(n *node, owner string) {
		d.assumed(owner, q.Key, q.Default)
		if q.Form == elements.Number {
			d.unwritten(n, owner, q.Key, q.Dim, q.Num, q.Checks)
		}
	}
}

// groupParam reads parameters that belong together, under a key of their own.
func (d *decoder) groupParam(q *elements.Param) field {
	inner := func() []field { return d.paramsOf(q.Inner) }
	return field{written: &writing{style: anObject, name: q.Key, fields: inner}, read: func(n *node, owner string) {
		d.mapping(n, q.Key, sub(owner, q.Key), inner())
	}}
}
