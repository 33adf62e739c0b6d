package scenarios

import "fmt"

// one reports whether exactly one of the keys stands in the mapping, and notes it when not.
func (d *decoder) one(n *node, what string, keys ...string) (key string, ok bool) {
	var found []string
	for _, k := range keys {
		if n.get(k) != nil {
			found = append(found, k)
		}
	}
	switch len(found) {
	case 1:
		return found[0], true
	case 0:
		if n.lacks {
			break
		}
		d.problem(n, what+" needs "+listed(keys, "or"), "e.g. "+keys[0]+": "+sampleKey(keys[0]))
	default:
		d.problem(n.keyOf(found[1]), what+" has "+listed(found, "and")+": only one of them can hold", "leave all but one out")
	}
	return "", false
}

// list calls read for every entry; an empty one is a list of none.
func (d *decoder) list(n *node, what string, read func(i int, item *node)) {
	if n.empty {
		return
	}
	if n.form != list {
		d.problem(n, what+" is a list", "write each entry behind a dash")
		return
	}
	for i, item := range n.items {
		read(i, item)
	}
}

// entries calls read for every key of a mapping whose keys are tags or names.
func (d *decoder) entries(n *node, what string, read func(key, value *node)) {
	if n.empty {
		return
	}
	if n.form != mapping {
		d.problem(n, what+" is written as names with what belongs to them", "write each name on a line of its own, a colon behind it, without a dash")
		for _, item := range n.items { // what was meant is read all the same
			if item.form == mapping {
				d.entries(item, what, read)
			}
		}
		return
	}
	seen := make(map[string]*node, len(n.keys))
	for i, k := range n.keys {
		if k.form != scalar {
			continue
		}
		if old := seen[k.text]; old != nil {
			d.problem(k, fmt.Sprintf("%s is given twice", k.text), "it stands "+where(old, k)+" already")
			continue
		}
		seen[k.text] = k
		read(k, n.items[i])
	}
}

// sampleKey is a likely value of a key of which one among several must stand.
func sampleKey(key string) string {
	if u, ok := usuals[key]; ok {
		return u.example
	}
	if key == "valve" || key == "pump" || key == "line" {
		return sampleTag(key)
	}
	return heights.example
}
