package cli

import (
	"context"
	"io"

	"github.com/spf13/cobra"

	"headfall/cmd/internal/text"
	"headfall/network"
	"headfall/viz"
	"headfall/viz/export"
)

func init() { register(groupPlan, newRun) }

// runOptions are where the answer goes.
type runOptions struct {
	html, csv, xlsx string
	noReport        bool
}

func newRun(a *app) *cobra.Command {
	var o runOptions
	c := &cobra.Command{
		Use:   "run FILE",
		Short: "Answer whether the sequence can run as written",
		Long: `Run calculates the whole plan and answers in the first words: RUN, DO NOT RUN, TOO CLOSE TO CALL
or NOT JUDGED. Then follow the first failure in clock time, the smallest margin with its band, when each
vessel is empty, what runs backwards, the headroom of every vessel, and what the answer rests on.

The report goes to FILE's name with .html in the working folder. With - as a PATH that file goes
to standard output and the text to standard error.

JSON: SI units, the unit in each key. "series" holds every level, flow and opening over time, "series_band" the 5, 50
and 95 % points of each level over the samples, at about a hundred moments and at the steps:
  {"time_s": [0, 150], "level_m": {"T-1": {"low": [4.15, 3.9], "mid": [4.2, 4.0], "high": [4.25, 4.1]}}}

Exit code 0: every limit holds. 1: a limit fails, a step was never reached, or too close to call.
2: bad usage or a bad file, nothing written. 3: the calculation could not finish. 130: interrupted;
what was computed is kept and marked.`,
		Example: `  headfall run plant.yaml
  headfall run plant.yaml --case wide --set V-1.kv=80 --no-report
  headfall run plant.yaml --json answer.json --csv series.csv --xlsx plant.xlsx
  headfall run - --json - < plant.yaml`,
		Args: oneFile,
		RunE: func(c *cobra.Command, args []string) error { return a.run(c.Context(), args[0], o) },
	}
	f := c.Flags()
	f.SortFlags = false
	f.StringVar(&o.html, "html", "", "write the report to `PATH` instead")
	f.BoolVar(&o.noReport, "no-report", false, "write no report")
	f.StringVar(&o.csv, "csv", "", "write the series as CSV to `PATH`")
	f.StringVar(&o.xlsx, "xlsx", "", "write a spreadsheet to `PATH`")
	return c
}

func (a *app) run(ctx context.Context, path string, o runOptions) error {
	if o.html != "" && o.noReport {
		return bad("leave one of them out", "--html and --no-report do not go together")
	}
	src, err := a.read(ctx, path)
	if err != nil {
		return err
	}
	if o.html == "" && !o.noReport {
		o.html = src.base() + ".html"
	}
	plant, err := a.load(src, &a.opt)
	if err != nil {
		return err
	}
	var res *network.Result
	files := o.files(a, plant, &res)
	if err := files.check(src.path); err != nil {
		return err
	}
	if res, err = a.answer(ctx, src, plant); err != nil {
		return err
	}
	a.settled = res.ExitCode
	if err := files.save(a.Out); err != nil {
		return err
	}
	if err := text.Run(a.words(files), plant, res, a.page(o, files)); err != nil {
		return err
	}
	return code(res.ExitCode)
}

// files lists what is to be written; res is there when they are.
func (o runOptions) files(a *app, plant *network.Plant, res **network.Result) outputs {
	var files outputs
	files.add(o.html, func(w io.Writer) error { return viz.Write(w, viz.Page{Plant: plant, Result: *res}) })
	files.add(a.opt.json, func(w io.Writer) error { return export.JSON(w, *res) })
	files.add(o.csv, func(w io.Writer) error { return export.CSV(w, plant, *res) })
	files.add(o.xlsx, func(w io.Writer) error { return export.XLSX(w, plant, *res) })
	return files
}

// words is where the text goes: to standard error when a file takes standard output.
func (a *app) words(files outputs) io.Writer {
	if files.toOut() {
		return a.Err
	}
	return a.Out
}

func (a *app) page(o runOptions, files outputs) text.Options {
	opt := text.Options{Width: a.Width, Colour: a.colour() && !files.toOut(), Quiet: a.opt.quiet, Report: o.html}
	for _, f := range files {
		if f.path != o.html && f.path != "-" {
			opt.Saved = append(opt.Saved, f.path)
		}
	}
	if o.html == "-" {
		opt.Report = "on standard output"
	}
	return opt
}
