package elementtest

import (
	"fmt"
	"strconv"

	"headfall/elements"
	"headfall/elements/quantity"
)

// Build makes an element of a kind from parameters written in braces, and readies it.
func Build(room elements.Room, kind, text string) (elements.Element, error) {
	n, err := read(text)
	if err != nil {
		return nil, err
	}
	e, err := build(room, kind, n)
	if err != nil {
		return nil, fmt.Errorf("%s %s %s: %w", room, kind, text, err)
	}
	return e, e.Ready()
}

func build(room elements.Room, kind string, n *node) (elements.Element, error) {
	k := elements.Lookup(room, kind)
	if k == nil {
		return nil, fmt.Errorf("no %s %q", room, kind)
	}
	e := k.New()
	p := &elements.Params{}
	e.Bind(p)
	return e, fill(p, n)
}

// fill sets the parameters from the mapping.
func fill(p *elements.Params, n *node) error {
	used := map[string]bool{}
	for _, q := range p.List {
		if q.Form == elements.Counts {
			for _, w := range q.Words {
				if v := n.of[w]; v != nil {
					c, err := strconv.Atoi(v.text)
					if err != nil {
						return err
					}
					q.Count[w], used[w] = c, true
				}
			}
			continue
		}
		v := n.of[q.Key]
		if v == nil {
			if q.Need == elements.Required {
				return fmt.Errorf("%s is missing", q.Key)
			}
			continue
		}
		used[q.Key] = true
		if q.Given != nil {
			*q.Given = true
		}
		if err := set(q, v); err != nil {
			return fmt.Errorf("%s: %w", q.Key, err)
		}
	}
	for _, key := range n.keys {
		if !used[key] {
			return fmt.Errorf("unknown key %q", key)
		}
	}
	return nil
}

func set(q *elements.Param, n *node) (err error) {
	switch q.Form {
	case elements.Number:
		return number(q, n.text)
	case elements.YesNo:
		*q.Bool = n.text == "yes"
	case elements.Word, elements.Name:
		*q.Text = n.text
	case elements.Table:
		*q.Rows, err = rows(n, q.Cols...)
	case elements.LevelRows:
		if n.list != nil {
			*q.Rows, err = rows(n, quantity.Time, q.Dim)
			return err
		}
		v, err := quantity.Parse(n.text, q.Dim)
		*q.Rows = [][]float64{{0, v.SI}}
		return err
	case elements.Nested:
		return nested(q.Room, n, q.Set)
	case elements.Series:
		for _, one := range n.list {
			if err := nested(q.Room, one, q.Add); err != nil {
				return err
			}
		}
	case elements.Levels:
		return level(q.Switch, n)
	case elements.OwnDevice:
		q.Device.Tag, q.Device.Open, q.Device.Given = n.of["tag"].text, n.of["open"].text == "yes", true
	case elements.Group:
		return fill(q.Inner, n)
	default:
		return fmt.Errorf("form %d is not known here", q.Form)
	}
	return err
}

func number(q *elements.Param, text string) error {
	v, err := quantity.Parse(text, q.Dim)
	if err != nil {
		return err
	}
	for _, check := range q.Checks {
		if want := check(v.SI); want != "" {
			return fmt.Errorf("%s: %s is wanted", text, want)
		}
	}
	*q.Num = v.SI
	if q.Doubt != nil {
		*q.Doubt = v
	}
	return nil
}

func rows(n *node, dims ...quantity.Dim) (all [][]float64, err error) {
	for _, line := range n.list {
		row := make([]float64, len(dims))
		if len(line.list) != len(dims) {
			return nil, fmt.Errorf("a row of %d is wanted", len(dims))
		}
		for i, cell := range line.list {
			v, err := quantity.Parse(cell.text, dims[i])
			if err != nil {
				return nil, err
			}
			row[i] = v.SI
		}
		all = append(all, row)
	}
	return all, nil
}

// nested makes an element from a bare word or a mapping of one key.
func nested(room elements.Room, n *node, set func(elements.Element, string) error) error {
	kind, inner := n.text, &node{}
	if len(n.keys) == 1 {
		kind = n.keys[0]
		inner = n.of[kind]
	}
	e, err := build(room, kind, inner)
	if err != nil {
		return err
	}
	return set(e, kind)
}

func level(s *elements.LevelSwitch, n *node) error {
	side := "below"
	if s.Above = n.of["above"] != nil; s.Above {
		side = "above"
	}
	v, err := quantity.Parse(n.of[side].text, quantity.Length)
	s.Vessel, s.Level, s.Given = n.of["level"].text, v.SI, true
	return err
}
