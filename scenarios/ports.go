package scenarios

import (
	"fmt"
	"slices"

	"headfall/elements"
	"headfall/elements/quantity"
	"headfall/network"
)

// portWords are the ways in which a line meets a vessel, in the order of network.PortForm.
var portWords = []string{"bottom", "centre", "invert", "dip", "crest"}

var portHelp = []string{"", "height of its centre above base", "height of its invert above base", "height of its mouth, turned down, above base", "height of the crest of its weir above base"}

func (d *decoder) portFields(p *network.Port) []field {
	fields := make([]field, 0, len(portWords)-1)
	for i, w := range portWords[1:] {
		f := d.number(&p.Height, w, quantity.Length, elements.Optional, portHelp[i+1], elements.NotNegative)
		read := f.read
		f.read = func(n *node, owner string) { p.Form = network.PortForm(i + 1); read(n, owner) }
		f.absent = nil
		fields = append(fields, f)
	}
	return fields
}

// portField makes the field of a port; end is the key of the line's end that it belongs to.
func (d *decoder) portField(p *network.Port, key, end string, tag *string) field {
	object := writing{style: anObject, name: "port", fields: func() []field { return d.portFields(new(network.Port)) }}
	return field{key: key, help: "how the line meets the vessel at its `" + end + "` end; default the bottom", written: &writing{style: aWord, words: portWords[:1], or: &object},
		read: func(n *node, owner string) {
			if n.form == scalar {
				if slices.Contains(portWords[1:], n.text) {
					d.problem(n, fmt.Sprintf("%s: %s needs its height", key, n.text), fmt.Sprintf("e.g. %s: {%s: 0.5 m}", key, n.text))
					return
				}
				_, p.Given = d.oneOf(n, key, portWords)
				d.onlyVessels(n, key, tag)
				return
			}
			if d.mapping(n, key, sub(owner, key), d.portFields(p)) {
				_, p.Given = d.one(n, key, portWords[1:]...)
			}
			d.onlyVessels(n, key, tag)
		}}
}

// onlyVessels refuses a port at what has none.
func (d *decoder) onlyVessels(n *node, key string, tag *string) {
	d.after = append(d.after, func() {
		if t := d.things[*tag]; t != nil && (t.class == aTee || t.class == anOutside) {
			d.problem(n, fmt.Sprintf("%s: %s is %s; only a vessel is met at a height", key, *tag, withArticle(t.class)), "leave "+key+" out")
		}
	})
}
