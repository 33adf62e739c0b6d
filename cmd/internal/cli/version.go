package cli

import (
	"fmt"
	"io"

	"github.com/spf13/cobra"
	"github.com/spf13/pflag"

	"headfall/network"
)

func init() { register(groupAbout, newVersion) }

func newVersion(a *app) *cobra.Command {
	licences := false
	c := &cobra.Command{
		Use:     "version",
		Short:   "Version of the program, and the notices of what it is built from",
		Example: "  headfall version\n  headfall version --licences",
		Args:    none,
		RunE: func(*cobra.Command, []string) error {
			if licences {
				return writeNotices(a.Out)
			}
			if a.opt.json != "" {
				return a.only(a.opt.json, func(w io.Writer) error {
					_, err := fmt.Fprintf(w, "{\"schema\": 1, \"command\": \"version\", \"name\": \"headfall\", \"version\": %q}\n", network.Version())
					return err
				})
			}
			_, err := fmt.Fprintln(a.Out, "headfall", network.Version())
			return err
		},
	}
	c.Flags().BoolVar(&licences, "licences", false, "print the licences of all that is part of the program, as licences does")
	c.Flags().SetNormalizeFunc(func(_ *pflag.FlagSet, name string) pflag.NormalizedName {
		if name == "licenses" {
			name = "licences"
		}
		return pflag.NormalizedName(name)
	})
	return c
}
