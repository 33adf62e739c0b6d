package scenarios

import (
	"bytes"
	"crypto/sha256"
	"encoding/hex"
	"errors"
	"fmt"
	"io"
	"path/filepath"
	"regexp"
	"slices"
	"strconv"
	"strings"
	"unicode/utf8"

	"gopkg.in/yaml.v3"

	"headfall/elements"
	"headfall/network"
)

// Options change a plant while it is read.
type Options struct {
	Set  []string // "V-1.kv=80": as if the file had said so
	Case string   // name of one of the file's cases, to be applied; "" for the plan itself
}

const maxSize = 64 << 20 // bytes of a file

// Load reads a plant file; name is what messages call it. The error is a *Problems with every fault of the file, also of cases that are not asked for.
func Load(name string, data []byte, opt Options) (*network.Plant, error) {
	src := &source{name: name, text: string(data)}
	d, err := load(src, opt)
	if err != nil {
		return nil, err
	}
	sum := sha256.Sum256(data)
	p := d.plant
	p.File, p.Text, p.SHA256 = filepath.Base(name), src.text, hex.EncodeToString(sum[:])
	p.Case, p.Warnings = opt.Case, d.warnings
	return p, nil
}

// load returns the decoder of the plan, or of the case that was asked for.
func load(src *source, opt Options) (*decoder, error) {
	first := newDecoder(src)
	root := first.tree()
	if root == nil {
		return nil, first.fail(nil)
	}
	root = first.copies(root)
	cases := casesOf(root)
	sets := first.arguments(opt.Set)
	var found []Problem
	chosen := decodeWith(src, root, nil, sets, &found)
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
		first.probs = append(first.probs, Problem{File: src.name, Says: fmt.Sprintf("there is no case %s", quoted(opt.Case)), Hint: first.hint(opt.Case, names(cases))})
	}
	if len(first.probs)+len(found) > 0 {
		return nil, first.fail(found)
	}
	return chosen, nil
}

// fail joins the problems found.
func (d *decoder) fail(more []Problem) *Problems {
	all := &Problems{List: append(d.probs, more...)}
	return all.sorted()
}

// tree reads the YAML; nil when it cannot be walked.
func (d *decoder) tree() *node {
	top := &node{src: d.src}
	switch text := d.src.text; {
	case len(text) > maxSize:
		d.problem(top, fmt.Sprintf("this file is larger than %d MB", maxSize>>20), "")
		return nil
	case !utf8.ValidString(text):
		line := 1 + strings.Count(text[:invalidAt(text)], "\n")
		d.problem(&node{src: d.src, at: network.Place{Line: line, Column: 1}}, "this is not UTF-8 text", "save the file as UTF-8")
		return nil
	}
	docs, err := parse(d.src.text)
	if err != nil {
		d.badYAML(err)
		return nil
	}
	if len(docs) == 0 || len(docs[0].Content) == 0 {
		d.problem(top, "this file is empty", "headfall new writes one to begin with")
		return nil
	}
	if len(docs) > 1 {
		d.problem(&node{src: d.src, at: network.Place{Line: docs[1].Line, Column: docs[1].Column}}, "a second document begins here; a file has one", "")
	}
	g := &grower{d: d, src: d.src, done: map[*yaml.Node]grown{}, open: map[*yaml.Node]bool{}}
	t := g.grow(docs[0].Content[0], 0)
	if t.n != nil && t.n.form != mapping {
		d.problem(t.n, "a plant file is written as keys with values", "it begins with headfall: 1")
		return nil
	}
	return t.n
}

func invalidAt(s string) int {
	for i, r := range s {
		if r == utf8.RuneError && !strings.HasPrefix(s[i:], "\uFFFD") {
			return i
		}
	}
	return 0
}

// parse returns the first two documents of a text.
func parse(text string) (docs []*yaml.Node, err error) {
	defer func() {
		if r := recover(); r != nil { // the reader of YAML has its own faults
			err = errors.New("this cannot be read as YAML")
		}
	}()
	in := yaml.NewDecoder(bytes.NewReader([]byte(text)))
	for len(docs) < 2 {
		doc := &yaml.Node{}
		switch err := in.Decode(doc); {
		case errors.Is(err, io.EOF):
			return docs, nil
		case err != nil:
			return nil, err
		}
		docs = append(docs, doc)
	}
	return docs, nil
}

var yamlLine = regexp.MustCompile(`^(?:yaml: )?(?:line (\d+): )?(.*)$`)

// badYAML notes what the reader of YAML said.
func (d *decoder) badYAML(err error) {
	m := yamlLine.FindStringSubmatch(strings.SplitN(err.Error(), "\n", 2)[0])
	line, _ := strconv.Atoi(m[1])
	text := d.src.line(line)
	at := network.Place{Line: line, Column: 1 + len(text) - len(strings.TrimLeft(text, " \t"))}
	hint := "look at this line and the one before it: indentation, and text with a colon or a comma that stands without quotes"
	if strings.Contains(text, "\t") || strings.Contains(m[2], "cannot start any token") {
		hint = "indent with blanks, not with tabs"
	}
	d.problem(&node{src: d.src, at: at}, "this cannot be read as YAML: "+m[2], hint)
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
	d.defaultsOf(root)
	d.resolve()
	for _, check := range d.after {
		check()
	}
	d.circles()
	d.doubts()
	d.whole(root)
}

// defaultsOf fills in what the file leaves out.
func (d *decoder) defaultsOf(root *node) {
	p := d.plant
	if p.Liquid == nil && root.get("liquid") == nil {
		d.waterByDefault(root)
	}
	if p.ReportEvery == 0 && p.RunFor > 0 {
		p.ReportEvery = defaultSpacing(p.RunFor)
		d.assumed("", "report_every", fmt.Sprintf("%g s", p.ReportEvery))
	}
	if p.ReportEvery > 0 && p.RunFor/p.ReportEvery > mostSamples {
		d.problem(first(root.get("report_every"), root), "report_every is too short for this run_for: the stored series would be too long", "")
	}
}

// waterByDefault puts water into a plant that states no liquid.
func (d *decoder) waterByDefault(root *node) {
	water := elements.Lookup(elements.Liquids, "water")
	if water == nil {
		return
	}
	word := &node{text: "water", plain: true, src: root.src, at: root.at}
	temperature := &node{text: "15 °C", plain: true, src: root.src, at: root.at}
	body := &node{form: mapping, src: root.src, at: root.at, keys: []*node{word}, items: []*node{temperature}}
	c, ok := d.element(elements.Liquids, body, "liquid", func(string, *node) string { return "liquid" })
	if ok && d.ready(c, root) {
		d.plant.Liquid, _ = c.element.(elements.Liquid)
		d.assumed("", "liquid", "water, 15 °C")
	}
}
