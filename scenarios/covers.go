package scenarios

import (
	"headfall/elements"
	"headfall/elements/quantity"
	"headfall/network"
)

const roomTemperature = 288.15 // K, of the gas under a cover when none is stated

func (d *decoder) coverFields(c *network.Cover) []field {
	*c = network.Cover{Pressure: d.plant.Atmosphere, Temperature: roomTemperature, Vacuum: nan, Overpress: nan}
	return []field{
		object(d, "gas", elements.Optional, "air under the cover at the start", "gas", func(*struct{}) []field { return d.gasFields(c) }, func(*struct{}, *node) {}),
		{key: "vents", help: "openings to the air; none: sealed", written: &writing{style: aMap, item: &writing{style: aKind, room: elements.Vents}, or: &writing{style: aWord, words: []string{"none"}}}, read: func(n *node, _ string) {
			if n.form == scalar && n.text == "none" {
				return
			}
			d.entries(n, "vents", func(key, value *node) { d.vent(c, key, value) })
		}},
		object(d, "withstands", elements.Optional, "what the vessel is built for", "withstands", func(*struct{}) []field { return d.ratingFields(c) }, func(*struct{}, *node) {}),
	}
}

func (d *decoder) gasFields(c *network.Cover) []field {
	return []field{
		{key: "pressure", help: "over atmosphere, (g), or over vacuum, (a); default that of the air", written: inUnits(quantity.Pressure),
			read: func(n *node, owner string) { d.gasPressure(n, owner, c) }},
		d.number(&c.Temperature, "temperature", quantity.Temperature, elements.Optional, "default 15 °C", elements.Positive),
	}
}

// gasPressure reads a pressure into Pa absolute.
func (d *decoder) gasPressure(n *node, owner string, c *network.Cover) {
	v, ok := d.quantity(n, "pressure", quantity.Pressure)
	if !ok {
		return
	}
	switch v.Gauge {
	case quantity.None:
		d.problem(n, "pressure: here it is over atmosphere, (g), or over vacuum, (a)", "write "+n.text+"(g)")
		return
	case quantity.Gauge:
		v.SI += d.plant.Atmosphere
		if v.Doubt.Kind == quantity.Uniform {
			v.Doubt.Low, v.Doubt.High = v.Doubt.Low+d.plant.Atmosphere, v.Doubt.High+d.plant.Atmosphere
		}
		v.Gauge = quantity.Absolute
	}
	if d.check(n, "pressure", v, []elements.Check{elements.Positive}) {
		c.Pressure = v.SI
		d.register(n, owner, "pressure", v, &c.Pressure, []elements.Check{elements.Positive})
	}
}

func (d *decoder) ratingFields(c *network.Cover) []field {
	return []field{
		d.rating(&c.Vacuum, "vacuum", "below atmosphere"),
		d.rating(&c.Overpress, "pressure", "above atmosphere"),
	}
}

// rating makes a field for a difference to the air's pressure.
func (d *decoder) rating(p *float64, key, help string) field {
	f := d.number(p, key, quantity.Pressure, elements.Optional, help, elements.NotNegative)
	read := f.read
	f.read = func(n *node, owner string) {
		if v, err := quantity.Parse(n.text, quantity.Pressure); n.form == scalar && err == nil && v.Gauge == quantity.Absolute {
			d.problem(n, key+" is a difference to the air, not over vacuum", "e.g. 5 mbar")
			return
		}
		read(n, owner)
	}
	return f
}

// vent reads one vent under its tag.
func (d *decoder) vent(c *network.Cover, key, n *node) {
	if d.declare(key, aVent) == nil {
		return
	}
	e, ok := d.element(elements.Vents, n, "vent", func(string, *node) string { return key.text })
	if !ok || !d.ready(e, n) {
		return
	}
	if v, is := e.element.(elements.Vent); is {
		c.Vents = append(c.Vents, &network.VesselVent{Tag: key.text, Place: key.at, Kind: e.kind, Vent: v})
	}
}
