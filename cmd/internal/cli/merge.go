package cli

import (
	"io"
	"os"

	"github.com/spf13/cobra"

	"headfall/network/study"
	"headfall/viz/export"
)

func init() { register(groupWhat, newMerge) }

func newMerge(a *app) *cobra.Command {
	var all bool
	c := &cobra.Command{
		Use:   "merge PART…",
		Short: "Join the parts of a drill or a spread that were made with --shard",
		Long: `Merge joins the parts that drill or spread wrote with --shard, one a job, and gives what one run would have given, to
the bit. Every part must be there once, be finished, and be of the same file, program and options.

The output, the JSON and the exit code are those of drill and spread.`,
		Example: `  headfall merge part-*.jsonl
  headfall merge part-*.jsonl --json spread.json`,
		Args: func(c *cobra.Command, args []string) error {
			if len(args) == 0 {
				return bad("headfall merge part-*.jsonl", "merge needs the parts")
			}
			return nil
		},
		RunE: func(c *cobra.Command, args []string) error { return a.merge(args, all) },
	}
	c.Flags().BoolVar(&all, "all", false, "of a drill: print every rehearsal that fails")
	return c
}

func (a *app) merge(paths []string, all bool) error {
	var parts []*study.PartFile
	for _, path := range paths {
		p, err := readPart(path)
		if err != nil {
			return bad("", "%w", err)
		}
		parts = append(parts, p)
	}
	whole, err := study.Merge(parts)
	if err != nil {
		return bad("", "%w", err)
	}
	var files outputs
	if whole.Drill != nil {
		files.add(a.opt.json, func(w io.Writer) error { return export.JSON(w, whole.Drill) })
	} else {
		files.add(a.opt.json, func(w io.Writer) error { return export.JSON(w, whole.Spread) })
	}
	for _, path := range paths {
		if err := files.check(&source{path: path, name: path}); err != nil {
			return err
		}
	}
	if whole.Drill != nil {
		return a.tellDrill(files, whole.Drill, all)
	}
	return a.tellSpread(files, whole.Spread)
}

func readPart(path string) (*study.PartFile, error) {
	f, err := os.Open(path)
	if err != nil {
		return nil, err
	}
	defer f.Close()
	return study.ReadPart(path, f)
}
