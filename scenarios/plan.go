package scenarios

import (
	"fmt"
	"time"

	"headfall/elements"
	"headfall/elements/quantity"
	"headfall/network"
)

const version = "1" // of the format

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
		}, absent: d.siteByDefault},
		d.liquidField(),
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
		d.handoverField(),
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
