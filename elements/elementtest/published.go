package elementtest

import (
	"encoding/json"
	"math"
	"os"
	"path/filepath"
	"testing"
)

// Published is one check value with where it is from and how close one has to come.
type Published struct {
	ID        string     `json:"id"`
	Quantity  string     `json:"quantity"`
	Expected  Many       `json:"expected"`
	Unit      string     `json:"unit"`
	Tolerance *Tolerance `json:"tolerance"`
	Source    string     `json:"source"`
	Class     string     `json:"found_class"`
}

// Tolerance is relative or absolute, one for all values or one each, or an accepted range.
type Tolerance struct {
	Type   string       `json:"type"`
	Value  float64      `json:"value"`
	Values []float64    `json:"values"`
	Min    float64      `json:"min"`
	Max    float64      `json:"max"`
	Ranges [][2]float64 `json:"ranges"`
}

// Many reads one number or a list of them.
type Many []float64

// UnmarshalJSON takes 1 as well as [1].
func (m *Many) UnmarshalJSON(b []byte) error {
	if err := json.Unmarshal(b, (*[]float64)(m)); err == nil {
		return nil
	}
	*m = make(Many, 1)
	return json.Unmarshal(b, &(*m)[0])
}

// Book is the check values of one file, by id.
type Book map[string]*Published

// Load reads testdata/elements/<name>.json from the top of the module.
func Load(t *testing.T, name string) Book {
	t.Helper()
	dir, err := os.Getwd()
	for err == nil {
		if _, missing := os.Stat(filepath.Join(dir, "go.mod")); missing == nil {
			break
		}
		dir = filepath.Dir(dir)
	}
	text, err := os.ReadFile(filepath.Join(dir, "testdata", "elements", name+".json"))
	if err != nil {
		t.Fatal(err)
	}
	var file struct {
		Checks []*Published `json:"checks"`
	}
	if err := json.Unmarshal(text, &file); err != nil {
		t.Fatal(err)
	}
	b := Book{}
	for _, c := range file.Checks {
		b[c.ID] = c
	}
	return b
}

// Hold compares what was worked out with all the values of a check.
func (b Book) Hold(t *testing.T, id string, got ...float64) {
	t.Helper()
	c := b[id]
	if c == nil {
		t.Fatalf("no check %s", id)
	}
	if len(got) != len(c.Expected) {
		t.Fatalf("%s: %d values for %d", id, len(got), len(c.Expected))
	}
	for i := range got {
		b.HoldOne(t, id, i, got[i])
	}
}

// HoldOne compares with one of the values of a check.
func (b Book) HoldOne(t *testing.T, id string, i int, got float64) {
	t.Helper()
	c := b[id]
	if want := c.Expected[i]; !c.Tolerance.allows(i, got, want) {
		t.Errorf("%s (%s; %s; %s), value %d: %.8g, published %.8g, tolerance %+v", id, c.Quantity, c.Source, c.Class, i+1, got, want, *c.Tolerance)
	}
}

func (o *Tolerance) allows(i int, got, want float64) bool {
	off := math.Abs(got - want)
	switch o.Type {
	case "rel":
		return off <= o.Value*math.Abs(want)
	case "abs":
		return off <= o.Value
	case "range":
		return got >= o.Min && got <= o.Max
	case "list_rel":
		return off <= o.Values[i]*math.Abs(want)
	case "list_range":
		return got >= o.Ranges[i][0] && got <= o.Ranges[i][1]
	}
	return false
}
