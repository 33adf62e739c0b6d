package scenarios

import (
	"fmt"
	"time"

	"headfall/elements"
	"headfall/elements/quantity"
	"headfall/network"
)

const (
	version            = "1"
	standardGravity    = 9.80665  // m/s²
	standardAtmosphere = 101325.0 // Pa
	defaultLiquid      = "{temperature: 15 °C}"
	mostSamples        = 5e6 // of the stored series
)

// planFields is the table of the file as a whole, in the order of reading: what is named or referred to by nothing but a tag comes before what
// uses it.
func (d *decoder) planFields() []field {
	p := d.plant
	return []field{
		{key: "headfall", need: elements.Required, help: "version of the format: 1", written: &writing{style: aWord, words: []string{version}}, read: d.version},
		d.freeText(&p.Title, "title", elements.Optional, "what the plan is called"),
		d.freeText(&p.Revision, "revision", elements.Optional, "of the plan"),
		{key: "start", help: "date and clock time of the start", written: &writing{style: aDate}, read: d.start},
		d.plainNumber(&p.RunFor, "run_for", quantity.Time, elements.Required, "time to run at most", elements.Positive),
		d.plainNumber(&p.ReportEvery, "report_every", quantity.Time, elements.Optional, "spacing of the stored series", elements.Positive),
		{key: "site", help: "gravity and air", written: &writing{style: anObject, name: "site", fields: d.siteFields}, read: func(n *node, _ string) {
			d.mapping(n, "site", "site", d.siteFields())
		}},
		d.kindField(elements.Liquids, "liquid", elements.Optional, "the one liquid of the plant; default water of 15 °C", func(c chosen, _ *node) {
			p.Liquid, _ = c.element.(elements.Liquid)
		}),
		object(d, "show", elements.Optional, "units to show", "show", d.showFields, func(s *network.Show, _ *node) { p.Show = *s }),
		d.section("trims", "named valve trims: rows of travel and share of Kv", writing{style: aTable, cols: trimColumns}, d.trim),
		d.section("vessels", "what stores liquid", vesselWriting(d), d.vessel),
		d.section("tees", "where lines meet and nothing is stored", writing{style: anObject, name: "tee", fields: func() []field { return d.teeFields(&network.Tee{}) }}, d.tee),
		d.section("outside", "points beyond the plant", writing{style: aKind, room: elements.Beyond}, d.outside),
		d.section("lines", "what carries liquid", writing{style: anObject, name: "line", fields: func() []field { return d.lineFields(&network.Line{}) }}, d.line),
		d.entriesOf("steps", "what people do", "step", func() []field { return d.stepFields(&step{Step: &network.Step{}}) }, d.step),
		d.entriesOf("upsets", "what goes wrong in this run", "upset", func() []field { return d.upsetFields(&upset{Upset: &network.Upset{}}) }, d.upset),
		d.entriesOf("milestones", "moments to report", "milestone", func() []field { return d.milestoneFields(&network.Milestone{}, &bound{to: &network.Condition{}}) }, d.milestone),
		d.entriesOf("limits", "what must hold", "limit", func() []field { return d.limitFields(&limit{Limit: &network.Limit{}}) }, d.limit),
		d.casesField(),
		{key: "handover", help: "times for which the state is printed", written: &writing{style: aList, item: &writing{style: aMoment}}, read: func(n *node, _ string) {
			d.list(n, "handover", func(_ int, item *node) {
				if m, ok := d.moment(item, "handover"); ok {
					p.Handover = append(p.Handover, m)
				}
			})
		}},
		object(d, "assume", elements.Optional, "assumptions", "assume", d.assumeFields, func(a *network.Assume, _ *node) { p.Assume = *a }),
	}
}

func vesselWriting(d *decoder) writing {
	return writing{style: anObject, name: "vessel", unless: "like", fields: func() []field {
		like := field{key: "like", help: "a vessel that this one copies; other keys here take the place of its own", written: aTagWritten}
		return append(d.vesselFields(newVessel()), like)
	}}
}

// section makes a field that maps tags or names to things.
func (d *decoder) section(key, help string, item writing, read func(key, n *node)) field {
	return field{key: key, help: help, written: &writing{style: aMap, item: &item}, read: func(n *node, _ string) { d.entries(n, key, read) }}
}

// entriesOf makes a field that is a list of mappings.
func (d *decoder) entriesOf(key, help, what string, fields func() []field, read func(n *node)) field {
	item := writing{style: anObject, name: what, fields: fields}
	return field{key: key, help: help, written: &writing{style: aList, item: &item}, read: func(n *node, _ string) {
		d.list(n, key, func(_ int, entry *node) { read(entry) })
	}}
}

func (d *decoder) version(n *node, _ string) {
	if d.text(n, "headfall") && n.text != version {
		d.problem(n, fmt.Sprintf("version %s of the format is not known", quoted(n.text)), "write headfall: "+version)
	}
}

func (d *decoder) start(n *node, _ string) {
	if !d.text(n, "start") {
		return
	}
	t, err := quantity.ParseDateTime(n.text)
	if err != nil {
		d.badText(n, "start", err)
		d.plant.Start = time.Date(2000, 1, 1, 0, 0, 0, 0, time.UTC) // so that clock times are read all the same
		return
	}
	d.plant.Start = t
}

func (d *decoder) siteFields() []field {
	air := d.number(&d.plant.Atmosphere, "atmosphere", quantity.Pressure, elements.Optional, "pressure of the air; default 1013.25 mbar", elements.Positive)
	read := air.read
	air.read = func(n *node, owner string) {
		if v, err := quantity.Parse(n.text, quantity.Pressure); n.form == scalar && err == nil && v.Gauge == quantity.Gauge {
			d.problem(n, "atmosphere is over vacuum, not over itself", "e.g. 1013.25 mbar")
			return
		}
		read(n, owner)
	}
	return []field{d.number(&d.plant.Gravity, "gravity", quantity.Acceleration, elements.Optional, "default 9.80665 m/s2", elements.Positive), air}
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
