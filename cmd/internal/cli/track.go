package cli

import (
	"context"
	"io"
	"strings"

	"github.com/spf13/cobra"

	"headfall/cmd/internal/text"
	"headfall/network"
	"headfall/network/study"
)

func init() { register(groupPlan, newTrack) }

type trackOptions struct {
	doubtful
	readings string
	done     []string
	pending  []string
}

func newTrack(a *app) *cobra.Command {
	var o trackOptions
	c := &cobra.Command{
		Use:   "track FILE --readings CSV",
		Short: "On the day: readings against the plan, and a fresh forecast",
		Long: `Track sets levels read on the day against what the plan expects: how fast each vessel drains over how fast it
should, when it will be empty now, and whether every limit still holds from the last reading on. Two readings of
a vessel are enough. It says what the readings look like: an outlet that plugs, a valve or a line-up that is not
as ordered, a gauge that is stuck.

The CSV has a header, time and then vessels or gauges with their units: time,T-1 [m],LT-2 [%]. Times are clocks
("06:20", "+1d 00:10") or durations from the plan's start. Steps count as done when the plan has them done;
--done s2=07:20 says when one was done, --not-done s2 that it is still to come.

JSON: {"schema": 1, "command": "track", "exit_code": 0, "complete": true, "pace": "slow", "rate_ratio": 0.82,
 "rate_of": "T-1", "now_s": 1800, "now": "2027-03-02T06:30:00",
 "vessels": {"T-1": {"readings": 2, "first_m": 5.4, "last_m": 5.0, "planned_m": 4.91, "expected_m": 4.92,
   "rate_ratio": 0.82, …}},
 "fitted": [{"name": "V-1.kv", "line": "L-1", "vessel": "T-1", "from_si": 75, "to_si": 60, "factor": 0.8, "met": true}],
 "forecast": {"verdict": "run", "why": "", "first_fail_at_s": null, "finish_s": 9710, "finish_low_s": 9500,
   "finish_high_s": 9900, "planned_finish_s": 9424, "emptied_at_s": {"T-1": 9710}, "limits": […]},
 "suspects": ["…"], "steps_taken_as_done": ["s1"],
 "rows": [{"time_s": 600, "clock": "…", "vessel": "T-1", "read_m": 5.4, "expected_m": 5.38, "difference_m": 0.02, …}]}

Exit code 0: every limit holds from the last reading on. 1: one will fail, or it is too close to call. 2: bad
usage or a bad file. 3: the calculation could not finish. 130: interrupted; what was found is kept and marked.`,
		Example: `  headfall track plant.yaml --readings day.csv
  headfall track plant.yaml --readings day.csv --done s1=06:04 --not-done s2`,
		Args: oneFile,
		RunE: func(c *cobra.Command, args []string) error { return a.track(c.Context(), args[0], o) },
	}
	f := c.Flags()
	f.SortFlags = false
	f.StringVar(&o.readings, "readings", "", "levels read, as a CSV `FILE` (- for standard input)")
	f.StringArrayVar(&o.done, "done", nil, "a step that was done, and when: `ID=TIME`; may be repeated")
	f.StringArrayVar(&o.pending, "not-done", nil, "`ID` of a step that was due and is still to come; may be repeated")
	o.bind(f)
	return c
}

func (a *app) track(ctx context.Context, path string, o trackOptions) error {
	p, err := a.open(ctx, path)
	if err != nil {
		return err
	}
	opt := study.TrackOptions{}
	if opt.Readings, err = a.readings(ctx, o.readings, path, p.plant); err != nil {
		return err
	}
	bar := a.progress("forecasting")
	if opt.Options, err = a.weigh(o.doubtful, bar); err != nil {
		return err
	}
	if err := o.steps(p.plant, &opt); err != nil {
		return err
	}
	return conclude(ctx, a, bar, []string{path, o.readings}, func(ctx context.Context) (*study.TrackResult, error) {
		return study.Track(ctx, p.load, opt)
	}, func(w io.Writer, res *study.TrackResult, opt text.Options) error { return text.Track(w, res, opt) })
}

// steps reads which steps were done and which are still to come.
func (o *trackOptions) steps(plant *network.Plant, opt *study.TrackOptions) error {
	opt.Done, opt.Pending = map[string]float64{}, map[string]bool{}
	for _, text := range o.done {
		id, when, ok := strings.Cut(text, "=")
		if !ok {
			return bad("as --done s2=07:20", "--done %s does not say when", text)
		}
		at, err := study.MomentOf(plant, strings.TrimSpace(when))
		if err != nil {
			return bad("as --done s2=07:20", "--done %s: %w", text, err)
		}
		opt.Done[strings.TrimSpace(id)] = at
	}
	for _, id := range o.pending {
		opt.Pending[strings.TrimSpace(id)] = true
	}
	return nil
}
