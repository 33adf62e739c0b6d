package cli

import (
	"context"
	"io"

	"github.com/spf13/cobra"

	"headfall/cmd/internal/text"
	"headfall/network"
	"headfall/network/study"
)

func init() { register(groupWhat, newSize) }

type sizeOptions struct {
	doubtful
	vary, from, to    string
	largest, smallest bool
	need              []string
}

func newSize(a *app) *cobra.Command {
	var o sizeOptions
	c := &cobra.Command{
		Use:   "size FILE --vary TAG.x --from A --to B",
		Short: "The largest or smallest value with which every limit holds",
		Long: `Size finds how far a number may go with every limit holding: an opening, a bore, a start level, a time.
Values all along are tried first, since holding may come and go; then the turning point is closed in on, the value is
rounded to what people set (openings and shares of travel to 5 %, times to minutes, else steps of 1, 2 or 5) on
the side that holds, and the rounded value is judged as run judges, doubts allowed for. Where that is too close
to call it goes a step further in.

--need asks for more than holding: "10 %" of every stated bound, "flow:SEWER=10 %" or "level:PIT=150 mm" of one.

JSON: {"schema": 1, "command": "size", "exit_code": 0, "complete": true, "found": true, "name": "s1.to",
 "unit_si": "1", "looking_for": "largest", "value_si": 0.5, "as_written": "50 %", "edge_si": 0.564,
 "edge_as_written": "56.3 %", "beyond": "flow of SEWER below 18 m3/h", "holds_si": [[0.229, 0.564]],
 "next_step": "55 %", "next_step_fails": "flow of SEWER … is too close to call with the doubts allowed for",
 "verdict": "run", "smallest_margin": {"limit": "…", "margin_si": 0.0006, "margin_low_si": 0.0002, "unit_si": "m3/s"},
 "scan": [{"value_si": 0.05, "holds": false, "why_not": "…", "margin_share": -0.3}], …}

Exit code 0: something was found. 1: nothing. 2: bad usage or a bad file. 3: the calculation could not finish.
130: interrupted; what was found is kept and marked.`,
		Example: `  headfall size plant.yaml --vary s1.to --from 10% --to 100%
  headfall size plant.yaml --vary L-1.pipe.bore --from 50mm --to 150mm --smallest
  headfall size plant.yaml --vary s1.at --from 06:00 --to 10:00 --need level:SUMP=0.2m`,
		Args: oneFile,
		RunE: func(c *cobra.Command, args []string) error { return a.size(c.Context(), args[0], o) },
	}
	f := c.Flags()
	f.SortFlags = false
	f.StringVar(&o.vary, "vary", "", "the number that is looked for, `TAG.x` as s1.to")
	f.StringVar(&o.from, "from", "", "least `VALUE` to look at")
	f.StringVar(&o.to, "to", "", "greatest `VALUE` to look at")
	f.BoolVar(&o.largest, "largest", false, "look for the largest value (so it does unless told otherwise)")
	f.BoolVar(&o.smallest, "smallest", false, "look for the smallest value")
	f.StringArrayVar(&o.need, "need", nil, "`MARGIN` wanted: '10 %', or of one limit flow:SEWER=10%; may be repeated")
	o.doubtful.bind(f)
	return c
}

func (a *app) size(ctx context.Context, path string, o sizeOptions) error {
	switch {
	case o.vary == "" || o.from == "" || o.to == "":
		return bad("as --vary s1.to --from 10% --to 100%", "size needs --vary, --from and --to")
	case o.largest && o.smallest:
		return bad("leave one of them out", "--largest and --smallest do not go together")
	}
	p, err := a.open(ctx, path)
	if err != nil {
		return err
	}
	bar := a.progress("sizing")
	opt, err := a.sizing(p.plant, o, bar)
	if err != nil {
		return err
	}
	return conclude(ctx, a, bar, []string{path}, func(ctx context.Context) (*study.SizeResult, error) {
		return study.Size(ctx, p.load, opt)
	}, func(w io.Writer, res *study.SizeResult, opt text.Options) error {
		return text.Size(w, p.plant, res, opt)
	})
}

// sizing reads what was asked for.
func (a *app) sizing(plant *network.Plant, o sizeOptions, bar *progress) (opt study.SizeOptions, err error) {
	opt = study.SizeOptions{Vary: o.vary, Smallest: o.smallest}
	if opt.Options, err = a.weigh(o.doubtful, bar); err != nil {
		return opt, err
	}
	for _, end := range []struct {
		flag, text string
		to         *float64
	}{{"--from", o.from, &opt.From}, {"--to", o.to, &opt.To}} {
		if *end.to, err = study.ValueOf(plant, o.vary, end.text); err != nil {
			return opt, bad("as --vary s1.to --from 10% --to 100%", "%s %s: %w", end.flag, end.text, err)
		}
	}
	for _, text := range o.need {
		n, err := study.ParseNeed(text)
		if err != nil {
			return opt, bad("as --need 10% or --need flow:SEWER=10%", "%w", err)
		}
		opt.Needs = append(opt.Needs, n)
	}
	return opt, nil
}
