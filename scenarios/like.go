package scenarios

import "fmt"

// copies writes out vessels that are `like` others.
func (d *decoder) copies(root *node) *node {
	vessels := root.get("vessels")
	if vessels == nil || vessels.form != mapping {
		return root
	}
	any := false
	for _, v := range vessels.items {
		any = any || v.get("like") != nil
	}
	if !any {
		return root
	}
	c := &copier{d: d, vessels: vessels, byTag: make(map[string]*node, len(vessels.keys)), done: map[string]*node{}, open: map[string]bool{}}
	for i, k := range vessels.keys {
		if c.byTag[k.text] == nil {
			c.byTag[k.text] = vessels.items[i]
		}
	}
	whole := *vessels
	whole.items = make([]*node, len(vessels.items))
	for i, k := range vessels.keys {
		whole.items[i] = c.written(k, vessels.items[i])
	}
	return root.with(&node{text: "vessels", plain: true, src: vessels.src, at: vessels.at}, &whole)
}

// copier writes out one vessel after the other.
type copier struct {
	d       *decoder
	vessels *node
	byTag   map[string]*node
	done    map[string]*node
	open    map[string]bool
}

// written returns a vessel with all that it copies.
func (c *copier) written(key, n *node) *node {
	like := n.get("like")
	if like == nil {
		return n
	}
	if done := c.done[key.text]; done != nil {
		return done
	}
	own := n.without("like")
	own.lacks = true       // until the other's keys are there
	c.done[key.text] = own // until it is known to be whole
	if !c.d.text(like, "like") {
		return own
	}
	model := c.byTag[like.text]
	switch {
	case model == nil:
		c.d.problem(like, fmt.Sprintf("like: there is no vessel %s", quoted(like.text)), c.d.hint(like.text, c.tags()))
		return own
	case c.open[key.text], like.text == key.text:
		c.d.problem(like, fmt.Sprintf("like goes round in a circle at %s", key.text), "one of them must be written out")
		return own
	case model.form != mapping:
		return own
	}
	c.open[key.text] = true
	if c.open[like.text] {
		c.d.problem(like, fmt.Sprintf("like goes round in a circle at %s", like.text), "one of them must be written out")
		return own
	}
	whole := merged(renamed(c.written(&node{text: like.text}, model), key.text+"/"), own)
	delete(c.open, key.text)
	c.done[key.text] = whole
	return whole
}

func (c *copier) tags() []string {
	var all []string
	for _, k := range c.vessels.keys {
		all = append(all, k.text)
	}
	return all
}

// merged returns a copy's keys with its own in their place. A gauge and a cover are merged key by key; a level takes the place of contents.
func merged(model, own *node) *node {
	whole := model
	for i, k := range own.keys {
		value := own.items[i]
		switch k.text {
		case "level":
			whole = whole.without("contents")
		case "contents":
			whole = whole.without("level")
		case "gauge", "cover", "gas", "withstands":
			if old := whole.get(k.text); old != nil && old.form == mapping && value.form == mapping {
				value = merged(old, value)
			}
		}
		if k.form == scalar && own.get(k.text) == own.items[i] {
			whole = whole.with(k, value)
			continue
		}
		c := *whole // a key given twice stays, and is found
		c.keys, c.items = append(append([]*node(nil), c.keys...), k), append(append([]*node(nil), c.items...), value)
		whole = &c
	}
	if whole == model {
		c := *model
		whole = &c
	}
	whole.at, whole.src, whole.flow, whole.key = own.at, own.src, own.flow, own.key
	return whole
}

// renamed returns a vessel whose own tags have a prefix: its gauge, its vents, its batches.
func renamed(n *node, prefix string) *node {
	c := n
	for i, k := range n.keys {
		v := n.items[i]
		switch k.text {
		case "gauge":
			v = retagged(v, "tag", prefix)
		case "cover":
			if vents := v.get("vents"); vents != nil && vents.form == mapping {
				named := *vents
				named.keys = make([]*node, len(vents.keys))
				for j, tag := range vents.keys {
					named.keys[j] = prefixed(tag, prefix)
				}
				v = v.with(&node{text: "vents", plain: true, src: vents.src, at: vents.at}, &named)
			}
		case "batches":
			named := *v
			named.items = make([]*node, len(v.items))
			for j, b := range v.items {
				named.items[j] = retagged(b, "id", prefix)
			}
			v = &named
		default:
			continue
		}
		c = c.with(k, v)
	}
	return c
}

func retagged(n *node, key, prefix string) *node {
	if tag := n.get(key); tag != nil && tag.form == scalar {
		return n.with(&node{text: key, plain: true, src: tag.src, at: tag.at}, prefixed(tag, prefix))
	}
	return n
}

func prefixed(n *node, prefix string) *node {
	c := *n
	c.text = prefix + n.text
	return &c
}
