package scenarios

import (
	"bytes"
	"errors"
	"fmt"
	"io"
	"regexp"
	"strconv"
	"strings"
	"unicode/utf8"

	"gopkg.in/yaml.v3"

	"headfall/network"
)

// tree reads the YAML; nil when it cannot be walked.
func (d *decoder) tree() *node {
	top := &node{src: d.src}
	switch text := d.src.text; {
	case len(text) > maxSize:
		d.problem(top, fmt.Sprintf("this file is larger than %d MB", maxSize>>20), "")
		return nil
	case !utf8.ValidString(text):
		d.problem(d.src.spot(invalidAt(text)), "this is not UTF-8 text", "save the file as UTF-8")
		return nil
	}
	if at := strings.IndexFunc(d.src.text, unprintable); at >= 0 {
		d.problem(d.src.spot(at), "there is a character here that does not print", "take it out; a plant file is plain text")
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

// unprintable reports what readers of YAML refuse without telling where.
func unprintable(r rune) bool {
	return r < ' ' && r != '\t' && r != '\n' && r != '\r' || r == 0x7f || r >= 0x80 && r < 0xa0 && r != 0x85
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

var yamlAnchor = regexp.MustCompile(`^unknown anchor '(.*)' referenced`)

var yamlLine = regexp.MustCompile(`^(?:yaml: )?(?:line (\d+): )?(.*)$`)

// badYAML notes what the reader of YAML said.
func (d *decoder) badYAML(err error) {
	m := yamlLine.FindStringSubmatch(strings.SplitN(err.Error(), "\n", 2)[0])
	line, _ := strconv.Atoi(m[1])
	if name := yamlAnchor.FindStringSubmatch(m[2]); name != nil {
		if i := strings.Index(d.src.text, "*"+name[1]); i >= 0 {
			d.problem(d.src.spot(i), fmt.Sprintf("*%s stands for nothing: there is no &%s before it", name[1], name[1]), "put a text that begins with * in quotes")
			return
		}
	}
	text := d.src.line(line)
	at := network.Place{Line: line, Column: 1 + len(text) - len(strings.TrimLeft(text, " \t"))}
	hint := "look at this line and the one before it: indentation, and text with a colon or a comma that stands without quotes"
	if strings.Contains(text, "\t") || strings.Contains(m[2], "cannot start any token") {
		hint = "indent with blanks, not with tabs"
	}
	d.problem(&node{src: d.src, at: at}, "this cannot be read as YAML: "+m[2], hint)
}
