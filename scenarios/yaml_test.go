package scenarios

import (
	"fmt"
	"strings"
	"testing"
)

// A file of which no section is known is refused by that alone; sections, and what goes on from the line before in braces, may be as many as they like.
func TestStrangeKeys(t *testing.T) {
	repeat := func(form string) string {
		var b strings.Builder
		for i := range mostStrange + 1 {
			fmt.Fprintf(&b, form, i)
		}
		return b.String()
	}
	words := []string{"vessels", "lines"}
	for name, c := range map[string]struct {
		text        string
		first, more int
	}{
		"of another kind": {"# nothing\n" + repeat("key_%d: 1\n"), 10, mostStrange + 1},
		"indented":        {"vessels:\n" + repeat("  T%d: {}\n"), 0, 0},
		"in braces":       {"vessels: {\n" + repeat("T%d: {},\n") + "}\n", 0, 0},
		"a misspelt one":  {"vesels:\n  T1: {}\nlines:\n", 0, 1},
	} {
		if first, n := strangeKeys(c.text, words); first != c.first || n != c.more {
			t.Errorf("%s: %d strange keys from byte %d on, want %d from %d", name, n, first, c.more, c.first)
		}
	}
}
