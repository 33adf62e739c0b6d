package scenarios

import (
	"errors"
	"fmt"
	"math"
	"strings"
	"unicode"
	"unicode/utf8"

	"headfall/elements"
	"headfall/elements/quantity"
)

// text reports whether a node is one scalar with something in it, and notes it when not.
func (d *decoder) text(n *node, key string) bool {
	switch {
	case n.form != scalar:
		d.problem(n, key+" is one value, not "+map[form]string{mapping: "keys with values", list: "a list"}[n.form], "write one value behind "+key+":")
	case n.empty:
		d.problem(n, key+" has no value", "write one behind "+key+":, or leave "+key+" out")
	default:
		return true
	}
	return false
}

// quantity reads a number with its unit and doubt.
func (d *decoder) quantity(n *node, key string, dim quantity.Dim) (quantity.Value, bool) {
	if !d.text(n, key) {
		return quantity.Value{}, false
	}
	if r, ok := d.cache[written{n.text, dim}]; ok {
		n.echo = r.echo
		return r.value, true
	}
	v, err := quantity.Parse(n.text, dim)
	if err != nil {
		d.badValue(n, key, dim, err)
		return v, false
	}
	n.echo = v.Echo()
	d.cache[written{n.text, dim}] = reading{v, n.echo}
	return v, true
}

// badText notes what a reader of texts found.
func (d *decoder) badText(n *node, key string, err error) {
	var q *quantity.Error
	if errors.As(err, &q) {
		d.within(n, q.Offset, q.Length, key+": "+q.Msg, q.Hint)
		return
	}
	d.problem(n, key+": "+err.Error(), "write it anew")
}

// badValue notes what the reader of quantities found. Where it could only show any value of the dimension, what is usual for the key is shown.
func (d *decoder) badValue(n *node, key string, dim quantity.Dim, err error) {
	var q *quantity.Error
	if errors.As(err, &q) {
		u := d.usually(key, dim)
		switch {
		case q.Number != "":
			q.Hint = "e.g. " + strings.TrimSpace(q.Number+" "+u.unit(q.Number, dim))
		case q.Example:
			q.Hint = "e.g. " + u.example
		}
	}
	d.badText(n, key, err)
}

// fixed reads a number that can carry no doubt.
func (d *decoder) fixed(n *node, key string, dim quantity.Dim, checks ...elements.Check) (quantity.Value, bool) {
	v, ok := d.quantity(n, key, dim)
	if ok && v.Doubt.Stated() {
		d.problem(n, key+" carries no doubt", "write one value")
		return v, false
	}
	return v, ok && d.check(n, key, v, checks)
}

// check applies the conditions on a number, also to the ends of a range.
func (d *decoder) check(n *node, key string, v quantity.Value, checks []elements.Check) bool {
	values := []float64{v.SI}
	if v.Doubt.Kind == quantity.Uniform {
		values = append(values, v.Doubt.Low, v.Doubt.High)
	}
	for _, x := range values {
		if math.IsNaN(x) || math.IsInf(x, 0) {
			d.problem(n, key+" is beyond what can be reckoned with", "e.g. "+d.usually(key, v.Dim).example)
			return false
		}
		for _, c := range checks {
			if want := c(x); want != "" {
				d.problem(n, fmt.Sprintf("%s must be %s", key, want), "e.g. "+d.usually(key, v.Dim).example)
				return false
			}
		}
	}
	return true
}

// number makes a field for one number of the plant.
func (d *decoder) number(p *float64, key string, dim quantity.Dim, need elements.Need, help string, checks ...elements.Check) field {
	return field{key: key, need: need, help: help, written: inUnits(dim),
		read: func(n *node, owner string) {
			v, ok := d.quantity(n, key, dim)
			if ok && d.check(n, key, v, checks) {
				*p = v.SI
				d.register(n, owner, key, v, p, checks)
			}
		},
		absent: func(n *node, owner string) { d.unwritten(n, owner, key, dim, p, checks) },
	}
}

// plainNumber makes a field for a number without a doubt that is not a number of the plant by name.
func (d *decoder) plainNumber(p *float64, key string, dim quantity.Dim, need elements.Need, help string, checks ...elements.Check) field {
	return field{key: key, need: need, help: help, written: inUnits(dim),
		read: func(n *node, _ string) {
			if v, ok := d.fixed(n, key, dim, checks...); ok {
				*p = v.SI
			}
		}}
}

// freeText makes a field for words that a person reads.
func (d *decoder) freeText(p *string, key string, need elements.Need, help string) field {
	return field{key: key, need: need, help: help, written: asText, read: func(n *node, _ string) {
		if d.text(n, key) && d.readable(n, key) {
			*p = strings.TrimSpace(n.text)
		}
	}}
}

const longestText = 10_000 // bytes of words that a person reads

// readable refuses words that would upset a terminal or fill a page.
func (d *decoder) readable(n *node, key string) bool {
	if len(n.text) > longestText {
		d.problem(n, fmt.Sprintf("%s is too long: %d characters, %d are taken", key, utf8.RuneCountInString(n.text), longestText), "say it shorter")
		return false
	}
	for _, r := range n.text {
		if r != '\n' && r != '\t' && unicode.IsControl(r) || r >= 0x202a && r <= 0x202e || r >= 0x2066 && r <= 0x2069 {
			d.problem(n, fmt.Sprintf("%s has a character in it that does not print, %U", key, r), "write it anew without")
			return false
		}
	}
	return true
}

// word makes a field for one of some words.
func (d *decoder) word(p *string, key string, need elements.Need, help string, words ...string) field {
	return field{key: key, need: need, help: help, written: &writing{style: aWord, words: words}, read: func(n *node, _ string) {
		if w, ok := d.oneOf(n, key, words); ok {
			*p = w
		}
	}}
}

func (d *decoder) oneOf(n *node, key string, words []string) (string, bool) {
	if !d.text(n, key) {
		return "", false
	}
	for _, w := range words {
		if strings.EqualFold(n.text, w) {
			return w, true
		}
	}
	hint := oneOf(words)
	if len(words) > fewWords {
		hint = d.hint(n.text, words)
	}
	d.problem(n, fmt.Sprintf("%s: %s is not understood", key, quoted(n.text)), hint)
	return "", false
}

// yesNo makes a field for a switch.
func (d *decoder) yesNo(p *bool, key string, need elements.Need, help string) field {
	return field{key: key, need: need, help: help, written: asYesNo, read: func(n *node, _ string) {
		if b, ok := d.isYes(n, key); ok {
			*p = b
		}
	}}
}

func (d *decoder) isYes(n *node, key string) (yes, ok bool) {
	if !d.text(n, key) {
		return false, false
	}
	switch strings.ToLower(n.text) {
	case "yes", "true":
		return true, true
	case "no", "false":
		return false, true
	}
	d.problem(n, fmt.Sprintf("%s: %s is neither yes nor no", key, quoted(n.text)), "write yes or no")
	return false, false
}
