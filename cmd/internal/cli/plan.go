package cli

import (
	"context"
	"io"

	"github.com/spf13/cobra"

	"headfall/cmd/internal/text"
	"headfall/network/study"
)

func init() { register(groupWhat, newPlan) }

func newPlan(a *app) *cobra.Command {
	var o doubtful
	c := &cobra.Command{
		Use:   "plan FILE",
		Short: "Search times and openings for the earliest finish with which every limit holds",
		Long: `Plan moves what the file marks as free, as in
  - {id: s2, at: "07:15", valve: V-2, to: 50 %, free: {at: ["06:00", "08:30"], to: [10 %, 100 %]}}
and looks for the plan that ends first with every limit holding, doubts allowed for. It ends when the last of
the vessels that a limit wants emptied is empty. Openings are searched in steps of 5 %, times in whole minutes;
what is found is judged as run judges. Then it says which further move would end sooner, and what forbids it.

JSON: {"schema": 1, "command": "plan", "exit_code": 0, "complete": true, "found": true, "verdict": "run",
 "finish_s": 7531, "finish_low_s": 7300, "finish_high_s": 7900, "empties": ["TA-1", "TA-2"],
 "steps": [{"id": "s2", "says": "OPEN HV-2 to 90 %", "at_s": 5580, "clock": "2027-03-02T07:33:00", "to": 0.9,
   "was_at_s": 1200, "was_to": 1, "target": "HV-2"}],
 "binds": [{"move": "s2 (HV-2) at 07:32", "limit": "level of PIT-4 below 2.40 m", "finish_s": 7500}],
 "smallest_margin": {"limit": "…", "margin_si": 0.2, "margin_low_si": 0.01, "unit_si": "m"},
 "as_written": {"verdict": "do_not_run", "why": "level of PIT-4 below 2.40 m", "finish_s": 3180},
 "fails": [], "set": ["s2.at=07:33", "s2.to=90 %"], "plans_tried": 749, "plans_judged": 5}

Exit code 0: a plan was found. 1: none. 2: bad usage or a bad file. 3: the calculation could not finish. 130:
interrupted; the best plan by then is kept and marked.`,
		Example: `  headfall new --demo cellar_free plant.yaml
  headfall plan plant.yaml --json plan.json
  headfall plan plant.yaml --samples 0             # without allowance`,
		Args: oneFile,
		RunE: func(c *cobra.Command, args []string) error { return a.plan(c.Context(), args[0], o) },
	}
	f := c.Flags()
	f.SortFlags = false
	o.bind(f)
	return c
}

func (a *app) plan(ctx context.Context, path string, o doubtful) error {
	p, err := a.open(ctx, path)
	if err != nil {
		return err
	}
	bar := a.progress("planning")
	opt, err := a.weigh(o, bar)
	if err != nil {
		return err
	}
	return conclude(ctx, a, bar, []string{path}, func(ctx context.Context) (*study.FoundPlan, error) {
		return study.Plan(ctx, p.load, opt)
	}, func(w io.Writer, res *study.FoundPlan, opt text.Options) error {
		return text.Plan(w, p.plant, res, opt)
	})
}
