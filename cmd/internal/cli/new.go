package cli

import (
	"io"
	"os"
	"strings"

	"github.com/spf13/cobra"

	"headfall/scenarios"
)

func init() {
	register(groupFile, newNew)
	register(groupFile, newSchema)
}

func newNew(a *app) *cobra.Command {
	demo := ""
	c := &cobra.Command{
		Use:   "new [FILE]",
		Short: "A commented file to start from",
		Long: `New writes a small plant that runs, with a comment on every key, to FILE or to standard output. A FILE that is there
already is left alone. With --demo it writes one of the demo plants:

  ` + strings.Join(scenarios.Demos(), "\n  "),
		Example: `  headfall new plant.yaml
  headfall new > plant.yaml
  headfall new --demo cellar cellar.yaml`,
		RunE: func(c *cobra.Command, args []string) error {
			plant := scenarios.Starter()
			if demo != "" {
				var known bool
				if plant, known = scenarios.Demo(demo); !known {
					return bad(among(demo, scenarios.Demos()), "there is no demo %q", demo)
				}
			}
			if a.opt.json != "" {
				return bad("headfall schema --json PATH writes the schema", "new has nothing to write as JSON")
			}
			if len(args) > 1 {
				return bad("headfall new plant.yaml", "new takes one FILE, got %d", len(args))
			}
			if len(args) == 0 || args[0] == "-" {
				_, err := a.Out.Write(plant)
				return err
			}
			return a.create(args[0], plant)
		},
		ValidArgsFunction: firstArg(ends("yaml")),
	}
	c.Flags().StringVar(&demo, "demo", "", "write the demo plant of this `NAME` instead")
	return c
}

// create writes a file that is not there yet.
func (a *app) create(path string, data []byte) error {
	if _, err := os.Lstat(path); err == nil {
		return bad("give another name", "%s is there already; it is not written over", path)
	}
	if err := a.only(path, func(w io.Writer) error { _, err := w.Write(data); return err }); err != nil {
		return err
	}
	_, err := io.WriteString(a.Out, "wrote "+path+"; next: headfall check "+path+"\n")
	return err
}

func or(a, b string) string {
	if a == "" {
		return b
	}
	return a
}

func newSchema(a *app) *cobra.Command {
	return &cobra.Command{
		Use:   "schema",
		Short: "JSON Schema of the file, for editors",
		Long: `Schema prints the JSON Schema (draft-07) of the plant file. An editor that knows it completes keys,
shows what each one means and marks what does not fit while it is typed.`,
		Example: `  headfall schema > headfall.schema.json
  # first line of a plant file, for editors with a YAML language server:
  # yaml-language-server: $schema=headfall.schema.json`,
		Args: none,
		RunE: func(*cobra.Command, []string) error {
			return a.only(or(a.opt.json, "-"), func(w io.Writer) error { _, err := w.Write(scenarios.Schema()); return err })
		},
	}
}
