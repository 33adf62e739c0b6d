package cli

import (
	"context"
	"crypto/sha256"
	"fmt"
	"io"
	"os"

	"github.com/spf13/cobra"

	"headfall/network/study"
	"headfall/viz/export"
)

func init() { register(groupWhat, newMerge) }

func newMerge(a *app) *cobra.Command {
	var o mergeOptions
	c := &cobra.Command{
		Use:   "merge PART…",
		Short: "Join the parts of a drill or a spread that were made with --shard",
		Long: `Merge joins the parts that drill or spread wrote with --shard, one a job, and gives what one run would have given, to
the bit. Every part must be there once, be finished, and be of the same file, program and options.

The output, the JSON and the exit code are those of drill and spread. For the report the plan itself is wanted too: --html
takes the plant file that the parts are of with --plan.`,
		Example: `  headfall drill plant.yaml --shard 1/2 --json part-1.jsonl
  headfall drill plant.yaml --shard 2/2 --json part-2.jsonl
  headfall merge part-*.jsonl --json drill.json
  headfall merge part-*.jsonl --html drill.html --plan plant.yaml`,
		Args: func(c *cobra.Command, args []string) error {
			if len(args) == 0 {
				return bad("headfall merge part-*.jsonl", "merge needs the parts")
			}
			return nil
		},
		RunE: func(c *cobra.Command, args []string) error { return a.merge(c.Context(), args, o) },
	}
	c.Flags().StringVar(&o.html, "html", "", "also write the report of the plan, with this study in it, to `PATH`")
	c.Flags().StringVar(&o.plan, "plan", "", "the plant `FILE` that the parts are of, for --html")
	c.Flags().BoolVar(&o.all, "all", false, "of a drill: print every rehearsal that fails")
	return c
}

type mergeOptions struct {
	many
	plan string
}

func (a *app) merge(ctx context.Context, paths []string, o mergeOptions) error {
	if (o.html == "") != (o.plan == "") {
		return bad("as --html drill.html --plan plant.yaml", "--html and --plan go together")
	}
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
	rep, src, err := a.mergeReport(ctx, o, whole)
	if err != nil {
		return err
	}
	var files outputs
	rep.add(&files)
	files.add(a.opt.json, func(w io.Writer) error { return export.JSON(w, whole.Answer()) })
	if err := files.check(append([]string{src.path}, paths...)...); err != nil {
		return err
	}
	if err := rep.answer(ctx, a, src); err != nil {
		return err
	}
	return a.tellWhole(files, rep, whole, o.all)
}

// mergeReport makes ready to write the report that --html asks for, of the plant that the parts are of and no other.
func (a *app) mergeReport(ctx context.Context, o mergeOptions, whole *study.Merged) (*studied, *source, error) {
	if o.html == "" {
		return nil, &source{}, nil
	}
	src, err := a.read(ctx, o.plan)
	if err != nil {
		return nil, nil, err
	}
	asked := whole.Head()
	if fmt.Sprintf("%x", sha256.Sum256(src.data)) != asked.Scenario.SHA256 {
		return nil, nil, bad("give --plan the file that they were made of, as it was then", "%s is not the plant file of these parts", o.plan)
	}
	a.opt.set, a.opt.caseName = asked.Asked.Set, "" // as they were
	if asked.Scenario.Case != nil {
		a.opt.caseName = *asked.Scenario.Case
	}
	plant, err := a.load(src, &a.opt)
	if err != nil {
		return nil, nil, err
	}
	rep, err := a.report(o.many, plant)
	return rep, src, err
}

func readPart(path string) (*study.PartFile, error) {
	f, err := os.Open(path)
	if err != nil {
		return nil, err
	}
	defer f.Close()
	return study.ReadPart(path, f)
}
