package scenarios

import (
	"math"
	"os"
	"reflect"
	"testing"

	"headfall/network"
)

// everyFile is the files that load: the format's example, the demos and the starter.
func everyFile(t testing.TB) map[string][]byte {
	all := map[string][]byte{starter: Starter()}
	for _, name := range Demos() {
		all[name], _ = Demo(name)
	}
	data, err := os.ReadFile("../testdata/scenarios/whole_file.yaml")
	if err != nil {
		t.Fatal(err)
	}
	all["whole_file"] = data
	return all
}

func TestPlainFormIsTheSamePlant(t *testing.T) {
	for name, data := range everyFile(t) {
		plain, err := Normalise(name, data)
		if err != nil {
			t.Errorf("%s: %v", name, err)
			continue
		}
		again, err := Normalise(name, plain)
		if err != nil {
			t.Errorf("%s: plain form does not load: %v\n%s", name, err, plain)
			continue
		}
		if string(again) != string(plain) {
			t.Errorf("%s: the plain form of the plain form is another", name)
		}
		for _, c := range append([]string{""}, mustLoad(t, name, data, Options{}).CaseNames...) {
			a, b := mustLoad(t, name, data, Options{Case: c}), mustLoad(t, name, plain, Options{Case: c})
			if diff := differ(reflect.ValueOf(bare(a)), reflect.ValueOf(bare(b)), "plant", map[uintptr]bool{}); diff != "" {
				t.Errorf("%s, case %q: %s", name, c, diff)
			}
		}
	}
}

// bare drops what is of the file and not of the plant.
func bare(p *network.Plant) *network.Plant {
	p.SHA256, p.Text, p.File = "", "", ""
	return p
}

// differ returns the first field in which two values differ, but for places and for how texts are spelled; "" when there is none.
func differ(a, b reflect.Value, path string, seen map[uintptr]bool) string {
	if a.Kind() != b.Kind() {
		return path + ": kinds differ"
	}
	switch a.Kind() {
	case reflect.Pointer, reflect.Interface:
		if a.IsNil() || b.IsNil() {
			if a.IsNil() != b.IsNil() {
				return path + ": one is nil"
			}
			return ""
		}
		if a.Kind() == reflect.Pointer {
			if seen[a.Pointer()] {
				return ""
			}
			seen[a.Pointer()] = true
		}
		return differ(a.Elem(), b.Elem(), path, seen)
	case reflect.Struct:
		for i := range a.NumField() {
			switch f := a.Type().Field(i); f.Name {
			case "Place", "At":
				if f.Type == reflect.TypeOf(network.Place{}) {
					continue
				}
				fallthrough
			default:
				if f.Name == "Text" || f.Name == "ToText" || f.Name == "InflowText" || f.Name == "Unit" || f.Type.Kind() == reflect.Func {
					continue
				}
				if d := differ(a.Field(i), b.Field(i), path+"."+f.Name, seen); d != "" {
					return d
				}
			}
		}
	case reflect.Slice, reflect.Array:
		if a.Len() != b.Len() {
			return path + ": lengths differ"
		}
		for i := range a.Len() {
			if d := differ(a.Index(i), b.Index(i), path, seen); d != "" {
				return d
			}
		}
	case reflect.Float64:
		if math.Float64bits(a.Float()) != math.Float64bits(b.Float()) && !(math.IsNaN(a.Float()) && math.IsNaN(b.Float())) {
			return path
		}
	case reflect.String:
		if a.String() != b.String() {
			return path + ": " + a.String() + " | " + b.String()
		}
	case reflect.Bool:
		if a.Bool() != b.Bool() {
			return path
		}
	case reflect.Int, reflect.Int64, reflect.Int32, reflect.Uint8:
		if a.CanInt() && a.Int() != b.Int() {
			return path
		}
	}
	return ""
}
