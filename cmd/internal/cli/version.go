package cli

import (
	"fmt"
	"io"

	"github.com/spf13/cobra"

	"headfall/network"
)

func init() { register(groupAbout, newVersion) }

func newVersion(a *app) *cobra.Command {
	notices := false
	c := &cobra.Command{
		Use:     "version",
		Short:   "Version of the program, and the notices of what it is built from",
		Example: "  headfall version\n  headfall version --notices",
		Args:    none,
		RunE: func(*cobra.Command, []string) error {
			if notices {
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
	c.Flags().BoolVar(&notices, "notices", false, "print the licences of the libraries that are part of the program")
	return c
}
