package cli

import (
	"go/ast"
	"go/parser"
	"go/token"
	"os"
	"path/filepath"
	"regexp"
	"strings"
	"testing"
)

// Every command says what it is for, with an example, and stands in the README.
func TestEveryCommandIsDescribed(t *testing.T) {
	readme, err := os.ReadFile("../../../README.md")
	if err != nil {
		t.Fatal(err)
	}
	for _, v := range verbs {
		c := v.make(newFakeApp())
		if c.Short == "" || c.Example == "" || c.RunE == nil && v.group != "" || c.Long == "" && v.group == "" {
			t.Errorf("%s lacks a short description, an example, or a job or a text", c.Name())
		}
		if strings.HasSuffix(c.Short, ".") {
			t.Errorf("%s: the short description is no sentence", c.Name())
		}
		if !regexp.MustCompile("`" + c.Name() + "\\b").Match(readme) {
			t.Errorf("%s is not in the README", c.Name())
		}
	}
}

func newFakeApp() *app { return &app{Streams: &Streams{}, engine: &engine{}} }

var refused = regexp.MustCompile(`(?i)\b(safe|safely|node|edge|solver|iteration|state vector)\b`)

// No text of the command line promises what nobody can know, or speaks of the inside of the program.
func TestWordsOfTheTrade(t *testing.T) {
	files, err := filepath.Glob("../*/*.go")
	if err != nil || len(files) < 20 {
		t.Fatal(err, len(files))
	}
	for _, name := range files {
		if strings.HasSuffix(name, "_test.go") {
			continue
		}
		set := token.NewFileSet()
		f, err := parser.ParseFile(set, name, nil, 0)
		if err != nil {
			t.Fatal(err)
		}
		ast.Inspect(f, func(n ast.Node) bool {
			if lit, ok := n.(*ast.BasicLit); ok && lit.Kind == token.STRING {
				if word := refused.FindString(lit.Value); word != "" {
					t.Errorf("%s says %q", set.Position(lit.Pos()), word)
				}
			}
			return true
		})
	}
}
