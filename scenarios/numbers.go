package scenarios

import (
	"math"

	"headfall/elements"
	"headfall/elements/quantity"
	"headfall/network"
)

// register enters a number that was written.
func (d *decoder) register(n *node, owner, key string, v quantity.Value, p *float64, checks []elements.Check) {
	if owner == "" {
		if v.Doubt.Stated() {
			d.problem(n, key+" carries no doubt", "write one value")
		}
		return
	}
	d.enter(network.Number{Name: owner + "." + key, Key: key, Dim: v.Dim, At: p, Value: v, Place: n.at, Check: checks})
}

// unwritten enters a number that has a value although the file does not give it; n is the mapping that lacks it.
func (d *decoder) unwritten(n *node, owner, key string, dim quantity.Dim, p *float64, checks []elements.Check) {
	if owner == "" || p == nil || math.IsNaN(*p) || math.IsInf(*p, 0) {
		return
	}
	v := quantity.Value{SI: *p, Dim: dim}
	d.enter(network.Number{Name: owner + "." + key, Key: key, Dim: dim, At: p, Value: v, Default: true, Place: n.at, Check: checks})
}

// assumed notes a default that was used.
func (d *decoder) assumed(owner, key, value string) {
	name := key
	if owner != "" {
		name = owner + "." + key
	}
	d.plant.Defaults = append(d.plant.Defaults, name+": "+value)
}

func (d *decoder) enter(number network.Number) {
	if len(d.slab) == 0 {
		d.slab = make([]network.Number, 256)
	}
	n := &d.slab[0]
	d.slab = d.slab[1:]
	*n = number
	d.plant.Numbers = append(d.plant.Numbers, n)
}

// declared are the doubts of numbers whose doubt the file does not state, by their key; see "The verdict" among the results.
var declared = map[string]func(v float64) quantity.Doubt{
	"kv":        share(0.15),
	"cv":        share(0.15),
	"cd":        share(0.05),
	"k":         share(0.20),
	"roughness": func(float64) quantity.Doubt { return quantity.Doubt{Kind: quantity.Factor, Factor: 2} },
	"level":     func(float64) quantity.Doubt { return quantity.Doubt{Kind: quantity.Normal95, Half: startLevel} },
}

const startLevel = 0.020 // m, half-width of the doubt of a start level

func share(s float64) func(float64) quantity.Doubt {
	return func(v float64) quantity.Doubt { return quantity.Doubt{Kind: quantity.Normal95, Half: s * v} }
}

// doubts fills in or takes away doubts as the file's assume says.
func (d *decoder) doubts() {
	for _, n := range d.plant.Numbers {
		switch d.plant.Assume.Doubts {
		case "none":
			n.Value.Doubt = quantity.Doubt{}
		case "default":
			d.assume(n)
		}
	}
}

func (d *decoder) assume(n *network.Number) {
	rule := declared[n.Key]
	if rule == nil || n.Value.Doubt.Stated() {
		return
	}
	v := n.Value.SI
	if n.Key != "level" && (v <= 0 || math.IsInf(v, 0)) {
		return
	}
	n.Value.Doubt, n.Assumed = rule(v), true
}

// numbersByName returns the plant's numbers by name.
func numbersByName(p *network.Plant) map[string]*network.Number {
	all := make(map[string]*network.Number, len(p.Numbers))
	for _, n := range p.Numbers {
		all[n.Name] = n
	}
	return all
}
