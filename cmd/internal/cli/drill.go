package cli

import (
	"context"

	"github.com/spf13/cobra"

	"headfall/elements/quantity"
	"headfall/network/study"
)

func init() { register(groupWhat, newDrill) }

type drillOptions struct {
	many
	pairs       bool
	late, early string
}

func newDrill(a *app) *cobra.Command {
	var o drillOptions
	c := &cobra.Command{
		Use:   "drill FILE",
		Short: "Rehearse what can go wrong, one fault at a time",
		Long: `Drill runs the plan again with one thing wrong at a time: every step late, early, not done, stopped half-way;
every hold at its longest and not signed; every valve stuck shut, half open and open; each normally shut
valve left open; every pump failed or weak; every vent half and wholly blocked; check valves leaking; every
line clogging. Where a limit fails and an alarm with a response comes, the response is calculated too.

What fails is ranked by the time there is to act: from the first alarm that comes, else from the fault, to the
first limit that fails and would not have failed in the plan. Then follow the earliest and the latest time of
each step with which every limit holds, all else as planned.

JSON: one object; each of its cases is as
  {"case": "V-1 is stuck open", "kind": "valve_stuck", "target": "V-1", "verdict": "fails", "as_planned": false,
   "first_fail_at_s": 2405.2, "limit": "level of SUMP below 1.9 m", "time_to_act_s": 240.1,
   "since": "alarm high of SUMP", "need_s": 135, "answered": "holds", "fails": 1, "not_reached": [],
   "spilled_m3": 0, "worst_headroom_of": "SUMP", "worst_headroom_m": 0.21}
and each of its steps as
  {"id": "s2", "says": "OPEN V-2 fully", "planned_at_s": 1200, "earliest_at_s": 840.5, "latest_at_s": 3120,
   "latest_is_end": false, "earliest_is_first_possible": false}

Exit code 0: every limit holds in the plan itself. 1: one fails there. 2: bad usage or a bad file. 3: the
calculation could not finish. 130: interrupted; what was done is kept and marked.`,
		Example: `  headfall drill plant.yaml
  headfall drill plant.yaml --pairs --json drill.json
  headfall drill plant.yaml --html drill.html
  headfall drill plant.yaml --shard 2/8 --json part-2.jsonl`,
		Args: oneFile,
		RunE: func(c *cobra.Command, args []string) error { return a.drill(c.Context(), args[0], o) },
	}
	f := c.Flags()
	f.SortFlags = false
	f.BoolVar(&o.pairs, "pairs", false, "also every two faults together")
	f.BoolVar(&o.all, "all", false, "print every rehearsal that fails")
	f.StringVar(&o.late, "late", "30 min", "how late steps are: a `TIME`")
	f.StringVar(&o.early, "early", "15 min", "how early steps are: a `TIME`")
	o.many.bind(f)
	return c
}

func (a *app) drill(ctx context.Context, path string, o drillOptions) error {
	opt := study.DrillOptions{Pairs: o.pairs}
	for _, t := range []struct {
		flag, text string
		to         *float64
	}{{"--late", o.late, &opt.Late}, {"--early", o.early, &opt.Early}} {
		v, err := quantity.ParseTime(t.text)
		if err != nil || v.SI <= 0 {
			return bad("as "+t.flag+" '20 min'", "%s %q is not a length of time", t.flag, t.text)
		}
		*t.to = v.SI
	}
	p, err := a.open(ctx, path)
	if err != nil {
		return err
	}
	bar := a.progress("rehearsing")
	if opt.Common, err = a.common(o.many, bar); err != nil {
		return err
	}
	s := cases[study.DrillHead, study.DrillUnit]{command: "drill", many: o.many, shard: opt.Shard, bar: bar}
	s.calculate = func(ctx context.Context) (*study.DrillPart, error) { return study.Drill(ctx, p.load, opt) }
	s.join = func(part *study.DrillPart) *study.Merged { return &study.Merged{Drill: study.DrillOf(part)} }
	return s.conclude(ctx, a, p)
}
