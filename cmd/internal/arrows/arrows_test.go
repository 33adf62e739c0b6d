// Package arrows holds the test that imports between the program's packages go one way only.
package arrows

import (
	"go/parser"
	"go/token"
	"io/fs"
	"os"
	"path"
	"path/filepath"
	"strconv"
	"strings"
	"testing"
)

const module = "headfall"

// allowed says which areas of the program each area may import. An area is the longest of these names that a package's path begins with.
var allowed = map[string][]string{
	"cmd":                  {"viz", "scenarios", "network/study", "network", "elements"},
	"viz":                  {"network/study", "network", "elements"},
	"scenarios":            {"network", "elements"},
	"network/study":        {"network", "elements"},
	"network":              {"elements", "integrate"},
	"elements":             {"elements/shape", "elements/friction", "elements/quantity"},
	"elements/shape":       {},
	"elements/friction":    {},
	"elements/quantity":    {},
	"elements/elementtest": {"elements", "elements/quantity"},
	"integrate":            {"integrate/sparse"},
	"integrate/sparse":     {},
	"integrate/ivptest":    {"integrate", "integrate/sparse"},
}

// within are the areas that whoever may import the first may import too.
var within = map[string][]string{
	"elements":  {"elements/shape", "elements/friction", "elements/quantity"},
	"integrate": {"integrate/sparse"},
}

// homes says where a library may be imported by the program itself; tests may use others as they need.
var homes = map[string][]string{
	"github.com/spf13/":        {"cmd"},
	"github.com/schollz/":      {"cmd"},
	"github.com/jedib0t/":      {"cmd"},
	"golang.org/x/term":        {"cmd"},
	"gopkg.in/yaml.v3":         {"scenarios"},
	"github.com/go-echarts/":   {"viz"},
	"github.com/xuri/excelize": {"viz"},
	"gonum.org/":               {"network/study", "network"},
	"github.com/agnivade/":     {"cmd", "scenarios"},
}

// TestArrows fails on any import that is not among those above.
func TestArrows(t *testing.T) {
	checked := 0
	err := filepath.WalkDir("../../..", func(name string, d fs.DirEntry, err error) error {
		if err != nil {
			return err
		}
		if d.IsDir() && (d.Name() == "testdata" || strings.HasPrefix(d.Name(), ".") && d.Name() != "." && d.Name() != "..") {
			return filepath.SkipDir
		}
		if d.IsDir() || !strings.HasSuffix(name, ".go") {
			return nil
		}
		rel, _ := filepath.Rel("../../..", name)
		checked++
		return check(t, filepath.ToSlash(rel))
	})
	if err != nil {
		t.Fatal(err)
	}
	if checked < 20 {
		t.Errorf("only %d files were looked at", checked)
	}
}

func check(t *testing.T, file string) error {
	src, err := os.ReadFile(filepath.Join("../../..", filepath.FromSlash(file)))
	if err != nil {
		return err
	}
	f, err := parser.ParseFile(token.NewFileSet(), file, src, parser.ImportsOnly)
	if err != nil {
		return err
	}
	from := area(path.Dir(file))
	if from == "" {
		t.Errorf("%s: not in a place that the layout names", file)
		return nil
	}
	test := strings.HasSuffix(file, "_test.go")
	for _, spec := range f.Imports {
		name, _ := strconv.Unquote(spec.Path.Value)
		if own, found := strings.CutPrefix(name, module+"/"); found {
			if !arrow(from, area(own), test) {
				t.Errorf("%s: %s may not import %s", file, from, own)
			}
		} else if strings.Contains(strings.Split(name, "/")[0], ".") && !test && !library(from, name) {
			t.Errorf("%s: %s may not import %s", file, from, name)
		}
	}
	return nil
}

// arrow tells whether one area may import another. Tests may use the demo scenarios and the conformance kits besides, and from outside their
// package what the package itself may not; but elements and integrate never see each other, nor anything above them.
func arrow(from, to string, test bool) bool {
	if from == to {
		return true
	}
	for _, a := range allowed[from] {
		if a == to {
			return true
		}
		for _, b := range within[a] {
			if b == to {
				return true
			}
		}
	}
	if !test {
		return false
	}
	low := func(s string) string { return strings.Split(s, "/")[0] }
	switch low(from) {
	case "elements", "integrate":
		return low(to) == low(from)
	}
	return true
}

func library(from, name string) bool {
	for prefix, areas := range homes {
		if !strings.HasPrefix(name, prefix) {
			continue
		}
		for _, a := range areas {
			if a == from {
				return true
			}
		}
	}
	return false
}

// area returns the longest known name that the path begins with.
func area(p string) string {
	for ; p != "." && p != "/" && p != ""; p = path.Dir(p) {
		if _, known := allowed[p]; known {
			return p
		}
	}
	return ""
}

// The rule itself is tested: arrows that must stand out do.
func TestArrowRule(t *testing.T) {
	for _, c := range []struct {
		from, to string
		test, ok bool
	}{
		{"cmd", "viz", false, true}, {"viz", "cmd", false, false}, {"network", "scenarios", false, false}, {"network", "scenarios", true, true},
		{"elements", "integrate", true, false}, {"integrate", "elements", true, false}, {"elements", "network", true, false},
		{"network", "elements/shape", false, true}, {"network/study", "network", false, true}, {"network", "network/study", false, false},
		{"scenarios", "integrate", false, false}, {"viz", "scenarios", false, false},
	} {
		if got := arrow(c.from, c.to, c.test); got != c.ok {
			t.Errorf("%s to %s (test %v): %v, want %v", c.from, c.to, c.test, got, c.ok)
		}
	}
}
