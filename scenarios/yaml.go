package scenarios

import (
	"bytes"
	"errors"
	"fmt"
	"io"
	"regexp"
	"slices"
	"strconv"
	"strings"
	"unicode"
	"unicode/utf8"

	"gopkg.in/yaml.v3"

	"headfall/network"
)

// tree reads the YAML; nil when it cannot be walked.
func (d *decoder) tree() *node {
	top := &node{src: d.src, at: network.Place{Line: 1, Column: 1}}
	switch text := d.src.text; {
	case len(text) > MaxSize:
		d.problem(top, fmt.Sprintf("this file is larger than %d MB", MaxSize>>20), "no plant takes so much: is it another file?")
		return nil
	case !utf8.ValidString(text):
		at := invalidAt(text)
		hint := "save the file as UTF-8"
		if strings.ContainsRune(text[:min(len(text), 512)], 0) {
			hint = "is it a plant file at all, and saved as UTF-8?"
		}
		d.problem(d.src.spot(at), "this is not UTF-8 text", hint)
		return nil
	}
	if at := strings.IndexFunc(d.src.text, unprintable); at >= 0 {
		d.problem(d.src.spot(at), "there is a character here that does not print", "take it out; a plant file is plain text")
		return nil
	}
	if at := tooDeep(d.src.text); at >= 0 {
		d.problem(d.src.spot(at), tooDeepSays, tooDeepHint)
		return nil
	}
	if at, n := strangeKeys(d.src.text, keysOf(d.planFields())); n > mostStrange {
		d.problem(d.src.spot(at), fmt.Sprintf("this file has more than %d keys in its first column that no plant file has", mostStrange), "this is the first; is it another file?")
		return nil
	}
	docs, err := parse(d.src.text)
	if err != nil {
		d.badYAML(err)
		return nil
	}
	if len(docs) == 0 || len(docs[0].Content) == 0 || nothing(docs[0].Content[0]) {
		d.problem(top, "this file is empty", "headfall new writes one to begin with")
		return nil
	}
	if len(docs) > 1 {
		d.problem(&node{src: d.src, at: network.Place{Line: docs[1].Line, Column: docs[1].Column}}, "a second document begins here; a file has one", "take the line --- out, or put what follows into a file of its own")
	}
	g := &grower{d: d, src: d.src, done: map[*yaml.Node]grown{}, open: map[*yaml.Node]bool{}}
	t := g.grow(docs[0].Content[0], 0)
	if t.n != nil && t.n.form != mapping {
		d.problem(t.n, "a plant file is written as keys with values", "it begins with headfall: 1")
		return nil
	}
	return t.n
}

// nothing reports a document with nothing in it.
func nothing(y *yaml.Node) bool { return y.Tag == "!!null" && y.Value == "" && y.Anchor == "" }

// unprintable reports what readers of YAML refuse without telling where.
func unprintable(r rune) bool {
	return r < ' ' && r != '\t' && r != '\n' && r != '\r' || r == 0x7f || r >= 0x80 && r < 0xa0 && r != 0x85
}

const mostOpen = 500 // brackets; the reader of YAML takes the square of their number in time

// tooDeep returns where more brackets are open than any file needs, or -1. It looks at brackets alone, from one line that begins in the first column
// to the next.
func tooDeep(text string) int {
	open := 0
	for i := 0; i < len(text); i++ {
		switch text[i] {
		case '{', '[':
			if open++; open > mostOpen {
				return i
			}
		case '}', ']':
			open = max(open-1, 0)
		case '\n':
			if i+1 < len(text) && !strings.ContainsRune(" \t{[", rune(text[i+1])) {
				open = 0
			}
		}
	}
	return -1
}

const mostStrange = 1000 // keys; a file of which not even the sections are known is not read to its end

// strangeKeys returns where the first key stands that begins in the first column and is not among the words, and how many there are. What goes on from the line
// before may begin anywhere.
func strangeKeys(text string, words []string) (first, n int) {
	goesOn := false
	for at, rest := 0, text; rest != "" && n <= mostStrange; {
		line, more, _ := strings.Cut(rest, "\n")
		key, _, found := strings.Cut(line, ":")
		if found && !goesOn && wordLike(key) && !slices.Contains(words, key) {
			if n++; n == 1 {
				first = at
			}
		}
		if trimmed := strings.TrimRight(line, " \t\r"); trimmed != "" {
			goesOn = strings.ContainsRune("{[,", rune(trimmed[len(trimmed)-1]))
		}
		at += len(line) + 1
		rest = more
	}
	return first, n
}

// wordLike tells that a text has letters, digits and lines under and between them only.
func wordLike(s string) bool {
	for _, r := range s {
		if !unicode.IsLetter(r) && !unicode.IsDigit(r) && r != '_' && r != '-' {
			return false
		}
	}
	return s != ""
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
			n := d.src.spot(i)
			n.text, n.plain = "*"+name[1], true
			d.problem(n, fmt.Sprintf("*%s stands for nothing: there is no &%s before it", name[1], name[1]), "put a text that begins with * in quotes")
			return
		}
	}
	if s, ok := slipOf(d.src); ok {
		d.problem(&node{src: d.src, at: s.at, text: s.text, plain: true}, s.says, s.hint)
		return
	}
	text := d.src.line(line)
	at := network.Place{Line: max(line, 1), Column: 1 + len(text) - len(strings.TrimLeft(text, " \t"))}
	d.problem(&node{src: d.src, at: at}, "this cannot be read as YAML: "+m[2],
		"look at this line and the ones before it: indentation, and text with a colon or a comma that stands without quotes")
}
