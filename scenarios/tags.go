package scenarios

import (
	"fmt"
	"slices"
	"strings"
	"unicode"

	"headfall/elements"
	"headfall/network"
)

// class is what a tag names.
type class string

const (
	aVessel     class = "vessel"
	aTee        class = "tee"
	anOutside   class = "outside point"
	aLine       class = "line"
	aValve      class = "valve"
	aPump       class = "pump"
	aCheckValve class = "check valve"
	aPart       class = "part"
	aVent       class = "vent"
	aDevice     class = "vent of a line"
	aStep       class = "step"
	aHold       class = "hold"
	aBatch      class = "batch"
	aGauge      class = "gauge"
)

// thing is what a tag stands for.
type thing struct {
	class  class
	tag    string
	at     *node
	body   *node           // what belongs to a vessel
	vessel *network.Vessel // a vessel, or the one a gauge belongs to
	line   *network.Line
	device *elements.Device
}

// reference is a tag that must be known when the file has been read.
type reference struct {
	n       *node
	key     string
	classes []class
	then    func(*thing)
}

// turned are the words that readers of YAML make something else of.
var turned = []string{"yes", "no", "on", "off", "true", "false", "null"}

// declare enters a tag; it returns nil when it cannot be one.
func (d *decoder) declare(n *node, c class) *thing {
	if !d.text(n, "tag") || n.text == "" {
		return nil
	}
	d.fit(n, c) // what has an unfit tag is known by it all the same, so that only the tag is a fault
	if old := d.things[n.text]; old != nil {
		d.problem(n, fmt.Sprintf("%s is the tag of a %s already", n.text, old.class), "it stands "+where(old.at, n)+"; tags are unique over the whole file")
		return nil
	}
	t := &thing{class: c, tag: n.text, at: n}
	d.things[n.text] = t
	return t
}

// fit notes a text that cannot be a tag.
func (d *decoder) fit(n *node, c class) {
	if slices.Contains(turned, strings.ToLower(n.text)) {
		d.problem(n, fmt.Sprintf("%s cannot be a tag: readers of YAML make something else of it", n.text), "add a number or a letter, e.g. "+n.text+"-1")
		return
	}
	for i, r := range n.text {
		letter := unicode.IsLetter(r)
		switch {
		case i == 0 && !letter:
			d.problem(n, fmt.Sprintf("%s cannot be a tag: it begins with no letter", quoted(n.text)), "e.g. "+tagOf(c, n.text))
			return
		case !letter && !unicode.IsDigit(r) && !strings.ContainsRune("-_/", r):
			d.within(n, len([]rune(n.text[:i])), 1, fmt.Sprintf("%s cannot be a tag", quoted(n.text)), "a tag has letters, digits, -, _ and /")
			return
		}
	}
}

// tagOf makes a tag of one that lacks its letter.
func tagOf(c class, text string) string {
	rest := "1"
	if !strings.ContainsFunc(text, func(r rune) bool { return !unicode.IsLetter(r) && !unicode.IsDigit(r) }) {
		rest = text
	}
	letter := strings.ToUpper(string(c[:1]))
	if c == aVessel {
		letter = "T" // for a tank; V is a valve's
	}
	return letter + "-" + rest
}

// refer notes a tag to be looked up later and returns it.
func (d *decoder) refer(n *node, key string, then func(*thing), classes ...class) string {
	if !d.text(n, key) {
		return ""
	}
	if strings.ContainsAny(n.text, "±") {
		d.problem(n, key+": a tag carries no doubt", "write "+strings.TrimSpace(n.text[:strings.Index(n.text, "±")]))
		return ""
	}
	d.refs = append(d.refs, reference{n, key, classes, then})
	return n.text
}

// tagField makes a field for the tag of another thing.
func (d *decoder) tagField(p *string, key string, need elements.Need, help string, classes ...class) field {
	return field{key: key, need: need, help: help, written: aTagWritten, read: func(n *node, _ string) {
		*p = d.refer(n, key, nil, classes...)
	}}
}

// resolve looks up what was referred to.
func (d *decoder) resolve() {
	for _, r := range d.refs {
		t := d.things[r.n.text]
		switch {
		case t == nil:
			d.problem(r.n, fmt.Sprintf("%s: there is no %s %s", r.key, classes(r.classes), quoted(r.n.text)), d.tagHint(r.n.text, r.classes))
		case !slices.Contains(r.classes, t.class):
			d.problem(r.n, fmt.Sprintf("%s: %s is %s, not a %s", r.key, r.n.text, withArticle(t.class), classes(r.classes)), d.tagHint("", r.classes))
		case r.then != nil:
			r.then(t)
		}
	}
}

// tagHint names the tag that is spelled most like a text, or what there is to choose from.
func (d *decoder) tagHint(text string, of []class) string {
	tags := d.tagsOf(of)
	hint := oneOf(tags)
	if text != "" {
		hint = d.hint(text, tags)
	}
	switch {
	case hint != "":
		return hint
	case len(tags) == 0 && d.advice <= enoughAdvice:
		return "this file has no " + classes(of)
	}
	return "headfall check lists the tags of a file that reads"
}

func classes(all []class) string {
	words := make([]string, len(all))
	for i, c := range all {
		words[i] = string(c)
	}
	return listed(words, "or")
}

// tagsOf returns the tags of some classes, in alphabetical order.
func (d *decoder) tagsOf(classes []class) []string {
	if d.advice > enoughAdvice {
		return nil
	}
	var tags []string
	for tag, t := range d.things {
		if slices.Contains(classes, t.class) {
			tags = append(tags, tag)
		}
	}
	slices.Sort(tags)
	return tags
}

// withArticle speaks of one thing of a class.
func withArticle(c class) string {
	if strings.ContainsRune("aeiou", rune(c[0])) {
		return "an " + string(c)
	}
	return "a " + string(c)
}
