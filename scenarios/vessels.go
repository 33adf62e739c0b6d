package scenarios

import (
	"math"

	"headfall/elements"
	"headfall/elements/quantity"
	"headfall/network"
)

var nan = math.NaN()

func newVessel() *network.Vessel {
	return &network.Vessel{Level: nan, Contents: nan, Rim: nan, RimLength: nan, EmptyAt: nan, Base: nan}
}

// vessel reads one vessel under its tag.
func (d *decoder) vessel(key, n *node) {
	t := d.declare(key, aVessel)
	v := newVessel()
	v.Tag, v.Place = key.text, key.at
	if t != nil {
		t.vessel, t.body = v, n
	}
	before := len(d.probs)
	d.mapping(n, "vessel "+v.Tag, v.Tag, d.vesselFields(v))
	if n.form == mapping && d.sets[v.Tag+".level"] == nil && d.sets[v.Tag+".contents"] == nil {
		d.one(n, "vessel "+v.Tag, "level", "contents")
	}
	if t != nil && len(d.probs) == before && v.Element != nil {
		d.plant.Vessels = append(d.plant.Vessels, v)
	}
}

// vesselFields is the table of a vessel. The gauge comes before the level, which may be in its per cent.
func (d *decoder) vesselFields(v *network.Vessel) []field {
	level := field{key: "level", help: "start level above base, or per cent of the gauge", written: &writing{style: aQuantity, dim: quantity.Length,
		or: &writing{style: aQuantity, dim: quantity.Ratio}}, instead: []string{"contents"}, read: func(n *node, owner string) { d.startLevel(n, owner, v) }}
	contents := d.number(&v.Contents, "contents", quantity.Volume, elements.Optional, "start contents, instead of a level", elements.NotNegative)
	contents.instead = []string{"level"}
	return []field{
		d.kindField(elements.Shapes, "shape", elements.Required, "inside of the vessel", func(c chosen, n *node) {
			if s, ok := c.element.(elements.Shaped); ok {
				v.Element, v.Kind = s, c.kind
			}
		}),
		d.number(&v.Base, "base", quantity.Length, elements.Required, "elevation of the lowest inside point over the site datum"),
		object(d, "gauge", elements.Optional, "what the panel shows of the level", "gauge", d.gaugeFields, func(g *network.Gauge, _ *node) { d.gauge(v, g) }),
		level, contents,
		d.number(&v.Rim, "rim", quantity.Length, elements.Optional, "height over base where an open vessel overtops; default the top of the shape", elements.Positive),
		d.number(&v.RimLength, "rim_length", quantity.Length, elements.Optional, "length over which it overtops; default the perimeter of the shape there", elements.Positive),
		d.tagField(&v.SpillsTo, "spills_to", elements.Optional, "vessel or outside point that takes what overtops; default the floor", aVessel, anOutside),
		d.number(&v.EmptyAt, "empty_at", quantity.Length, elements.Optional, "level that counts as drained", elements.NotNegative),
		d.inflowField(v),
		objects(d, "batches", "volumes that come in at a steady rate", "batch", d.batchFields, func(b *batch, n *node) { v.Batches = append(v.Batches, b.to) }),
		d.alarmsField(v),
		object(d, "cover", elements.Optional, "a roof: the gas above the liquid matters", "cover", d.coverFields, func(c *network.Cover, n *node) { v.Cover = c }),
		objects(d, "inside", "media and internals", "internal", d.internalFields, func(i *network.Internal, n *node) { d.internal(v, i, n) }),
	}
}

// startLevel reads a level as a length, or in per cent of the gauge.
func (d *decoder) startLevel(n *node, owner string, v *network.Vessel) {
	if !d.text(n, "level") {
		return
	}
	share, inShares := asShare(n.text)
	if !inShares {
		if value, ok := d.quantity(n, "level", quantity.Length); ok && d.check(n, "level", value, aboveBase) {
			v.Level = value.SI
			d.register(n, owner, "level", value, &v.Level, aboveBase)
		}
		return
	}
	g := v.Gauge
	if g == nil {
		d.problem(n, "level: per cent needs a gauge", "write the level in m, or give the vessel gauge: {zero: …, span: …}")
		return
	}
	n.echo = share.Echo()
	value := quantity.Value{SI: g.Zero + share.SI*g.Span, Text: n.text, Unit: "%", Dim: quantity.Length, Doubt: share.Doubt}
	value.Doubt.Half *= g.Span
	value.Doubt.Low, value.Doubt.High = g.Zero+value.Doubt.Low*g.Span, g.Zero+value.Doubt.High*g.Span
	if share.Doubt.Kind != quantity.Uniform {
		value.Doubt.Low, value.Doubt.High = 0, 0
	}
	if d.check(n, "level", value, aboveBase) {
		v.Level = value.SI
		d.register(n, owner, "level", value, &v.Level, aboveBase)
	}
}

var aboveBase = []elements.Check{func(x float64) string {
	if x < 0 {
		return "0 or more: it is the height above the vessel's base"
	}
	return ""
}}

func (d *decoder) inflowField(v *network.Vessel) field {
	rows := writing{style: aTable, cols: []quantity.Dim{quantity.Time, quantity.Flow}}
	return field{key: "inflow", help: "flow that comes in from outside: one value, or rows of time and flow",
		written: &writing{style: aQuantity, dim: quantity.Flow, or: &rows}, read: func(n *node, owner string) {
			d.course(n, owner, "inflow", quantity.Flow, (*[][]float64)(&v.Inflow), []elements.Check{elements.NotNegative})
			v.InflowText = n.text
		}}
}

func (d *decoder) internalFields(i *network.Internal) []field {
	i.Voids = nan
	return []field{
		d.plainNumber(&i.From, "from", quantity.Length, elements.Required, "lower end above base", elements.NotNegative),
		d.plainNumber(&i.To, "to", quantity.Length, elements.Required, "upper end above base", elements.Positive),
		d.plainNumber(&i.Voids, "voids", quantity.Ratio, elements.Optional, "share of the space left to liquid", elements.Positive, elements.Share),
		d.plainNumber(&i.Displaces, "displaces", quantity.Volume, elements.Optional, "volume taken up", elements.NotNegative),
	}
}

func (d *decoder) internal(v *network.Vessel, i *network.Internal, n *node) {
	_, ok := d.one(n, "internal", "voids", "displaces")
	if i.To <= i.From {
		d.problem(first(n.get("to"), n), "internal: to must be above from", "both are heights above the vessel's base, the lower one first")
		ok = false
	}
	if math.IsNaN(i.Voids) {
		i.Voids = 1
	}
	if ok {
		v.Inside = append(v.Inside, *i)
	}
}
