package scenarios

import (
	"crypto/sha256"
	"encoding/hex"
	"fmt"
	"path/filepath"
	"slices"

	"headfall/network"
)

// Options change a plant while it is read.
type Options struct {
	Set  []string // "V-1.kv=80": as if the file had said so
	Case string   // name of one of the file's cases, to be applied; "" for the plan itself
}

// MaxSize is the largest file that is read, bytes: a hundred thousand vessels take a third of it.
const MaxSize = 64 << 20

// Load reads a plant file; name is what messages call it. The error is a *Problems with every fault of the file, also of cases that are not asked for.
func Load(name string, data []byte, opt Options) (*network.Plant, error) {
	src := newSource(name, data)
	d, err := load(src, opt)
	if err != nil {
		return nil, err
	}
	sum := sha256.Sum256(data)
	p := d.plant
	p.File, p.Text, p.SHA256 = filepath.Base(name), src.text, hex.EncodeToString(sum[:])
	p.Case = opt.Case
	return p, nil
}

// load returns the decoder of the plan, or of the case that was asked for.
func load(src *source, opt Options) (*decoder, error) {
	first := newDecoder(src)
	root := first.tree()
	if root == nil {
		return nil, first.fail(nil)
	}
	root.respell(keysOf(first.planFields())) // a section is read, whatever its name looks like
	root = first.copies(root)
	cases := casesOf(root)
	sets := first.arguments(opt.Set)
	var found []Problem
	plain := sets
	if opt.Case != "" {
		plain = nil // they may name what only the case has
	}
	chosen := decodeWith(src, root, nil, plain, &found)
	chosen.plant.CaseNames = names(cases)
	for _, c := range cases {
		extra := sets
		if c.name.text != opt.Case {
			extra = nil
		}
		other := decodeWith(src, first.apply(root, c), c.sets(), extra, &found)
		if c.name.text == opt.Case {
			other.plant.CaseNames = chosen.plant.CaseNames
			chosen = other
		}
	}
	if opt.Case != "" && !slices.Contains(names(cases), opt.Case) {
		first.probs = append(first.probs, Problem{File: src.name, Says: fmt.Sprintf("there is no case %s", quoted(opt.Case)), Hint: caseHint(opt.Case, names(cases))})
	}
	if len(first.probs)+len(found) > 0 {
		return nil, first.fail(found)
	}
	return chosen, nil
}

func caseHint(asked string, cases []string) string {
	if len(cases) == 0 {
		return "this file has no cases"
	}
	return didYouMean(asked, cases)
}

// fail joins the problems found.
func (d *decoder) fail(more []Problem) *Problems {
	all := &Problems{List: append(d.probs, more...)}
	return all.sorted()
}

// decodeWith decodes a tree with values set from outside and adds its problems to those found. Sets of the command line come last and win.
func decodeWith(src *source, root *node, fromCase, fromLine []setting, found *[]Problem) *decoder {
	sets := append(append([]setting(nil), fromCase...), fromLine...)
	d := newDecoder(src)
	d.collect = len(sets) > 0
	d.decode(root)
	if len(sets) == 0 {
		*found = append(*found, d.probs...)
		return d
	}
	with := newDecoder(src)
	with.sets = map[string]*node{}
	known := newNameList(d.names)
	for _, s := range sets {
		if name, ok := with.settle(s, known); ok {
			with.sets[name] = s.value
		}
	}
	with.decode(root)
	*found = append(*found, with.probs...)
	return with
}

// decode fills the plant.
func (d *decoder) decode(root *node) {
	p := d.plant
	p.Gravity, p.Atmosphere, p.Assume = standardGravity, standardAtmosphere, defaultAssume()
	d.mapping(root, "the file", "", d.planFields())
	d.spacing(root)
	d.resolve()
	for _, check := range d.after {
		check()
	}
	d.storable(root)
	d.circles()
	d.doubts()
	d.whole(root)
}
