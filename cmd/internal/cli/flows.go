package cli

import (
	"context"
	"io"

	"github.com/spf13/cobra"

	"headfall/cmd/internal/text"
	"headfall/network/study"
)

func init() { register(groupWhat, newFlows) }

func newFlows(a *app) *cobra.Command {
	valve := ""
	c := &cobra.Command{
		Use:   "flows FILE --valve TAG",
		Short: "Flow through a valve as installed, against its opening",
		Long: `Flows gives the flow through a valve in its line at every tenth of its travel: with the vessels that it drains as
full as the plan has them when the valve is first moved, half of the way down to the outlet, and nine tenths of
it. All else stands as the plan has it at that moment.

JSON: {"schema": 1, "command": "flows", "exit_code": 0, "complete": true, "valve": "V-1", "line": "L-1", "at_s": 0,
 "heads": [{"name": "full", "levels_m": {"T-1": 2.5}}, {"name": "half", …}, {"name": "low", …}],
 "rows": [{"opening": 0.5, "flows_m3_s": [0.0044, 0.0037, 0.0030], "turns": 6}],
 "turns": 12, "half_flow_at": 0.4, "notes": []}

Exit code 0: done. 2: bad usage or a bad file. 3: the calculation could not finish. 130: interrupted.`,
		Example: `  headfall flows plant.yaml --valve V-1
  headfall flows plant.yaml --valve V-1 --json flows.json`,
		Args: oneFile,
		RunE: func(c *cobra.Command, args []string) error { return a.flows(c.Context(), args[0], valve) },
	}
	c.Flags().StringVar(&valve, "valve", "", "`TAG` of the valve")
	return c
}

func (a *app) flows(ctx context.Context, path, valve string) error {
	if valve == "" {
		return bad("as --valve V-1", "flows needs --valve TAG")
	}
	p, err := a.open(ctx, path)
	if err != nil {
		return err
	}
	return conclude(ctx, a, a.progress("calculating"), []string{path}, func(ctx context.Context) (*study.FlowsResult, error) {
		return study.Flows(ctx, p.load, a.opt.study(), valve)
	}, func(w io.Writer, res *study.FlowsResult, opt text.Options) error {
		return text.Flows(w, p.plant, res, opt)
	})
}
