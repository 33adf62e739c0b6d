package cli

import (
	"errors"
	"strings"

	"github.com/agnivade/levenshtein"
	"github.com/spf13/cobra"
	"github.com/spf13/pflag"
)

// nearest returns the name most like the word, or "" when none is like it.
func nearest(word string, names []string) string {
	best, least := "", 3
	for _, name := range names {
		d := levenshtein.ComputeDistance(strings.ToLower(word), name)
		if strings.HasPrefix(name, strings.ToLower(word)) && word != "" {
			d = min(d, 1)
		}
		if d < least && d < len(name) {
			best, least = name, d
		}
	}
	return best
}

// badFlag names the nearest flag to one that is not known.
func badFlag(c *cobra.Command, err error) error {
	hint := "headfall help " + c.Name()
	if c == c.Root() {
		hint = "headfall help"
	}
	if word, found := strings.CutPrefix(err.Error(), "unknown flag: --"); found {
		var names []string
		c.Flags().VisitAll(func(f *pflag.Flag) { names = append(names, f.Name) })
		if near := nearest(word, names); near != "" {
			hint = "did you mean --" + near + "?"
		}
	}
	var value *pflag.InvalidValueError
	if errors.As(err, &value) {
		return bad(hint, "--%s: %q is not understood", value.GetFlag().Name, value.GetValue())
	}
	return bad(hint, "%w", err)
}
