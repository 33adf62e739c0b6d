package scenarios

import (
	"gopkg.in/yaml.v3"

	"headfall/network"
)

const (
	maxDepth = 60        // of nesting, aliases followed
	maxNodes = 1_000_000 // that aliases may add
)

const (
	tooDeepSays = "this is nested too deeply"
	tooDeepHint = "is there a bracket or a brace that is never closed?"
)

// grower turns yaml nodes into ours.
type grower struct {
	d     *decoder
	src   *source
	done  map[*yaml.Node]grown // anchors already turned
	open  map[*yaml.Node]bool  // anchors that are being turned
	added int                  // nodes that aliases stand for
	slab  []node
}

// grown is a tree with its extent, aliases followed.
type grown struct {
	n            *node // nil when it was refused
	size, height int
}

// grow returns the tree of a yaml node, which lets go of its children on the way: there is no room for two trees of a large file.
func (g *grower) grow(y *yaml.Node, depth int) (t grown) {
	if y.Kind == yaml.AliasNode {
		return g.alias(y, depth)
	}
	n := g.fresh(y)
	if depth > maxDepth {
		return g.refuse(n, tooDeepSays, tooDeepHint)
	}
	if y.Style&yaml.TaggedStyle != 0 {
		tag := &node{src: g.src, at: n.at, text: y.Tag, plain: true}
		g.d.problem(tag, "YAML tags are not used here: "+y.Tag, "leave "+y.Tag+" out")
	}
	if y.Anchor != "" {
		g.open[y] = true
	}
	t = grown{n: n, size: 1}
	if !g.children(y, depth, &t) {
		return grown{}
	}
	if y.Anchor != "" {
		delete(g.open, y)
		g.done[y] = t
	}
	return t
}

func (g *grower) children(y *yaml.Node, depth int, t *grown) bool {
	n := t.n
	if n.form == mapping {
		n.keys = make([]*node, 0, len(y.Content)/2)
		n.items = make([]*node, 0, len(y.Content)/2)
	}
	for i, c := range y.Content {
		child := g.grow(c, depth+1)
		y.Content[i] = nil
		if child.n == nil {
			return false
		}
		t.size += child.size
		t.height = max(t.height, child.height+1)
		if n.form == mapping && i%2 == 0 {
			g.key(c, child.n)
			n.keys = append(n.keys, child.n)
			continue
		}
		if child.n.empty && child.n.text == "" && n.form == mapping {
			child.n.at = n.keys[len(n.keys)-1].at
		}
		if n.form == mapping && c.Kind != yaml.AliasNode {
			child.n.key = n.keys[len(n.keys)-1]
		}
		n.items = append(n.items, child.n)
	}
	return true
}

// key refuses keys that are no words and merge keys.
func (g *grower) key(y *yaml.Node, k *node) {
	switch {
	case k.form != scalar:
		g.d.problem(k, "a key must be one word", "write one key a line, each with its own value")
	case y.Tag == "!!merge":
		g.d.problem(k, "merge keys (<<) are not understood", "vessels can be copied with like: TAG")
	}
}

// alias returns what an alias stands for, within bounds.
func (g *grower) alias(y *yaml.Node, depth int) grown {
	here := &node{src: g.src, at: network.Place{Line: y.Line, Column: y.Column}, text: "*" + y.Value, plain: true}
	t := g.done[y.Alias]
	switch {
	case g.open[y.Alias]:
		return g.refuse(here, "*"+y.Value+" stands inside what it stands for", "write out what is meant here")
	case t.n == nil:
		return g.refuse(here, "*"+y.Value+" stands for nothing", "write & and its name before what it stands for")
	case depth+t.height > maxDepth:
		return g.refuse(here, "with what *"+y.Value+" stands for this is nested too deeply", "write out what is meant here")
	}
	if g.added += t.size; g.added > maxNodes {
		return g.refuse(here, "aliases make this file too large", "write out what is meant, or leave it away")
	}
	return t
}

func (g *grower) refuse(n *node, says, hint string) grown {
	g.d.problem(n, says, hint)
	return grown{}
}

const slabSize = 512

func (g *grower) fresh(y *yaml.Node) *node {
	if len(g.slab) == 0 {
		g.slab = make([]node, slabSize)
	}
	n := &g.slab[0]
	g.slab = g.slab[1:]
	n.src, n.text, n.at = g.src, y.Value, network.Place{Line: y.Line, Column: y.Column}
	n.flow = y.Style&yaml.FlowStyle != 0
	switch y.Kind {
	case yaml.MappingNode:
		n.form, n.text = mapping, ""
	case yaml.SequenceNode:
		n.form, n.text = list, ""
	default:
		n.plain = y.Style&(yaml.DoubleQuotedStyle|yaml.SingleQuotedStyle|yaml.LiteralStyle|yaml.FoldedStyle) == 0
		n.empty = y.Tag == "!!null" && n.plain
	}
	return n
}
