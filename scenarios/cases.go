package scenarios

import (
	"headfall/elements"
	"headfall/network"
)

// variant is one case of a file.
type variant struct{ name, body *node }

func casesOf(root *node) []variant {
	var all []variant
	n := root.get("cases")
	if n == nil || n.form != mapping {
		return nil
	}
	seen := map[string]bool{}
	for i, k := range n.keys {
		if k.form == scalar && n.items[i].form == mapping && !seen[k.text] {
			seen[k.text] = true
			all = append(all, variant{k, n.items[i]})
		}
	}
	return all
}

func names(cases []variant) []string {
	var all []string
	for _, c := range cases {
		all = append(all, c.name.text)
	}
	return all
}

// sets returns the values that a case sets.
func (v variant) sets() []setting {
	var all []setting
	if set := v.body.get("set"); set != nil && set.form == mapping {
		for i, k := range set.keys {
			if k.form == scalar {
				all = append(all, setting{k, set.items[i]})
			}
		}
	}
	return all
}

// apply works the steps, upsets and title of a case into the tree.
func (d *decoder) apply(root *node, v variant) *node {
	if steps := v.body.get("steps"); steps != nil && steps.form == list {
		root = root.with(&node{text: "steps", src: steps.src, at: steps.at, plain: true}, mergeSteps(root.get("steps"), steps))
	}
	if upsets := v.body.get("upsets"); upsets != nil && upsets.form == list {
		root = root.with(&node{text: "upsets", src: upsets.src, at: upsets.at, plain: true}, appended(root.get("upsets"), upsets))
	}
	return root
}

// mergeSteps puts a case's steps in the place of those with their id, or behind them all.
func mergeSteps(old, with *node) *node {
	merged := *with
	merged.items = nil
	place := map[string]int{}
	if old != nil && old.form == list {
		merged.items = append(merged.items, old.items...)
		for i, s := range old.items {
			if id := idOf(s); id != "" {
				place[id] = i
			}
		}
	}
	for _, s := range with.items {
		if i, ok := place[idOf(s)]; ok {
			merged.items[i] = s
			delete(place, idOf(s)) // the same id twice in one case is a fault, and is then found
			continue
		}
		merged.items = append(merged.items, s)
	}
	return &merged
}

func appended(old, with *node) *node {
	joined := *with
	joined.items = nil
	if old != nil && old.form == list {
		joined.items = append(joined.items, old.items...)
	}
	joined.items = append(joined.items, with.items...)
	return &joined
}

// casesField reads how cases are written; what they do is found when each is applied.
func (d *decoder) casesField() field {
	item := writing{style: anObject, name: "case", fields: d.caseFields}
	return d.section("cases", "variants of this plan, by name", item, func(key, n *node) {
		if n.empty {
			d.problem(key, "case "+key.text+" changes nothing", "it has set, steps or upsets")
			return
		}
		d.mapping(n, "case "+key.text, "", d.caseFields())
	})
}

func (d *decoder) caseFields() []field {
	steps := writing{style: anObject, name: "step", fields: func() []field { return d.stepFields(&step{Step: &network.Step{}}) }}
	upsets := writing{style: anObject, name: "upset", fields: func() []field { return d.upsetFields(&upset{Upset: &network.Upset{}}) }}
	var note string
	entries := func(key string) func(n *node, _ string) {
		return func(n *node, _ string) { d.list(n, key, func(int, *node) {}) }
	}
	return []field{
		{key: "set", help: "numbers and words that are other than in the plan, by name", written: &writing{style: aMap, item: &writing{style: anyText}}, read: func(n *node, _ string) {
			d.entries(n, "set", func(*node, *node) {})
		}},
		{key: "steps", help: "steps that take the place of those with their id, or are added", written: &writing{style: aList, item: &steps}, read: entries("steps")},
		{key: "upsets", help: "what goes wrong besides", written: &writing{style: aList, item: &upsets}, read: entries("upsets")},
		d.freeText(&note, "note", elements.Optional, "words about the case"),
	}
}
