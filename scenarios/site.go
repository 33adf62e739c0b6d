package scenarios

import (
	"fmt"

	"headfall/elements"
	"headfall/elements/quantity"
	"headfall/network"
)

// liquidField reads the liquid of the plant.
func (d *decoder) liquidField() field {
	f := d.kindField(elements.Liquids, "liquid", elements.Optional, "the one liquid of the plant; default water of 15 °C", func(c chosen, _ *node) {
		d.plant.Liquid, _ = c.element.(elements.Liquid)
	})
	f.absent = d.waterByDefault
	return f
}

func (d *decoder) handoverField() field {
	return field{key: "handover", help: "times for which the state is printed", written: &writing{style: aList, item: asMoment}, read: func(n *node, _ string) {
		d.list(n, "handover", func(_ int, item *node) {
			if m, ok := d.moment(item, "handover"); ok {
				d.plant.Handover = append(d.plant.Handover, m)
			}
		})
	}}
}

func (d *decoder) siteFields() []field {
	gravity := d.withDefault(d.number(&d.plant.Gravity, "gravity", quantity.Acceleration, elements.Optional, "default 9.80665 m/s2", elements.Positive), "9.80665 m/s2")
	air := d.number(&d.plant.Atmosphere, "atmosphere", quantity.Pressure, elements.Optional, "pressure of the air; default 1013.25 mbar", elements.Positive)
	read := air.read
	air.read = func(n *node, owner string) {
		if v, err := quantity.Parse(n.text, quantity.Pressure); n.form == scalar && err == nil && v.Gauge == quantity.Gauge {
			d.problem(n, "atmosphere is over vacuum, not over itself", "e.g. 1013.25 mbar")
			return
		}
		read(n, owner)
	}
	return []field{gravity, d.withDefault(air, "1013.25 mbar")}
}

// withDefault lets a field say what was taken when it is not written.
func (d *decoder) withDefault(f field, text string) field {
	absent := f.absent
	f.absent = func(n *node, owner string) {
		d.assumed(owner, f.key, text)
		absent(n, owner)
	}
	return f
}

func (d *decoder) showFields(s *network.Show) []field {
	unit := func(p *string, key string, dim quantity.Dim) field {
		return field{key: key, help: "unit to show", written: &writing{style: aWord, words: quantity.Units(dim)}, read: func(n *node, _ string) {
			if !d.text(n, key) {
				return
			}
			u, ok := quantity.CanonicalUnit(dim, n.text)
			if !ok {
				d.problem(n, fmt.Sprintf("show: %s is no unit of %s", quoted(n.text), dim), d.hint(n.text, quantity.Units(dim)))
				return
			}
			*p = u
		}}
	}
	return []field{unit(&s.Level, "level", quantity.Length), unit(&s.Flow, "flow", quantity.Flow), unit(&s.Volume, "volume", quantity.Volume), unit(&s.Pressure, "pressure", quantity.Pressure)}
}

func (d *decoder) assumeFields(a *network.Assume) []field {
	*a = defaultAssume()
	return []field{
		d.word(&a.Doubts, "doubts", elements.Optional, "default: declared doubts where the file states none; stated: only the file's own; none", "default", "stated", "none"),
		{key: "together", help: "keys whose doubts have one common draw", written: &writing{style: aList, item: &writing{style: anyText}}, read: func(n *node, _ string) {
			d.list(n, "together", func(_ int, item *node) {
				if d.text(item, "together") {
					a.Together = append(a.Together, item.text)
					d.after = append(d.after, func() { d.togetherKey(item) })
				}
			})
		}},
		d.plainNumber(&a.CheckLeak, "check_valves_leak", quantity.Ratio, elements.Optional, "share of Kv that check valves let back", elements.Share),
		d.word(&a.HeaderAir, "header_air", elements.Optional, "whether air that a branch takes in breaks the siphon after its tee", "vents", "ignored"),
	}
}

func defaultAssume() network.Assume { return network.Assume{Doubts: "default", HeaderAir: "vents"} }

// togetherKey refuses a key that no number of the plant has.
func (d *decoder) togetherKey(n *node) {
	keys := map[string]bool{}
	var words []string
	for _, number := range d.plant.Numbers {
		if !keys[number.Key] {
			keys[number.Key] = true
			words = append(words, number.Key)
		}
	}
	if !keys[n.text] {
		d.problem(n, fmt.Sprintf("together: no number of this file has the key %s", quoted(n.text)), d.hint(n.text, words))
	}
}
