package scenarios

import (
	"headfall/elements"
	"headfall/elements/quantity"
	"headfall/network"
)

// tee reads one tee under its tag.
func (d *decoder) tee(key, n *node) {
	t := d.declare(key, aTee)
	e := &network.Tee{Tag: key.text, Place: key.at, Elevation: nan}
	if n.empty {
		n = &node{form: mapping, src: n.src, at: key.at}
	}
	if d.mapping(n, "tee "+e.Tag, e.Tag, d.teeFields(e)) && t != nil {
		d.plant.Tees = append(d.plant.Tees, e)
	}
}

func (d *decoder) teeFields(e *network.Tee) []field {
	return []field{d.number(&e.Elevation, "elevation", quantity.Length, elements.Optional, "over the site datum; serves suction and air checks")}
}

// outside reads one outside point under its tag.
func (d *decoder) outside(key, n *node) {
	t := d.declare(key, anOutside)
	c, ok := d.element(elements.Beyond, n, key.text, func(string, *node) string { return key.text })
	if !ok || !d.ready(c, n) || t == nil {
		return
	}
	if o, is := c.element.(elements.Outsider); is {
		d.plant.Outside = append(d.plant.Outside, &network.Outside{Tag: key.text, Place: key.at, Kind: c.kind, Element: o})
	}
}
