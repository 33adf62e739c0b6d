package scenarios

import (
	"fmt"
	"regexp"
	"slices"
	"strings"

	"headfall/network"
)

// setting is one value set from outside: by a case, or on the command line.
type setting struct{ name, value *node }

// arguments turns --set arguments into settings.
func (d *decoder) arguments(args []string) []setting {
	var all []setting
	for _, a := range args {
		src := &source{name: "--set " + quoted(a), text: a}
		name, value, ok := strings.Cut(a, "=")
		at := func(text string, from int) *node {
			lead := len(text) - len(strings.TrimLeft(text, " "))
			return &node{text: strings.TrimSpace(text), plain: true, src: src, at: network.Place{Line: 1, Column: len([]rune(a[:from+lead])) + 1}}
		}
		if !ok || strings.TrimSpace(value) == "" || strings.TrimSpace(name) == "" {
			d.problem(at(a, 0), "this sets nothing", "write TAG.x=VALUE, e.g. V-1.kv=80")
			continue
		}
		all = append(all, setting{at(name, 0), at(value, len(name)+1)})
	}
	return all
}

// nameList is the names that may be set.
type nameList struct {
	all   map[string]bool
	byTag map[string][]string
	tags  []string
}

func newNameList(names []string) *nameList {
	l := &nameList{all: make(map[string]bool, len(names)), byTag: map[string][]string{}}
	for _, name := range names {
		if l.all[name] {
			continue
		}
		l.all[name] = true
		tag, _, _ := strings.Cut(name, ".")
		if l.byTag[tag] == nil {
			l.tags = append(l.tags, tag)
		}
		l.byTag[tag] = append(l.byTag[tag], name)
	}
	return l
}

var index = regexp.MustCompile(`\[\d+\]`)

// find returns the names that a name can mean: itself; itself without [1] where there is one only; itself with an index where there are several;
// and where the path is left out, all that begin and end alike.
func (l *nameList) find(name string) []string {
	if l.all[name] {
		return []string{name}
	}
	if plain := strings.ReplaceAll(name, "[1]", ""); l.all[plain] {
		return []string{plain}
	}
	tag, rest, _ := strings.Cut(name, ".")
	var found []string
	for _, full := range l.byTag[tag] {
		_, path, _ := strings.Cut(full, ".")
		if index.ReplaceAllString(path, "") == rest {
			found = append(found, full)
		}
	}
	if len(found) > 0 || rest == "" {
		return found
	}
	for _, full := range l.byTag[tag] {
		_, path, _ := strings.Cut(full, ".")
		if strings.HasSuffix(index.ReplaceAllString(path, ""), "."+rest) || strings.HasSuffix(path, "."+rest) {
			found = append(found, full)
		}
	}
	return found
}

// settle finds the full name of a setting.
func (d *decoder) settle(s setting, l *nameList) (string, bool) {
	found := l.find(s.name.text)
	switch len(found) {
	case 1:
		return found[0], true
	case 0:
		d.unknownName(s.name, l)
	default:
		d.problem(s.name, fmt.Sprintf("%s could be %s", s.name.text, listed(found, "or")), "write which")
	}
	return "", false
}

func (d *decoder) unknownName(n *node, l *nameList) {
	tag, rest, dot := strings.Cut(n.text, ".")
	names := l.byTag[tag]
	switch {
	case names == nil:
		hint := nearest(tag, l.tags)
		if hint != "" && dot {
			hint += "." + rest
		}
		switch {
		case hint != "":
			hint = "did you mean " + hint + "?"
		case len(l.tags) <= shortList:
			hint = oneOf(l.tags)
		default:
			hint = "headfall check lists every number by its name"
		}
		d.problem(n, fmt.Sprintf("there is nothing tagged %s to set", quoted(tag)), hint)
	case !dot:
		d.problem(n, fmt.Sprintf("%s: which of its values?", tag), oneOf(names))
	default:
		d.problem(n, fmt.Sprintf("%s has no value %s", tag, quoted(rest)), didYouMean(n.text, names))
	}
}

// Find returns the number of a plant that a name means, with the freedom of --set: an index that is not needed, a path left out.
func Find(p *network.Plant, name string) (*network.Number, error) {
	names := make([]string, len(p.Numbers))
	byName := numbersByName(p)
	for i, n := range p.Numbers {
		names[i] = n.Name
	}
	d := newDecoder(&source{name: name, text: name})
	n := &node{text: name, plain: true, src: d.src, at: network.Place{Line: 1, Column: 1}}
	full, ok := d.settle(setting{name: n}, newNameList(slices.Clone(names)))
	if !ok {
		return nil, d.fail(nil)
	}
	return byName[full], nil
}
