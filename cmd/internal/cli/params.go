package cli

import (
	"strings"

	"headfall/elements"
	"headfall/elements/quantity"
)

// paramsOf asks a kind for its parameters.
func paramsOf(k *elements.Kind) []*elements.Param {
	var p elements.Params
	k.New().Bind(&p)
	return p.List
}

const unitsShown = 4

// written tells how a parameter is written: "length: mm, m, in".
func written(p *elements.Param) string {
	switch p.Form {
	case elements.Number:
		return measure(p.Dim)
	case elements.YesNo:
		return "yes or no"
	case elements.Word:
		return "one of " + strings.Join(p.Words, ", ")
	case elements.Name:
		return "a name"
	case elements.Table:
		var cols []string
		for _, d := range p.Cols {
			cols = append(cols, d.String())
		}
		return "rows [[" + strings.Join(cols, ", ") + "], …]"
	case elements.Nested:
		return choice(p.Room)
	case elements.Series:
		return "a list of: " + choice(p.Room)
	case elements.Levels:
		return "{level: TAG, above: 1 m} or below"
	case elements.Counts:
		return "counts by name"
	case elements.LevelRows:
		return measure(p.Dim) + ", or rows [[time, " + p.Dim.String() + "], …]"
	case elements.OwnDevice:
		return "{tag: TAG, open: yes or no}"
	case elements.Group:
		return "{" + strings.Join(keys(p.Inner.List), ", ") + "}"
	}
	return ""
}

func keys(list []*elements.Param) []string {
	var all []string
	for _, p := range list {
		all = append(all, p.Key)
	}
	return all
}

// measure names a dimension with the usual units of it.
func measure(d quantity.Dim) string {
	units := quantity.Units(d)
	if len(units) == 0 || d.Bare() {
		if d == quantity.Ratio {
			return "share, bare or %"
		}
		return d.String() + ", bare"
	}
	if len(units) > unitsShown {
		units = units[:unitsShown]
	}
	return d.String() + " (" + strings.Join(units, ", ") + " …)"
}

// choice lists the kinds of a room.
func choice(room elements.Room) string {
	var names []string
	for _, k := range elements.Kinds(room) {
		names = append(names, k.Name)
	}
	return "one of " + strings.Join(names, ", ")
}
