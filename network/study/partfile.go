package study

import (
	"bufio"
	"encoding/json"
	"errors"
	"fmt"
	"io"
)

// A part of a study is written as JSON Lines: what it is, then a line a unit, then how many there were.
//
//	{"schema":1,"command":"drill","shard":2,"of":8,"units":57,"head":{…}}
//	{"unit":1,"result":{…}}
//	{"end":true,"done":7}
type firstLine struct {
	Schema  int             `json:"schema"`
	Command string          `json:"command"`
	Shard   int             `json:"shard"`
	Of      int             `json:"of"`
	Units   int             `json:"units"`
	Head    json.RawMessage `json:"head"`
}

type unitLine struct {
	Unit   *int            `json:"unit,omitempty"`
	Result json.RawMessage `json:"result,omitempty"`
	End    bool            `json:"end,omitempty"`
	Done   int             `json:"done,omitempty"`
}

// WritePart writes a part of a study.
func WritePart[H, U any](w io.Writer, command string, p *Part[H, U]) error {
	head, err := json.Marshal(p.Head)
	if err != nil {
		return err
	}
	out := json.NewEncoder(w)
	out.SetEscapeHTML(false)
	s := p.Shard
	if s.whole() {
		s = Shard{1, 1}
	}
	if err := out.Encode(firstLine{1, command, s.Index, s.Of, p.Count, head}); err != nil {
		return err
	}
	for _, i := range p.Shard.cases(p.Count) {
		u, ok := p.Units[i]
		if !ok {
			continue
		}
		result, err := json.Marshal(u)
		if err != nil {
			return err
		}
		if err := out.Encode(unitLine{Unit: &i, Result: result}); err != nil {
			return err
		}
	}
	return out.Encode(unitLine{End: true, Done: len(p.Units)})
}

// PartFile is a part as it was read, not yet looked into.
type PartFile struct {
	Name    string
	Command string
	shard   Shard
	count   int
	head    string
	units   map[int]json.RawMessage
	ended   bool
}

// mostParts is the number of parts that a study may be split into.
const mostParts = 1 << 20

// ReadPart reads a part; name is for messages.
func ReadPart(name string, r io.Reader) (*PartFile, error) {
	in := bufio.NewReader(r)
	line, err := in.ReadBytes('\n')
	var first firstLine
	if json.Unmarshal(line, &first) != nil || first.Of < 1 || first.Of > mostParts || first.Units < 0 || len(first.Head) == 0 {
		if err != nil && !errors.Is(err, io.EOF) {
			return nil, err
		}
		return nil, fmt.Errorf("%s is not a part of a study: it was not written with --shard", name)
	}
	if first.Schema != 1 {
		return nil, fmt.Errorf("%s is of another version of the program (schema %d)", name, first.Schema)
	}
	p := &PartFile{Name: name, Command: first.Command, shard: Shard{first.Shard, first.Of}, count: first.Units, head: string(first.Head), units: map[int]json.RawMessage{}}
	for n := 2; ; n++ {
		line, err := in.ReadBytes('\n')
		if err != nil && !errors.Is(err, io.EOF) {
			return nil, err
		}
		if len(line) == 0 {
			return p, nil
		}
		var u unitLine
		if json.Unmarshal(line, &u) != nil {
			return nil, fmt.Errorf("%s is cut off or damaged at its line %d; make part %d of %d again", name, n, first.Shard, first.Of)
		}
		if u.End {
			p.ended = true
		} else if u.Unit != nil {
			p.units[*u.Unit] = u.Result
		}
	}
}
