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

var (
	called  = regexp.MustCompile(`headfall ([a-z]+)\b([^\n|'` + "`" + `]*)`)
	flagged = regexp.MustCompile(`--([a-z-]+)`)
)

// Every flag that the README gives a command is one of that command's.
func TestReadmeFlags(t *testing.T) {
	readme, err := os.ReadFile("../../../README.md")
	if err != nil {
		t.Fatal(err)
	}
	root, checked := newFakeApp().root(), 0
	for _, m := range called.FindAllStringSubmatch(string(readme), -1) {
		c, _, err := root.Find(m[1:2])
		if err != nil || c == root {
			continue // a sentence
		}
		for _, f := range flagged.FindAllStringSubmatch(m[2], -1) {
			checked++
			if c.Flags().Lookup(f[1]) == nil && root.PersistentFlags().Lookup(f[1]) == nil {
				t.Errorf("%s has no flag --%s: %s", m[1], f[1], m[0])
			}
		}
	}
	if checked < 20 {
		t.Errorf("only %d flags were found", checked)
	}
}
