package scenarios

import (
	"bytes"
	"encoding/json"
	"errors"
	"os"
	"path/filepath"
	"testing"

	"github.com/santhosh-tekuri/jsonschema/v6"
	"gopkg.in/yaml.v3"
)

func schema(t *testing.T) *jsonschema.Schema {
	t.Helper()
	doc, err := jsonschema.UnmarshalJSON(bytes.NewReader(Schema()))
	if err != nil {
		t.Fatal(err)
	}
	c := jsonschema.NewCompiler()
	if err := c.AddResource("plant.json", doc); err != nil {
		t.Fatal(err)
	}
	s, err := c.Compile("plant.json")
	if err != nil {
		t.Fatal(err)
	}
	return s
}

// asJSONOrNot reads YAML as an editor does: with the types that YAML gives to scalars. What JSON has no value for is none.
func asJSONOrNot(t *testing.T, data []byte) (any, bool) {
	t.Helper()
	var v any
	if err := yaml.Unmarshal(data, &v); err != nil {
		t.Fatal(err)
	}
	text, err := json.Marshal(v)
	var none *json.UnsupportedValueError
	if errors.As(err, &none) {
		return nil, false
	}
	if err != nil {
		t.Fatal(err)
	}
	doc, err := jsonschema.UnmarshalJSON(bytes.NewReader(text))
	if err != nil {
		t.Fatal(err)
	}
	return doc, true
}

func asJSON(t *testing.T, data []byte) any {
	doc, ok := asJSONOrNot(t, data)
	if !ok {
		t.Fatal("no JSON")
	}
	return doc
}

func TestSchemaTakesWhatLoads(t *testing.T) {
	s := schema(t)
	for name, data := range everyFile(t) {
		if err := s.Validate(asJSON(t, data)); err != nil {
			t.Errorf("%s: %v", name, err)
		}
	}
}

func TestSchemaRefuses(t *testing.T) {
	s := schema(t)
	for _, bad := range []string{
		"title: no version\nrun_for: 1 h\n",
		"headfall: 1\nrun_for: 1 h\nvesels: {}\n",
		"headfall: 1\nrun_for: 1\n",
		"headfall: 1\nrun_for: 1 h\nvessels: {T-1: {shape: {cube: {side: 1 m}}, base: 0 m, level: 1 m}}\n",
		"headfall: 1\nrun_for: 1 h\nlines: {L-1: {from: A, to: B, parts: [{pipe: {length: 1 m, boer: 1 m}}]}}\n",
	} {
		if s.Validate(asJSON(t, []byte(bad))) == nil {
			t.Errorf("taken: %s", bad)
		}
	}
}

// An editor marks the bad files of testdata/bad/form, and cannot know what is wrong with those of testdata/bad/plant.
func TestSchemaSeesWhatCanBeSeen(t *testing.T) {
	s := schema(t)
	for folder, seen := range map[string]bool{"form": true, "plant": false} {
		files, err := filepath.Glob("../testdata/bad/" + folder + "/*.yaml")
		if err != nil || len(files) < 40 {
			t.Fatal(len(files), err)
		}
		for _, f := range files {
			data, err := os.ReadFile(f)
			if err != nil {
				t.Fatal(err)
			}
			doc, ok := asJSONOrNot(t, data)
			if !ok { // .nan and .inf: no value of JSON, and no text that fits a pattern
				continue
			}
			if err := s.Validate(doc); (err != nil) != seen {
				t.Errorf("%s: marked %v, want %v: %v", f, err != nil, seen, err)
			}
		}
	}
}

func TestSchemaIsTheSameEveryTime(t *testing.T) {
	if !bytes.Equal(Schema(), Schema()) {
		t.Error("two schemas differ")
	}
}
