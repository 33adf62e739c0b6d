package cli

import (
	"context"
	"io"
	"path/filepath"

	"github.com/spf13/cobra"

	"headfall/cmd/internal/text"
	"headfall/network"
	"headfall/network/study"
)

func init() { register(groupWhat, newCompare) }

func newCompare(a *app) *cobra.Command {
	var o doubtful
	c := &cobra.Command{
		Use:   "compare FILE [FILE…]",
		Short: "Plans side by side under the same limits",
		Long: `Compare judges the plan of a file and all its cases, or the plans of several files, and sets them side by side:
verdict, least headroom, when the last vessel is empty, the peak flow to each outside point, what is spilled.
All are judged by the same limits: with several files by those of the first. The best is the one of those that
hold that ends first. With --case one case is set beside the plan, or taken in each of several files.

JSON: {"schema": 1, "command": "compare", "exit_code": 0, "complete": true, "best": "G",
 "limits": ["level of PIT-4 below 2.40 m"], "outside": ["SEWER"],
 "rows": [{"name": "G", "file": "plant.yaml", "verdict": "run", "why": "", "first_fail_at_s": null,
   "smallest_margin": {"limit": "…", "margin_si": 0.47, "margin_low_si": 0.2, "unit_si": "m"},
   "worst_vessel": "PIT-4", "worst_headroom_m": 0.47, "headroom_to": "alarm", "finish_s": 9424,
   "finish_low_s": 9100, "finish_high_s": 9800, "peak_flow_m3_s": {"SEWER": 0.0042}, "spilled_m3": 0}], "notes": []}

Exit code 0: at least one plan holds. 1: none does. 2: bad usage or a bad file. 3: the calculation could not
finish. 130: interrupted; what was judged is kept and marked.`,
		Example: `  headfall compare plant.yaml
  headfall compare draft.yaml second.yaml --json table.json`,
		Args: func(c *cobra.Command, args []string) error {
			if len(args) == 0 {
				return bad("headfall compare plant.yaml", "compare needs a FILE")
			}
			return nil
		},
		RunE: func(c *cobra.Command, args []string) error { return a.compare(c.Context(), args, o) },
	}
	f := c.Flags()
	f.SortFlags = false
	o.bind(f)
	return c
}

func (a *app) compare(ctx context.Context, paths []string, o doubtful) error {
	plans, _, err := a.contenders(ctx, paths)
	if err != nil {
		return err
	}
	bar := a.progress("comparing")
	opt, err := a.weigh(o, bar)
	if err != nil {
		return err
	}
	return conclude(ctx, a, bar, paths, func(ctx context.Context) (*study.CompareResult, error) {
		return study.Compare(ctx, plans, opt)
	}, func(w io.Writer, res *study.CompareResult, opt text.Options) error { return text.Compare(w, res, opt) })
}

// contenders reads the files and lists the plans: of one file the plan and its cases, of several the plan of each.
func (a *app) contenders(ctx context.Context, paths []string) (plans []study.Contender, first *source, err error) {
	for _, path := range paths {
		src, err := a.read(ctx, path)
		if err != nil {
			return nil, nil, err
		}
		if first == nil {
			first = src
		}
		one := func(name, which string) error {
			o := a.opt
			o.caseName = which
			load := func() (*network.Plant, error) { return a.load(src, &o) }
			_, err := load()
			plans = append(plans, study.Contender{Name: name, File: path, Load: load})
			return err
		}
		if len(paths) > 1 {
			if err := one(filepath.Base(path), a.opt.caseName); err != nil {
				return nil, nil, err
			}
			continue
		}
		if err := one("as written", ""); err != nil {
			return nil, nil, err
		}
		plant, err := plans[0].Load()
		if err != nil {
			return nil, nil, err
		}
		cases := plant.CaseNames
		if a.opt.caseName != "" {
			cases = []string{a.opt.caseName}
		}
		for _, name := range cases {
			if err := one(name, name); err != nil {
				return nil, nil, err
			}
		}
	}
	return plans, first, nil
}
