package cli

import (
	"context"
	"io"

	"github.com/spf13/cobra"

	"headfall/cmd/internal/text"
	"headfall/network/study"
)

func init() { register(groupWhat, newFit) }

type fitOptions struct {
	readings string
	vary     []string
}

func newFit(a *app) *cobra.Command {
	var o fitOptions
	c := &cobra.Command{
		Use:   "fit FILE --readings CSV --vary TAG.x",
		Short: "Calibrate coefficients from a drain test",
		Long: `Fit finds the coefficients with which the plant's levels run through the readings of a test: robust least
squares, so that a few wrong readings do not matter. It gives each value with its 95 % band, by the scatter of
the readings alone and with the doubts of what was not fitted; it says when the readings cannot tell two numbers
apart, and down to which level the value was tested.

The CSV has a header, time and then vessels or gauges with their units: time,T-1 [m],LT-2 [%]. Times are clocks
("06:20", "+1d 00:10") or durations from the plan's start. Lines that begin with # are words.

JSON: {"schema": 1, "command": "fit", "verdict": "fitted", "exit_code": 0, "complete": true,
 "values": [{"name": "L-1.orifice.cd", "unit_si": "1", "value_si": 0.6201, "low_si": 0.615, "high_si": 0.625,
   "low_with_doubts_si": 0.58, "high_with_doubts_si": 0.66, "was_si": 0.65, "says": "0.62 ± 0.04",
   "pulled_by": [{"name": "V-1.kv", "by_si": -0.03}]}],
 "readings_used": 20, "readings": 20, "scatter_m": 0.0048, "persistence": 0.1, "condition": 1,
 "pairs": [], "tested": {"T-1": {"low_m": 0.35, "high_m": 2.5, "from_s": 0, "to_s": 1200}},
 "warnings": ["do not use it below …"],
 "rows": [{"time_s": 60, "vessel": "T-1", "read_m": 2.38, "fitted_m": 2.384, "weight": 0.97}], …}

Exit code 0: fitted. 1: the readings do not tell. 2: bad usage or a bad file. 3: the calculation could not finish.
130: interrupted; what was found is kept and marked.`,
		Example: `  headfall fit plant.yaml --readings test.csv --vary V-1.kv
  headfall fit plant.yaml --readings test.csv --vary V-1.kv --vary T-1.level --json fit.json`,
		Args: oneFile,
		RunE: func(c *cobra.Command, args []string) error { return a.fit(c.Context(), args[0], o) },
	}
	f := c.Flags()
	f.SortFlags = false
	f.StringVar(&o.readings, "readings", "", "levels read, as a CSV `FILE` (- for standard input)")
	f.StringSliceVar(&o.vary, "vary", nil, "a number to be fitted, `TAG.x` as V-1.kv; may be repeated")
	return c
}

func (a *app) fit(ctx context.Context, path string, o fitOptions) error {
	if len(o.vary) == 0 {
		return bad("as --vary V-1.kv", "fit needs --vary TAG.x: what is to be fitted")
	}
	p, err := a.open(ctx, path)
	if err != nil {
		return err
	}
	list, err := a.readings(ctx, o.readings, path, p.plant)
	if err != nil {
		return err
	}
	bar := a.progress("fitting")
	opt := study.FitOptions{Model: a.opt.calculation(), Workers: a.opt.workers, Vary: o.vary, Readings: list, Progress: bar.done}
	return conclude(ctx, a, bar, []string{path, o.readings}, func(ctx context.Context) (*study.FitResult, error) {
		return study.Fit(ctx, p.load, opt)
	}, func(w io.Writer, res *study.FitResult, opt text.Options) error { return text.Fit(w, p.plant, res, opt) })
}
